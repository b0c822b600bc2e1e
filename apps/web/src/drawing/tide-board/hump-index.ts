/** Finds the passes of a row that touch a stretch of time, without looking at the others. */
import { lowerBound } from './rows.js';
import type { BoardHump, HumpState, Interval } from './tide-board-types.js';

/** Passes of each row in order of time. */
export interface HumpIndex {
  readonly byRow: ReadonlyMap<string, readonly BoardHump[]>;
  readonly byId: ReadonlyMap<string, BoardHump>;
  /** Longest profile of each row: how far before the view a pass may begin and still reach into it. */
  readonly longestMs: ReadonlyMap<string, number>;
}

/** Sorts once; the board asks many times. */
export function indexHumps(humps: readonly BoardHump[]): HumpIndex {
  const byRow = new Map<string, BoardHump[]>();
  const longestMs = new Map<string, number>();
  for (const hump of humps) {
    const list = byRow.get(hump.rowId);
    if (list) list.push(hump);
    else byRow.set(hump.rowId, [hump]);
    const length = hump.profile.toMs - hump.profile.fromMs;
    longestMs.set(hump.rowId, Math.max(longestMs.get(hump.rowId) ?? 0, length));
  }
  for (const list of byRow.values()) list.sort((a, b) => a.profile.fromMs - b.profile.fromMs || a.aosMs - b.aosMs);
  return { byRow, byId: new Map(humps.map((hump) => [hump.id, hump])), longestMs };
}

/** Passes of a row whose profile touches the view, as a range of `byRow`: `[first, end)`. */
export function humpsBetween(index: HumpIndex, rowId: string, view: Interval): [number, number] {
  const list = index.byRow.get(rowId);
  if (!list) return [0, 0];
  const earliest = view.fromMs - (index.longestMs.get(rowId) ?? 0);
  const first = lowerBound(list.length, (at) => (list[at] as BoardHump).profile.fromMs >= earliest);
  const end = lowerBound(list.length, (at) => (list[at] as BoardHump).profile.fromMs >= view.toMs);
  return [first, Math.max(first, end)];
}

/** Minutes for sale in each UTC day, by the day's start in ms: on each row overlapping passes count once. */
export function sellableMinutesByDay(index: HumpIndex, rowIds: readonly string[]): Map<number, number> {
  const dayMs = 86_400_000;
  const minutes = new Map<number, number>();
  for (const rowId of rowIds) {
    for (const part of forSaleUnion(index.byRow.get(rowId) ?? [])) {
      for (let day = Math.floor(part.fromMs / dayMs) * dayMs; day < part.toMs; day += dayMs) {
        const inside = Math.min(part.toMs, day + dayMs) - Math.max(part.fromMs, day);
        minutes.set(day, (minutes.get(day) ?? 0) + inside / 60_000);
      }
    }
  }
  return minutes;
}

const FOR_SALE: HumpState = 'forSale';

function forSaleUnion(humps: readonly BoardHump[]): Interval[] {
  const parts: { fromMs: number; toMs: number }[] = [];
  const sorted = humps.filter((hump) => hump.state === FOR_SALE).sort((a, b) => a.aosMs - b.aosMs);
  for (const hump of sorted) {
    const last = parts.at(-1);
    if (last && hump.aosMs <= last.toMs) last.toMs = Math.max(last.toMs, hump.losMs);
    else parts.push({ fromMs: hump.aosMs, toMs: hump.losMs });
  }
  return parts;
}
