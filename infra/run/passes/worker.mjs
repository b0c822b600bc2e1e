/** A thread that searches the slices it is given and hands the columns over without a copy. */
import { parentPort, workerData } from 'node:worker_threads';
import { transferList } from '../../../packages/orbit/dist/index.js';
import { searchSlice } from './slice.mjs';

parentPort.on('message', ({ satellites, firstSatellite }) => {
  const result = searchSlice({ ...workerData, satellites, firstSatellite });
  parentPort.postMessage({ firstSatellite, ...result }, result.blocks.flatMap(transferList));
});
