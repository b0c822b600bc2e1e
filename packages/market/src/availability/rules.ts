/**
 * Availability rules: RFC 5545 recurrences in the station's own time zone, expanded into UTC. A rule's length is either
 * exact minutes, or a time of day on the station's clock at which it ends; opening hours use the latter, so that a day of
 * 23 or 25 hours has neither a gap nor an overlap.
 */

import type { Options } from 'rrule';
import * as rruleModule from 'rrule';
import { type Interval, mergeIntervals } from '../interval.js';
import { MarketError } from '../market-error.js';
import {
  DAY_MS,
  fromWallClock,
  isoWeekday,
  MINUTE_MS,
  parseLocalDateTime,
  parseTimeOfDay,
  startOfDay,
  toWallClock,
} from '../time/local-time.js';
import { recurrenceParts } from './recurrence-grammar.js';

export interface AvailabilityRule {
  readonly id: string;
  /** RFC 5545 recurrence rule without `RRULE:`, such as `FREQ=WEEKLY;BYDAY=MO,TU`. Daily or slower. */
  readonly rrule: string;
  /** `YYYY-MM-DDTHH:mm` on the station's clock; the first instance, if the rule fits it. */
  readonly startLocal: string;
  /** IANA zone. */
  readonly timeZone: string;
  /** Exact length. Give either this or `endLocal`. */
  readonly durationMin?: number | undefined;
  /** `HH:mm` on the station's clock, `24:00` allowed; not later than the start means the next day. */
  readonly endLocal?: string | undefined;
  /** `YYYY-MM-DDTHH:mm` on the same clock: starts that are left out (EXDATE, RFC 5545 3.8.5.1). */
  readonly exceptLocal?: readonly string[] | undefined;
}

/** The longest that one instance may last; longer openings are written as rules that touch. */
export const LONGEST_INSTANCE_MIN = 7 * 1440;
/** Instances that one rule may have in a year and a day: one for each hour. */
export const MOST_INSTANCES_A_YEAR = 8_784;

/** The package is CommonJS to Node and ESM to a bundler; its classes stand in one place or the other. */
const { RRule } = 'RRule' in rruleModule ? rruleModule : (rruleModule as { default: typeof rruleModule }).default;

/**
 * The rule in its parts, on the station's clock. Throws `bad rule` for text that is no recurrence, a frequency below a day
 * (too dense), or an interval or count that would never end or never begin.
 */
export function parseRecurrence(rrule: string, startLocal: string, timeZone: string): Partial<Options> {
  const parts = recurrenceParts(rrule);
  if (typeof parts === 'string')
    throw new MarketError('bad rule', `The recurrence “${rrule}” cannot be used: ${parts}`, { rrule });
  const dtstart = new Date(parseLocalDateTime(startLocal));
  return { ...RRule.parseString(rrule), dtstart, until: untilWallClock(parts.get('UNTIL'), timeZone) };
}

/** UNTIL is UTC when it ends in Z (RFC 5545 3.3.10); the recurrence is computed on the station's clock. */
function untilWallClock(until: string | undefined, timeZone: string): Date | null {
  if (until === undefined) return null;
  const [, year, month, day, hour = '23', minute = '59', second = '59', zulu] =
    /^(\d{4})(\d{2})(\d{2})(?:T(\d{2})(\d{2})(\d{2})(Z?))?$/.exec(until) ?? [];
  const clock = Date.UTC(Number(year), Number(month) - 1, Number(day), Number(hour), Number(minute), Number(second));
  return new Date(zulu === 'Z' ? toWallClock(clock, timeZone) : clock);
}

/**
 * The library walks from the first instance on, so a rule of years ago grows slow. Daily and weekly rules without a count
 * repeat exactly after their interval: they may begin a whole number of intervals later, one before the period.
 */
function nearStart(options: Partial<Options>, fromWallMs: number): Partial<Options> {
  const { freq, interval, count, dtstart } = options;
  const days = freq === RRule.DAILY ? 1 : freq === RRule.WEEKLY ? 7 : 0;
  if (days === 0 || typeof count === 'number' || !dtstart) return options;
  const stepMs = days * (interval ?? 1) * DAY_MS;
  const steps = Math.floor((fromWallMs - dtstart.getTime()) / stepMs) - 1;
  return steps <= 0 ? options : { ...options, dtstart: new Date(dtstart.getTime() + steps * stepMs) };
}

