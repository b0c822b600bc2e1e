import fc from 'fast-check';
import type Stripe from 'stripe';
import { describe, expect, it } from 'vitest';
import { type Bench, bench, pay } from './testing.js';

const STEPS = ['pay', 'hold', 'capture', 'cancel', 'refund', 'transfer', 'reverse', 'dispute', 'settle'] as const;
type Step = { what: (typeof STEPS)[number]; amount: number; pick: number };

/** Does one step with whatever there is; what the service refuses is not done, and that is the point. */
async function attempt({ stripe, hook }: Bench, account: string, step: Step): Promise<void> {
  const intents = (await stripe.paymentIntents.list({ limit: 100 })).data;
  const transfers = (await stripe.transfers.list({ limit: 100 })).data;
  const intent = intents[step.pick % Math.max(1, intents.length)];
  const transfer = transfers[step.pick % Math.max(1, transfers.length)];
  const { amount } = step;
  const deeds: Record<Step['what'], () => Promise<unknown>> = {
    pay: () => pay(stripe, { amount }),
    hold: () => pay(stripe, { amount, capture_method: 'manual' }),
    capture: () => stripe.paymentIntents.capture(intent?.id ?? 'pi_none', { amount_to_capture: amount }),
    cancel: () => stripe.paymentIntents.cancel(intent?.id ?? 'pi_none'),
    refund: () => stripe.refunds.create({ payment_intent: intent?.id ?? 'pi_none', amount }),
    transfer: () => stripe.transfers.create({ amount, currency: 'eur', destination: account }),
    reverse: () => stripe.transfers.createReversal(transfer?.id ?? 'tr_none', { amount }),
    dispute: () => hook('disputes', { charge: String(intent?.latest_charge), amountMinor: amount }),
    settle: () => hook('clock', { advanceMs: 3 * 86_400_000 }),
  };
  await deeds[step.what]().catch(() => undefined);
}

async function checkMoney({ stripe }: Bench, account: string): Promise<void> {
  const charges = (await stripe.charges.list({ limit: 100 })).data;
  const refunds = (await stripe.refunds.list({ limit: 100 })).data;
  const transfers = (await stripe.transfers.list({ limit: 100 })).data;
  const disputes = (await stripe.disputes.list({ limit: 100 })).data;
  const sum = (numbers: number[]): number => numbers.reduce((total, number) => total + number, 0);
  for (const charge of charges) {
    const given = sum(refunds.filter((refund) => refund.charge === charge.id).map(({ amount }) => amount));
    expect(charge.amount_captured).toBeLessThanOrEqual(charge.amount);
    expect(given).toBeLessThanOrEqual(charge.amount_captured);
  }
  for (const transfer of transfers) expect(transfer.amount_reversed).toBeLessThanOrEqual(transfer.amount);
  const paidFees = sum((await stripe.balanceTransactions.list({ limit: 100 })).data.map(({ fee }) => fee));
  const sent = sum(transfers.map((transfer) => transfer.amount - transfer.amount_reversed));
  const settledRefunds = sum(refunds.filter(({ status }) => status === 'succeeded').map(({ amount }) => amount));
  const expected =
    sum(charges.map((charge) => charge.amount_captured)) -
    settledRefunds -
    sum(disputes.map(({ amount }) => amount)) -
    paidFees -
    sent;
  const total = (balance: Stripe.Balance): number =>
    sum([...balance.available, ...balance.pending].map(({ amount }) => amount));
  expect(total(await stripe.balance.retrieve())).toBe(expected);
  expect(total(await stripe.balance.retrieve({}, { stripeAccount: account }))).toBe(sent);
}

describe('money', () => {
  it('adds up after any series of requests, refused ones among them', async () => {
    const step = fc.record({
      what: fc.constantFrom(...STEPS),
      amount: fc.integer({ min: 50, max: 3000 }),
      pick: fc.nat(50),
    });
    await fc.assert(
      fc.asyncProperty(fc.array(step, { minLength: 10, maxLength: 30 }), async (steps) => {
        const tools = await bench();
        const { id } = await tools.stripe.accounts.create({
          type: 'express',
          capabilities: { transfers: { requested: true } },
        });
        await tools.hook(`accounts/${id}/activate`);
        for (const one of steps) await attempt(tools, id, one);
        await checkMoney(tools, id);
      }),
      { numRuns: 20, seed: 20_261_201 },
    );
  }, 60_000);
});
