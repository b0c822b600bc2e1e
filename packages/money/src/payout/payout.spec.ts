import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { buildPayout, contactFeeMinor, type PayoutContact, type PayoutInput, payoutRunTotals } from './payout.js';

const contact = (settledMinor: number, change: Partial<PayoutContact> = {}): PayoutContact => ({
  bookingId: 'b',
  settledMinor,
  feeMinor: contactFeeMinor(settledMinor, 800),
  refundMinor: 0,
  reserveMinor: 0,
  ...change,
});
const payout = (ownerId: string, change: Partial<PayoutInput>) =>
  buildPayout({ ownerId, currency: 'EUR', contacts: [], adjustments: [], minimumMinor: 0, heldBack: null, ...change });

/** The run that the picture of the payouts page shows: owner, settled, refunds, set aside, adjusted, to pay. */
const PICTURED: readonly [string, number, number, number, number, number][] = [
  ['Brattholm Radio', 1_482_340, 4_120, 0, 0, 1_359_633],
  ['Fellside Earth Stations', 1_096_215, 6_120, 0, 0, 1_002_398],
  ['Atlântida Antenas', 711_480, 0, 0, 0, 654_562],
  ['Estrecho Sur', 742_960, 1_840, 5_268, 0, 676_415],
  ['Witkrans Teleport', 655_310, 2_210, 0, 0, 600_675],
  ['Kestle Bay Antennas', 301_125, 0, 0, 1_250, 278_285],
  ['Vindsele Fjärrmark', 148_870, 990, 0, 0, 135_970],
  ['Cape Harrow Ground', 468_205, 0, 0, 0, 430_749],
];

describe('payouts', () => {
  const statements = PICTURED.map(([ownerId, settled, refundMinor, reserveMinor, adjusted]) =>
    payout(ownerId, {
      contacts: [contact(settled, { refundMinor, reserveMinor })],
      adjustments: adjusted === 0 ? [] : [{ reason: 'double set-up fee, given back', amountMinor: adjusted }],
      minimumMinor: ownerId.startsWith('Vindsele') ? 200_000 : 0,
      heldBack: ownerId.startsWith('Atlântida') ? 'a call about the new account is missing' : null,
    }),
  );

  it('gives the pictured statements to the cent', () => {
    expect(statements.map((statement) => [statement.ownerId, statement.toPayMinor])).toEqual(
      PICTURED.map(([owner, , , , , toPay]) => [owner, toPay]),
    );
  });

  it('gives the pictured totals: 51 386.87 due, 43 481.55 sent in six transfers, 7 905.32 stays', () => {
    expect(payoutRunTotals(statements, 'EUR')).toMatchObject({
      settledMinor: 5_606_505,
      feeMinor: 448_520,
      refundMinor: 15_280,
      reserveMinor: 5_268,
      adjustedMinor: 1_250,
      toPayMinor: 5_138_687,
      sentMinor: 4_348_155,
      transfers: 6,
      staysMinor: 790_532,
    });
    expect(statements.filter((statement) => statement.state !== 'ready').map((statement) => statement.state)).toEqual([
      'held back',
      'below minimum',
    ]);
  });

  it('refuses to pay one contact twice, or one owner twice', () => {
    expect(() => payout('o', { contacts: [contact(1), contact(2)] })).toThrow('stands twice');
    expect(() => payoutRunTotals([payout('o', {}), payout('o', {})], 'EUR')).toThrow('stands twice in the run');
    expect(() => payoutRunTotals([payout('o', {})], 'NOK')).toThrow('cannot hold a statement in EUR');
  });

  it('wants a reason for an adjustment and no amount below zero', () => {
    expect(() => payout('o', { adjustments: [{ reason: ' ', amountMinor: 1 }] })).toThrow('needs a reason');
    expect(() => payout('o', { contacts: [contact(-1)] })).toThrow('below zero');
  });

  it('sends nothing to an owner who owes', () => {
    expect(payout('o', { contacts: [contact(100, { refundMinor: 200 })] })).toMatchObject({
      toPayMinor: -108,
      state: 'nothing due',
    });
  });

  it('accounts for every cent of a run', () => {
    const amounts = fc.integer({ min: 0, max: 100_000 });
    fc.assert(
      fc.property(
        fc.array(fc.tuple(amounts, amounts, amounts, fc.integer({ min: -5_000, max: 5_000 })), { maxLength: 8 }),
        (owners) => {
          const totals = payoutRunTotals(
            owners.map(([settled, refundMinor, reserveMinor, adjusted], index) =>
              payout(String(index), {
                contacts: [contact(settled, { refundMinor, reserveMinor })],
                adjustments: [{ reason: 'correction', amountMinor: adjusted }],
                minimumMinor: 20_000,
              }),
            ),
            'EUR',
          );
          expect(
            totals.sentMinor + totals.staysMinor + totals.feeMinor + totals.refundMinor + totals.reserveMinor,
          ).toBe(totals.settledMinor + totals.adjustedMinor);
        },
      ),
    );
  });
});
