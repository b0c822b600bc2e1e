/**
 * `npm run bench`: the pass search as the product runs it against a plain one written here (satellite.js at a fixed step,
 * then bisection), in one run on one machine. Where the plain search would take hours it is measured on some of the pairs
 * and scaled; the table says so. Ratios travel between machines better than seconds do.
 */
import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { ensureOrbit } from './passes/ensure-orbit.mjs';
import { ROOT } from './toolbox.mjs';

ensureOrbit();
const { searchPassesColumns, sgp4Source } = await import('../../packages/orbit/dist/index.js');
const { plainSearch } = await import('./bench/plain-search.mjs');
const { market } = await import('./bench/market.mjs');

const CASES = [
  { satellites: 20, stations: 12, days: 7, warmRuns: 9, plainPairs: 240 },
  { satellites: 1, stations: 200, days: 14, warmRuns: 9, plainPairs: 200 },
  { satellites: 1000, stations: 100, days: 7, warmRuns: 1, plainPairs: 200 },
  { satellites: 1000, stations: 100, days: 7, uneven: true, warmRuns: 1, plainPairs: 200 },
];
const folder = mkdtempSync(join(tmpdir(), 'skyberth-bench-'));
const median = (values) => values.sort((a, b) => a - b)[Math.floor(values.length / 2)];

/** A process of its own, so that compiling counts as it does for a person who waits. */
function coldMs(scenario, threads) {
  const path = join(folder, 'scenario.json');
  writeFileSync(path, JSON.stringify(scenario));
  const script = join(ROOT, 'infra/run/passes.mjs');
  const args = [script, '--scenario', path, '--summary', ...(threads ? ['--threads', String(threads)] : [])];
  const { stdout, stderr, status } = spawnSync(process.execPath, args, { encoding: 'utf8' });
  if (status !== 0) throw new Error(stderr);
  return JSON.parse(stdout);
}

function warmMs({ elementSets, sites, fromMs, toMs }, runs) {
  const times = [];
  for (let run = 0; run < runs; run += 1) {
    const started = performance.now();
    searchPassesColumns({ satellites: elementSets.map(sgp4Source), sites, fromMs, toMs });
    times.push(performance.now() - started);
  }
  return median(times);
}

const rounded = (value) => (value >= 100 ? Math.round(value) : Math.round(value * 10) / 10);

for (const one of CASES) {
  const demand = market(one);
  const usual = coldMs(demand.scenario);
  const single = usual.threads === 1 ? usual : coldMs(demand.scenario, 1);
  const warm = warmMs(demand, one.warmRuns);
  const plain = plainSearch(demand, one.plainPairs);
  const pairs = one.satellites * one.stations;
  const plainMs = (plain.ms * pairs) / plain.pairs;
  console.log(
    [
      `${one.satellites} spacecraft x ${one.stations} stations x ${one.days} days${one.uneven ? ', uneven masks on half' : ''}:`,
      `${usual.passes} passes`,
      `  fresh process, ${usual.threads} thread(s): ${rounded(usual.computeMs)} ms, ${usual.peakRssMb} MB; one thread: ${rounded(single.computeMs)} ms`,
      `  same process again, one thread: ${rounded(warm)} ms`,
      `  plain search, one thread: ${rounded(plainMs)} ms${plain.pairs < pairs ? ` (measured on ${plain.pairs} of ${pairs} pairs, scaled)` : ''}`,
      `  ratio: ${rounded(plainMs / single.computeMs)} fresh, ${rounded(plainMs / warm)} again`,
    ].join('\n'),
  );
}
rmSync(folder, { recursive: true, force: true });
