import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { totalMs } from '../interval.js';
import { DAY_MS, HOUR_MS } from '../time/local-time.js';
import { blackoutIntervals, openIntervals, sellableIntervals } from './availability.js';
import { type AvailabilityRule, expandRules, ruleInstances, weeklyRule } from './rules.js';
import { validateRules } from './validate-rules.js';

const OSLO = 'Europe/Oslo';
const allDays = [1, 2, 3, 4, 5, 6, 7];
const hours = (fromLocal: string, toLocal: string, days: readonly number[] = allDays, id = 'hours'): AvailabilityRule =>
  weeklyRule({ id, days, fromLocal, toLocal, timeZone: OSLO, fromDate: '2026-01-01' });
const daily: AvailabilityRule = {
  id: 'daily',
  rrule: 'FREQ=DAILY',
  startLocal: '2026-01-01T08:00',
  durationMin: 120,
  timeZone: OSLO,
};

// Clock changes in Norway in 2026: 29 March and 25 October (Directive 2000/84/EC: the last Sundays, 01:00 UTC).
const SPRING = Date.UTC(2026, 2, 28, 12);
const AUTUMN = Date.UTC(2026, 9, 24, 12);

describe('availability rules', () => {
  it('keeps the hour on the station clock when the clock changes', () => {
    const starts = expandRules([daily], SPRING, SPRING + 2 * DAY_MS).map((each) => new Date(each.fromMs).toISOString());
    expect(starts).toEqual(['2026-03-29T06:00:00.000Z', '2026-03-30T06:00:00.000Z']);
    expect(expandRules([daily], SPRING - DAY_MS, SPRING)[0]?.fromMs).toBe(Date.UTC(2026, 2, 28, 7));
  });

  it('has neither gap nor overlap when open all day, on days of 23 and of 25 hours', () => {
    for (const fromMs of [SPRING, AUTUMN]) {
      expect(expandRules([hours('00:00', '24:00')], fromMs, fromMs + 3 * DAY_MS)).toEqual([
        { fromMs, toMs: fromMs + 3 * DAY_MS },
      ]);
      expect(validateRules([hours('00:00', '24:00')])).toEqual([]);
    }
  });

  it('closes on the clock: a night shift lasts 7 hours in spring and 9 in autumn', () => {
    const night = hours('22:00', '06:00', [6]);
    const [spring] = expandRules([night], SPRING, SPRING + DAY_MS);
    const [autumn] = expandRules([night], AUTUMN, AUTUMN + DAY_MS);
    expect((spring as { toMs: number; fromMs: number }).toMs - (spring?.fromMs ?? 0)).toBe(7 * HOUR_MS);
    expect((autumn as { toMs: number; fromMs: number }).toMs - (autumn?.fromMs ?? 0)).toBe(9 * HOUR_MS);
  });

  it('lasts its exact minutes when given a length (RFC 5545 3.3.6)', () => {
    const exact: AvailabilityRule = {
      id: 'exact',
      rrule: 'FREQ=DAILY',
      startLocal: '2026-01-01T22:00',
      durationMin: 480,
      timeZone: OSLO,
    };
    expect(totalMs(expandRules([exact], SPRING, SPRING + DAY_MS))).toBe(8 * HOUR_MS);
  });

  it('shows an instance that began before the period, cut to it', () => {
    const fromMs = Date.UTC(2026, 5, 1, 7);
    expect(expandRules([daily], fromMs, fromMs + HOUR_MS)).toEqual([{ fromMs, toMs: fromMs + HOUR_MS }]);
  });

  it('begins on the first chosen day and ends with UNTIL', () => {
    const rule = { ...hours('08:00', '18:00', [1, 3]), rrule: 'FREQ=WEEKLY;BYDAY=MO,WE;UNTIL=20260107T235959Z' };
    expect(rule.startLocal).toBe('2026-01-05T08:00');
    expect(expandRules([rule], Date.UTC(2026, 0, 1), Date.UTC(2026, 2, 1))).toHaveLength(2);
  });

  it('leaves out exceptions, which a count counts all the same (RFC 5545 3.8.5.1)', () => {
    const rule = {
      id: 'daily',
      rrule: 'FREQ=DAILY;COUNT=3',
      startLocal: '2026-12-01T09:00',
      timeZone: 'Europe/Oslo',
      durationMin: 60,
      exceptLocal: ['2026-12-02T09:00'],
    };
    const found = ruleInstances(rule, Date.UTC(2026, 10, 1), Date.UTC(2027, 0, 1));
    expect(found.map((each) => each.fromMs)).toEqual([Date.UTC(2026, 11, 1, 8), Date.UTC(2026, 11, 3, 8)]);
  });

  it('finds the same instances years later as by walking from the start', () => {
    const rules = fc.constantFrom(
      'FREQ=DAILY;INTERVAL=3',
      'FREQ=DAILY;BYMONTH=3,10;BYDAY=SA,SU',
      'FREQ=WEEKLY;INTERVAL=2;BYDAY=TU,SU;WKST=MO',
      'FREQ=WEEKLY;INTERVAL=3;BYDAY=MO,WE,FR;WKST=SU',
      'FREQ=WEEKLY;BYDAY=MO,TU,WE;BYSETPOS=-1',
      'FREQ=WEEKLY;UNTIL=20240630T000000Z',
      'FREQ=MONTHLY;BYDAY=-1FR',
    );
    const begin = Date.UTC(2022, 4, 4);
    fc.assert(
      fc.property(rules, fc.integer({ min: 0, max: 1_000 }), (rrule, days) => {
        const rule: AvailabilityRule = {
          id: 'r',
          rrule,
          startLocal: '2022-05-04T09:00',
          durationMin: 90,
          timeZone: OSLO,
        };
        const fromMs = begin + days * DAY_MS;
        const toMs = fromMs + 40 * DAY_MS;
        const walked = ruleInstances(rule, begin, toMs).filter((each) => each.toMs > fromMs);
        expect(ruleInstances(rule, fromMs, toMs)).toEqual(walked);
      }),
    );
  });

  it('refuses days that are none', () => {
    expect(() => hours('08:00', '18:00', [0])).toThrow('1 (Monday) to 7 (Sunday)');
    expect(() => hours('08:00', '18:00', [])).toThrow('got none');
  });
});

