/** Which pass lies under the pointer: its target is its whole column in the row, never narrower than a finger's or a pointer's. */
import { type HumpIndex, humpsBetween } from './hump-index.js';
import { type RowLayout, rowAt } from './rows.js';
import type { BoardHump, Interval } from './tide-board-types.js';
import { timeToX, xToTime } from './view.js';

/** A pass's column in px from the field's left edge. */
export function targetColumn(hump: BoardHump, view: Interval, widthPx: number, leastPx: number): [number, number] {
  const x0 = timeToX(view, widthPx, hump.aosMs);
  const x1 = timeToX(view, widthPx, hump.losMs);
  const missing = Math.max(0, leastPx - (x1 - x0)) / 2;
  return [x0 - missing, x1 + missing];
}

/** The pass at a place of the field; where columns overlap, the one whose middle is nearer. */
export function humpAt(
  index: HumpIndex,
  layout: RowLayout,
  view: Interval,
  widthPx: number,
  place: { readonly xPx: number; readonly yPx: number },
): BoardHump | null {
  const row = rowAt(layout, place.yPx);
  if (!row) return null;
  const reach = layout.measures.targetPx;
  const around = { fromMs: xToTime(view, widthPx, place.xPx - reach), toMs: xToTime(view, widthPx, place.xPx + reach) };
  const list = index.byRow.get(row.row.id) ?? [];
  const [first, end] = humpsBetween(index, row.row.id, around);
  let best: BoardHump | null = null;
  let bestPx = Number.POSITIVE_INFINITY;
  for (let at = first; at < end; at += 1) {
    const hump = list[at] as BoardHump;
    const [x0, x1] = targetColumn(hump, view, widthPx, reach);
    if (place.xPx < x0 || place.xPx > x1) continue;
    const distance = Math.abs((x0 + x1) / 2 - place.xPx);
    if (distance < bestPx) {
      best = hump;
      bestPx = distance;
    }
  }
  return best;
}
