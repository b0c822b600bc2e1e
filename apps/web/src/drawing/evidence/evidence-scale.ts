/** One scale of time for everything that stands side by side in a dispute: it runs down the page. */

export interface TimeScale {
  readonly fromMs: number;
  readonly toMs: number;
  readonly heightPx: number;
}

const MINUTE_MS = 60_000;
const STEPS_MIN = [1, 2, 5, 10, 15, 30, 60, 120, 240] as const;
/** Labels closer than this can't be read. */
const LEAST_TICK_PX = 26;

/** The contact with a tenth of its length before and after it, so that what lies at its ends has room. */
export function scaleOf(aosMs: number, losMs: number, heightPx: number): TimeScale {
  const rimMs = Math.max(20_000, (losMs - aosMs) * 0.06);
  return { fromMs: aosMs - rimMs, toMs: losMs + rimMs, heightPx };
}

export function yOf({ fromMs, toMs, heightPx }: TimeScale, atMs: number): number {
  return ((atMs - fromMs) / (toMs - fromMs)) * heightPx;
}

/** Whole minutes to label, as close as they can be read. */
export function minuteLabels(scale: TimeScale): number[] {
  const pxPerMinute = (scale.heightPx * MINUTE_MS) / (scale.toMs - scale.fromMs);
  const stepMin = STEPS_MIN.find((step) => step * pxPerMinute >= LEAST_TICK_PX) ?? 480;
  const stepMs = stepMin * MINUTE_MS;
  const labels: number[] = [];
  for (let at = Math.ceil(scale.fromMs / stepMs) * stepMs; at <= scale.toMs; at += stepMs) labels.push(at);
  return labels;
}

export interface Placed<T> {
  readonly item: T;
  /** Where it happened. */
  readonly y: number;
  /** Where its words stand, moved so that none covers another. */
  readonly wordsY: number;
}

/** Puts words beside their instants, at least `gapPx` apart, within the height; order is kept. */
export function placeWords<T extends { readonly atMs: number }>(
  items: readonly T[],
  scale: TimeScale,
  gapPx: number,
): Placed<T>[] {
  const sorted = items.toSorted((a, b) => a.atMs - b.atMs);
  const ys = sorted.map(({ atMs }) => Math.min(scale.heightPx, Math.max(0, yOf(scale, atMs))));
  const words: number[] = [];
  for (const y of ys) words.push(Math.max(y, (words.at(-1) ?? -Infinity) + gapPx));
  // What was pushed beyond the end is pushed back up, from the end.
  for (let index = words.length - 1, limit = scale.heightPx; index >= 0; index -= 1, limit -= gapPx)
    words[index] = Math.min(words[index] as number, limit);
  return sorted.map((item, index) => ({ item, y: ys[index] as number, wordsY: words[index] as number }));
}
