import { readFileSync } from 'node:fs';
import { type AvailabilityRule, fromWallClock, recurrenceStarts, ruleInstances } from '@skyberth/market';
import { describe, expect, it } from 'vitest';

interface PublishedCase {
  readonly name: string;
  readonly tzid: string;
  readonly dtstart: string;
  readonly rrule: string;
  readonly complete: boolean;
  readonly rfcPage: string;
  readonly instancesUtc: readonly string[];
}

const { cases } = JSON.parse(readFileSync(new URL('data/time/rfc5545-rrule-cases.json', import.meta.url), 'utf8')) as {
  cases: readonly PublishedCase[];
};

const LENGTH_MIN = 45;
const YEAR_MS = 366 * 86_400_000;

function ruleOf(published: PublishedCase): AvailabilityRule {
  const [, year, month, day, hour, minute] = /^(\d{4})(\d\d)(\d\d)T(\d\d)(\d\d)/.exec(published.dtstart) ?? [];
  return {
    id: published.name,
    rrule: published.rrule,
    startLocal: `${year}-${month}-${day}T${hour}:${minute}`,
    timeZone: published.tzid,
    durationMin: LENGTH_MIN,
  };
}

describe('recurrence rules against the examples of RFC 5545 section 3.8.5.3', () => {
  it('has all 17 of them', () => {
    expect(cases).toHaveLength(17);
  });

  it.each(cases.map((published) => [`${published.name} (${published.rfcPage})`, published] as const))(
    '%s',
    (_name, published) => {
      const expected = published.instancesUtc.map((text) => Date.parse(text));
      const fromMs = (expected[0] as number) - 1;
      // A complete list must have nothing after its last instance either, so the period goes on for years.
      const toMs = published.complete ? (expected.at(-1) as number) + 4 * YEAR_MS : (expected.at(-1) as number) + 1;
      const found = ruleInstances(ruleOf(published), fromMs, toMs);
      expect(found.map((each) => new Date(each.fromMs).toISOString())).toEqual(
        expected.map((timeMs) => new Date(timeMs).toISOString()),
      );
      expect(found.every((each) => each.toMs - each.fromMs === LENGTH_MIN * 60_000)).toBe(true);
    },
  );
});

describe('local times about a clock change, RFC 5545 section 3.3.5', () => {
  const NEW_YORK = 'America/New_York';

  it('reads a time that occurs twice as the first one (2007-11-04T01:30 is 05:30Z)', () => {
    expect(fromWallClock(Date.UTC(2007, 10, 4, 1, 30), NEW_YORK)).toBe(Date.UTC(2007, 10, 4, 5, 30));
  });

  it('reads a time in the gap with the offset before it (2007-03-11T02:30 is 03:30 EDT, 07:30Z)', () => {
    expect(fromWallClock(Date.UTC(2007, 2, 11, 2, 30), NEW_YORK)).toBe(Date.UTC(2007, 2, 11, 7, 30));
  });

  it('skips dates that do not exist and keeps instances that fall into the gap (3.3.10)', () => {
    const rule: AvailabilityRule = {
      id: 'night',
      rrule: 'FREQ=DAILY;COUNT=3',
      startLocal: '2007-03-10T02:30',
      timeZone: NEW_YORK,
      durationMin: 30,
    };
    const starts = recurrenceStarts(rule, Date.UTC(2007, 2, 1), Date.UTC(2007, 3, 1));
    expect(starts).toHaveLength(3);
    expect(ruleInstances(rule, Date.UTC(2007, 2, 1), Date.UTC(2007, 3, 1)).map((each) => each.fromMs)).toEqual([
      Date.UTC(2007, 2, 10, 7, 30),
      Date.UTC(2007, 2, 11, 7, 30),
      Date.UTC(2007, 2, 12, 6, 30),
    ]);
  });
});
