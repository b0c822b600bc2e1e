import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { HOUR_MS, MINUTE_MS } from '../time/local-time.js';
import type { PriceCard, QuoteInput } from './price-types.js';
import { busyIntervals, priceCardAt, quote, volumeMonth } from './quote.js';
import { validateLadder, validatePriceCard } from './validate-price-card.js';

const write = (amountMinor: number, currency: string): string => `${currency} ${(amountMinor / 100).toFixed(2)}`;
const plain: PriceCard = {
  currency: 'EUR',
  perMinuteMinor: 600,
  setupMinor: 0,
  minimumMinor: 0,
  busyHours: [],
  shortNotice: null,
  volume: [],
};

/** The card that the picture of the antenna page shows. */
const pictured: PriceCard = {
  currency: 'EUR',
  perMinuteMinor: 560,
  setupMinor: 1200,
  minimumMinor: 3200,
  busyHours: [{ days: [1, 2, 3, 4, 5], fromLocal: '17:00', toLocal: '21:00', percent: 20 }],
  shortNotice: { underHours: 2, percent: 10 },
  volume: [{ overMinutesInMonth: 300, percent: 12 }],
};
const tuesdayEvening = Date.UTC(2026, 11, 1, 18, 10);
const ask = (change: Partial<QuoteInput>) =>
  quote(
    {
      card: pictured,
      fromMs: tuesdayEvening,
      toMs: tuesdayEvening + 8 * MINUTE_MS,
      buyMs: tuesdayEvening - 24 * HOUR_MS,
      monthlyMinutesSoFar: 0,
      timeZone: 'Europe/London',
      ...change,
    },
    write,
  );

describe('quotes', () => {
  it('gives the pictured example: 8 min 00 s on a Tuesday at 18:10, bought the day before, is 65.76', () => {
    const { lines, totalMinor } = ask({});
    expect(lines).toEqual([
      { kind: 'time', label: '8 min 00 s', detail: 'at EUR 5.60 a minute', amountMinor: 4480 },
      { kind: 'setup', label: 'Set-up', detail: 'once a contact', amountMinor: 1200 },
      { kind: 'busy', label: 'Busy hours', detail: '+20\u00a0%, 17:00 to 21:00 at the station', amountMinor: 896 },
    ]);
    expect(totalMinor).toBe(6576);
  });

  it('gives the pictured price of the found pass: 60.80 + 15.00 + 6.08 = 81.88', () => {
    const card: PriceCard = {
      ...plain,
      perMinuteMinor: 640,
      setupMinor: 1500,
      shortNotice: { underHours: 2, percent: 10 },
    };
    const fromMs = Date.UTC(2026, 11, 1, 15, 0, 5);
    const found = ask({
      card,
      fromMs,
      toMs: fromMs + 570_000,
      buyMs: Date.UTC(2026, 11, 1, 14, 5, 9),
      timeZone: 'Europe/Oslo',
    });
    expect(found.lines.map((line) => line.amountMinor)).toEqual([6080, 1500, 608]);
    expect(found.lines[2]?.detail).toBe('10\u00a0%, under 2\u00a0h before AOS');
    expect(found.totalMinor).toBe(8188);
  });

  it('splits a contact at the edge of busy hours, on the station clock', () => {
    const fromMs = Date.UTC(2026, 11, 1, 16, 57);
    const line = ask({ fromMs, toMs: fromMs + 8 * MINUTE_MS }).lines.find((each) => each.kind === 'busy');
    expect(line).toMatchObject({
      detail: '+20\u00a0%, on 5 min 00 s, 17:00 to 21:00 at the station',
      amountMinor: 560,
    });
    expect(ask({ fromMs, toMs: fromMs + 3 * MINUTE_MS }).lines.some((each) => each.kind === 'busy')).toBe(false);
  });

  it('knows busy hours past midnight and across a clock change', () => {
    const night = { days: [6], fromLocal: '22:00', toLocal: '06:00', percent: -30 };
    const from = Date.UTC(2026, 2, 28);
    expect(busyIntervals(night, 'Europe/Oslo', from, from + 48 * HOUR_MS)).toEqual([
      { fromMs: Date.UTC(2026, 2, 28, 21), toMs: Date.UTC(2026, 2, 29, 4) },
    ]);
    const line = ask({
      card: { ...plain, busyHours: [night] },
      fromMs: from + 22 * HOUR_MS,
      toMs: from + 22 * HOUR_MS + 600_000,
      buyMs: from,
      timeZone: 'Europe/Oslo',
    }).lines[1];
    expect(line).toMatchObject({ kind: 'busy', label: 'Quiet hours', amountMinor: -1800 });
  });

  it('applies the volume tier to the time above it only, and the highest tier reached', () => {
    const card: PriceCard = {
      ...plain,
      volume: [
        { overMinutesInMonth: 305, percent: 20 },
        { overMinutesInMonth: 300, percent: 10 },
      ],
    };
    const { lines } = ask({ card, toMs: tuesdayEvening + 10 * MINUTE_MS, monthlyMinutesSoFar: 298 });
    expect(lines.slice(1).map((line) => line.amountMinor)).toEqual([-300, -360]);
    expect(lines[1]?.detail).toBe('\u221210\u00a0%, on 5 min 00 s, after 300 min in the month');
  });

  it('raises a cheap contact to the least charge and says so', () => {
    const { lines, totalMinor } = ask({ toMs: tuesdayEvening + MINUTE_MS });
    expect(totalMinor).toBe(3200);
    expect(lines.at(-1)).toMatchObject({ kind: 'least charge', amountMinor: 3200 - 560 - 1200 - 112 });
  });

  it('ends short notice exactly at its limit', () => {
    const at = (noticeMs: number) =>
      ask({ buyMs: tuesdayEvening - noticeMs }).lines.some((line) => line.kind === 'short notice');
    expect(at(2 * HOUR_MS)).toBe(false);
    expect(at(2 * HOUR_MS - 1)).toBe(true);
  });

  it('is exact to the second and rounds halves up: 1 s at 0.30 a minute is half a cent, so one', () => {
    expect(ask({ card: { ...plain, perMinuteMinor: 30 }, toMs: tuesdayEvening + 1000 }).totalMinor).toBe(1);
    expect(ask({ card: { ...plain, perMinuteMinor: 29 }, toMs: tuesdayEvening + 1000 }).totalMinor).toBe(0);
  });

  it('always adds up, is whole, and never below the least charge', () => {
    const cards = fc.record({
      currency: fc.constant('EUR'),
      perMinuteMinor: fc.integer({ min: 0, max: 100_000 }),
      setupMinor: fc.integer({ min: 0, max: 100_000 }),
      minimumMinor: fc.integer({ min: 0, max: 100_000 }),
      busyHours: fc.array(
        fc.record({
          days: fc.constant([2]),
          fromLocal: fc.constant('18:00'),
          toLocal: fc.constant('18:15'),
          percent: fc.integer({ min: -90, max: 300 }),
        }),
        { maxLength: 1 },
      ),
      shortNotice: fc.option(
        fc.record({ underHours: fc.integer({ min: 1, max: 100 }), percent: fc.integer({ min: 0, max: 300 }) }),
      ),
      volume: fc.array(
        fc.record({ overMinutesInMonth: fc.integer({ min: 0, max: 400 }), percent: fc.integer({ min: 0, max: 90 }) }),
        { maxLength: 1 },
      ),
    });
    fc.assert(
      fc.property(
        cards,
        fc.integer({ min: 1, max: 3_600_000 }),
        fc.double({ min: 0, max: 500, noNaN: true }),
        (card, lengthMs, monthlyMinutesSoFar) => {
          const { lines, totalMinor } = ask({ card, toMs: tuesdayEvening + lengthMs, monthlyMinutesSoFar });
          expect(lines.reduce((sum, line) => sum + line.amountMinor, 0)).toBe(totalMinor);
          expect(lines.every((line) => Number.isInteger(line.amountMinor))).toBe(true);
          expect(totalMinor).toBeGreaterThanOrEqual(card.minimumMinor);
        },
      ),
    );
  });

  it('refuses a contact that ends before it begins or is bought too late', () => {
    expect(() => ask({ toMs: tuesdayEvening })).toThrow('must end after it begins');
    expect(() => ask({ buyMs: tuesdayEvening + 1 })).toThrow('bought before it begins');
  });
});

