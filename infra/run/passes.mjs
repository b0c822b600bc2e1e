/**
 * `npm run --silent passes -- --scenario scenario.json [--summary] [--threads N]`: every pass of a scenario as JSON, by the
 * engine that the market uses. Exit status 2 and one sentence a problem for bad input; nothing else is ever on stdout.
 */
import { readFileSync, statSync } from 'node:fs';
import { availableParallelism } from 'node:os';
import { resolve } from 'node:path';
import { parseArgs } from 'node:util';
import { ensureOrbit } from './passes/ensure-orbit.mjs';
import { searchInThreads } from './passes/threads.mjs';

const LARGEST_SCENARIO_BYTES = 256_000_000;
const MOST_THREADS = 64;
/** Spacecraft times stations times days that one thread does in about half a second; below, a second one costs more than it saves. */
const WORTH_THREADS = 60_000;
const DAY_MS = 86_400_000;

function refuse(problems) {
  process.stderr.write(`${problems.join('\n')}\n`);
  process.exit(2);
}

function readArguments() {
  const options = { scenario: { type: 'string' }, summary: { type: 'boolean' }, threads: { type: 'string' } };
  try {
    const { values } = parseArgs({ options });
    if (values.scenario === undefined) refuse(['Say which scenario to search: --scenario scenario.json.']);
    if (values.threads !== undefined && !/^[1-9]\d?$/.test(values.threads))
      refuse([`--threads is "${values.threads}"; it must be a whole number from 1 to ${MOST_THREADS}.`]);
    const threads = values.threads === undefined ? undefined : Number(values.threads);
    if (threads > MOST_THREADS)
      refuse([`--threads is ${threads}; it must be a whole number from 1 to ${MOST_THREADS}.`]);
    // npm runs scripts in the project's folder; the file is named from where the person stands.
    const path = resolve(process.env.INIT_CWD ?? '.', values.scenario);
    return { path, summary: values.summary === true, threads };
  } catch (error) {
    return refuse([`${error.message}.`.replace(/\.\.$/, '.')]);
  }
}

function readScenarioText(path) {
  try {
    const { size } = statSync(path);
    if (size > LARGEST_SCENARIO_BYTES)
      return refuse([`${path} has ${size} bytes; at most ${LARGEST_SCENARIO_BYTES} are read.`]);
    return readFileSync(path, 'utf8');
  } catch (error) {
    return refuse([`${path} cannot be read: ${error.message}.`]);
  }
}

function usualThreads({ satellites, sites, fromMs, toMs }) {
  const work = satellites.length * sites.length * ((toMs - fromMs) / DAY_MS);
  return work < WORTH_THREADS ? 1 : Math.min(availableParallelism(), MOST_THREADS, satellites.length);
}

// A reader that has seen enough closes the pipe; that is no failure.
process.stdout.on('error', (error) => {
  if (error.code === 'EPIPE') process.exit(0);
  throw error;
});

const { path, summary, threads: askedThreads } = readArguments();
const text = readScenarioText(path);
ensureOrbit();
const { passRows } = await import('./passes/output.mjs');
const { readScenario } = await import('./passes/scenario.mjs');
const { scenario, problems } = readScenario(text);
if (problems.length > 0) refuse(problems);

const threads = askedThreads ?? usualThreads(scenario);
const started = performance.now();
const result = await searchInThreads(scenario, threads);
const computeMs = performance.now() - started;
// A spacecraft that gives out inside the period stops nobody else; what is missing is said, and what was found stands.
for (const { satellite, message } of result.faults)
  process.stderr.write(`Satellite ${scenario.satellites[satellite].id}: ${message}\n`);

if (summary) {
  const passes = result.blocks.reduce((sum, { count }) => sum + count, 0);
  const peakRssMb = Math.round(process.resourceUsage().maxRSS / 1024);
  process.stdout.write(
    `${JSON.stringify({ passes, computeMs: Math.round(computeMs * 10) / 10, peakRssMb, threads })}\n`,
  );
} else {
  for (const piece of passRows(scenario, result.blocks)) {
    if (!process.stdout.write(piece)) await new Promise((resolve) => process.stdout.once('drain', resolve));
  }
}
