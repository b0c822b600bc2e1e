/** What the price form holds while it is filled in. */
import type { PriceCard } from '@skyberth/shared';
import type { NumberOrEmpty } from '../../lib/form-rules.js';

export interface BusyValues {
  days: number[];
  fromLocal: string;
  toLocal: string;
  percent: NumberOrEmpty;
}
export interface PriceValues {
  perMinuteMinor: NumberOrEmpty;
  setupMinor: NumberOrEmpty;
  minimumMinor: NumberOrEmpty;
  busyHours: BusyValues[];
  shortNotice: { underHours: NumberOrEmpty; percent: NumberOrEmpty } | null;
  volume: { overMinutesInMonth: NumberOrEmpty; percent: NumberOrEmpty }[];
  ladder: { hoursBeforeAos: NumberOrEmpty; refundPercent: NumberOrEmpty }[];
}

/** Nothing is guessed about money; only the ladder begins with steps that are common practice. */
const EMPTY: PriceValues = {
  perMinuteMinor: '',
  setupMinor: 0,
  minimumMinor: 0,
  busyHours: [],
  shortNotice: null,
  volume: [],
  ladder: [
    { hoursBeforeAos: 48, refundPercent: 100 },
    { hoursBeforeAos: 12, refundPercent: 50 },
  ],
};

export function priceValues(card: PriceCard | null): PriceValues {
  if (!card) return structuredClone(EMPTY);
  const { perMinuteMinor, setupMinor, minimumMinor, busyHours, shortNotice, volume, ladder } = card;
  return structuredClone({ perMinuteMinor, setupMinor, minimumMinor, busyHours, shortNotice, volume, ladder });
}

const orZero = (value: NumberOrEmpty): number => (value === '' ? 0 : value);

export interface DrawnStep {
  readonly percent: number;
  readonly untilText: string;
  readonly isNow: boolean;
}

/** The ladder as falling steps, closed with what holds after the last one. */
export function drawnSteps(ladder: PriceValues['ladder']): DrawnStep[] {
  const steps = ladder
    .filter((step) => step.hoursBeforeAos !== '' && step.refundPercent !== '')
    .map((step) => ({ hours: orZero(step.hoursBeforeAos), percent: orZero(step.refundPercent) }))
    .sort((a, b) => b.hours - a.hours);
  const drawn = steps.map(({ hours, percent }) => ({
    percent,
    untilText: hours === 0 ? 'until AOS' : `until ${hours}\u00a0h before`,
    isNow: false,
  }));
  const last = steps.at(-1);
  return last && (last.hours === 0 || last.percent === 0)
    ? drawn
    : [...drawn, { percent: 0, untilText: 'then', isNow: false }];
}