describe('price cards', () => {
  it('takes the card in force on the day of purchase', () => {
    const cards = [1000, 3000, 2000].map((validFromMs) => ({ ...plain, validFromMs }));
    expect(priceCardAt(cards, 2999)?.validFromMs).toBe(2000);
    expect(priceCardAt(cards, 3000)?.validFromMs).toBe(3000);
    expect(priceCardAt(cards, 999)).toBeUndefined();
  });

  it('counts volume in the calendar month of the station', () => {
    expect(volumeMonth(Date.UTC(2026, 11, 31, 23, 30), 'Europe/Oslo')).toEqual({
      fromMs: Date.UTC(2026, 11, 31, 23),
      toMs: Date.UTC(2027, 0, 31, 23),
    });
  });

  it('accepts the pictured card and names each fault of a bad one', () => {
    expect(validatePriceCard(pictured)).toEqual([]);
    const bad: PriceCard = {
      ...pictured,
      perMinuteMinor: -5,
      busyHours: [{ days: [8], fromLocal: '25:00', toLocal: '21:00', percent: 900 }],
      volume: [{ overMinutesInMonth: 5, percent: 95 }],
    };
    expect(validatePriceCard(bad).map((fault) => fault.field)).toEqual([
      'perMinuteMinor',
      'busyHours.0.days',
      'busyHours.0.percent',
      'busyHours.0.fromLocal',
      'volume.0.percent',
    ]);
  });

  it('refuses busy hours that overlap, also past midnight on Sunday', () => {
    const overlap = validatePriceCard({
      ...plain,
      busyHours: [
        { days: [7], fromLocal: '22:00', toLocal: '02:00', percent: 10 },
        { days: [1], fromLocal: '01:00', toLocal: '03:00', percent: 10 },
      ],
    });
    expect(overlap.map((fault) => fault.sentence)).toEqual([
      'The busy hours 01:00 to 03:00 overlap others on the same day.',
    ]);
  });

  it('wants a ladder that falls', () => {
    expect(validateLadder([])).toHaveLength(1);
    expect(
      validateLadder([
        { hoursBeforeAos: 4, refundPercent: 50 },
        { hoursBeforeAos: 24, refundPercent: 60 },
      ]),
    ).toHaveLength(2);
  });
});
