/**
 * A worked example beside the price card: what one contact would cost by the card as it is typed. The price that is charged
 * is always the server's quote; this follows the same rules for a first contact of the month, before VAT.
 */
import { daysText, minuteOf, spansOf, WEEK_MINUTES } from './hours-words.js';

export interface ExampleCard {
  readonly perMinuteMinor: number;
  readonly setupMinor: number;
  readonly minimumMinor: number;
  readonly busyHours: readonly {
    readonly days: readonly number[];
    readonly fromLocal: string;
    readonly toLocal: string;
    readonly percent: number;
  }[];
  readonly shortNotice: { readonly underHours: number; readonly percent: number } | null;
}

export interface ExampleContact {
  readonly lengthS: number;
  /** 1 is Monday, on the station's clock. */
  readonly day: number;
  readonly startLocal: string;
  readonly boughtHoursBefore: number;
}

export interface ExampleLine {
  readonly label: string;
  readonly detail: string;
  readonly amountMinor: number;
}

/** Nearest minor unit, halves away from zero: one rounding for each line. */
const nearest = (value: number): number => Math.sign(value) * Math.round(Math.abs(value)) || 0;
const signed = (percent: number): string =>
  `${percent > 0 ? '+' : percent < 0 ? '\u2212' : ''}${Math.abs(percent)}\u00a0%`;

/** Seconds of the contact within hours of the week; a contact on Sunday night may run into Monday. */
function secondsWithin(hours: ExampleCard['busyHours'][number], contact: ExampleContact): number {
  const start = (contact.day - 1) * 1440 + minuteOf(contact.startLocal);
  const end = start + contact.lengthS / 60;
  let minutes = 0;
  for (const span of spansOf({ ...hours, days: [...hours.days] })) {
    for (const shift of [0, WEEK_MINUTES]) {
      minutes += Math.max(0, Math.min(end, span.toMin + shift) - Math.max(start, span.fromMin + shift));
    }
  }
  return Math.min(contact.lengthS, Math.round(minutes * 60));
}

/** The sum, line by line, as a person would work it out. */
export function exampleLines(card: ExampleCard, contact: ExampleContact): ExampleLine[] {
  const priceOf = (seconds: number, percent = 100) => nearest((card.perMinuteMinor * seconds * percent) / 6_000);
  const lines: ExampleLine[] = [{ label: 'Time', detail: 'every minute', amountMinor: priceOf(contact.lengthS) }];
  if (card.setupMinor > 0) lines.push({ label: 'Set-up', detail: 'once', amountMinor: card.setupMinor });
  for (const hours of card.busyHours) {
    const amountMinor = priceOf(secondsWithin(hours, contact), hours.percent);
    if (amountMinor === 0) continue;
    const label = hours.percent < 0 ? 'Quiet hours' : 'Busy hours';
    const detail = `${signed(hours.percent)}, ${daysText(hours.days)} ${hours.fromLocal} to ${hours.toLocal}`;
    lines.push({ label, detail, amountMinor });
  }
  const notice = card.shortNotice;
  if (notice && contact.boughtHoursBefore < notice.underHours) {
    const detail = `${signed(notice.percent)}, under ${notice.underHours}\u00a0h before AOS`;
    lines.push({ label: 'Short notice', detail, amountMinor: priceOf(contact.lengthS, notice.percent) });
  }
  const sum = lines.reduce((total, line) => total + line.amountMinor, 0);
  if (sum < card.minimumMinor)
    lines.push({ label: 'Up to the least charge', detail: '', amountMinor: card.minimumMinor - sum });
  return lines;
}
