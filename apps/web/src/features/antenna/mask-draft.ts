/** A horizon mask while it is edited: its points, its way back, and what it leaves of the sky. */
import { maskElevationAt } from '../../drawing/common/rose.js';
import type { EditableMaskPoint } from '../../drawing/mask-editor/mask-editor-types.js';

export type MaskTuple = [azimuthDeg: number, elevationDeg: number];

const STEP_DEG = 0.5;
const RADIAN = Math.PI / 180;
/** Steps back that are kept. */
const MOST_UNDO = 100;

/** Points with names of their own, in ascending azimuth; corners at one azimuth keep their order. */
export function pointsOf(mask: readonly (readonly [number, number])[]): readonly EditableMaskPoint[] {
  return mask
    .map(([azimuthDeg, elevationDeg], index) => ({ id: `p${index}`, azimuthDeg, elevationDeg }))
    .sort((a, b) => a.azimuthDeg - b.azimuthDeg);
}

export const maskOf = (points: readonly EditableMaskPoint[]): MaskTuple[] =>
  points.map(({ azimuthDeg, elevationDeg }) => [azimuthDeg, elevationDeg]);

/** Whether both have the same corners. */
export function isSameMask(one: readonly EditableMaskPoint[], other: readonly EditableMaskPoint[]): boolean {
  return (
    one.length === other.length &&
    one.every(
      (point, index) =>
        point.azimuthDeg === other[index]?.azimuthDeg && point.elevationDeg === other[index]?.elevationDeg,
    )
  );
}

/**
 * Share of the hemisphere above the mask, in percent. The part of a hemisphere above an elevation is 1 - sin(elevation)
 * (Archimedes' zone), averaged over azimuth in steps of half a degree; ground below the horizon adds nothing.
 */
export function skyAbovePercent(points: readonly EditableMaskPoint[]): number {
  const steps = 360 / STEP_DEG;
  let sum = 0;
  for (let step = 0; step < steps; step += 1) {
    const elevationDeg = Math.max(0, maskElevationAt(points, step * STEP_DEG));
    sum += 1 - Math.sin(elevationDeg * RADIAN);
  }
  return (sum / steps) * 100;
}

/** The azimuth at which two masks differ most, and by how much (positive where the new one is higher). */
export function largestChange(
  before: readonly EditableMaskPoint[],
  now: readonly EditableMaskPoint[],
): { readonly azimuthDeg: number; readonly changeDeg: number } {
  let largest = { azimuthDeg: 0, changeDeg: 0 };
  const azimuths = [...before, ...now].map((point) => point.azimuthDeg);
  for (const azimuthDeg of azimuths) {
    const changeDeg = maskElevationAt(now, azimuthDeg) - maskElevationAt(before, azimuthDeg);
    if (Math.abs(changeDeg) > Math.abs(largest.changeDeg)) largest = { azimuthDeg, changeDeg };
  }
  return largest;
}

/** The points as CSV, as the reader takes it back. */
export function csvOf(points: readonly EditableMaskPoint[]): string {
  const rows = points.map(({ azimuthDeg, elevationDeg }) => `${azimuthDeg},${elevationDeg}`);
  return `${['azimuth_deg,elevation_deg', ...rows].join('\n')}\n`;
}

/** The list now, the last one that was let go, and the ones before it. */
export interface MaskDraft {
  readonly points: readonly EditableMaskPoint[];
  readonly settled: readonly EditableMaskPoint[];
  readonly past: readonly (readonly EditableMaskPoint[])[];
}

export type MaskAct =
  | { readonly kind: 'change'; readonly points: readonly EditableMaskPoint[]; readonly settled: boolean }
  | { readonly kind: 'undo' }
  | { readonly kind: 'begin'; readonly points: readonly EditableMaskPoint[] };

export const beginDraft = (points: readonly EditableMaskPoint[]): MaskDraft => ({ points, settled: points, past: [] });

/** One drag is one step back, however many places it passed. */
export function maskDraft(draft: MaskDraft, act: MaskAct): MaskDraft {
  if (act.kind === 'begin') return beginDraft(act.points);
  if (act.kind === 'undo') {
    const last = draft.past.at(-1);
    return last ? { points: last, settled: last, past: draft.past.slice(0, -1) } : draft;
  }
  if (!act.settled) return { ...draft, points: act.points };
  if (isSameMask(act.points, draft.settled)) return { ...draft, points: draft.settled };
  return { points: act.points, settled: act.points, past: [...draft.past, draft.settled].slice(-MOST_UNDO) };
}
