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
  /** Time between its ends that falls below the new mask. */
  readonly cutOutMs: number;
  /** Nothing of it is left above the new mask. */
  readonly isLost: boolean;
}

interface Span {
  readonly fromMs: number;
  readonly toMs: number;
  /** Time above the mask within it. */
  readonly aboveMs: number;
}

/** What of the sold time lies above the mask, straight between the instants of the track. */
function visibleSpan({ track, aosUtc, losUtc }: SoldTrack, mask: readonly EditableMaskPoint[]): Span | null {
  const [aosMs, losMs] = [Date.parse(aosUtc), Date.parse(losUtc)];
  const heights = track.map((place) => ({
    atMs: Date.parse(place.timeUtc),
    overDeg: place.elevationDeg - maskElevationAt(mask, place.azimuthDeg),
  }));
  let [firstMs, lastMs, aboveMs] = [losMs, aosMs, 0];
  heights.forEach((to, index) => {
    const from = heights[index - 1];
    if (!from || (from.overDeg < 0 && to.overDeg < 0)) return;
    const crossingMs = from.atMs + (from.overDeg / (from.overDeg - to.overDeg)) * (to.atMs - from.atMs);
    const startMs = Math.max(aosMs, from.overDeg < 0 ? crossingMs : from.atMs);
    const endMs = Math.min(losMs, to.overDeg < 0 ? crossingMs : to.atMs);
    if (endMs <= startMs) return;
    firstMs = Math.min(firstMs, startMs);
    lastMs = Math.max(lastMs, endMs);
    aboveMs += endMs - startMs;
  });
  return aboveMs > 0 ? { fromMs: firstMs, toMs: lastMs, aboveMs } : null;
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
  if (!left) return { startsLaterMs: 0, endsSoonerMs: 0, cutOutMs: 0, isLost: true };
  const startsLaterMs = Math.max(0, left.fromMs - old.fromMs);
  const endsSoonerMs = Math.max(0, old.toMs - left.toMs);
  const cutOutMs = Math.max(0, old.aboveMs - left.aboveMs - startsLaterMs - endsSoonerMs);
  const isTouched = [startsLaterMs, endsSoonerMs, cutOutMs].some((lostMs) => lostMs > SAME_MS);
  return isTouched ? { startsLaterMs, endsSoonerMs, cutOutMs, isLost: false } : null;
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
