/** Changes to a mask, each giving a new list: points stay in ascending azimuth, and never pass each other. */
import { maskElevationAt } from '../common/rose.js';
import type { EditableMaskPoint } from './mask-editor-types.js';

/** Finest step of an angle, in degrees. */
export const STEP_DEG = 0.1;
/** Step with Shift held. */
export const LARGE_STEP_DEG = 1;
const LARGEST_AZIMUTH_DEG = 359.9;
const LARGEST_ELEVATION_DEG = 90;
/** Two angles nearer than this are the same to the eye and to the table. */
const SAME_DEG = 0.05;

/** Rounds to a tenth of a degree without leftovers of binary fractions. */
export function roundDeg(angleDeg: number): number {
  return Math.round(angleDeg * 10) / 10;
}

/** Moves a point, kept between its neighbours and inside 0 to 90 degrees. Unknown ids change nothing. */
export function movePoint(
  points: readonly EditableMaskPoint[],
  id: string,
  to: { readonly azimuthDeg: number; readonly elevationDeg: number },
): readonly EditableMaskPoint[] {
  const at = points.findIndex((point) => point.id === id);
  if (at < 0) return points;
  const before = points[at - 1];
  const after = points[at + 1];
  const least = before ? before.azimuthDeg + STEP_DEG : 0;
  const most = after ? after.azimuthDeg - STEP_DEG : LARGEST_AZIMUTH_DEG;
  const moved = {
    id,
    azimuthDeg: roundDeg(clamp(to.azimuthDeg, least, most)),
    elevationDeg: roundDeg(clamp(to.elevationDeg, 0, LARGEST_ELEVATION_DEG)),
  };
  return points.with(at, moved);
}

/** Adds a point on the present line at an azimuth. On an azimuth that has one already it changes nothing. */
export function addPoint(
  points: readonly EditableMaskPoint[],
  azimuthDeg: number,
  newId: string,
): readonly EditableMaskPoint[] {
  const azimuth = roundDeg(clamp(azimuthDeg, 0, LARGEST_AZIMUTH_DEG));
  if (points.some((point) => Math.abs(point.azimuthDeg - azimuth) < STEP_DEG)) return points;
  const added = {
    id: newId,
    azimuthDeg: azimuth,
    elevationDeg: roundDeg(Math.max(0, maskElevationAt(points, azimuth))),
  };
  return [...points, added].sort((a, b) => a.azimuthDeg - b.azimuthDeg);
}

/** Azimuth halfway from a point to the next, across north from the last. */
export function azimuthAfter(points: readonly EditableMaskPoint[], id: string): number | null {
  const at = points.findIndex((point) => point.id === id);
  const point = points[at];
  if (!point) return null;
  const next = points[(at + 1) % points.length] ?? point;
  const gap = (next.azimuthDeg - point.azimuthDeg + 360) % 360 || 360;
  return roundDeg((point.azimuthDeg + gap / 2) % 360);
}

/** Takes a point away; the last one stays, since a mask needs one. */
export function removePoint(points: readonly EditableMaskPoint[], id: string): readonly EditableMaskPoint[] {
  return points.length > 1 ? points.filter((point) => point.id !== id) : points;
}

/** Whether a point differs from the mask in force: its own old place, or the old line when it is new. */
export function isChanged(point: EditableMaskPoint, before: readonly EditableMaskPoint[]): boolean {
  const old = before.find((one) => one.id === point.id);
  if (!old) return true;
  return (
    Math.abs(old.azimuthDeg - point.azimuthDeg) > SAME_DEG || Math.abs(old.elevationDeg - point.elevationDeg) > SAME_DEG
  );
}

/** What a key does to a point; null when it isn't one of the editor's keys. */
export function keyMove(
  key: string,
  isLarge: boolean,
  point: EditableMaskPoint,
): { azimuthDeg: number; elevationDeg: number } | null {
  const step = isLarge ? LARGE_STEP_DEG : STEP_DEG;
  const { azimuthDeg, elevationDeg } = point;
  const moves: Readonly<Record<string, { azimuthDeg: number; elevationDeg: number }>> = {
    ArrowUp: { azimuthDeg, elevationDeg: elevationDeg + step },
    ArrowDown: { azimuthDeg, elevationDeg: elevationDeg - step },
    ArrowLeft: { azimuthDeg: azimuthDeg - step, elevationDeg },
    ArrowRight: { azimuthDeg: azimuthDeg + step, elevationDeg },
  };
  return moves[key] ?? null;
}

function clamp(value: number, least: number, most: number): number {
  return Math.max(least, Math.min(most, value));
}
