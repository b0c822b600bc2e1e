import type { Dispute } from '@skyberth/shared';
import { DayTime } from '../../ui/day-time.js';
import { MoneyText } from '../../ui/values.js';
import { shareText } from './dispute-words.js';
import classes from './disputes.module.css';

/** What was decided, and what was booked for it. */
export function Decisions({ dispute }: { readonly dispute: Dispute }) {
  if (dispute.decisions.length === 0)
    return (
      <section className={classes.card}>
        <h2>Not decided yet</h2>
        <p className={classes.by}>
          <MoneyText amountMinor={dispute.heldMinor} currency={dispute.currency} /> of the station's earnings are set
          aside. A decision is due by <DayTime atMs={Date.parse(dispute.decideByUtc)} />.
        </p>
      </section>
    );
  return dispute.decisions.map((one) => (
    <section key={one.round} className={classes.card}>
      <h2>
        {one.round === 1 ? 'Decision' : 'Decision on the appeal'}: {shareText(one.refundBasisPoints)} back
      </h2>
      <p className={classes.by}>
        {one.byName}, <DayTime atMs={Date.parse(one.atUtc)} />
        {one.refundBasisPoints > 0 && `; borne by ${one.borneBy === 'owner' ? 'the station' : 'the marketplace'}`}
      </p>
      <p style={{ margin: 0, whiteSpace: 'pre-line' }}>{one.text}</p>
      <table className={classes.money}>
        <tbody>
          {one.effect.lines.map((line) => (
            <tr key={line.words}>
              <td style={{ whiteSpace: 'normal', color: 'inherit' }}>{line.words}</td>
              <td>
                <MoneyText amountMinor={line.amountMinor} currency={one.effect.currency} />
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  ));
}
