import type Stripe from 'stripe';
import { postBalance, totalMinor } from '../core/balance.js';
import { refused } from '../core/errors.js';
import { newId } from '../core/ids.js';
import { PLATFORM } from '../core/store.js';
import type { Work } from '../http/call.js';
import { blankCharge } from './charge-life.js';
import { idOf } from './common.js';
import { checkAvailable } from './payout-life.js';

export interface TransferOrder {
  amountMinor: number;
  currency: string;
  destination: Stripe.Account;
  source: Stripe.Charge | undefined;
  transferGroup: string | null;
  description: string | null;
  metadata: Stripe.Metadata;
}

/** Moves money from the platform to a connected account. */
export function makeTransfer(work: Work, order: TransferOrder): Stripe.Transfer {
  if (order.destination.capabilities?.transfers !== 'active') {
    throw refused('Your destination account needs to have the transfers capability enabled.', {
      code: 'insufficient_capabilities_for_transfer',
      param: 'destination',
    });
  }
  if (order.source) checkSource(work, order, order.source);
  else checkAvailable(work, order.amountMinor, order.currency);
  const id = newId('tr');
  const availableOnS = order.source ? paidInOn(work, order.source) : work.desk.clock.nowS();
  const out = postBalance(work.desk, {
    account: PLATFORM,
    type: 'transfer',
    reportingCategory: 'transfer',
    amountMinor: -order.amountMinor,
    currency: order.currency,
    sourceId: id,
    description: order.description,
    availableOnS,
  });
  const payment = receive(work, order, availableOnS);
  const transfer: Stripe.Transfer = {
    id,
    object: 'transfer',
    amount: order.amountMinor,
    amount_reversed: 0,
    balance_transaction: out.id,
    created: work.desk.clock.nowS(),
    currency: order.currency,
    description: order.description,
    destination: order.destination.id,
    destination_payment: payment.id,
    livemode: false,
    metadata: order.metadata,
    reversals: { object: 'list', data: [], has_more: false, url: `/v1/transfers/${id}/reversals` },
    reversed: false,
    source_transaction: order.source?.id ?? null,
    source_type: 'card',
    transfer_group: order.transferGroup ?? order.source?.transfer_group ?? null,
  };
  work.desk.insert('transfer', transfer, PLATFORM);
  work.desk.store.save<'charge'>({ ...payment, source_transfer: id });
  work.desk.emit('transfer.created', transfer, PLATFORM);
  return transfer;
}

/** Takes transferred money back, as far as the connected account still has it. */
export function reverseTransfer(
  work: Work,
  transfer: Stripe.Transfer,
  amountMinor: number,
  metadata: Stripe.Metadata,
): Stripe.TransferReversal {
  const left = transfer.amount - transfer.amount_reversed;
  if (amountMinor > left) {
    throw refused(
      `Transfer reversal amount (${amountMinor}) is greater than unreversed amount on transfer (${left}).`,
      { param: 'amount' },
    );
  }
  const account = idOf(transfer.destination) ?? '';
  const there = totalMinor(work.desk, account, transfer.currency);
  if (there < amountMinor) {
    throw refused(
      `The connected account has ${there} ${transfer.currency} left, less than the ${amountMinor} to be taken back.`,
      {
        code: 'balance_insufficient',
        param: 'amount',
      },
    );
  }
  const id = newId('trr');
  const payment = work.desk.get('charge', idOf(transfer.destination_payment) ?? '', account);
  const postings = {
    currency: transfer.currency,
    sourceId: id,
    availableOnS: work.desk.get('balance_transaction', idOf(transfer.balance_transaction) ?? '', PLATFORM).available_on,
  };
  postBalance(work.desk, {
    ...postings,
    account,
    type: 'payment_refund',
    reportingCategory: 'transfer_reversal',
    amountMinor: -amountMinor,
  });
  const back = postBalance(work.desk, {
    ...postings,
    account: PLATFORM,
    type: 'transfer_refund',
    reportingCategory: 'transfer_reversal',
    amountMinor,
  });
  const reversal: Stripe.TransferReversal = {
    id,
    object: 'transfer_reversal',
    amount: amountMinor,
    balance_transaction: back.id,
    created: work.desk.clock.nowS(),
    currency: transfer.currency,
    destination_payment_refund: null,
    metadata,
    source_refund: null,
    transfer: transfer.id,
  };
  work.desk.insert('transfer_reversal', reversal, PLATFORM);
  const reversedMinor = transfer.amount_reversed + amountMinor;
  const after: Stripe.Transfer = {
    ...transfer,
    amount_reversed: reversedMinor,
    reversed: reversedMinor === transfer.amount,
    reversals: { ...transfer.reversals, data: [reversal, ...transfer.reversals.data] },
  };
  work.desk.store.save<'transfer'>(after);
  work.desk.store.save<'charge'>({
    ...payment,
    amount_refunded: reversedMinor,
    refunded: reversedMinor === payment.amount,
  });
  work.desk.emit('transfer.reversed', after, PLATFORM);
  return reversal;
}

/** A transfer tied to a charge may use that charge's money before it has settled, but never more than is left of it. */
function checkSource(work: Work, order: TransferOrder, source: Stripe.Charge): void {
  if (!source.captured || source.status !== 'succeeded') {
    throw refused('The source_transaction has not been captured.', {
      code: 'charge_invalid_parameter',
      param: 'source_transaction',
    });
  }
  if (source.currency !== order.currency) {
    throw refused(`The currency of source_transaction (${source.currency}) does not match ${order.currency}.`, {
      param: 'currency',
    });
  }
  const row = work.desk.store
    .sql(
      `SELECT coalesce(sum(json_extract(body, '$.amount') - json_extract(body, '$.amount_reversed')), 0) AS used
       FROM objects WHERE kind = 'transfer' AND json_extract(body, '$.source_transaction') = ?`,
    )
    .get(source.id) as { used: number };
  const left = source.amount - source.amount_refunded - row.used;
  if (order.amountMinor > left) {
    throw refused(
      `You have only ${Math.max(0, left)} ${source.currency} left of this charge to transfer, not ${order.amountMinor}.`,
      {
        code: 'balance_insufficient',
        param: 'amount',
      },
    );
  }
}

function paidInOn(work: Work, source: Stripe.Charge): number {
  return work.desk.get('balance_transaction', idOf(source.balance_transaction) ?? '', PLATFORM).available_on;
}

/** The transfer as the connected account sees it: a payment that came in. */
function receive(work: Work, order: TransferOrder, availableOnS: number): Stripe.Charge {
  const account = order.destination.id;
  const payment = blankCharge(work, 'py', order.amountMinor, order.currency);
  const row = postBalance(work.desk, {
    account,
    type: 'payment',
    reportingCategory: 'charge',
    amountMinor: order.amountMinor,
    currency: order.currency,
    sourceId: payment.id,
    availableOnS,
  });
  const received: Stripe.Charge = {
    ...payment,
    amount_captured: order.amountMinor,
    captured: true,
    balance_transaction: row.id,
  };
  return work.desk.insert('charge', received, account);
}
