import { describe, expect, it } from 'vitest';
import type { ElementSet } from '../elements/element-set.js';
import { parseElementSets } from '../elements/parse-element-sets.js';
import { sgp4Source } from '../elements/sgp4-source.js';
import { temeToEcef } from '../frames/look-angles.js';
import { Ephemeris } from './ephemeris.js';
import { INTERVAL_NUMBERS, POINTS } from './interpolation.js';

const LINES = [
  '1 81001U 26900A   26334.25000000  .00000000  00000-0  40000-4 0  9990',
  '2 81001  97.4800  12.0000 0012000  80.0000  10.0000 15.15323725  1000',
];
const { tle: _lines, ...LOW } = parseElementSets(LINES.join('\n')).sets[0] as ElementSet;
const DAY_MS = 86_400_000;

/** Worst distance in metres between the interpolated place and SGP4's own, at many places of every interval. */
function worstErrorM(set: ElementSet): number {
  const source = sgp4Source(set);
  const fromMs = set.epochMs + 5 * DAY_MS;
  const ephemeris = Ephemeris.of(source, fromMs, fromMs + 2 * DAY_MS);
  const state = new Float64Array(6);
  let worstKm = 0;
  for (let at = ephemeris.startAt; at < ephemeris.endAt; at += 0.0937) {
    const interval = Math.floor(at);
    const first = ephemeris.interval(interval);
    const place = [0, 0, 0];
    for (let power = POINTS - 1; power >= 0; power -= 1) {
      for (const axis of [0, 1, 2]) {
        place[axis] = place[axis]! * (at - interval - 0.5) + ephemeris.powers[first + 3 * power + axis]!;
      }
    }
    const timeMs = ephemeris.timeMs(at);
    source.stateTeme(timeMs, state);
    temeToEcef(timeMs, state);
    worstKm = Math.max(worstKm, Math.hypot(state[0]! - place[0]!, state[1]! - place[1]!, state[2]! - place[2]!));
  }
  expect(ephemeris.powers.length % INTERVAL_NUMBERS).toBe(0);
  return worstKm * 1000;
}

describe('interpolation', () => {
  it.each<readonly [string, Partial<ElementSet>, number]>([
    ['a low orbit', {}, 0.1],
    ['a very low one with much drag', { meanMotionRevPerDay: 16, bstarPerEarthRadius: 1e-4 }, 0.1],
    ['a low ellipse', { meanMotionRevPerDay: 11, eccentricity: 0.2 }, 0.1],
    ['a half-day ellipse', { meanMotionRevPerDay: 2.006, eccentricity: 0.72, inclinationDeg: 63.4 }, 0.5],
    ['a transfer orbit with drag', { meanMotionRevPerDay: 2.28, eccentricity: 0.73, bstarPerEarthRadius: 1e-3 }, 0.5],
    ['a day-long ellipse', { meanMotionRevPerDay: 1.0027, eccentricity: 0.4 }, 0.5],
    ['the geostationary orbit', { meanMotionRevPerDay: 1.0027379, eccentricity: 0.0003, inclinationDeg: 0.06 }, 0.5],
  ])('stays within its bound on %s', (_, change, boundM) => {
    expect(worstErrorM({ ...LOW, ...change })).toBeLessThan(boundM);
  });

  it('samples a period shorter than a step', () => {
    const source = sgp4Source(LOW);
    const ephemeris = Ephemeris.of(source, LOW.epochMs, LOW.epochMs + 1_000);
    expect(ephemeris.endAt - ephemeris.startAt).toBeGreaterThan(6);
    expect(Math.abs(ephemeris.timeMs(ephemeris.endAt) - LOW.epochMs - 1_000)).toBeLessThan(0.001);
  });
});
