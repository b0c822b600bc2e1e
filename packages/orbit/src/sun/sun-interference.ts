/** The Sun near the beam: as noise that drowns the link, and as heat that a receive chain may not survive. */
import { halfPowerBeamwidthDeg } from '../radio/antenna.js';
import type { GeodeticSite, LookAngles } from '../types.js';
import { type SunPath, sunPath } from './sun-path.js';
import { type Direction, separationDeg } from './sun-position.js';

/** Half the width of the Sun's disc that interference reckons with, degrees (sun-outage practice of satellite operators). */
const SOLAR_RADIUS_DEG = 0.25;

/** With its centre this far below the horizon no part of the Sun is seen, refraction included. */
const SUN_GONE_DEG = -1;

/**
 * Angle from the Sun's centre within which the link suffers: half the 3 dB width plus the Sun's radius.
 * Source: sun-outage page of the operator of the Palapa satellites.
 */
export function sunOutageAngleDeg(dish: { diameterM: number; frequencyMhz: number }): number {
  return halfPowerBeamwidthDeg(dish) / 2 + SOLAR_RADIUS_DEG;
}

export interface SunInterference {
  /** Smallest angle between beam and Sun while the Sun is up; undefined if it is down throughout. */
  readonly closestDeg: number | undefined;
  readonly closestMs: number | undefined;
  /** Where the Sun stood then. */
  readonly sunAtClosest: Direction | undefined;
  /** When the beam was nearer than the keep-off angle. */
  readonly intervals: readonly { readonly fromMs: number; readonly toMs: number }[];
}

/**
 * Follows the angle between beam and Sun along a pass. Between two samples the angle is taken as a straight line, so a
 * track of a few seconds' step is good to a tenth of a degree at the fastest.
 */
export function sunInterference(
  track: readonly LookAngles[],
  site: GeodeticSite,
  keepOffDeg: number,
  path: SunPath = sunPath(),
): SunInterference {
  const angles = track.map((look) => {
    const sun = path.direction(site, look.timeMs);
    return { timeMs: look.timeMs, sun, apartDeg: sun.elevationDeg > SUN_GONE_DEG ? separationDeg(look, sun) : 180 };
  });
  const seen = angles.filter(({ sun }) => sun.elevationDeg > SUN_GONE_DEG);
  const closest = seen.reduce<(typeof seen)[number] | undefined>(
    (best, angle) => (best === undefined || angle.apartDeg < best.apartDeg ? angle : best),
    undefined,
  );
  return {
    closestDeg: closest?.apartDeg,
    closestMs: closest?.timeMs,
    sunAtClosest: closest?.sun,
    intervals: intervalsBelow(angles, keepOffDeg),
  };
}

function intervalsBelow(
  angles: readonly { timeMs: number; apartDeg: number }[],
  levelDeg: number,
): { fromMs: number; toMs: number }[] {
  const intervals: { fromMs: number; toMs: number }[] = [];
  let openMs: number | undefined;
  angles.forEach((angle, index) => {
    const before = angles[index - 1];
    const inside = angle.apartDeg < levelDeg;
    const crossingMs = before === undefined ? angle.timeMs : crossing(before, angle, levelDeg);
    if (inside && openMs === undefined) openMs = crossingMs;
    if (!inside && openMs !== undefined) {
      intervals.push({ fromMs: openMs, toMs: crossingMs });
      openMs = undefined;
    }
  });
  if (openMs !== undefined) intervals.push({ fromMs: openMs, toMs: angles.at(-1)!.timeMs });
  return intervals;
}

function crossing(
  from: { timeMs: number; apartDeg: number },
  to: { timeMs: number; apartDeg: number },
  levelDeg: number,
): number {
  const share = (levelDeg - from.apartDeg) / (to.apartDeg - from.apartDeg);
  return from.timeMs + (to.timeMs - from.timeMs) * Math.max(0, Math.min(1, share));
}
