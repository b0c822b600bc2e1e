import type { HomeView } from '@skyberth/shared';
import { Figure, Figures, MoneyText } from '../../ui/values.js';

/** A few sums, one line a currency: nothing is converted. */
export function MoneyGlance({ money }: { readonly money: HomeView['money'] }) {
  return (
    <section aria-labelledby="money">
      <h2 id="money">Money at a glance</h2>
      <Figures columns={1} ruled>
        {money.map(({ label, note, amounts }) => (
          <Figure
            key={label}
            label={label}
            note={note}
            size="large"
            value={
              amounts.length === 0
                ? 'nothing yet'
                : amounts.map((amount) => (
                    <div key={amount.currency}>
                      <MoneyText {...amount} />
                    </div>
                  ))
            }
          />
        ))}
      </Figures>
    </section>
  );
}
