/** Invented rows and passes for the specs of this folder. */
import { layOutRows, MEASURES, type RowLayout } from './rows.js';
import type { BoardHump, BoardStation, HumpState } from './tide-board-types.js';

export const T0 = Date.UTC(2026, 11, 1, 14);
export const MINUTE_MS = 60_000;

/** Two stations: A with rows a1 and a2, B with b1. */
export function threeRows(variant: 'wide' | 'phone' = 'wide'): RowLayout {
  const station = (id: string, rows: readonly string[]): BoardStation => ({
    id,
    name: id,
    timeZone: 'UTC',
    nights: [],
    rows: rows.map((row) => ({ id: row, name: row, detail: [] })),
  });
  return layOutRows([station('A', ['a1', 'a2']), station('B', ['b1'])], MEASURES[variant]);
}

/** A triangular pass from one minute to another after `T0`, over a flat mask of 5 degrees. */
export function pass(
  id: string,
  rowId: string,
  fromMin: number,
  toMin: number,
  state: HumpState = 'forSale',
): BoardHump {
  const [aosMs, losMs] = [T0 + fromMin * MINUTE_MS, T0 + toMin * MINUTE_MS];
  return {
    id,
    rowId,
    spacecraftShort: 'W1',
    spacecraftName: 'Whimbrel 1',
    aosMs,
    losMs,
    highestMs: (aosMs + losMs) / 2,
    highestDeg: 45,
    profile: {
      fromMs: aosMs,
      toMs: losMs,
      elevationDeg: Float32Array.from([5, 25, 45, 25, 5]),
      maskDeg: Float32Array.from([5, 5, 5, 5, 5]),
    },
    state,
  };
}
