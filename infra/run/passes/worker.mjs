/** A thread that searches the slices it is given and hands the columns over without a copy. */
import { parentPort, workerData } from 'node:worker_threads';
import { transferList } from '../../../packages/orbit/dist/index.js';
import { searchSlice } from './slice.mjs';

/** A slice, or null when there is none left. */
parentPort.on('message', (slice) => {
  if (slice === null) {
    parentPort.close();
    return;
  }
  const { satellites, firstSatellite } = slice;
  const result = searchSlice({ ...workerData, satellites, firstSatellite });
  parentPort.postMessage({ firstSatellite, ...result }, result.blocks.flatMap(transferList));
});
