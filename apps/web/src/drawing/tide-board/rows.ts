/** Where stations and rows stand, from top to bottom, and which of them are in sight. */
import type { BoardRow, BoardStation } from './tide-board-types.js';

/** Measures of a variant, in px. */
export interface BoardMeasures {
  /** Strip with the station's name and clock; 0 on the phone, where it stands in the row. */
  readonly stripPx: number;
  readonly rowPx: number;
  /** Space kept free at the top of a row for its name (phone). */
  readonly headroomPx: number;
  /** From the row's lower edge up to the base line: room for quays. */
  readonly quayPx: number;
  /** Height of a pass through the zenith. */
  readonly humpPx: number;
  readonly namesPx: number;
  /** Least width of a pass's target. */
  readonly targetPx: number;
}

export const MEASURES: Readonly<Record<'wide' | 'phone', BoardMeasures>> = {
  wide: { stripPx: 27, rowPx: 68, headroomPx: 0, quayPx: 10, humpPx: 53, namesPx: 180, targetPx: 24 },
  phone: { stripPx: 0, rowPx: 84, headroomPx: 20, quayPx: 11, humpPx: 50, namesPx: 0, targetPx: 44 },
};

/** A station or a row with its place. */
export interface PlacedStation {
  readonly station: BoardStation;
  readonly topPx: number;
  readonly bottomPx: number;
}
export interface PlacedRow {
  readonly row: BoardRow;
  readonly station: BoardStation;
  readonly index: number;
  readonly topPx: number;
}

/** The whole column of rows. */
export interface RowLayout {
  readonly stations: readonly PlacedStation[];
  readonly rows: readonly PlacedRow[];
  readonly rowById: ReadonlyMap<string, PlacedRow>;
  readonly heightPx: number;
  readonly measures: BoardMeasures;
}

/** Places every station's strip and rows. */
export function layOutRows(stations: readonly BoardStation[], measures: BoardMeasures): RowLayout {
  const placedStations: PlacedStation[] = [];
  const rows: PlacedRow[] = [];
  let topPx = 0;
  for (const station of stations) {
    const stationTop = topPx;
    topPx += measures.stripPx;
    for (const row of station.rows) {
      rows.push({ row, station, index: rows.length, topPx });
      topPx += measures.rowPx;
    }
    placedStations.push({ station, topPx: stationTop, bottomPx: topPx });
  }
  return {
    stations: placedStations,
    rows,
    rowById: new Map(rows.map((row) => [row.row.id, row])),
    heightPx: topPx,
    measures,
  };
}

/** Base line of a row: where a pass at 0 degrees stands. */
export function baseLinePx(row: PlacedRow, measures: BoardMeasures): number {
  return row.topPx + measures.rowPx - measures.quayPx;
}

/** Rows touching a vertical range, by binary search: `[first, end)`. */
export function rowsBetween(layout: RowLayout, fromPx: number, toPx: number): [number, number] {
  const { rows, measures } = layout;
  const first = lowerBound(rows.length, (index) => (rows[index]?.topPx ?? 0) + measures.rowPx > fromPx);
  const end = lowerBound(rows.length, (index) => (rows[index]?.topPx ?? 0) >= toPx);
  return [first, Math.max(first, end)];
}

/** The row under a vertical place, or null on a station's strip. */
export function rowAt(layout: RowLayout, yPx: number): PlacedRow | null {
  const [first] = rowsBetween(layout, yPx, yPx);
  const row = layout.rows[first];
  return row && yPx >= row.topPx && yPx < row.topPx + layout.measures.rowPx ? row : null;
}

/** First index from 0 to `count` for which `holds`; it must be false up to some index and true from there on. */
export function lowerBound(count: number, holds: (index: number) => boolean): number {
  let low = 0;
  let high = count;
  while (low < high) {
    const middle = (low + high) >>> 1;
    if (holds(middle)) high = middle;
    else low = middle + 1;
  }
  return low;
}
