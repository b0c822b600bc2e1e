/** The price of a stretch, before VAT. */
import { type Quote as PriceQuote, quote, totalMs, volumeMonth } from '@skyberth/market';
import { formatMoney } from '@skyberth/money';
import type { AntennaInput } from '../workers/job-types.js';

export const writeMoney = (amountMinor: number, currency: string): string => formatMoney({ amountMinor, currency });

/** Minutes that the caller has already bought at the station in the month of the contact. */
function minutesSoFar(antenna: AntennaInput, fromMs: number): number {
  if (antenna.price.volume.length === 0) return 0;
  const month = volumeMonth(fromMs, antenna.timeZone);
  const counted = antenna.bought.filter((each) => each.fromMs >= month.fromMs && each.fromMs < month.toMs);
  return counted.reduce((sum, each) => sum + totalMs([each]), 0) / 60_000;
}

/** Throws where the stretch has begun before it is bought. */
export function priceOf(antenna: AntennaInput, stretch: { fromMs: number; toMs: number }, nowMs: number): PriceQuote {
  return quote(
    {
      card: antenna.price,
      fromMs: stretch.fromMs,
      toMs: stretch.toMs,
      buyMs: nowMs,
      monthlyMinutesSoFar: minutesSoFar(antenna, stretch.fromMs),
      timeZone: antenna.timeZone,
    },
    writeMoney,
  );
}
