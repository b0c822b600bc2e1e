import type Stripe from 'stripe';
import { describe, expect, it } from 'vitest';
import { type Bench, bench, pay, refusal } from './testing.js';

const DAY_MS = 86_400_000;

async function owner({ stripe, hook }: Bench): Promise<Stripe.Account> {
  const account = await stripe.accounts.create({
    type: 'express',
    country: 'NO',
    email: 'owner@skerry.example',
    capabilities: { transfers: { requested: true } },
  });
  await hook(`accounts/${account.id}/activate`);
  return account;
}

describe('refunds', () => {
  it('give back a part, then the rest, and never more than was taken', async () => {
    const { stripe } = await bench();
    await pay(stripe, { amount: 50_000 });
    const held = await pay(stripe, { amount: 1000, capture_method: 'manual' });
    expect((await refusal(stripe.refunds.create({ payment_intent: held.id }))).code).toBe('charge_not_refundable');
    await stripe.paymentIntents.capture(held.id, { amount_to_capture: 600 });
    const part = await stripe.refunds.create({ payment_intent: held.id, amount: 250, reason: 'requested_by_customer' });
    expect(part).toMatchObject({ amount: 250, status: 'succeeded' });
    expect((await refusal(stripe.refunds.create({ payment_intent: held.id, amount: 351 }))).param).toBe('amount');
    await stripe.refunds.create({ payment_intent: held.id });
    expect(await stripe.charges.retrieve(String(part.charge))).toMatchObject({ refunded: true, amount_refunded: 1000 });
    expect((await refusal(stripe.refunds.create({ payment_intent: held.id }))).code).toBe('charge_already_refunded');
    const sum = (await stripe.refunds.list({ payment_intent: held.id })).data.reduce(
      (total, refund) => total + refund.amount,
      0,
    );
    expect(sum).toBe(600);
  });

  it('wait for money when the balance cannot bear them', async () => {
    const { stripe, hook } = await bench({ settlementDays: 1 });
    const paid = await pay(stripe, { amount: 1000 });
    // The fee is gone, so 960 are there: less than the 1000 to give back.
    const refund = await stripe.refunds.create({ payment_intent: paid.id });
    expect(refund).toMatchObject({
      status: 'pending',
      pending_reason: 'insufficient_funds',
      balance_transaction: null,
    });
    expect((await refusal(stripe.refunds.create({ payment_intent: paid.id }))).code).toBe('charge_already_refunded');
    await pay(stripe, { amount: 5000 });
    await hook('clock', { advanceMs: DAY_MS + 1000 });
    expect((await stripe.refunds.retrieve(refund.id)).status).toBe('succeeded');
  });

  it('can fail at the bank, and the money is there again', async () => {
    const { stripe, hook } = await bench();
    await pay(stripe, { amount: 50_000 });
    const paid = await pay(stripe, { amount: 1000, payment_method: 'pm_card_refundFail' });
    const before = await stripe.balance.retrieve();
    const refund = await stripe.refunds.create({ payment_intent: paid.id });
    await hook('clock', { advanceMs: 6000 });
    expect((await stripe.refunds.retrieve(refund.id)).status).toBe('failed');
    const after = await stripe.balance.retrieve();
    const total = (balance: Stripe.Balance): number =>
      (balance.available[0]?.amount ?? 0) + (balance.pending[0]?.amount ?? 0);
    expect(total(after)).toBe(total(before));
  });
});

describe('transfers', () => {
  it('need an account that is ready and money that has settled', async () => {
    const tools = await bench();
    const { stripe, hook } = tools;
    const unready = await stripe.accounts.create({ type: 'express', capabilities: { transfers: { requested: true } } });
    await pay(stripe, { amount: 10_000 });
    const send = (destination: string, amount: number, currency = 'eur') =>
      stripe.transfers.create({ amount, currency, destination });
    expect((await refusal(send(unready.id, 100))).code).toBe('insufficient_capabilities_for_transfer');
    const account = await owner(tools);
    expect((await refusal(send(account.id, 100))).code).toBe('balance_insufficient');
    await hook('clock', { advanceMs: 2 * DAY_MS + 1000 });
    expect((await refusal(send(account.id, 9826))).code).toBe('balance_insufficient');
    expect((await refusal(send(account.id, 100, 'usd'))).code).toBe('balance_insufficient');
    expect((await send(account.id, 9825)).amount).toBe(9825);
    expect((await stripe.balance.retrieve()).available).toMatchObject([{ amount: 0, currency: 'eur' }]);
    expect((await stripe.balance.retrieve({}, { stripeAccount: account.id })).available).toMatchObject([
      { amount: 9825 },
    ]);
    expect((await refusal(send(account.id, 1))).code).toBe('balance_insufficient');
  });

  it('tied to a charge go out before it settles, up to what is left of it', async () => {
    const tools = await bench();
    const { stripe } = tools;
    const account = await owner(tools);
    const paid = await pay(stripe, { amount: 10_000, transfer_group: 'BERTH-4' });
    const send = (amount: number, currency = 'eur') =>
      stripe.transfers.create({
        amount,
        currency,
        destination: account.id,
        source_transaction: String(paid.latest_charge),
      });
    expect((await refusal(send(100, 'usd'))).param).toBe('currency');
    expect(await send(8000)).toMatchObject({ transfer_group: 'BERTH-4', source_transaction: paid.latest_charge });
    expect((await refusal(send(2001))).code).toBe('balance_insufficient');
    expect((await stripe.balance.retrieve({}, { stripeAccount: account.id })).pending).toMatchObject([
      { amount: 8000 },
    ]);
  });

  it('come back in part and in full, but not when the owner was paid out', async () => {
    const tools = await bench({ settlementDays: 0 });
    const { stripe } = tools;
    const account = await owner(tools);
    await pay(stripe, { amount: 10_000 });
    const transfer = await stripe.transfers.create({ amount: 5000, currency: 'eur', destination: account.id });
    await stripe.transfers.createReversal(transfer.id, { amount: 1000 });
    expect((await refusal(stripe.transfers.createReversal(transfer.id, { amount: 4001 }))).param).toBe('amount');
    await stripe.payouts.create({ amount: 3000, currency: 'eur' }, { stripeAccount: account.id });
    expect((await refusal(stripe.transfers.createReversal(transfer.id))).code).toBe('balance_insufficient');
    await stripe.transfers.createReversal(transfer.id, { amount: 1000 });
    expect(await stripe.transfers.retrieve(transfer.id)).toMatchObject({ amount_reversed: 2000, reversed: false });
    expect((await stripe.transfers.listReversals(transfer.id)).data).toHaveLength(2);
  });
});

