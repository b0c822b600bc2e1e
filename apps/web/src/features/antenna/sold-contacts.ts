/** What a new mask does to contacts that are sold already, from the track each was sold with. */
import type { ResponseOf, routes } from '@skyberth/shared';
import { maskElevationAt } from '../../drawing/common/rose.js';
import type { AzimuthMinutes, EditableMaskPoint } from '../../drawing/mask-editor/mask-editor-types.js';

type Geometry = ResponseOf<typeof routes.bookingGeometry>;
export type SoldTrack = Pick<Geometry, 'aosUtc' | 'losUtc' | 'track'>;

const SECTOR_DEG = 10;
/** Below this the edges of a contact are the same to anyone. */
const SAME_MS = 500;

export interface MaskTouch {
  /** Time at the beginning that falls below the new mask. */
  readonly startsLaterMs: number;
  readonly endsSoonerMs: number;
  /** Nothing of it is left above the new mask. */
  readonly isLost: boolean;
}

interface Span {
  readonly fromMs: number;
  readonly toMs: number;
}

/** First and last moment above the mask within the sold time, straight between the instants of the track. */
function visibleSpan({ track, aosUtc, losUtc }: SoldTrack, mask: readonly EditableMaskPoint[]): Span | null {
  const [aosMs, losMs] = [Date.parse(aosUtc), Date.parse(losUtc)];
  const heights = track.map((place) => ({
    atMs: Date.parse(place.timeUtc),
    overDeg: place.elevationDeg - maskElevationAt(mask, place.azimuthDeg),
  }));
  let fromMs = Number.POSITIVE_INFINITY;
  let toMs = Number.NEGATIVE_INFINITY;
  heights.forEach((here, index) => {
    const before = heights[index - 1];
    if (before && before.overDeg >= 0 !== here.overDeg >= 0) {
      const share = before.overDeg / (before.overDeg - here.overDeg);
      const crossingMs = before.atMs + share * (here.atMs - before.atMs);
      fromMs = Math.min(fromMs, crossingMs);
      toMs = Math.max(toMs, crossingMs);
    }
    if (here.overDeg >= 0) {
      fromMs = Math.min(fromMs, here.atMs);
      toMs = Math.max(toMs, here.atMs);
    }
  });
  const span = { fromMs: Math.max(fromMs, aosMs), toMs: Math.min(toMs, losMs) };
  return span.toMs > span.fromMs ? span : null;
}

/** How the sold time shrinks from the mask in force to the new one; null where it does not. */
export function touchOf(
  sold: SoldTrack,
  before: readonly EditableMaskPoint[],
  now: readonly EditableMaskPoint[],
): MaskTouch | null {
  const old = visibleSpan(sold, before);
  if (!old) return null;
  const left = visibleSpan(sold, now);
  if (!left) return { startsLaterMs: 0, endsSoonerMs: 0, isLost: true };
  const startsLaterMs = Math.max(0, left.fromMs - old.fromMs);
  const endsSoonerMs = Math.max(0, old.toMs - left.toMs);
  return startsLaterMs > SAME_MS || endsSoonerMs > SAME_MS ? { startsLaterMs, endsSoonerMs, isLost: false } : null;
}

/** Minutes of the sold contacts above each mask in every 10 degrees of azimuth, for the bars outside the rose. */
export function minutesBySector(
  sold: readonly SoldTrack[],
  before: readonly EditableMaskPoint[],
  now: readonly EditableMaskPoint[],
): AzimuthMinutes[] {
  const bars = Array.from({ length: 360 / SECTOR_DEG }, (_, index) => ({
    fromAzimuthDeg: index * SECTOR_DEG,
    minutesBefore: 0,
    minutesNow: 0,
  }));
  for (const { track, aosUtc, losUtc } of sold) {
    const [aosMs, losMs] = [Date.parse(aosUtc), Date.parse(losUtc)];
    track.forEach((place, index) => {
      const next = track[index + 1];
      const bar = bars[Math.floor((place.azimuthDeg % 360) / SECTOR_DEG)];
      if (!next || !bar) return;
      const fromMs = Math.max(aosMs, Date.parse(place.timeUtc));
      const minutes = Math.max(0, Math.min(losMs, Date.parse(next.timeUtc)) - fromMs) / 60_000;
      const middleDeg = (place.elevationDeg + next.elevationDeg) / 2;
      if (middleDeg >= maskElevationAt(before, place.azimuthDeg)) bar.minutesBefore += minutes;
      if (middleDeg >= maskElevationAt(now, place.azimuthDeg)) bar.minutesNow += minutes;
    });
  }
  return bars;
}
