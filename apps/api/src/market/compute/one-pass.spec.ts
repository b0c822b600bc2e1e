import { describe, expect, it } from 'vitest';
import { jsonText, SAMPLE_NOW_MS, sampleAntenna, sampleFlying, sampleSearch } from '../testing/samples.js';
import type { PassJob, PassOutcome } from '../workers/job-types.js';
import { PassDesk } from './pass-desk.js';

const desk = new PassDesk();

/** A pass that can be sold whole, as the search shows it. */
const whole = (() => {
  const outcome = desk.carryOut(sampleSearch());
  if (outcome.kind !== 'found') throw new Error(outcome.kind);
  const passes = JSON.parse(jsonText(outcome.json));
  const { geometry, parts } = passes.find((pass: { state: string }) => pass.state === 'for sale');
  return { aosMs: Date.parse(geometry.aosUtc), losMs: Date.parse(geometry.losUtc), totalMinor: parts[0].totalMinor };
})();

function ask(change: Partial<PassJob>): Extract<PassOutcome, { kind: 'pass' }> {
  const outcome = desk.carryOut<PassJob>({
    kind: 'pass',
    nowMs: SAMPLE_NOW_MS,
    need: 'downlink',
    bands: [],
    aosMs: whole.aosMs,
    losMs: whole.losMs,
    spacecraft: sampleFlying(),
    antenna: sampleAntenna(),
    withTrack: false,
    booked: false,
    ...change,
  });
  if (outcome.kind !== 'pass') throw new Error(outcome.kind);
  return outcome;
}

describe('one pass', () => {
  it('is recomputed to the very times and price that the search has shown', () => {
    const outcome = ask({});
    expect([outcome.aosMs, outcome.losMs, outcome.reasons]).toEqual([whole.aosMs, whole.losMs, []]);
    expect(outcome.price?.totalMinor).toBe(whole.totalMinor);
  });

  it('takes a request a millisecond beside for the pass itself', () => {
    const outcome = ask({ aosMs: whole.aosMs - 1, losMs: whole.losMs + 1 });
    expect([outcome.aosMs, outcome.losMs, outcome.reasons]).toEqual([whole.aosMs, whole.losMs, []]);
  });

  it('sells nothing to a request that reaches two milliseconds beyond the pass', () => {
    for (const change of [{ aosMs: whole.aosMs - 2 }, { losMs: whole.losMs + 2 }]) {
      const outcome = ask(change);
      expect(outcome.price).toBeNull();
      expect(outcome.reasons.map((reason) => reason.code)).toEqual(['not as asked']);
      expect(outcome.reasons[0]?.sentence).toContain(new Date(whole.aosMs).toISOString());
    }
  });

  it('sells a part where parts are sold, with the geometry of its own ends', () => {
    const outcome = ask({ aosMs: whole.aosMs + 30_000, losMs: whole.aosMs + 180_000 });
    expect(outcome.price?.billedSeconds).toBe(150);
    expect(outcome.part.aosUtc).toBe(new Date(whole.aosMs + 30_000).toISOString());
    expect(outcome.part.elevationDeg[0]).toBeGreaterThan(outcome.pass.elevationDeg[0]);
    expect(outcome.tcaMs).toBeGreaterThanOrEqual(outcome.aosMs);
    expect(outcome.tcaMs).toBeLessThanOrEqual(outcome.losMs);
  });

  it('sells no part shorter than the shortest contact, and none where only whole passes are sold', () => {
    const short = ask({ aosMs: whole.aosMs, losMs: whole.aosMs + 60_000 });
    expect(short.price).toBeNull();
    expect(short.reasons).toHaveLength(1);
    const antenna = sampleAntenna({ partsAllowed: false });
    expect(ask({ antenna }).price?.totalMinor).toBe(whole.totalMinor);
    expect(ask({ antenna, aosMs: whole.aosMs + 30_000 }).price).toBeNull();
  });

  it('names what blocks the stretch that was asked for', () => {
    const blackouts = [{ fromMs: whole.losMs - 10_000, toMs: whole.losMs + 600_000, reason: 'feed change' }];
    const outcome = ask({ antenna: sampleAntenna({ blackouts }) });
    expect(outcome.price).toBeNull();
    expect(outcome.reasons.map((reason) => reason.code)).toEqual(['blackout']);
    expect(outcome.reasons[0]?.sentence).toContain('feed change');
  });

  it('counts volume of the month at the station', () => {
    const price = { ...sampleAntenna().price, volume: [{ overMinutesInMonth: 60, percent: 50 }] };
    const bought = [{ fromMs: SAMPLE_NOW_MS, toMs: SAMPLE_NOW_MS + 3_600_000 }];
    const full = ask({ antenna: sampleAntenna({ price }) }).price;
    const reduced = ask({ antenna: sampleAntenna({ price, bought }) }).price;
    expect(full?.totalMinor).toBe(whole.totalMinor);
    expect(reduced?.lines.map((line) => line.kind)).toContain('volume');
    expect(reduced?.totalMinor).toBeLessThan(full?.totalMinor ?? 0);
  });

  it('leaves a booked contact its own times, whatever blocks them now, and makes no price', () => {
    const blackouts = [{ fromMs: whole.aosMs, toMs: whole.losMs, reason: 'storm' }];
    const outcome = ask({ booked: true, antenna: sampleAntenna({ blackouts }), aosMs: whole.aosMs + 7_000 });
    expect([outcome.aosMs, outcome.losMs, outcome.price, outcome.reasons]).toEqual([
      whole.aosMs + 7_000,
      whole.losMs,
      null,
      [],
    ]);
  });

  it('finds no pass where the spacecraft is below the horizon', () => {
    expect(() => ask({ aosMs: whole.aosMs - 1_200_000, losMs: whole.aosMs - 900_000 })).toThrow('no pass');
  });
});
