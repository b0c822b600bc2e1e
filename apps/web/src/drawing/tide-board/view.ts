/** The stretch of time in view: from pixels to time and back, panning, zooming, and the steps of the time axis. */
import type { Interval } from './tide-board-types.js';

const SECOND_MS = 1000;
const MINUTE_MS = 60 * SECOND_MS;
const HOUR_MS = 60 * MINUTE_MS;
/** One day in ms. */
export const DAY_MS = 24 * HOUR_MS;
/** Closest and widest view. */
export const LEAST_SPAN_MS = 2 * MINUTE_MS;
export const LARGEST_SPAN_MS = 14 * DAY_MS;

/** Horizontal place of an instant, in px from the left edge. */
export function timeToX(view: Interval, widthPx: number, atMs: number): number {
  return ((atMs - view.fromMs) / (view.toMs - view.fromMs)) * widthPx;
}

/** The instant at a horizontal place. */
export function xToTime(view: Interval, widthPx: number, xPx: number): number {
  return view.fromMs + (xPx / widthPx) * (view.toMs - view.fromMs);
}

/** Keeps a view between the closest and the widest, and inside the limits when there are any. */
export function clampView(view: Interval, limits?: Interval): Interval {
  const most = limits ? Math.min(LARGEST_SPAN_MS, limits.toMs - limits.fromMs) : LARGEST_SPAN_MS;
  const middle = (view.fromMs + view.toMs) / 2;
  const span = Math.max(Math.min(LEAST_SPAN_MS, most), Math.min(most, view.toMs - view.fromMs));
  let fromMs = span === view.toMs - view.fromMs ? view.fromMs : middle - span / 2;
  if (limits) fromMs = Math.min(Math.max(fromMs, limits.fromMs), limits.toMs - span);
  return { fromMs, toMs: fromMs + span };
}

/** Moves the view by a time. */
export function panView(view: Interval, byMs: number, limits?: Interval): Interval {
  return clampView({ fromMs: view.fromMs + byMs, toMs: view.toMs + byMs }, limits);
}

/** Narrows (`factor` below 1) or widens the view; the instant `anchorMs` stays where it is on the screen. */
export function zoomView(view: Interval, factor: number, anchorMs: number, limits?: Interval): Interval {
  const span = view.toMs - view.fromMs;
  const newSpan = Math.max(LEAST_SPAN_MS, Math.min(LARGEST_SPAN_MS, span * factor));
  const share = (anchorMs - view.fromMs) / span;
  const fromMs = anchorMs - share * newSpan;
  return clampView({ fromMs, toMs: fromMs + newSpan }, limits);
}

/** Steps of the axis: a label every `labelMs`, a dark or light piece of the scale bar every `barMs`. */
export interface AxisStep {
  readonly labelMs: number;
  readonly barMs: number;
}

const STEPS: readonly AxisStep[] = [
  { labelMs: 10 * SECOND_MS, barMs: 5 * SECOND_MS },
  { labelMs: 30 * SECOND_MS, barMs: 10 * SECOND_MS },
  { labelMs: MINUTE_MS, barMs: 20 * SECOND_MS },
  { labelMs: 2 * MINUTE_MS, barMs: MINUTE_MS },
  { labelMs: 5 * MINUTE_MS, barMs: MINUTE_MS },
  { labelMs: 10 * MINUTE_MS, barMs: 5 * MINUTE_MS },
  { labelMs: 30 * MINUTE_MS, barMs: 10 * MINUTE_MS },
  { labelMs: HOUR_MS, barMs: 30 * MINUTE_MS },
  { labelMs: 2 * HOUR_MS, barMs: HOUR_MS },
  { labelMs: 6 * HOUR_MS, barMs: 2 * HOUR_MS },
  { labelMs: 12 * HOUR_MS, barMs: 6 * HOUR_MS },
  { labelMs: DAY_MS, barMs: 12 * HOUR_MS },
  { labelMs: 2 * DAY_MS, barMs: DAY_MS },
  { labelMs: 7 * DAY_MS, barMs: DAY_MS },
];

/** The finest step whose labels stand at least `leastGapPx` apart. */
export function axisStep(view: Interval, widthPx: number, leastGapPx = 96): AxisStep {
  const msPerPx = (view.toMs - view.fromMs) / Math.max(1, widthPx);
  return STEPS.find((step) => step.labelMs / msPerPx >= leastGapPx) ?? (STEPS[STEPS.length - 1] as AxisStep);
}

/** Multiples of a step from the first at or before the view's start to the first past its end, from UTC midnight. */
export function multiplesInView(view: Interval, stepMs: number): number[] {
  const marks: number[] = [];
  for (let at = Math.floor(view.fromMs / stepMs) * stepMs; at <= view.toMs + stepMs; at += stepMs) marks.push(at);
  return marks;
}

/** `3 h in view`, `10 min in view`, `2 d in view`. */
export function spanText(view: Interval): string {
  const span = view.toMs - view.fromMs;
  const [value, unit] =
    span >= 2 * DAY_MS
      ? [span / DAY_MS, 'd']
      : span >= 90 * MINUTE_MS
        ? [span / HOUR_MS, 'h']
        : [span / MINUTE_MS, 'min'];
  return `${value >= 10 ? Math.round(value) : Math.round(value * 10) / 10}\u00a0${unit} in view`;
}
