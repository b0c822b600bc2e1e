/** Divides the satellites of a scenario over threads. Each satellite stands by itself, so the rows are the same for any number. */
import { Worker } from 'node:worker_threads';

/** Small enough that no thread waits long for the last, large enough that messages cost nothing. */
const MOST_IN_SLICE = 25;

export async function searchInThreads(scenario, threads) {
  if (threads === 1) {
    const { searchSlice } = await import('./slice.mjs');
    return searchSlice({ ...scenario, firstSatellite: 0 });
  }
  const { satellites, ...shared } = scenario;
  const size = Math.max(1, Math.min(MOST_IN_SLICE, Math.ceil(satellites.length / (2 * threads))));
  const slices = [];
  for (let first = 0; first < satellites.length; first += size)
    slices.push({ firstSatellite: first, satellites: satellites.slice(first, first + size) });
  const answers = [];
  const waiting = slices.values();
  await Promise.all(
    Array.from({ length: Math.min(threads, slices.length) }, () => workThrough(waiting, shared, answers)),
  );
  answers.sort((a, b) => a.firstSatellite - b.firstSatellite);
  return { blocks: answers.flatMap(({ blocks }) => blocks), faults: answers.flatMap(({ faults }) => faults) };
}

/** One worker until no slice is left. */
function workThrough(waiting, shared, answers) {
  return new Promise((resolve, reject) => {
    const worker = new Worker(new URL('./worker.mjs', import.meta.url), { workerData: shared });
    const give = () => {
      const { value, done } = waiting.next();
      worker.postMessage(done ? null : value);
    };
    worker.on('message', (answer) => {
      answers.push(answer);
      give();
    });
    worker.on('error', reject);
    // It closes its own port and ends by itself: ending it from outside while it still clears up can bring the process down.
    worker.on('exit', (code) => (code === 0 ? resolve() : reject(new Error(`A search thread ended with ${code}.`))));
    give();
  });
}
