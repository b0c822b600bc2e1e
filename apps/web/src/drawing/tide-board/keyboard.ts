/** Which pass the arrow keys lead to. */
import { type HumpIndex, humpsBetween } from './hump-index.js';
import type { RowLayout } from './rows.js';
import type { BoardHump, Interval } from './tide-board-types.js';

/** Keys that move from pass to pass. */
export type MoveKey = 'ArrowLeft' | 'ArrowRight' | 'ArrowUp' | 'ArrowDown' | 'Home' | 'End';

/** Whether a key moves from pass to pass. */
export function isMoveKey(key: string): key is MoveKey {
  return ['ArrowLeft', 'ArrowRight', 'ArrowUp', 'ArrowDown', 'Home', 'End'].includes(key);
}

/**
 * The pass that a key leads to from another: earlier or later in the row, the nearest in time on the next row that has
 * any, the row's first or last. Null at an edge.
 */
export function neighbour(index: HumpIndex, layout: RowLayout, fromId: string, key: MoveKey): BoardHump | null {
  const from = index.byId.get(fromId);
  if (!from) return null;
  if (key === 'ArrowUp' || key === 'ArrowDown') return acrossRows(index, layout, from, key === 'ArrowUp' ? -1 : 1);
  const list = byAos(index.byRow.get(from.rowId) ?? []);
  const at = list.indexOf(from);
  const to = { ArrowLeft: at - 1, ArrowRight: at + 1, Home: 0, End: list.length - 1 }[key];
  return to === at ? null : (list[to] ?? null);
}

/** Where the keyboard enters the board: the first picked pass in view, else the first that ends after now, else any. */
export function entryHump(
  index: HumpIndex,
  layout: RowLayout,
  view: Interval,
  pickedIds: readonly string[],
  nowMs: number,
): BoardHump | null {
  const inView: BoardHump[] = [];
  for (const { row } of layout.rows) {
    const [first, end] = humpsBetween(index, row.id, view);
    const list = index.byRow.get(row.id) ?? [];
    for (let at = first; at < end; at += 1) {
      const hump = list[at];
      if (hump && hump.losMs > view.fromMs && hump.aosMs < view.toMs) inView.push(hump);
    }
    if (inView.length > 0 && pickedIds.length === 0) break;
  }
  return (
    inView.find((hump) => pickedIds.includes(hump.id)) ?? inView.find((hump) => hump.losMs > nowMs) ?? inView[0] ?? null
  );
}

/** The pass of the same row nearest to where the given one would stand after paging by a time. */
export function afterPaging(index: HumpIndex, fromId: string, byMs: number): BoardHump | null {
  const from = index.byId.get(fromId);
  if (!from) return null;
  return nearestInTime(index.byRow.get(from.rowId) ?? [], (from.aosMs + from.losMs) / 2 + byMs);
}

function acrossRows(index: HumpIndex, layout: RowLayout, from: BoardHump, step: 1 | -1): BoardHump | null {
  const start = layout.rowById.get(from.rowId)?.index;
  if (start === undefined) return null;
  for (let at = start + step; at >= 0 && at < layout.rows.length; at += step) {
    const list = index.byRow.get(layout.rows[at]?.row.id ?? '') ?? [];
    const nearest = nearestInTime(list, (from.aosMs + from.losMs) / 2);
    if (nearest) return nearest;
  }
  return null;
}

function nearestInTime(humps: readonly BoardHump[], atMs: number): BoardHump | null {
  let best: BoardHump | null = null;
  let bestMs = Number.POSITIVE_INFINITY;
  for (const hump of humps) {
    const distance = Math.abs((hump.aosMs + hump.losMs) / 2 - atMs);
    if (distance < bestMs) {
      best = hump;
      bestMs = distance;
    }
  }
  return best;
}

function byAos(humps: readonly BoardHump[]): BoardHump[] {
  return [...humps].sort((a, b) => a.aosMs - b.aosMs || a.id.localeCompare(b.id));
}
