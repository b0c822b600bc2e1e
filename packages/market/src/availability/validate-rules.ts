/** What is wrong with availability rules, in sentences, before they are saved. */
import { MarketError, type MarketFault } from '../market-error.js';
import {
  DAY_MS,
  formatLocalDateTime,
  fromWallClock,
  isTimeZone,
  parseLocalDateTime,
  parseTimeOfDay,
  toWallClock,
} from '../time/local-time.js';
import {
  type AvailabilityRule,
  LONGEST_INSTANCE_MIN,
  MOST_INSTANCES_A_YEAR,
  parseRecurrence,
  ruleInstances,
} from './rules.js';

/** Overlaps are looked for in this many days from the later of the two beginnings: a year, so both clock changes. */
const OVERLAP_SEARCH_MS = 366 * DAY_MS;

/** Every fault of every rule, then the first overlap of each pair; empty when all can be saved. `field` is `<id>.<field>`. */
export function validateRules(rules: readonly AvailabilityRule[]): MarketFault[] {
  const faults = rules.flatMap(ruleFaults);
  const ids = rules.map((rule) => rule.id);
  for (const id of new Set(ids.filter((each, index) => ids.indexOf(each) !== index))) {
    faults.push({ field: id, sentence: `Two rules are both called “${id}”.` });
  }
  return faults.length > 0 ? faults : overlapFaults(rules);
}

function ruleFaults(rule: AvailabilityRule): MarketFault[] {
  const faults: MarketFault[] = [];
  const fault = (field: string, sentence: string) => faults.push({ field: `${rule.id}.${field}`, sentence });
  const attempt = (field: string, act: () => unknown) => {
    try {
      act();
    } catch (cause) {
      if (!(cause instanceof MarketError)) throw cause;
      fault(field, cause.message);
    }
  };
  if (!isTimeZone(rule.timeZone))
    fault('timeZone', `“${rule.timeZone}” is not a time zone of the IANA database, such as Europe/Oslo.`);
  attempt('startLocal', () => parseLocalDateTime(rule.startLocal));
  if ((rule.durationMin === undefined) === (rule.endLocal === undefined))
    fault('durationMin', 'Give either a length in minutes or the time of day at which it ends.');
  const { durationMin, endLocal } = rule;
  if (
    durationMin !== undefined &&
    !(Number.isInteger(durationMin) && durationMin >= 1 && durationMin <= LONGEST_INSTANCE_MIN)
  ) {
    fault(
      'durationMin',
      `The length is ${durationMin} min; it must be a whole number from 1 to ${LONGEST_INSTANCE_MIN}.`,
    );
  }
  for (const each of rule.exceptLocal ?? []) attempt('exceptLocal', () => parseLocalDateTime(each));
  if (endLocal !== undefined) attempt('endLocal', () => parseTimeOfDay(endLocal));
  if (faults.length > 0) return faults;
  attempt('rrule', () => parseRecurrence(rule.rrule, rule.startLocal, rule.timeZone));
  if (faults.length > 0) return faults;
  const fromMs = fromWallClock(parseLocalDateTime(rule.startLocal), rule.timeZone);
  const first = ruleInstances(rule, fromMs, fromMs + OVERLAP_SEARCH_MS);
  if (first.length > MOST_INSTANCES_A_YEAR)
    fault('rrule', `It repeats ${first.length} times in its first year; at most ${MOST_INSTANCES_A_YEAR}.`);
  if (first.length === 0) fault('rrule', 'It opens nothing in the year after its start.');
  const clash = first.find((each, index) => index > 0 && each.fromMs < (first[index - 1]?.toMs ?? 0));
  if (clash !== undefined)
    fault(
      'durationMin',
      `It overlaps itself: one instance is still open when the next begins at ${formatLocalDateTime(toWallClock(clash.fromMs, rule.timeZone)).replace('T', ' ')} at the station.`,
    );
  return faults;
}

function overlapFaults(rules: readonly AvailabilityRule[]): MarketFault[] {
  const faults: MarketFault[] = [];
  const begins = rules.map((rule) => fromWallClock(parseLocalDateTime(rule.startLocal), rule.timeZone));
  rules.forEach((a, i) => {
    rules.slice(i + 1).forEach((b, offset) => {
      const fromMs = Math.max(begins[i] as number, begins[i + 1 + offset] as number);
      const both = firstOverlap(
        ruleInstances(a, fromMs, fromMs + OVERLAP_SEARCH_MS),
        ruleInstances(b, fromMs, fromMs + OVERLAP_SEARCH_MS),
      );
      if (both !== undefined) {
        faults.push({
          field: b.id,
          sentence: `The rules “${a.id}” and “${b.id}” overlap, first from ${formatLocalDateTime(toWallClock(both, a.timeZone)).replace('T', ' ')} at the station.`,
        });
      }
    });
  });
  return faults;
}

/** Where two sorted lists first overlap. */
function firstOverlap(
  a: readonly { fromMs: number; toMs: number }[],
  b: readonly { fromMs: number; toMs: number }[],
): number | undefined {
  for (let i = 0, j = 0; i < a.length && j < b.length; ) {
    const x = a[i] as { fromMs: number; toMs: number };
    const y = b[j] as { fromMs: number; toMs: number };
    const fromMs = Math.max(x.fromMs, y.fromMs);
    if (fromMs < Math.min(x.toMs, y.toMs)) return fromMs;
    if (x.toMs <= y.toMs) i += 1;
    else j += 1;
  }
  return undefined;
}
