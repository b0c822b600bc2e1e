/** When an antenna is someone else's: the one thing that one buyer may learn of another. */
import { type Interval, intersectIntervals, mergeIntervals, subtractIntervals } from '@skyberth/market';
import type { BusyInput } from './workers/job-types.js';

/**
 * Times at which no beam is left and not only the caller keeps them, set-up and teardown included. Merged, so that not even
 * the number of contacts shows.
 */
export function takenIntervals(beams: number, busy: readonly BusyInput[], period: Interval): Interval[] {
  const guard = (each: BusyInput): Interval => ({ fromMs: each.guardFromMs, toMs: each.guardToMs });
  let full: Interval[] = [period];
  for (let beam = 1; beam <= beams; beam += 1) {
    full = intersectIntervals(full, busy.filter((each) => each.beam === beam).map(guard));
  }
  const others = busy.filter((each) => each.own === null).map(guard);
  const mine = busy.filter((each) => each.own !== null).map(guard);
  // On several beams the time is full for the caller too where one of the beams is their own.
  return beams === 1 ? subtractIntervals(full, mine) : intersectIntervals(full, mergeIntervals(others));
}
