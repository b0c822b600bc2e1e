import { Anchor } from '@mantine/core';
import type { Booking } from '@skyberth/shared';
import { Link } from 'react-router-dom';
import { RefundSteps } from '../../drawing/curves/refund-steps.js';
import { paths } from '../../lib/paths.js';
import { formatNumber, formatTime } from '../../ui/format.js';
import { MoneyText } from '../../ui/values.js';
import classes from './contact.module.css';

const STATE_WORDS: Readonly<Record<Booking['payment']['state'], string>> = {
  none: 'Nothing was paid or reserved.',
  'waiting for the buyer': 'The payment was begun and not finished; nothing is charged.',
  authorised: 'Reserved on the card; taken once the contact has taken place.',
  capturing: 'Being taken from the card.',
  captured: 'Taken from the card.',
  releasing: 'Whatever was reserved is being given back.',
  released: 'The reservation was given back; nothing was charged.',
  refunding: 'Being refunded.',
  refunded: 'Refunded.',
  failed: 'The payment failed.',
};

/** The price line by line, where the money is, and the invoice. */
export function MoneySection({ booking }: { readonly booking: Booking }) {
  const { quote, payment } = booking;
  const { currency } = quote;
  return (
    <section aria-labelledby="money-title">
      <h2 id="money-title" className={classes.heading}>
        Money
      </h2>
      <table className={classes.sum}>
        <tbody>
          {quote.lines.map((line) => (
            <Row key={line.label + line.detail} label={line.label} detail={line.detail}>
              <MoneyText amountMinor={line.amountMinor} currency={currency} />
            </Row>
          ))}
          {quote.vat.amountMinor !== 0 && (
            <Row label={quote.vat.note} detail="">
              <MoneyText amountMinor={quote.vat.amountMinor} currency={currency} />
            </Row>
          )}
        </tbody>
        <tfoot>
          <Row label="To pay" detail={quote.vat.amountMinor === 0 ? quote.vat.note : ''}>
            <MoneyText amountMinor={quote.toPayMinor} currency={currency} />
          </Row>
        </tfoot>
      </table>
      <p>
        {STATE_WORDS[payment.state]} {payment.card && `Card: ${payment.card}.`} {payment.failure}
        {payment.capturedMinor > 0 && (
          <>
            {' '}
            Taken: <MoneyText amountMinor={payment.capturedMinor} currency={payment.currency} />.
          </>
        )}
        {payment.refundedMinor > 0 && (
          <>
            {' '}
            Refunded: <MoneyText amountMinor={payment.refundedMinor} currency={payment.currency} />.
          </>
        )}
      </p>
      {booking.invoiceId && (
        <p>
          <Anchor component={Link} to={paths.invoice(booking.invoiceId)}>
            Invoice {booking.invoiceNumber}
          </Anchor>
        </p>
      )}
      {booking.actions.includes('cancel') && <Ladder booking={booking} />}
    </section>
  );
}

function Row({ label, detail, children }: { label: string; detail: string; children: React.ReactNode }) {
  return (
    <tr>
      <th scope="row">
        {label} {detail && <small>{detail}</small>}
      </th>
      <td>{children}</td>
    </tr>
  );
}

function Ladder({ booking }: { readonly booking: Booking }) {
  const { ladder } = booking.quote;
  if (ladder.length === 0) return null;
  return (
    <>
      <h3 className={classes.small}>Back to the buyer on cancelling, agreed when it was held</h3>
      <RefundSteps
        steps={ladder.map((step) => ({
          percent: step.refundPercent,
          untilText:
            step.untilUtc === null
              ? 'after that'
              : step.hoursBeforeAos < 1
                ? `till ${formatTime(Date.parse(step.untilUtc))}`
                : `till ${formatNumber(step.hoursBeforeAos, step.hoursBeforeAos % 1 === 0 ? 0 : 1)} h`,
        }))}
      />
    </>
  );
}
