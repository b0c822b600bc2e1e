/** The longest gap between contacts as rows: windows of time in each of which at least one contact must lie. */
import type { Stretch } from './cliques.js';

export interface Window {
  /** The gap that the window forbids would begin here. */
  readonly afterMs: number;
  /** Indices of the stretches of which one is needed; may be empty. */
  readonly needed: readonly number[];
}

/**
 * Windows such that a set of stretches without overlaps has no gap longer than `longestMs` in `[fromMs, toMs)` exactly where
 * each window holds one of them. A gap runs from an end (or `fromMs`) to the next beginning (or `toMs`). After the end e of
 * any stretch, chosen or not, one is needed that ends after e and begins by e + longest; where a later window needs a part
 * of what an earlier one does, the earlier says nothing more and is left out.
 */
export function gapWindows(stretches: readonly Stretch[], period: Stretch, longestMs: number): Window[] {
  const { fromMs, toMs } = period;
  const byStart = stretches.map((_, index) => index).sort((a, b) => at(stretches, a).fromMs - at(stretches, b).fromMs);
  const ends = stretches.map((each) => each.toMs).filter((endMs) => endMs > fromMs && endMs + longestMs < toMs);
  const instants = [...new Set([...(fromMs + longestMs < toMs ? [fromMs] : []), ...ends])].sort((a, b) => a - b);
  const begun: number[] = [];
  let reached = 0;
  for (const afterMs of instants) {
    while (reached < byStart.length && at(stretches, byStart[reached] as number).fromMs <= afterMs + longestMs)
      reached += 1;
    begun.push(reached);
  }
  return instants.flatMap((afterMs, place) => {
    const many = begun[place] as number;
    if (begun[place + 1] === many) return [];
    return [{ afterMs, needed: byStart.slice(0, many).filter((index) => at(stretches, index).toMs > afterMs) }];
  });
}

/** The longest gap that a set of stretches leaves, overlapping or not, and where it begins. */
export function longestGap(
  stretches: readonly Stretch[],
  { fromMs, toMs }: Stretch,
): { fromMs: number; lengthMs: number } {
  let reachedMs = fromMs;
  let longest = { fromMs, lengthMs: 0 };
  const inOrder = [...stretches].sort((a, b) => a.fromMs - b.fromMs);
  for (const each of [...inOrder, { fromMs: toMs, toMs }]) {
    const lengthMs = Math.min(each.fromMs, toMs) - reachedMs;
    if (lengthMs > longest.lengthMs) longest = { fromMs: reachedMs, lengthMs };
    reachedMs = Math.max(reachedMs, each.toMs);
  }
  return longest;
}

const at = (stretches: readonly Stretch[], index: number): Stretch => stretches[index] as Stretch;
