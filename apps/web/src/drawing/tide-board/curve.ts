/** From the samples of a pass to the points of its drawing, cut to AOS and LOS and to the antenna's own horizon. */
import { elevationShare } from '../common/elevation-scale.js';
import type { BoardHump, HumpProfile } from './tide-board-types.js';

/** Where a hump is drawn. */
export interface CurveFrame {
  /** Horizontal place of an instant in px. */
  readonly x: (atMs: number) => number;
  readonly baseY: number;
  readonly humpPx: number;
}

/** Points of a curve from left to right; `land` is the height of the mask there. Larger y is lower. */
export interface CurvePoints {
  readonly xs: readonly number[];
  readonly tops: readonly number[];
  readonly lands: readonly number[];
}

const LEAST_STEP_PX = 0.9;

/** Value of equally spaced samples at an instant, straight between them, held at the ends. */
export function sampleAt(profile: HumpProfile, samples: Float32Array, atMs: number): number {
  const last = samples.length - 1;
  const place = ((atMs - profile.fromMs) / (profile.toMs - profile.fromMs)) * last;
  const low = Math.max(0, Math.min(last, Math.floor(place)));
  const high = Math.min(last, low + 1);
  const share = Math.max(0, Math.min(1, place - low));
  return (samples[low] ?? 0) * (1 - share) + (samples[high] ?? 0) * share;
}

/** Curve and land between two instants, both included; points closer than a pixel are left out. */
export function curveBetween(profile: HumpProfile, frame: CurveFrame, fromMs: number, toMs: number): CurvePoints {
  const xs: number[] = [];
  const tops: number[] = [];
  const lands: number[] = [];
  const add = (atMs: number) => {
    xs.push(frame.x(atMs));
    tops.push(frame.baseY - elevationShare(sampleAt(profile, profile.elevationDeg, atMs)) * frame.humpPx);
    lands.push(frame.baseY - elevationShare(sampleAt(profile, profile.maskDeg, atMs)) * frame.humpPx);
  };
  const stepMs = (profile.toMs - profile.fromMs) / Math.max(1, profile.elevationDeg.length - 1);
  const stepPx = Math.abs(frame.x(profile.fromMs + stepMs) - frame.x(profile.fromMs));
  const stride = Math.max(1, Math.floor(LEAST_STEP_PX / Math.max(1e-6, stepPx)));
  add(fromMs);
  const first = Math.floor((fromMs - profile.fromMs) / stepMs) + 1;
  for (let at = first; profile.fromMs + at * stepMs < toMs; at += stride) add(profile.fromMs + at * stepMs);
  add(toMs);
  return { xs, tops, lands };
}

/** The highest point of a curve. */
export function apexOf(points: CurvePoints): { x: number; y: number } {
  let best = 0;
  for (let at = 1; at < points.tops.length; at += 1) {
    if ((points.tops[at] ?? 0) < (points.tops[best] ?? 0)) best = at;
  }
  return { x: points.xs[best] ?? 0, y: points.tops[best] ?? 0 };
}

/** Widest stretch of x in which the curve is above `topY` and the land below `bottomY`; null when there is none. */
export function openWater(points: CurvePoints, topY: number, bottomY: number): [number, number] | null {
  let best: [number, number] | null = null;
  let start: number | null = null;
  const close = (endX: number) => {
    if (start !== null && (!best || endX - start > best[1] - best[0])) best = [start, endX];
    start = null;
  };
  for (let at = 0; at < points.xs.length; at += 1) {
    const x = points.xs[at] as number;
    const isOpen = (points.tops[at] as number) <= topY && (points.lands[at] as number) >= bottomY;
    if (isOpen && start === null) start = x;
    if (!isOpen) close(points.xs[at - 1] ?? x);
  }
  close(points.xs.at(-1) ?? 0);
  return best;
}

/** The stretch of a pass that its state is about: the bought or held part, else all of it. */
export function statedPart(hump: BoardHump): { fromMs: number; toMs: number } {
  if (!hump.part) return { fromMs: hump.aosMs, toMs: hump.losMs };
  return { fromMs: Math.max(hump.aosMs, hump.part.fromMs), toMs: Math.min(hump.losMs, hump.part.toMs) };
}
