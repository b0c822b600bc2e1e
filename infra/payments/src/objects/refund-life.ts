import type Stripe from 'stripe';
import { postBalance, totalMinor } from '../core/balance.js';
import { refused } from '../core/errors.js';
import { newId } from '../core/ids.js';
import { PLATFORM } from '../core/store.js';
import type { Work } from '../http/call.js';
import { refundableMinor } from './charge-life.js';
import { idOf } from './common.js';
import { cardMemory, testCardOf } from './payment-method-source.js';

/** A card whose refund fails does so a little later, as a bank's answer would. */
const REFUND_FAILS_AFTER_S = 5;

export interface RefundOrder {
  charge: Stripe.Charge;
  amountMinor: number;
  reason: Stripe.Refund.Reason | null;
  metadata: Stripe.Metadata;
}

/** Gives money back to the card: at once, or when the balance can bear it. */
export function makeRefund(work: Work, order: RefundOrder): Stripe.Refund {
  const { charge, amountMinor } = order;
  checkRefundable(charge, amountMinor, hasOpenDispute(work, charge));
  const enough = totalMinor(work.desk, work.account, charge.currency) >= amountMinor;
  const refund: Stripe.Refund = {
    id: newId('re'),
    object: 'refund',
    amount: amountMinor,
    balance_transaction: null,
    charge: charge.id,
    created: work.desk.clock.nowS(),
    currency: charge.currency,
    customer: idOf(charge.customer),
    customer_account: null,
    destination_details: {
      type: 'card',
      card: { reference_status: 'pending', reference_type: 'acquirer_reference_number', type: 'refund' },
    },
    metadata: order.metadata,
    payment_intent: idOf(charge.payment_intent),
    payment_method: charge.payment_method,
    reason: order.reason,
    receipt_number: null,
    source_transfer_reversal: null,
    status: enough ? 'succeeded' : 'pending',
    transfer_reversal: null,
    ...(enough ? {} : { pending_reason: 'insufficient_funds' as const }),
  };
  const booked = enough ? bookRefund(work, refund, charge) : refund;
  work.desk.insert('refund', booked, work.account);
  const refundedMinor = charge.amount_refunded + amountMinor;
  const after: Stripe.Charge = { ...charge, amount_refunded: refundedMinor, refunded: refundedMinor === charge.amount };
  work.desk.store.save<'charge'>(after);
  work.desk.emit('refund.created', booked, work.account);
  work.desk.emit('charge.refunded', after, work.account, {
    amount_refunded: charge.amount_refunded,
    refunded: charge.refunded,
  });
  if (enough) failLaterIfAsked(work, booked);
  return booked;
}

/** Carries out refunds that waited for money, oldest first, as far as the balance reaches. */
export function settlePendingRefunds(work: Work): void {
  const waiting = work.desk.store
    .list('refund', { account: work.account, where: { status: 'pending' }, limit: 1000 })
    .items.reverse();
  for (const refund of waiting) {
    if (totalMinor(work.desk, work.account, refund.currency) < refund.amount) continue;
    const charge = work.desk.get('charge', idOf(refund.charge) ?? '', work.account);
    const { pending_reason: _settled, ...rest } = refund;
    const booked = bookRefund(work, { ...rest, status: 'succeeded' }, charge);
    work.desk.store.save<'refund'>(booked);
    work.desk.emit('refund.updated', booked, work.account, { status: 'pending' });
    failLaterIfAsked(work, booked);
  }
}

/** The payer's bank could not take the money; it comes back to the balance and the charge counts as not refunded. */
export function failRefund(work: Work, refundId: string): void {
  const refund = work.desk.store.find('refund', refundId, work.account);
  if (refund?.status !== 'succeeded') return;
  const charge = work.desk.get('charge', idOf(refund.charge) ?? '', work.account);
  const row = postBalance(work.desk, {
    account: work.account,
    type: 'refund_failure',
    reportingCategory: 'refund_failure',
    amountMinor: refund.amount,
    currency: refund.currency,
    sourceId: refund.id,
  });
  const failed: Stripe.Refund = {
    ...refund,
    status: 'failed',
    failure_reason: 'lost_or_stolen_card',
    failure_balance_transaction: row.id,
  };
  work.desk.store.save<'refund'>(failed);
  work.desk.store.save<'charge'>({
    ...charge,
    amount_refunded: charge.amount_refunded - refund.amount,
    refunded: false,
  });
  work.desk.emit('refund.failed', failed, work.account);
  work.desk.emit('charge.refund.updated', failed, work.account);
}

/** A dispute that was won leaves the charge as it was; any other one has taken its money already. */
function hasOpenDispute(work: Work, charge: Stripe.Charge): boolean {
  const disputes = work.desk.store.list('dispute', {
    account: work.account,
    where: { charge: charge.id },
    limit: 10,
  }).items;
  return disputes.some((dispute) => dispute.status !== 'won');
}

function checkRefundable(charge: Stripe.Charge, amountMinor: number, disputed: boolean): void {
  if (charge.status !== 'succeeded' || !charge.captured) {
    throw refused(
      'This charge has not been captured, so there is nothing to refund. Cancel its PaymentIntent instead.',
      {
        code: 'charge_not_refundable',
      },
    );
  }
  if (disputed) throw refused('This charge is disputed, so it cannot be refunded.', { code: 'charge_disputed' });
  const left = refundableMinor(charge);
  if (left === 0) throw refused(`Charge ${charge.id} has already been refunded.`, { code: 'charge_already_refunded' });
  if (amountMinor > left) {
    throw refused(`Refund amount (${amountMinor}) is greater than unrefunded amount on charge (${left}).`, {
      param: 'amount',
    });
  }
}

function bookRefund(work: Work, refund: Stripe.Refund, charge: Stripe.Charge): Stripe.Refund {
  const paidIn = work.desk.get('balance_transaction', idOf(charge.balance_transaction) ?? '', work.account);
  const row = postBalance(work.desk, {
    account: work.account,
    type: charge.id.startsWith('py_') ? 'payment_refund' : 'refund',
    reportingCategory: 'refund',
    amountMinor: -refund.amount,
    currency: refund.currency,
    sourceId: refund.id,
    description: `Refund of ${charge.id}`,
    availableOnS: paidIn.available_on,
  });
  return { ...refund, balance_transaction: row.id };
}

function failLaterIfAsked(work: Work, refund: Stripe.Refund): void {
  const methodId = idOf(refund.payment_method);
  if (work.account !== PLATFORM || methodId === null) return;
  if (testCardOf(cardMemory(work, methodId)).refund === 'fails') {
    work.desk.schedule('refund_fails', refund.id, work.desk.clock.nowS() + REFUND_FAILS_AFTER_S);
  }
}
