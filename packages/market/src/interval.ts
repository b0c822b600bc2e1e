/** Half-open stretches of time `[fromMs, toMs)` in UTC milliseconds, and the algebra that offers are made of. */

/** A stretch of time: `fromMs` belongs to it, `toMs` does not. */
export interface Interval {
  readonly fromMs: number;
  readonly toMs: number;
}

const byStart = (a: Interval, b: Interval): number => a.fromMs - b.fromMs || a.toMs - b.toMs;

/**
 * The same time as sorted stretches that neither overlap nor touch. Empty and inverted stretches disappear.
 * Every other function of this file answers in this form.
 */
export function mergeIntervals(intervals: readonly Interval[]): Interval[] {
  const sorted = intervals.filter((each) => each.toMs > each.fromMs).sort(byStart);
  const merged: Interval[] = [];
  for (const next of sorted) {
    const last = merged.at(-1);
    if (last !== undefined && next.fromMs <= last.toMs) {
      if (next.toMs > last.toMs) merged[merged.length - 1] = { fromMs: last.fromMs, toMs: next.toMs };
    } else {
      merged.push({ fromMs: next.fromMs, toMs: next.toMs });
    }
  }
  return merged;
}

/** Time that lies in both. Neither argument needs to be merged. */
export function intersectIntervals(a: readonly Interval[], b: readonly Interval[]): Interval[] {
  const left = mergeIntervals(a);
  const right = mergeIntervals(b);
  const both: Interval[] = [];
  for (let i = 0, j = 0; i < left.length && j < right.length; ) {
    const x = left[i] as Interval;
    const y = right[j] as Interval;
    const fromMs = Math.max(x.fromMs, y.fromMs);
    const toMs = Math.min(x.toMs, y.toMs);
    if (toMs > fromMs) both.push({ fromMs, toMs });
    if (x.toMs < y.toMs) i += 1;
    else j += 1;
  }
  return both;
}

/** Time of `a` that is not in `b`. Neither argument needs to be merged. */
export function subtractIntervals(a: readonly Interval[], b: readonly Interval[]): Interval[] {
  const cuts = mergeIntervals(b);
  const rest: Interval[] = [];
  let first = 0;
  for (const whole of mergeIntervals(a)) {
    while (first < cuts.length && (cuts[first] as Interval).toMs <= whole.fromMs) first += 1;
    let fromMs = whole.fromMs;
    for (let k = first; k < cuts.length && (cuts[k] as Interval).fromMs < whole.toMs; k += 1) {
      const cut = cuts[k] as Interval;
      if (cut.fromMs > fromMs) rest.push({ fromMs, toMs: cut.fromMs });
      fromMs = Math.max(fromMs, cut.toMs);
    }
    if (fromMs < whole.toMs) rest.push({ fromMs, toMs: whole.toMs });
  }
  return rest;
}

/** Milliseconds in all, overlaps counted once. */
export function totalMs(intervals: readonly Interval[]): number {
  return mergeIntervals(intervals).reduce((sum, each) => sum + (each.toMs - each.fromMs), 0);
}