/** Starts of instances, on the station's clock, in `[fromWallMs, toWallMs)`. */
export function recurrenceStarts(rule: AvailabilityRule, fromWallMs: number, toWallMs: number): number[] {
  const recurrence = new RRule(nearStart(parseRecurrence(rule.rrule, rule.startLocal, rule.timeZone), fromWallMs));
  const starts = recurrence.between(new Date(fromWallMs), new Date(toWallMs - 1), true).map((date) => date.getTime());
  if (rule.exceptLocal === undefined || rule.exceptLocal.length === 0) return starts;
  // A count counts what is left out too, so the exceptions come off last.
  const except = new Set(rule.exceptLocal.map(parseLocalDateTime));
  return starts.filter((start) => !except.has(start));
}

/** The instant at which an instance that starts at this reading ends. */
function endOf(rule: AvailabilityRule, startWallMs: number): number {
  if (rule.endLocal === undefined)
    return fromWallClock(startWallMs, rule.timeZone) + (rule.durationMin ?? 0) * MINUTE_MS;
  const endWallMs = startOfDay(startWallMs) + parseTimeOfDay(rule.endLocal) * MINUTE_MS;
  return fromWallClock(endWallMs > startWallMs ? endWallMs : endWallMs + DAY_MS, rule.timeZone);
}

/** The instances of one rule, as they are, that touch `[fromMs, toMs)`; not cut and not merged. */
export function ruleInstances(rule: AvailabilityRule, fromMs: number, toMs: number): Interval[] {
  const reachMs = Math.max(rule.durationMin ?? 0, rule.endLocal === undefined ? 0 : 1440) * MINUTE_MS + DAY_MS;
  const starts = recurrenceStarts(
    rule,
    toWallClock(fromMs, rule.timeZone) - reachMs,
    toWallClock(toMs, rule.timeZone) + DAY_MS,
  );
  return starts
    .map((start) => ({ fromMs: fromWallClock(start, rule.timeZone), toMs: endOf(rule, start) }))
    .filter((each) => each.fromMs < toMs && each.toMs > fromMs);
}

/**
 * The time that the rules open within `[fromMs, toMs)`: merged, cut to the period, sorted. Rules are expected to have
 * passed `validateRules`; a bad one throws `bad rule`, `bad local time` or `bad time zone`.
 */
export function expandRules(rules: readonly AvailabilityRule[], fromMs: number, toMs: number): Interval[] {
  if (!(toMs >= fromMs))
    throw new MarketError('bad interval', 'The period must end after it begins.', { fromMs, toMs });
  const all = rules.flatMap((rule) => ruleInstances(rule, fromMs, toMs));
  return mergeIntervals(
    all.map((each) => ({ fromMs: Math.max(each.fromMs, fromMs), toMs: Math.min(each.toMs, toMs) })),
  );
}

const RRULE_DAYS = ['MO', 'TU', 'WE', 'TH', 'FR', 'SA', 'SU'] as const;

/** Opening hours as people give them: days of the week (1 is Monday), from and to on the station's clock. */
export interface WeeklyHours {
  readonly id: string;
  readonly days: readonly number[];
  readonly fromLocal: string;
  /** `24:00` is the end of the day; not later than `fromLocal` runs past midnight. */
  readonly toLocal: string;
  readonly timeZone: string;
  /** First day, `YYYY-MM-DD`, on which it may open. */
  readonly fromDate: string;
}

/** The weekly rule for opening hours. Throws `bad rule` without days, `bad local time` for unreadable times. */
export function weeklyRule({ id, days, fromLocal, toLocal, timeZone, fromDate }: WeeklyHours): AvailabilityRule {
  const chosen = [...new Set(days)].sort((a, b) => a - b);
  if (chosen.length === 0 || chosen.some((day) => RRULE_DAYS[day - 1] === undefined)) {
    throw new MarketError(
      'bad rule',
      `Choose at least one day from 1 (Monday) to 7 (Sunday); got ${days.join(', ') || 'none'}.`,
      { days },
    );
  }
  parseTimeOfDay(toLocal);
  if (parseTimeOfDay(fromLocal) === 1440)
    throw new MarketError('bad local time', 'Opening hours begin at 23:59 at the latest.', { fromLocal });
  let first = parseLocalDateTime(`${fromDate}T${fromLocal}`);
  while (!chosen.includes(isoWeekday(first))) first += DAY_MS;
  return {
    id,
    rrule: `FREQ=WEEKLY;BYDAY=${chosen.map((day) => RRULE_DAYS[day - 1]).join(',')}`,
    startLocal: new Date(first).toISOString().slice(0, 16),
    timeZone,
    endLocal: toLocal,
  };
}