describe('payouts', () => {
  it('arrive after two days, or fail and come back', async () => {
    const { stripe, hook } = await bench({ settlementDays: 0 });
    await pay(stripe, { amount: 10_000 });
    expect((await refusal(stripe.payouts.create({ amount: 9826, currency: 'eur' }))).code).toBe('balance_insufficient');
    const payout = await stripe.payouts.create({ amount: 9000, currency: 'eur' });
    await hook('clock', { advanceMs: 2 * DAY_MS + 1000 });
    expect((await stripe.payouts.retrieve(payout.id)).status).toBe('paid');
    expect((await refusal(stripe.payouts.cancel(payout.id))).statusCode).toBe(400);
    await hook(`payouts/${payout.id}/fail`);
    expect(await stripe.payouts.retrieve(payout.id)).toMatchObject({
      status: 'failed',
      failure_code: 'account_closed',
    });
    expect((await stripe.balance.retrieve()).available).toMatchObject([{ amount: 9825 }]);
  });
});

describe('disputes', () => {
  it('take the money and a fee, and bring the money back when won', async () => {
    const { stripe } = await bench({ settlementDays: 0 });
    const paid = await pay(stripe, { amount: 10_000, payment_method: 'pm_card_createDispute' });
    const [dispute] = (await stripe.disputes.list({ payment_intent: paid.id })).data;
    expect(dispute).toMatchObject({ status: 'needs_response', amount: 10_000, reason: 'fraudulent' });
    expect((await stripe.balance.retrieve()).available).toMatchObject([{ amount: 9825 - 11_500 }]);
    expect((await refusal(stripe.refunds.create({ payment_intent: paid.id }))).code).toBe('charge_disputed');
    const won = await stripe.disputes.update(dispute?.id ?? '', {
      evidence: { uncategorized_text: 'winning_evidence' },
    });
    expect(won.status).toBe('won');
    expect((await stripe.balance.retrieve()).available).toMatchObject([{ amount: 9825 - 1500 }]);
    expect((await refusal(stripe.disputes.close(won.id))).statusCode).toBe(400);
  });

  it('can be opened by a test and lost', async () => {
    const { stripe, hook } = await bench();
    const paid = await pay(stripe, { amount: 10_000 });
    await hook('disputes', { charge: paid.latest_charge, amountMinor: 4000, reason: 'product_not_received' });
    const [dispute] = (await stripe.disputes.list()).data;
    expect((await stripe.disputes.close(dispute?.id ?? '')).status).toBe('lost');
    const types = (await stripe.events.list({ types: ['charge.dispute.created', 'charge.dispute.closed'] })).data.map(
      (event) => event.type,
    );
    expect(types).toEqual(['charge.dispute.closed', 'charge.dispute.created']);
  });
});

describe('balance transactions', () => {
  it('add up to the balance, page by page', async () => {
    const { stripe } = await bench({ settlementDays: 0 });
    for (let index = 0; index < 12; index += 1) await pay(stripe, { amount: 1000 + index });
    const first = await pay(stripe, { amount: 5000 });
    await stripe.refunds.create({ payment_intent: first.id, amount: 700 });
    let net = 0;
    let rows = 0;
    for await (const row of stripe.balanceTransactions.list({ limit: 5 })) {
      expect(row.net).toBe(row.amount - row.fee);
      expect(row.fee_details.reduce((sum, detail) => sum + detail.amount, 0)).toBe(row.fee);
      net += row.net;
      rows += 1;
    }
    expect(rows).toBe(14);
    expect((await stripe.balance.retrieve()).available).toMatchObject([{ amount: net }]);
    expect((await stripe.balanceTransactions.list({ type: 'refund' })).data).toMatchObject([{ amount: -700, fee: 0 }]);
    const newest = await stripe.balanceTransactions.list({ limit: 3 });
    const older = await stripe.balanceTransactions.list({ limit: 3, starting_after: newest.data[2]?.id ?? '' });
    const back = await stripe.balanceTransactions.list({ limit: 3, ending_before: older.data[0]?.id ?? '' });
    expect(back.data).toEqual(newest.data);
    expect((await refusal(stripe.balanceTransactions.list({ limit: 101 }))).param).toBe('limit');
  });
});
