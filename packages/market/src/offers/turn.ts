/** The time between two contacts on one dish: set-up, teardown, and turning from one azimuth to the other. */
import { MarketError } from '../market-error.js';
import type { OfferAntenna, OfferPass } from './offer-types.js';

/** Azimuth at any instant, held still before AOS and after LOS. */
export type AzimuthAt = (timeMs: number) => number;

const SCAN_STEP_MS = 1_000;
/** Turning longer than this is not looked for; a dish slower than 0.05° a second is no tracking antenna. */
const LONGEST_TURN_S = 7_200;

/** The shorter way round between two azimuths, 0 to 180 degrees. */
export function azimuthDistanceDeg(aDeg: number, bDeg: number): number {
  const apart = Math.abs(aDeg - bDeg) % 360;
  return apart > 180 ? 360 - apart : apart;
}

/** Azimuth along a pass: the pass's own function where it has one, else straight between its three instants. */
export function azimuthAlong(pass: OfferPass): AzimuthAt {
  const { aosMs, tcaMs, losMs, azimuthAtDeg } = pass;
  const clamp = (timeMs: number): number => Math.min(Math.max(timeMs, aosMs), losMs);
  if (azimuthAtDeg !== undefined) return (timeMs) => azimuthAtDeg(clamp(timeMs));
  const [aosDeg, tcaDeg, losDeg] = pass.azimuthDeg;
  const between = (fromDeg: number, toDeg: number, share: number): number =>
    fromDeg + (((((toDeg - fromDeg) % 360) + 540) % 360) - 180) * share;
  return (timeMs) => {
    const at = clamp(timeMs);
    if (at < tcaMs) return between(aosDeg, tcaDeg, (at - aosMs) / (tcaMs - aosMs));
    return losMs > tcaMs ? between(tcaDeg, losDeg, (at - tcaMs) / (losMs - tcaMs)) : losDeg;
  };
}

/** Milliseconds to turn between two azimuths. Throws `bad antenna` for a rate of zero or less. */
export function turnMs(antenna: OfferAntenna, fromDeg: number, toDeg: number): number {
  if (antenna.turnTimeS !== undefined) return antenna.turnTimeS(fromDeg, toDeg) * 1000;
  if (!(antenna.slewAzimuthDegPerS > 0))
    throw new MarketError(
      'bad antenna',
      `${antenna.name} turns at ${antenna.slewAzimuthDegPerS}° a second; it must be above zero.`,
    );
  return (azimuthDistanceDeg(fromDeg, toDeg) / antenna.slewAzimuthDegPerS) * 1000;
}

/** The most that a turn can add, so that contacts further away need no look. */
export const longestTurnMs = (antenna: OfferAntenna): number =>
  (antenna.turnTimeS === undefined
    ? Math.min(LONGEST_TURN_S, 180 / Math.max(antenna.slewAzimuthDegPerS, 1e-6))
    : LONGEST_TURN_S) * 1000;

/**
 * The first instant, not before `earliestMs`, at which the dish can have come from `fromDeg` (free at `freeMs`), be set up
 * and follow the pass. A later start needs no further look: the dish then waits along the track.
 */
export function readyAtMs(
  antenna: OfferAntenna,
  azimuthAt: AzimuthAt,
  free: { readonly freeMs: number; readonly fromDeg: number; readonly earliestMs: number },
): number {
  const setupMs = antenna.setupS * 1000;
  const possible = (timeMs: number): boolean =>
    free.freeMs + turnMs(antenna, free.fromDeg, azimuthAt(timeMs)) + setupMs <= timeMs;
  return firstPossible(
    Math.max(free.earliestMs, free.freeMs + setupMs),
    free.freeMs + setupMs + longestTurnMs(antenna),
    possible,
  );
}

/** The last instant, not after `latestMs`, at which the dish can stop following, be put down and reach `toDeg` by `dueMs`. */
export function leaveAtMs(
  antenna: OfferAntenna,
  azimuthAt: AzimuthAt,
  due: { readonly dueMs: number; readonly toDeg: number; readonly latestMs: number },
): number {
  const teardownMs = antenna.teardownS * 1000;
  const possible = (negatedMs: number): boolean =>
    -negatedMs + teardownMs + turnMs(antenna, azimuthAt(-negatedMs), due.toDeg) <= due.dueMs;
  return -firstPossible(
    Math.max(-due.latestMs, -(due.dueMs - teardownMs)),
    -(due.dueMs - teardownMs - longestTurnMs(antenna)),
    possible,
  );
}

/** Steps forward until it is possible, then halves the last step to the millisecond, always keeping a possible end. */
function firstPossible(fromMs: number, limitMs: number, possible: (timeMs: number) => boolean): number {
  if (possible(fromMs)) return fromMs;
  for (let low = fromMs; low < limitMs; low += SCAN_STEP_MS) {
    let high = Math.min(low + SCAN_STEP_MS, limitMs);
    if (!possible(high)) continue;
    let bound = low;
    while (high - bound > 1) {
      const middle = (bound + high) / 2;
      if (possible(middle)) high = middle;
      else bound = middle;
    }
    return high;
  }
  return limitMs;
}
