/** The search over some of the satellites, the same in the main thread and in a worker. */
import { OrbitError, searchPassesColumns, sgp4Source } from '../../../packages/orbit/dist/index.js';

export function searchSlice({ satellites, sites, fromMs, toMs, firstSatellite }) {
  const faults = [];
  const usable = [];
  satellites.forEach(({ elementSet }, index) => {
    try {
      usable.push({ satellite: firstSatellite + index, source: sgp4Source(elementSet) });
    } catch (error) {
      if (!(error instanceof OrbitError)) throw error;
      faults.push({ satellite: firstSatellite + index, message: error.message });
    }
  });
  const result = searchPassesColumns({ satellites: usable.map(({ source }) => source), sites, fromMs, toMs });
  for (const block of result.blocks) {
    for (let row = 0; row < block.count; row += 1) block.satellite[row] = usable[block.satellite[row]].satellite;
  }
  for (const { satellite, error } of result.faults) {
    faults.push({ satellite: usable[satellite].satellite, message: error.message });
  }
  return { blocks: result.blocks.map((block) => ({ ...block, count: block.count })), faults };
}
