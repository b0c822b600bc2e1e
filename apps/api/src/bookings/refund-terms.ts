/** What a cancellation gives back, by the steps frozen with the price. */
import { refundOf } from '../invoices/invoice-amounts.js';
import type { BookingRow } from './bookings.repository.js';

/** Per cent that the operator gets back at `nowMs`: a step holds to its very instant, and from AOS on there is none. */
export function ladderPercent(booking: Pick<BookingRow, 'quote' | 'aosMs'>, nowMs: number): number {
  if (nowMs >= booking.aosMs) return 0;
  const step = booking.quote.ladder.find((each) => each.untilUtc !== null && nowMs <= Date.parse(each.untilUtc));
  return step?.refundPercent ?? 0;
}

/** Per cent that a cancellation now gives back, by who cancels; null where it cannot be cancelled any more. */
export function cancelPercent(booking: BookingRow, by: 'operator' | 'owner' | 'admin', nowMs: number): number | null {
  if (nowMs >= booking.aosMs) return null;
  if (booking.state === 'awaiting owner') return by === 'owner' ? null : 100;
  if (booking.state !== 'confirmed') return null;
  return by === 'operator' ? ladderPercent(booking, nowMs) : 100;
}

/** The same in money, VAT included. */
export function cancelRefundMinor(
  booking: BookingRow,
  by: 'operator' | 'owner' | 'admin',
  nowMs: number,
): number | null {
  const percent = cancelPercent(booking, by, nowMs);
  return percent === null ? null : refundOf(booking.quote, percent).grossMinor;
}
