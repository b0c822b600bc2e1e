/**
 * Measures the search of the built server as a browser meets it: the first search of one spacecraft over many antennas, the
 * same again, a shifted one, and how long the event loop keeps others waiting while a large search runs. Loopback only.
 * Run it with `npm run bench:api`, after `npm run build`. Nothing here is part of the tests: figures depend on the machine.
 */
import { randomUUID } from 'node:crypto';
import { mkdtempSync, rmSync } from 'node:fs';
import { cpus, tmpdir } from 'node:os';
import { join } from 'node:path';
import { monitorEventLoopDelay } from 'node:perf_hooks';
import { setTimeout as sleep } from 'node:timers/promises';
import { Worker } from 'node:worker_threads';
import { createApp, readConfig } from '@skyberth/api';
import { openDatabase } from '@skyberth/drizzle';
import { seedMarket } from './seed-market.mjs';

const ANTENNAS = 200;
const ROUNDS = 15;
const LARGE = { spacecraft: 100, searches: 10, stations: 100 };
const DAY_MS = 86_400_000;
const START_MS = Math.ceil(Date.now() / DAY_MS) * DAY_MS;

const dataDir = mkdtempSync(join(tmpdir(), 'skyberth-bench-'));
const config = readConfig({
  PORT: '0',
  SKYBERTH_DATA_DIR: dataDir,
  SKYBERTH_TOKEN_SECRET: 'a secret for measuring only, thirty-two characters',
  PAYMENTS_URL: 'http://127.0.0.1:9',
  STRIPE_SECRET_KEY: 'sk_test_bench',
  STRIPE_WEBHOOK_SECRET: 'whsec_bench',
  SMTP_URL: 'smtp://127.0.0.1:9',
  JOBS: 'off',
  ...(process.env.PASS_WORKERS ? { PASS_WORKERS: process.env.PASS_WORKERS } : {}),
});
const app = await createApp(config, { quiet: true });
await app.listen(0, '127.0.0.1');
const url = `http://127.0.0.1:${app.getHttpServer().address().port}`;
const asker = new Worker(new URL('./asker.mjs', import.meta.url), { workerData: { url } });

/** One question to the thread that plays the browser. */
function ask(message) {
  return new Promise((resolve, reject) => {
    const id = randomUUID();
    const listen = (answer) => {
      if (answer.id !== id) return;
      asker.off('message', listen);
      if (answer.error) reject(new Error(answer.error));
      else resolve(answer);
    };
    asker.on('message', listen);
    asker.postMessage({ ...message, id });
  });
}

const median = (values) => [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)];
const ms = (value) => `${value.toFixed(0)} ms`.padStart(8);
const search = (spacecraftIds, change = {}) =>
  ask({
    kind: 'search',
    body: {
      spacecraftIds,
      fromUtc: new Date(START_MS).toISOString(),
      toUtc: new Date(START_MS + 7 * DAY_MS).toISOString(),
      ...change,
    },
  });

try {
  const { organisationId } = await ask({ kind: 'sign up' });
  const db = openDatabase(config.databaseFile);
  const many = LARGE.spacecraft * LARGE.searches;
  const seeded = seedMarket(db, {
    organisationId,
    antennas: ANTENNAS,
    spacecraft: ROUNDS + 1 + many,
    startMs: START_MS,
  });
  db.$client.close();
  console.log(
    `${cpus().length} x ${cpus()[0]?.model ?? 'unknown'}, Node ${process.versions.node}, ${config.passWorkers} pass workers`,
  );
  await measureOne(seeded.spacecraftIds.slice(0, ROUNDS + 1));
  await measureLoop(seeded.spacecraftIds.slice(ROUNDS + 1), seeded.stationIds.slice(0, LARGE.stations));
} finally {
  await asker.terminate();
  await app.close();
  rmSync(dataDir, { recursive: true, force: true });
}

/** Each round takes a spacecraft that the server has not seen, so that its first search is really the first. */
async function measureOne([warmUp, ...fresh]) {
  await search([warmUp]);
  const figures = { first: [], again: [], shifted: [] };
  let passes = 0;
  let bytes = 0;
  for (const id of fresh) {
    const first = await search([id]);
    passes = first.passes;
    bytes = first.bytes;
    figures.first.push(first.tookMs);
    figures.again.push((await search([id])).tookMs);
    const shifted = {
      fromUtc: new Date(START_MS + DAY_MS).toISOString(),
      toUtc: new Date(START_MS + 8 * DAY_MS).toISOString(),
    };
    figures.shifted.push((await search([id], shifted)).tookMs);
  }
  console.log(`1 spacecraft x ${ANTENNAS} antennas x 7 days: ${passes} passes, ${(bytes / 1e6).toFixed(1)} MB`);
  console.log(`  first search        median ${ms(median(figures.first))}, worst ${ms(Math.max(...figures.first))}`);
  console.log(`  the same again      median ${ms(median(figures.again))}, worst ${ms(Math.max(...figures.again))}`);
  console.log(`  a day later         median ${ms(median(figures.shifted))}, worst ${ms(Math.max(...figures.shifted))}`);
}

/** Only passes through the zenith are wanted, so that the work is large and the answer is not. */
async function measureLoop(ids, stationIds) {
  const delay = monitorEventLoopDelay({ resolution: 5 });
  delay.enable();
  await sleep(500);
  delay.reset();
  const begun = performance.now();
  for (let i = 0; i < LARGE.searches; i += 1) {
    const some = ids.slice(i * LARGE.spacecraft, (i + 1) * LARGE.spacecraft);
    await search(some, { stationIds, lowestElevationDeg: 89.5 });
  }
  const tookMs = performance.now() - begun;
  delay.disable();
  console.log(
    `${ids.length} spacecraft x ${stationIds.length} stations x 7 days, ${LARGE.spacecraft} at a time: ${ms(tookMs)}`,
  );
  console.log(`  event loop delay    p99 ${ms(delay.percentile(99) / 1e6)}, worst ${ms(delay.max / 1e6)}`);
}
