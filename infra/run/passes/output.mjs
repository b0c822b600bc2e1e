/** Rows of columns as JSON text, in pieces, so that millions of passes need no second copy in memory. */
import { CLIPPED_END, CLIPPED_START } from '../../../packages/orbit/dist/index.js';

const ROWS_IN_PIECE = 2_000;

const utc = (timeMs) => new Date(Math.round(timeMs)).toISOString();
const rounded = (value, decimals) => Number(value.toFixed(decimals));
const triple = (values, row, decimals) => [0, 1, 2].map((at) => rounded(values[3 * row + at], decimals));

function passOf(scenario, block, row) {
  const elevationDeg = triple(block.elevationDeg, row, 4);
  return {
    satelliteId: scenario.satellites[block.satellite[row]].id,
    stationId: scenario.sites[block.site[row]].id,
    aosUtc: utc(block.timeMs[3 * row]),
    tcaUtc: utc(block.timeMs[3 * row + 1]),
    losUtc: utc(block.timeMs[3 * row + 2]),
    clippedStart: (block.flags[row] & CLIPPED_START) !== 0,
    clippedEnd: (block.flags[row] & CLIPPED_END) !== 0,
    maxElevationDeg: elevationDeg[1],
    azimuthDeg: triple(block.azimuthDeg, row, 3),
    elevationDeg,
    rangeKm: triple(block.rangeKm, row, 3),
    rangeRateKmS: triple(block.rangeRateKmPerS, row, 5),
  };
}

export function* passRows(scenario, blocks) {
  yield '{"passes":[';
  let separator = '';
  let piece = '';
  let inPiece = 0;
  for (const block of blocks) {
    for (let row = 0; row < block.count; row += 1) {
      piece += separator + JSON.stringify(passOf(scenario, block, row));
      separator = ',\n';
      inPiece += 1;
      if (inPiece < ROWS_IN_PIECE) continue;
      yield piece;
      piece = '';
      inPiece = 0;
    }
  }
  yield `${piece}]}\n`;
}
