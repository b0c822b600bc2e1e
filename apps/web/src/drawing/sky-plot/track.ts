/** Figures of a track on the sky plot: places between samples, minute ticks, the way it runs, and its words. */
import { formatDegrees, formatDuration, formatTime } from '../../ui/format.js';
import { type Point, type Rose, toPoint } from '../common/rose.js';
import type { SkyPlotProps, TrackPoint } from './sky-plot-types.js';

const MINUTE_MS = 60_000;

/** Direction at an instant between two samples; null outside the track. The short way is taken across north. */
export function trackAt(track: readonly TrackPoint[], atMs: number): TrackPoint | null {
  const after = track.findIndex((point) => point.atMs >= atMs);
  const to = track[after];
  if (!to) return null;
  if (to.atMs === atMs) return to;
  const from = track[after - 1];
  if (!from) return null;
  const share = (atMs - from.atMs) / (to.atMs - from.atMs);
  const turn = ((to.azimuthDeg - from.azimuthDeg + 540) % 360) - 180;
  return {
    atMs,
    azimuthDeg: (from.azimuthDeg + share * turn + 360) % 360,
    elevationDeg: from.elevationDeg + share * (to.elevationDeg - from.elevationDeg),
  };
}

/** Points from one instant to another, both included when the track reaches them. */
export function trackBetween(track: readonly TrackPoint[], fromMs: number, toMs: number): TrackPoint[] {
  const inside = track.filter((point) => point.atMs > fromMs && point.atMs < toMs);
  const ends = [trackAt(track, fromMs), trackAt(track, toMs)];
  return [ends[0], ...inside, ends[1]].filter((point): point is TrackPoint => !!point);
}

/** A short stroke across the track. */
export interface Tick {
  readonly atMs: number;
  readonly from: Point;
  readonly to: Point;
  /** Where a label may stand, left of the way it runs. */
  readonly label: Point;
}

/** A tick on each full minute between AOS and LOS. */
export function minuteTicks(
  rose: Rose,
  track: readonly TrackPoint[],
  aosMs: number,
  losMs: number,
  halfPx: number,
): Tick[] {
  const ticks: Tick[] = [];
  for (let atMs = Math.ceil(aosMs / MINUTE_MS) * MINUTE_MS; atMs <= losMs; atMs += MINUTE_MS) {
    const place = trackAt(track, atMs);
    const way = headingAt(rose, track, atMs);
    if (!place || !way) continue;
    const at = toPoint(rose, place.azimuthDeg, place.elevationDeg);
    const across = { x: -way.y, y: way.x };
    const shifted = (px: number): Point => ({ x: at.x + across.x * px, y: at.y + across.y * px });
    ticks.push({ atMs, from: shifted(-halfPx), to: shifted(halfPx), label: shifted(halfPx + 5) });
  }
  return ticks;
}

/** Unit vector on the drawing along which the vessel moves. */
export function headingAt(rose: Rose, track: readonly TrackPoint[], atMs: number): Point | null {
  const reachMs = 4000;
  const a = trackAt(track, atMs - reachMs) ?? trackAt(track, atMs);
  const b = trackAt(track, atMs + reachMs) ?? trackAt(track, atMs);
  if (!a || !b || a.atMs === b.atMs) return null;
  const [p, q] = [toPoint(rose, a.azimuthDeg, a.elevationDeg), toPoint(rose, b.azimuthDeg, b.elevationDeg)];
  const length = Math.hypot(q.x - p.x, q.y - p.y);
  return length === 0 ? null : { x: (q.x - p.x) / length, y: (q.y - p.y) / length };
}

/** The plot in words, for those who don't see it. */
export function skyWords({ track, aosMs, losMs, nowMs, sun }: SkyPlotProps): string {
  const [aos, los] = [trackAt(track, aosMs), trackAt(track, losMs)];
  const highest = track.reduce<TrackPoint | null>(
    (best, one) => (!best || one.elevationDeg > best.elevationDeg ? one : best),
    null,
  );
  const place = (point: TrackPoint) =>
    `azimuth ${formatDegrees(point.azimuthDeg)}, elevation ${formatDegrees(point.elevationDeg)}`;
  const now = nowMs === undefined || nowMs < aosMs || nowMs > losMs ? null : trackAt(track, nowMs);
  return [
    aos && `Rises at ${formatTime(aosMs)} at ${place(aos)}.`,
    highest && `Highest at ${formatTime(highest.atMs)} at ${place(highest)}.`,
    los && `Sets at ${formatTime(losMs)} at ${place(los)}, after ${formatDuration(losMs - aosMs)}.`,
    now && `Now at ${place(now)}.`,
    sun &&
      `The Sun stands at azimuth ${formatDegrees(sun.azimuthDeg)}, elevation ${formatDegrees(sun.elevationDeg)}; keep ${formatDegrees(sun.keepOffDeg, 0)} off.`,
  ]
    .filter(Boolean)
    .join(' ');
}
