import { describe, expect, it } from 'vitest';
import type { BookingRow } from './bookings.repository.js';
import { cancelPercent, cancelRefundMinor, ladderPercent } from './refund-terms.js';

const AOS = Date.UTC(2026, 11, 10, 12);
const HOUR = 3_600_000;
const step = (refundPercent: number, hoursBeforeAos: number) => ({
  refundPercent,
  hoursBeforeAos,
  untilUtc: new Date(AOS - hoursBeforeAos * HOUR).toISOString(),
  now: false,
});

const booking = (state: BookingRow['state']): BookingRow =>
  ({
    state,
    aosMs: AOS,
    quote: {
      currency: 'EUR',
      lines: [{ label: 'Time', detail: '', amountMinor: 8188 }],
      totalMinor: 8188,
      vat: { ratePercent: 0, amountMinor: 0, note: '' },
      toPayMinor: 8188,
      ladder: [step(100, 72), step(50, 24), { refundPercent: 0, hoursBeforeAos: 0, untilUtc: null, now: true }],
    },
  }) as unknown as BookingRow;

describe('the refund of a cancellation', () => {
  it.each([
    ['long before', 200 * HOUR, 100],
    ['at the very instant of a step', 72 * HOUR, 100],
    ['a millisecond after it', 72 * HOUR - 1, 50],
    ['at the last step', 24 * HOUR, 50],
    ['after the last step', 24 * HOUR - 1, 0],
    ['at AOS', 0, 0],
  ])('%s', (_when, beforeMs, percent) => {
    expect(ladderPercent(booking('confirmed'), AOS - beforeMs)).toBe(percent);
  });

  it('is all of it when the station or Skyberth cancels, or nobody has accepted yet', () => {
    const late = AOS - HOUR;
    expect(cancelPercent(booking('confirmed'), 'operator', late)).toBe(0);
    expect(cancelPercent(booking('confirmed'), 'owner', late)).toBe(100);
    expect(cancelPercent(booking('confirmed'), 'admin', late)).toBe(100);
    expect(cancelPercent(booking('awaiting owner'), 'operator', late)).toBe(100);
    expect(cancelRefundMinor(booking('confirmed'), 'operator', AOS - 30 * HOUR)).toBe(4094);
  });

  it('does not exist where there is nothing to cancel', () => {
    expect(cancelPercent(booking('awaiting owner'), 'owner', AOS - HOUR)).toBeNull();
    expect(cancelPercent(booking('confirmed'), 'operator', AOS)).toBeNull();
    for (const state of ['held', 'under way', 'settled', 'cancelled'] as const) {
      expect(cancelPercent(booking(state), 'admin', AOS - HOUR)).toBeNull();
    }
  });
});
