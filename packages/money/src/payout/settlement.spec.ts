import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type OwnerPosting, payoutSums } from './settlement.js';

describe('the sums of a payout line', () => {
  it('put each posting in its column', () => {
    const posting = (causeKey: string, amountMinor: number): OwnerPosting => ({
      causeKey,
      amountMinor,
      bookingId: 'b',
    });
    const sums = payoutSums([
      posting('sale:b', -10_000),
      posting('fee:b', 800),
      posting('refund:ch:2000', 2_000),
      posting('refund:ch:2000', -160),
      posting('dispute-reserve:d', 7_360),
      posting('dispute-release:d:1', -7_360),
      posting('adjust:x', -250),
    ]);
    expect(sums).toEqual({
      contactCount: 1,
      settledMinor: 10_000,
      feeMinor: 800,
      refundMinor: 1_840,
      reserveMinor: 0,
      adjustedMinor: 250,
      toPayMinor: 7_610,
    });
  });

  it('add up to the account to the cent, whatever was posted', () => {
    const causes = [
      'sale',
      'fee',
      'refund',
      'dispute-refund',
      'chargeback-reserve',
      'chargeback-release',
      'adjust',
      'x',
    ];
    const posting = fc.record({
      causeKey: fc.constantFrom(...causes).map((kind) => `${kind}:1`),
      amountMinor: fc.integer({ min: -1_000_000, max: 1_000_000 }),
      bookingId: fc.constantFrom('a', 'b', null),
    });
    fc.assert(
      fc.property(fc.array(posting, { maxLength: 40 }), (postings) => {
        const sums = payoutSums(postings);
        const { settledMinor, feeMinor, refundMinor, reserveMinor, adjustedMinor, toPayMinor } = sums;
        expect(toPayMinor).toBe(settledMinor - feeMinor - refundMinor - reserveMinor + adjustedMinor);
        expect(toPayMinor + postings.reduce((sum, one) => sum + one.amountMinor, 0)).toBe(0);
      }),
    );
  });
});
