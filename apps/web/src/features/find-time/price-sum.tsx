import type { Quote } from '@skyberth/shared';
import { MoneyText } from '../../ui/values.js';
import classes from './find-time.module.css';

/** The price as a sum that a person can follow, VAT and its reason included. */
export function PriceSum({ quote }: { readonly quote: Quote }) {
  const { currency, vat } = quote;
  return (
    <section className={classes.part} aria-label="Price">
      <table className={classes.sum}>
        <tbody>
          {quote.lines.map((line) => (
            <tr key={line.label + line.detail}>
              <th scope="row">
                {line.label} <small>{line.detail}</small>
              </th>
              <td>
                <MoneyText amountMinor={line.amountMinor} currency={currency} />
              </td>
            </tr>
          ))}
          {vat.amountMinor !== 0 && (
            <tr>
              <th scope="row">{vat.note}</th>
              <td>
                <MoneyText amountMinor={vat.amountMinor} currency={currency} />
              </td>
            </tr>
          )}
        </tbody>
        <tfoot>
          <tr>
            <th scope="row">To pay {vat.amountMinor === 0 && <small>{vat.note}</small>}</th>
            <td>
              <MoneyText amountMinor={quote.toPayMinor} currency={currency} />
            </td>
          </tr>
        </tfoot>
      </table>
    </section>
  );
}
