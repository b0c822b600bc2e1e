/**
 * What a contact costs, line by line.
 *
 * Rules, in this order: the per-minute part is exact to the second; every percentage (busy hours, short notice, volume) is
 * taken of the plain per-minute part of the seconds it covers, and none of another percentage; each line is rounded to the
 * nearest minor unit, halves away from zero, and the total is the sum of the printed lines.
 */
import { type Interval, intersectIntervals, totalMs } from '../interval.js';
import { MarketError } from '../market-error.js';
import {
  DAY_MS,
  fromWallClock,
  HOUR_MS,
  isoWeekday,
  MINUTE_MS,
  parseTimeOfDay,
  startOfDay,
  toWallClock,
} from '../time/local-time.js';
import { lengthText, type MoneyWriter, signedPercentText } from '../words/words.js';
import type { BusyHours, DatedPriceCard, Quote, QuoteInput, QuoteLine } from './price-types.js';

/** Nearest whole number, halves away from zero. Inputs are small enough that one division is exact at a half. */
const roundHalfUp = (value: number): number => (value < 0 ? -Math.round(-value) : Math.round(value)) || 0;

/** Price of so many seconds at a per-minute price, and a percentage of it, rounded once. */
function secondsPrice(perMinuteMinor: number, seconds: number, percent = 100): number {
  return roundHalfUp((perMinuteMinor * seconds * percent) / 6000);
}

/** The card in force for a purchase at `buyMs`, or `undefined` before the first. Quotes already given keep theirs. */
export function priceCardAt<C extends DatedPriceCard>(cards: readonly C[], buyMs: number): C | undefined {
  return cards
    .filter((card) => card.validFromMs <= buyMs)
    .reduce<C | undefined>(
      (best, card) => (best === undefined || card.validFromMs >= best.validFromMs ? card : best),
      undefined,
    );
}

/** When the hours of one rule are on, in UTC, wherever they touch `[fromMs, toMs)`. */
export function busyIntervals(hours: BusyHours, timeZone: string, fromMs: number, toMs: number): Interval[] {
  const start = parseTimeOfDay(hours.fromLocal) * MINUTE_MS;
  const end = parseTimeOfDay(hours.toLocal) * MINUTE_MS;
  const found: Interval[] = [];
  const lastDay = startOfDay(toWallClock(toMs, timeZone));
  for (let day = startOfDay(toWallClock(fromMs, timeZone)) - DAY_MS; day <= lastDay; day += DAY_MS) {
    if (!hours.days.includes(isoWeekday(day))) continue;
    found.push({
      fromMs: fromWallClock(day + start, timeZone),
      toMs: fromWallClock(day + (end > start ? end : end + DAY_MS), timeZone),
    });
  }
  return intersectIntervals(found, [{ fromMs, toMs }]);
}

/**
 * The price of `[fromMs, toMs)` bought at `buyMs`. `write` puts amounts into the lines' words.
 * Throws `bad interval` for a part that does not end after it begins, or is not bought before it begins.
 */
export function quote(input: QuoteInput, write: MoneyWriter): Quote {
  const { card, fromMs, toMs, buyMs } = input;
  if (!(toMs > fromMs)) throw new MarketError('bad interval', 'A contact must end after it begins.', { fromMs, toMs });
  if (buyMs > fromMs) throw new MarketError('bad interval', 'A contact is bought before it begins.', { buyMs, fromMs });
  const billedSeconds = Math.round((toMs - fromMs) / 1000);
  const base: QuoteLine = {
    kind: 'time',
    label: lengthText(billedSeconds * 1000),
    detail: `at ${write(card.perMinuteMinor, card.currency)} a minute`,
    amountMinor: secondsPrice(card.perMinuteMinor, billedSeconds),
  };
  const further: QuoteLine[] = [
    { kind: 'setup', label: 'Set-up', detail: 'once a contact', amountMinor: card.setupMinor },
    ...busyLines(input, billedSeconds),
    ...shortNoticeLine(input, billedSeconds),
    ...volumeLines(input, billedSeconds),
  ];
  const lines = [base, ...further.filter((line) => line.amountMinor !== 0)];
  const sum = lines.reduce((total, line) => total + line.amountMinor, 0);
  if (sum < card.minimumMinor) {
    lines.push({
      kind: 'least charge',
      label: 'Up to the least charge',
      detail: `of ${write(card.minimumMinor, card.currency)} a contact`,
      amountMinor: card.minimumMinor - sum,
    });
  }
  return { currency: card.currency, billedSeconds, lines, totalMinor: Math.max(sum, card.minimumMinor) };
}

function busyLines({ card, fromMs, toMs, timeZone }: QuoteInput, billedSeconds: number): QuoteLine[] {
  return card.busyHours.flatMap((hours): QuoteLine[] => {
    const seconds = Math.min(billedSeconds, Math.round(totalMs(busyIntervals(hours, timeZone, fromMs, toMs)) / 1000));
    if (seconds === 0) return [];
    const share = seconds === billedSeconds ? '' : `on ${lengthText(seconds * 1000)}, `;
    return [
      {
        kind: 'busy',
        label: hours.percent < 0 ? 'Quiet hours' : 'Busy hours',
        detail: `${signedPercentText(hours.percent)}, ${share}${hours.fromLocal} to ${hours.toLocal} at the station`,
        amountMinor: secondsPrice(card.perMinuteMinor, seconds, hours.percent),
      },
    ];
  });
}

function shortNoticeLine({ card, fromMs, buyMs }: QuoteInput, billedSeconds: number): QuoteLine[] {
  const rule = card.shortNotice;
  if (rule === null || fromMs - buyMs >= rule.underHours * HOUR_MS) return [];
  return [
    {
      kind: 'short notice',
      label: 'Short notice',
      detail: `${rule.percent}\u00a0%, under ${rule.underHours}\u00a0h before AOS`,
      amountMinor: secondsPrice(card.perMinuteMinor, billedSeconds, rule.percent),
    },
  ];
}

/** Each second bears the reduction of the highest tier that it lies above, so crossing a tier never makes a contact dearer. */
function volumeLines({ card, monthlyMinutesSoFar }: QuoteInput, billedSeconds: number): QuoteLine[] {
  const tiers = [...card.volume].sort((a, b) => a.overMinutesInMonth - b.overMinutesInMonth);
  const first = monthlyMinutesSoFar * 60;
  const end = first + billedSeconds;
  return tiers.flatMap((tier, index): QuoteLine[] => {
    const fromS = Math.max(first, tier.overMinutesInMonth * 60);
    const toS = Math.min(end, (tiers[index + 1]?.overMinutesInMonth ?? Number.POSITIVE_INFINITY) * 60);
    const seconds = Math.round(toS - fromS);
    if (seconds <= 0) return [];
    const share = seconds === billedSeconds ? '' : `on ${lengthText(seconds * 1000)}, `;
    return [
      {
        kind: 'volume',
        label: 'Volume',
        detail: `${signedPercentText(-tier.percent)}, ${share}after ${tier.overMinutesInMonth} min in the month`,
        amountMinor: secondsPrice(card.perMinuteMinor, seconds, -tier.percent),
      },
    ];
  });
}

/** The start of the month, station time, in which volume is counted for a contact at `timeMs`, and the start of the next. */
export function volumeMonth(timeMs: number, timeZone: string): Interval {
  const local = new Date(toWallClock(timeMs, timeZone));
  const month = (offset: number): number =>
    fromWallClock(Date.UTC(local.getUTCFullYear(), local.getUTCMonth() + offset, 1), timeZone);
  return { fromMs: month(0), toMs: month(1) };
}
