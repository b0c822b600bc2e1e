/** Day, twilight and night of a station, for the paper that a tide board is drawn on. */
import type { GeodeticSite } from '../types.js';
import { type SunPath, sunPath } from './sun-path.js';

export type DaylightPhase = 'day' | 'civil' | 'nautical' | 'astronomical' | 'night';

/**
 * Elevation of the Sun's centre below which a phase is over. Sunrise and sunset at -0.833 degrees (34' refraction, 16'
 * of disc) and the twilights at -6, -12 and -18 are the definitions of the almanacs.
 */
const PHASES: readonly (readonly [DaylightPhase, lowestDeg: number])[] = [
  ['day', -0.833],
  ['civil', -6],
  ['nautical', -12],
  ['astronomical', -18],
  ['night', -90],
];

export interface DaylightInterval {
  readonly fromMs: number;
  readonly toMs: number;
  readonly phase: DaylightPhase;
}

/** The phase at an instant. */
export function daylightPhase(site: GeodeticSite, timeMs: number, sun: SunPath = sunPath()): DaylightPhase {
  const { elevationDeg } = sun.direction(site, timeMs);
  return PHASES.find(([, lowestDeg]) => elevationDeg >= lowestDeg)?.[0] ?? 'night';
}

const STEP_MS = 10 * 60_000;
const TOLERANCE_MS = 500;

/** Phases over a period, unbroken and in order; changes to half a second of the model, which is good to some seconds. */
export function daylightIntervals(
  site: GeodeticSite,
  fromMs: number,
  toMs: number,
  sun: SunPath = sunPath(),
): DaylightInterval[] {
  const intervals: DaylightInterval[] = [];
  let startMs = fromMs;
  let phase = daylightPhase(site, fromMs, sun);
  const visit = (atMs: number, nextMs: number, before: DaylightPhase, after: DaylightPhase): void => {
    if (before === after) return;
    if (nextMs - atMs > TOLERANCE_MS) {
      const middleMs = (atMs + nextMs) / 2;
      const middle = daylightPhase(site, middleMs, sun);
      visit(atMs, middleMs, before, middle);
      visit(middleMs, nextMs, middle, after);
      return;
    }
    intervals.push({ fromMs: startMs, toMs: nextMs, phase });
    startMs = nextMs;
    phase = after;
  };
  for (let atMs = fromMs; atMs < toMs; atMs += STEP_MS) {
    const nextMs = Math.min(toMs, atMs + STEP_MS);
    visit(atMs, nextMs, phase, daylightPhase(site, nextMs, sun));
  }
  intervals.push({ fromMs: startMs, toMs, phase });
  return intervals;
}
