/** Openings and blackouts as they are entered: checked by the market's own rules, and turned into what is kept. */
import { type Interval, isTimeZone, MarketError, ruleInstances, validateRules } from '@skyberth/market';
import type { BlackoutEntry, FieldError, OpeningInput } from '@skyberth/shared';
import { DomainError } from '../platform/domain-error.js';
import { recurrenceOf } from '../stations/calendar-times.js';

type Entry = OpeningInput | BlackoutEntry;

/** Throws `bad-input` with one sentence for each thing that is wrong; `pointer` names the list they came in. */
export function refuseBadEntries(entries: readonly Entry[], pointer: string): void {
  const faults = entries.flatMap((entry, index): FieldError[] =>
    entryFaults(entry).map(({ field, sentence }) => ({ pointer: `${pointer}/${index}/${field}`, detail: sentence })),
  );
  const [first] = faults;
  if (first) throw new DomainError('bad-input', faults.map((fault) => fault.detail).join(' '), faults);
}

/** Everything that is wrong with one entry, by field. */
export function entryFaults(entry: Entry): { field: string; sentence: string }[] {
  if (entry.rrule === null && entry.durationMin !== null) return onceFaults(entry);
  return validateRules([recurrenceOf('entry', entry)]).map(({ field, sentence }) => ({
    field: field.replace(/^entry\.?/, ''),
    sentence,
  }));
}

/** What comes once may last longer than what comes again, so only its beginning is checked. */
function onceFaults(entry: Entry): { field: string; sentence: string }[] {
  if (!isTimeZone(entry.timeZone))
    return [{ field: 'timeZone', sentence: `“${entry.timeZone}” is not a time zone of the IANA database.` }];
  try {
    onceInterval(entry);
    return [];
  } catch (error) {
    if (!(error instanceof MarketError)) throw error;
    return [{ field: 'startLocal', sentence: error.message }];
  }
}

/** All that one entry takes in a period, uncut. */
export const entryInstances = (entry: Entry, fromMs: number, toMs: number): Interval[] =>
  ruleInstances(recurrenceOf('entry', entry), fromMs, toMs);

/** The time of an entry that comes once. */
export function onceInterval(entry: Entry): Interval {
  const fromMs = Date.parse(`${entry.startLocal}Z`);
  const day = 86_400_000;
  const [only] = entryInstances({ ...entry, exceptLocal: [] }, fromMs - 2 * day, fromMs + 2 * day);
  if (only === undefined) throw new MarketError('bad local time', `“${entry.startLocal}” is not a local time.`);
  return only;
}
