/** Where the spacecraft is at this instant, and what that means for pointing and tuning. Pure. */
import type { PassDetail } from '@skyberth/shared';

export interface TrackInstant {
  readonly atMs: number;
  readonly azimuthDeg: number;
  readonly elevationDeg: number;
  readonly rangeKm: number;
  readonly rangeRateKmPerS: number;
}

export interface Live extends TrackInstant {
  /** How fast the direction moves across the sky, the angle between two pointings a second apart. */
  readonly turningDegPerS: number;
}

const DEG = Math.PI / 180;

export const trackOf = (detail: PassDetail): TrackInstant[] =>
  detail.track.map((one) => ({ ...one, atMs: Date.parse(one.timeUtc) }));

/** State at an instant, straight between the track's points; null outside of them. */
export function liveAt(track: readonly TrackInstant[], atMs: number): Live | null {
  const at = instantAt(track, atMs);
  if (!at) return null;
  const next = instantAt(track, atMs + 1000);
  const before = next ?? instantAt(track, atMs - 1000);
  return { ...at, turningDegPerS: before ? angleBetweenDeg(at, before) : 0 };
}

function instantAt(track: readonly TrackInstant[], atMs: number): TrackInstant | null {
  const after = track.findIndex((one) => one.atMs >= atMs);
  const next = track[after];
  if (!next) return null;
  const last = track[after - 1];
  if (!last) return next.atMs === atMs ? next : null;
  const share = (atMs - last.atMs) / (next.atMs - last.atMs);
  const between = (a: number, b: number) => a + share * (b - a);
  // The short way round, across north where that is shorter.
  const turnDeg = ((next.azimuthDeg - last.azimuthDeg + 540) % 360) - 180;
  return {
    atMs,
    azimuthDeg: (last.azimuthDeg + share * turnDeg + 360) % 360,
    elevationDeg: between(last.elevationDeg, next.elevationDeg),
    rangeKm: between(last.rangeKm, next.rangeKm),
    rangeRateKmPerS: between(last.rangeRateKmPerS, next.rangeRateKmPerS),
  };
}

type Pointing = Pick<TrackInstant, 'azimuthDeg' | 'elevationDeg'>;

function angleBetweenDeg(a: Pointing, b: Pointing): number {
  const [x, y] = [unit(a), unit(b)];
  const across = Math.hypot(x[1] * y[2] - x[2] * y[1], x[2] * y[0] - x[0] * y[2], x[0] * y[1] - x[1] * y[0]);
  return Math.atan2(across, x[0] * y[0] + x[1] * y[1] + x[2] * y[2]) / DEG;
}

function unit({ azimuthDeg, elevationDeg }: Pointing): [number, number, number] {
  const level = Math.cos(elevationDeg * DEG);
  return [level * Math.cos(azimuthDeg * DEG), level * Math.sin(azimuthDeg * DEG), Math.sin(elevationDeg * DEG)];
}

/** A value given at the instants of the track, at `atMs`; NaN where it is not known. */
export function valueAt(track: readonly TrackInstant[], values: readonly number[], atMs: number): number {
  const after = track.findIndex((one) => one.atMs >= atMs);
  const [next, to] = [track[after], values[after]];
  if (!next || to === undefined) return Number.NaN;
  if (next.atMs === atMs) return to;
  const [last, from] = [track[after - 1], values[after - 1]];
  if (!last || from === undefined) return Number.NaN;
  return from + ((atMs - last.atMs) / (next.atMs - last.atMs)) * (to - from);
}
