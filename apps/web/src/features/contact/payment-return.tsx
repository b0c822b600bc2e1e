import { Loader } from '@mantine/core';
import type { Booking } from '@skyberth/shared';
import { useNow } from '../../lib/use-now.js';
import { formatDayTime } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { Sign } from '../../ui/signs.js';
import classes from './contact.module.css';

/** What became of the payment, after the payment page or a saved card: waits for the provider's word and says it. */
export function PaymentReturn({ booking }: { readonly booking: Booking }) {
  const nowMs = useNow();
  if (booking.payment.state === 'failed')
    return (
      <ProblemNotice title="The payment was not agreed to">
        {booking.payment.failure ?? 'The bank gave no reason.'} Nothing was charged. Pay again while the hold lasts.
      </ProblemNotice>
    );
  if (booking.state === 'held') {
    const isOver = booking.holdEndsUtc !== null && nowMs >= Date.parse(booking.holdEndsUtc);
    return (
      <div className={classes.notice} role="status">
        <Loader size="xs" type="dots" />
        {isOver
          ? 'The hold has run out before the payment service confirmed. If the card was charged, it is given back by itself.'
          : 'Waiting for the payment service to confirm. This takes a few seconds; the hold goes on meanwhile.'}
      </div>
    );
  }
  const words: Partial<Record<Booking['state'], string>> = {
    confirmed: 'Paid and confirmed. The sum is reserved on the card and taken once the contact has taken place.',
    'awaiting owner': `Paid. ${booking.ownerName} has been asked${booking.answerByUtc ? ` and answers by ${formatDayTime(Date.parse(booking.answerByUtc))} UTC` : ''}; the sum is only reserved until then.`,
  };
  const sentence = words[booking.state];
  if (sentence)
    return (
      <div className={classes.notice} data-tone="good" role="status">
        <Sign shape="check" />
        {sentence}
      </div>
    );
  if (booking.state === 'lapsed')
    return (
      <ProblemNotice title="The hold ran out first">
        Nothing was charged, or it is given back by itself. Find the pass again if it is still for sale.
      </ProblemNotice>
    );
  return null;
}
