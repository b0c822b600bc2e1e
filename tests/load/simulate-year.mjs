/**
 * Plays a year: `node tests/load/simulate-year.mjs [--bookings 50000] [--seed 1]`. Prints one line of JSON; ends with status 1
 * and one sentence for each thing that does not agree. Build first (`npm run build`).
 */
import { performance } from 'node:perf_hooks';
import { parseArgs } from 'node:util';
import { playYear } from './year/play.mjs';

const { values } = parseArgs({
  options: { bookings: { type: 'string', default: '50000' }, seed: { type: 'string', default: '1' } },
});
const from = performance.now();
const { disagreements, ...played } = await playYear({ bookings: Number(values.bookings), seed: Number(values.seed) });
const seconds = Math.round((performance.now() - from) / 100) / 10;
console.log(JSON.stringify({ seed: Number(values.seed), seconds, ...played, disagreements: disagreements.length }));
for (const sentence of disagreements) console.error(sentence);
if (disagreements.length > 0) process.exitCode = 1;
