/** Where in the sky sold contacts are flown, from the track each was sold with. */
import type { ResponseOf, routes } from '@skyberth/shared';
import { maskElevationAt } from '../../drawing/common/rose.js';
import type { AzimuthMinutes, EditableMaskPoint } from '../../drawing/mask-editor/mask-editor-types.js';

type Geometry = ResponseOf<typeof routes.bookingGeometry>;
export type SoldTrack = Pick<Geometry, 'aosUtc' | 'losUtc' | 'track'>;

const SECTOR_DEG = 10;
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
