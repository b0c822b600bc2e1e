/** What a price is made of. Amounts are whole minor units of the card's currency; percentages are whole or fractional. */

/** Hours of the station's own week at another price. */
export interface BusyHours {
  /** ISO weekdays of the start, 1 is Monday. */
  readonly days: readonly number[];
  /** `HH:mm` at the station. */
  readonly fromLocal: string;
  /** `HH:mm` at the station, `24:00` is the end of the day; earlier than or equal to the start runs past midnight. */
  readonly toLocal: string;
  /** Added to the per-minute part; negative for quiet hours. */
  readonly percent: number;
}

/** Hours before AOS, and what a cancellation made no later than that brings back. */
export interface LadderStep {
  readonly hoursBeforeAos: number;
  readonly refundPercent: number;
}

export interface PriceCard {
  readonly currency: string;
  readonly perMinuteMinor: number;
  /** Once a contact. */
  readonly setupMinor: number;
  /** The least that a contact costs, all lines together. */
  readonly minimumMinor: number;
  readonly busyHours: readonly BusyHours[];
  readonly shortNotice: { readonly underHours: number; readonly percent: number } | null;
  /** Reductions for the time that lies above so many minutes bought at this station in the month. */
  readonly volume: readonly { readonly overMinutesInMonth: number; readonly percent: number }[];
}

/** A card in a series: it holds for purchases from `validFromMs` on, until a later one does. */
export interface DatedPriceCard extends PriceCard {
  readonly validFromMs: number;
}

export interface QuoteInput {
  readonly card: PriceCard;
  /** The part of the pass that is bought. */
  readonly fromMs: number;
  readonly toMs: number;
  /** The instant of purchase; the hold freezes it. */
  readonly buyMs: number;
  /** What this buyer has already bought at this station in the calendar month of the contact, station time. */
  readonly monthlyMinutesSoFar: number;
  /** IANA zone of the station, for busy hours. */
  readonly timeZone: string;
}

export type QuoteLineKind = 'time' | 'setup' | 'busy' | 'short notice' | 'volume' | 'least charge';

export interface QuoteLine {
  readonly kind: QuoteLineKind;
  /** A few words, such as `9 min 30 s`. */
  readonly label: string;
  /** The rest of the sentence, such as `at €6.40 a minute`. */
  readonly detail: string;
  readonly amountMinor: number;
}

export interface Quote {
  readonly currency: string;
  /** Whole seconds that were priced. */
  readonly billedSeconds: number;
  /** At least the `time` line; a line of zero does not appear. Their sum is the total. */
  readonly lines: readonly QuoteLine[];
  readonly totalMinor: number;
}
