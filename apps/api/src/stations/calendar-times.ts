/** When openings and blackouts that come again do come, remembered by day: recurrences are dear, and rules never change. */
import { type AvailabilityRule, type Interval, ruleInstances } from '@skyberth/market';
import { WeightedCache } from '../platform/weighted-cache.js';
import type { CalendarRuleRow } from './antennas.repository.js';

const DAY_MS = 86_400_000;
/** Instances kept, of all rules together. */
const MAX_KEPT = 200_000;
/** What comes once is the first of a recurrence that ends there. */
const ONCE = 'FREQ=DAILY;COUNT=1';

type RuleFields = Pick<
  CalendarRuleRow,
  'rrule' | 'startLocal' | 'durationMin' | 'endLocal' | 'timeZone' | 'exceptLocal'
>;

/** A row, or what a person has entered, as the market computes with it. */
export const recurrenceOf = (id: string, fields: RuleFields): AvailabilityRule => ({
  id,
  rrule: fields.rrule ?? ONCE,
  startLocal: fields.startLocal,
  timeZone: fields.timeZone,
  ...(fields.durationMin === null ? {} : { durationMin: fields.durationMin }),
  ...(fields.endLocal === null ? {} : { endLocal: fields.endLocal }),
  exceptLocal: fields.exceptLocal,
});

/** One coming of a rule. */
export interface RuleInstance extends Interval {
  readonly rule: CalendarRuleRow;
}

export class CalendarTimes {
  private readonly kept = new WeightedCache<readonly Interval[]>(MAX_KEPT);

  /** Openings that touch the period, uncut, by rule and beginning. */
  openings(rules: readonly CalendarRuleRow[], fromMs: number, toMs: number): RuleInstance[] {
    return this.of('opening', rules, fromMs, toMs);
  }

  /** Blackouts that touch the period, uncut, by rule and beginning. */
  blackouts(rules: readonly CalendarRuleRow[], fromMs: number, toMs: number): RuleInstance[] {
    return this.of('blackout', rules, fromMs, toMs);
  }

  private of(
    kind: CalendarRuleRow['kind'],
    rules: readonly CalendarRuleRow[],
    fromMs: number,
    toMs: number,
  ): RuleInstance[] {
    return rules
      .filter((rule) => rule.kind === kind)
      .flatMap((rule) =>
        this.wholeDays(rule, Math.floor(fromMs / DAY_MS), Math.ceil(toMs / DAY_MS))
          .filter((each) => each.fromMs < toMs && each.toMs > fromMs)
          .map((each) => ({ ...each, rule })),
      );
  }

  private wholeDays(rule: CalendarRuleRow, firstDay: number, lastDay: number): readonly Interval[] {
    const key = `${rule.id}|${firstDay}|${lastDay}`;
    const known = this.kept.get(key);
    if (known !== undefined) return known;
    const found = ruleInstances(recurrenceOf(rule.id, rule), firstDay * DAY_MS, lastDay * DAY_MS);
    this.kept.set(key, found, found.length + 1);
    return found;
  }
}
