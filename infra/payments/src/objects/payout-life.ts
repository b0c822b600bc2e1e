import type Stripe from 'stripe';
import { availableMinor, postBalance } from '../core/balance.js';
import { refused } from '../core/errors.js';
import type { Work } from '../http/call.js';

export function paidPayout(work: Work, payout: Stripe.Payout): Stripe.Payout {
  const paid: Stripe.Payout = { ...payout, status: 'paid' };
  work.desk.store.save<'payout'>(paid);
  work.desk.emit('payout.paid', paid, work.account);
  return paid;
}

/** The bank took the money at the appointed time. */
export function arrivePayout(work: Work, payoutId: string): void {
  const payout = work.desk.store.find('payout', payoutId, work.account);
  if (payout?.status === 'pending' || payout?.status === 'in_transit') paidPayout(work, payout);
}

/** The bank sent the money back, or the payout was called off before it left: the balance has it again. */
export function returnPayout(work: Work, payout: Stripe.Payout, outcome: 'failed' | 'canceled'): Stripe.Payout {
  const possible = outcome === 'failed' ? ['pending', 'in_transit', 'paid'] : ['pending'];
  if (!possible.includes(payout.status))
    throw refused(`This payout is ${payout.status}, so it cannot become ${outcome}.`);
  const row = postBalance(work.desk, {
    account: work.account,
    type: outcome === 'failed' ? 'payout_failure' : 'payout_cancel',
    reportingCategory: 'payout_reversal',
    amountMinor: payout.amount,
    currency: payout.currency,
    sourceId: payout.id,
  });
  work.desk.unschedule('payout_arrives', payout.id);
  const returned: Stripe.Payout = {
    ...payout,
    status: outcome,
    failure_balance_transaction: row.id,
    ...(outcome === 'failed'
      ? { failure_code: 'account_closed', failure_message: 'The bank account has been closed.' }
      : {}),
  };
  work.desk.store.save<'payout'>(returned);
  work.desk.emit(outcome === 'failed' ? 'payout.failed' : 'payout.canceled', returned, work.account);
  return returned;
}

export function checkAvailable(work: Work, amountMinor: number, currency: string): void {
  const available = availableMinor(work.desk, work.account, currency);
  if (amountMinor <= available) return;
  throw refused(
    `You have insufficient available funds: ${amountMinor} ${currency} asked for, ${available} available.`,
    {
      code: 'balance_insufficient',
      param: 'amount',
    },
  );
}