describe('openings and blackouts', () => {
  const fromMs = Date.UTC(2026, 11, 1);
  const toMs = fromMs + DAY_MS;

  it('adds one-off openings and takes off one-off and repeated blackouts', () => {
    const open = openIntervals({
      rules: [daily],
      openings: [{ fromMs: fromMs + 9 * HOUR_MS, toMs: fromMs + 10 * HOUR_MS }],
      fromMs,
      toMs,
    });
    expect(open).toEqual([{ fromMs: fromMs + 7 * HOUR_MS, toMs: fromMs + 10 * HOUR_MS }]);
    const blackouts = blackoutIntervals({
      rules: [
        {
          id: 'grease',
          rrule: 'FREQ=WEEKLY;BYDAY=TU',
          startLocal: '2026-01-06T08:30',
          durationMin: 30,
          timeZone: OSLO,
          reason: 'greasing',
        },
      ],
      once: [{ fromMs: fromMs + 9 * HOUR_MS, toMs: fromMs + 9.5 * HOUR_MS, reason: 'own use' }],
      fromMs,
      toMs,
    });
    expect(blackouts.map((each) => each.reason)).toEqual(['greasing', 'own use']);
    expect(totalMs(sellableIntervals(open, blackouts))).toBe(2 * HOUR_MS);
  });
});

describe('faults of availability rules', () => {
  const faultsOf = (change: Partial<AvailabilityRule>) =>
    validateRules([{ ...daily, ...change }]).map((fault) => `${fault.field}: ${fault.sentence}`);

  it('finds nothing wrong with good rules', () => {
    expect(validateRules([daily, hours('12:00', '18:00')])).toEqual([]);
  });

  it.each([
    [{ timeZone: 'Mars/Olympus' }, 'daily.timeZone: “Mars/Olympus” is not a time zone'],
    [{ startLocal: '2026-13-01T08:00' }, 'daily.startLocal: “2026-13-01T08:00” is not a local time'],
    [{ durationMin: -30 }, 'daily.durationMin: The length is -30 min; it must be a whole number from 1'],
    [{ durationMin: undefined }, 'daily.durationMin: Give either a length in minutes or the time of day'],
    [{ endLocal: '10:00' }, 'daily.durationMin: Give either'],
    [
      { rrule: 'FREQ=MINUTELY' },
      'daily.rrule: The recurrence “FREQ=MINUTELY” cannot be used: FREQ is “MINUTELY”; use DAILY',
    ],
    [{ rrule: 'FREQ=DAILY;BYHOUR=8,9' }, 'the time of day comes from the start'],
    [{ rrule: 'FREQ=DAILY;INTERVAL=0' }, 'INTERVAL is “0”; use a whole number from 1'],
    [{ rrule: 'FREQ=DAILY;COUNT=3;UNTIL=20270101T000000Z' }, 'COUNT and UNTIL exclude each other'],
    [{ rrule: 'every day' }, '“every day” is not a part'],
    [{ rrule: 'INTERVAL=2' }, 'it has no FREQ'],
    [{ rrule: 'FREQ=DAILY;FREQ=WEEKLY' }, 'FREQ stands twice'],
    [{ rrule: 'FREQ=DAILY;BYDAY=XX' }, 'BYDAY is “XX”; use weekdays'],
    [{ rrule: 'FREQ=YEARLY;BYMONTH=2;BYMONTHDAY=30' }, 'daily.rrule: It opens nothing in the year after its start.'],
    [
      { durationMin: 1500 },
      'daily.durationMin: It overlaps itself: one instance is still open when the next begins at 2026-01-02 08:00',
    ],
  ] satisfies [Partial<AvailabilityRule>, string][])('%j', (change, expected) => {
    expect(faultsOf(change).join('\n')).toContain(expected);
  });

  it('names the first overlap of two rules, and rules of one name', () => {
    expect(validateRules([daily, hours('09:00', '12:00', [1], 'mondays')])[0]?.sentence).toBe(
      'The rules “daily” and “mondays” overlap, first from 2026-01-05 09:00 at the station.',
    );
    expect(validateRules([daily, daily])[0]?.sentence).toBe('Two rules are both called “daily”.');
  });
});
