import type { ResponseOf, routes } from '@skyberth/shared';
import { formatMoney } from '../../ui/format.js';
import { Sign } from '../../ui/signs.js';
import classes from './reconciliation.module.css';

type View = ResponseOf<typeof routes.reconciliation>;

/** Two vessels a currency: at one level when provider and ledger agree, else the difference stands between them. */
export function Levels({ currencies, ageing }: Pick<View, 'currencies' | 'ageing'>) {
  const open = ageing.reduce((sum, band) => sum + band.movements, 0);
  return (
    <div className={classes.levels}>
      {currencies.map((one) => (
        <section key={one.currency} className={classes.level} aria-label={`Provider and ledger in ${one.currency}`}>
          <Vessels one={one} />
          <dl>
            <div>
              <dt>Provider</dt>
              <dd>{formatMoney({ amountMinor: one.providerMinor, currency: one.currency })}</dd>
            </div>
            <div>
              <dt>Ledger</dt>
              <dd>{formatMoney({ amountMinor: one.ledgerMinor, currency: one.currency })}</dd>
            </div>
          </dl>
          <p data-level={one.differenceMinor === 0 || undefined}>
            <Sign shape={one.differenceMinor === 0 ? 'check' : 'square'} />
            {differenceSentence(one)}
          </p>
        </section>
      ))}
      {open > 0 && (
        <section className={classes.level} aria-label="Age of open movements">
          <dl>
            {ageing.map((band) => (
              <div key={band.label}>
                <dt>{band.label}</dt>
                <dd>{band.movements}</dd>
              </div>
            ))}
          </dl>
          <p>Open movements by age</p>
        </section>
      )}
    </div>
  );
}

function differenceSentence({ currency, differenceMinor, explainedMinor }: View['currencies'][number]): string {
  if (differenceMinor === 0) return 'Level to the cent.';
  const money = (amountMinor: number) => formatMoney({ amountMinor, currency });
  if (differenceMinor === explainedMinor)
    return `They differ by ${money(differenceMinor)}, all of it in the list below.`;
  return `They differ by ${money(differenceMinor)}; ${money(differenceMinor - explainedMinor)} of it have no cause. Stop and look.`;
}

const HEIGHT = 52;

function Vessels({ one }: { readonly one: View['currencies'][number] }) {
  const most = Math.max(1, Math.abs(one.providerMinor), Math.abs(one.ledgerMinor));
  const depth = (minor: number) => (Math.max(0, minor) / most) * (HEIGHT - 10);
  return (
    <svg viewBox={`0 0 96 ${HEIGHT}`} width="96" height={HEIGHT} aria-hidden="true" focusable="false">
      {[one.providerMinor, one.ledgerMinor].map((minor, index) => (
        <g key={index === 0 ? 'provider' : 'ledger'} transform={`translate(${index * 52} 0)`}>
          <rect x="3" y={HEIGHT - 3 - depth(minor)} width="38" height={depth(minor)} fill="var(--sk-shoal)" />
          <path d={`M2 2 V${HEIGHT - 2} H42 V2`} fill="none" stroke="var(--sk-ink)" strokeWidth="1.6" />
        </g>
      ))}
      <path
        d={`M44 ${HEIGHT - 3 - depth(one.providerMinor)} L54 ${HEIGHT - 3 - depth(one.ledgerMinor)}`}
        stroke={one.differenceMinor === 0 ? 'var(--sk-ink3)' : 'var(--sk-buoy-ink)'}
        strokeWidth="1.6"
        strokeDasharray="2 2"
      />
    </svg>
  );
}
