/** One bar: what of the settled money is sent, stays for the next run, is the fee, and goes back or aside. */
import type { PayoutRun } from '@skyberth/shared';
import { formatMoney } from '../../ui/format.js';
import classes from './payouts.module.css';

export function WhereItGoes({ run }: { readonly run: PayoutRun }) {
  const sum = (part: (line: PayoutRun['lines'][number]) => number) =>
    run.lines.reduce((total, line) => total + Math.max(0, part(line)), 0);
  const sent = ['ready', 'paying', 'paid'];
  const parts = [
    { key: 'sent', label: 'Sent to owners', minor: run.sendsMinor },
    {
      key: 'stays',
      label: 'Stays for the next run',
      minor: sum((line) => (sent.includes(line.state) ? 0 : line.toPayMinor)),
    },
    { key: 'fee', label: 'Marketplace fee', minor: sum((line) => line.feeMinor) },
    { key: 'aside', label: 'Refunds, set aside', minor: sum((line) => line.refundMinor + line.reserveMinor) },
  ].filter((part) => part.minor > 0);
  if (parts.length === 0) return null;
  return (
    <section className={classes.where} aria-label="Where the money goes">
      <h2>Where the money goes</h2>
      <div className={classes.bar} aria-hidden="true">
        {parts.map((part) => (
          <span key={part.key} data-part={part.key} style={{ flexGrow: part.minor }} />
        ))}
      </div>
      <dl className={classes.legend}>
        {parts.map((part) => (
          <div key={part.key}>
            <dt>
              <span className={classes.swatch} data-part={part.key} />
              {part.label}
            </dt>
            <dd>{formatMoney({ amountMinor: part.minor, currency: run.currency })}</dd>
          </div>
        ))}
      </dl>
    </section>
  );
}
