/** Weekly opening hours as figures and words. */
import type { WeeklyRule } from '@skyberth/shared';

export const DAYS = ['Mon', 'Tue', 'Wed', 'Thu', 'Fri', 'Sat', 'Sun'] as const;
export const DAY_MINUTES = 1440;
export const WEEK_MINUTES = 7 * DAY_MINUTES;

/** `08:30` in minutes; NaN for anything else. */
export function minuteOf(timeOfDay: string): number {
  const match = /^(\d{2}):(\d{2})$/.exec(timeOfDay);
  return match ? Number(match[1]) * 60 + Number(match[2]) : Number.NaN;
}

/** Minutes from Monday 00:00 on the station's clock. */
export interface WeekSpan {
  readonly fromMin: number;
  readonly toMin: number;
}

/** The spans of one rule; one that runs past Sunday midnight is cut in two. */
export function spansOf({ days, fromLocal, toLocal }: WeeklyRule): WeekSpan[] {
  const from = minuteOf(fromLocal);
  const to = minuteOf(toLocal);
  if (Number.isNaN(from) || Number.isNaN(to)) return [];
  const length = to > from ? to - from : to + DAY_MINUTES - from;
  return days.flatMap((day): WeekSpan[] => {
    const fromMin = (day - 1) * DAY_MINUTES + from;
    const toMin = fromMin + length;
    if (toMin <= WEEK_MINUTES) return [{ fromMin, toMin }];
    return [
      { fromMin, toMin: WEEK_MINUTES },
      { fromMin: 0, toMin: toMin - WEEK_MINUTES },
    ];
  });
}

/** All that the rules open in a week, merged and in order. */
export function openSpans(rules: readonly WeeklyRule[]): WeekSpan[] {
  const sorted = rules.flatMap(spansOf).sort((a, b) => a.fromMin - b.fromMin);
  const merged: { fromMin: number; toMin: number }[] = [];
  for (const span of sorted) {
    const last = merged.at(-1);
    if (last && span.fromMin <= last.toMin) last.toMin = Math.max(last.toMin, span.toMin);
    else merged.push({ ...span });
  }
  return merged;
}

/** Hours open in a week without a clock change. */
export const openHoursAWeek = (rules: readonly WeeklyRule[]): number =>
  openSpans(rules).reduce((sum, span) => sum + span.toMin - span.fromMin, 0) / 60;
