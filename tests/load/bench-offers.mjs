/**
 * Measures offers in a crowded market on the built server: 1 spacecraft x 200 antennas x 14 days with 20,000 contacts sold,
 * from the request to the last byte. Loopback only. Run it with `npm run bench:offers`, after `npm run build`. Nothing here
 * is part of the tests: figures depend on the machine.
 */
import { randomUUID } from 'node:crypto';
import { mkdtempSync, rmSync } from 'node:fs';
import { cpus, tmpdir } from 'node:os';
import { join } from 'node:path';
import { Worker } from 'node:worker_threads';
import { createApp, readConfig } from '@skyberth/api';
import { bookings, openDatabase } from '@skyberth/drizzle';
import { seedMarket } from './seed-market.mjs';

const ANTENNAS = 200;
const DAYS = 14;
const SOLD_EACH = 100;
const ROUNDS = 15;
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

const search = (spacecraftId) =>
  ask({
    kind: 'search',
    body: {
      spacecraftIds: [spacecraftId],
      fromUtc: new Date(START_MS).toISOString(),
      toUtc: new Date(START_MS + DAYS * DAY_MS).toISOString(),
    },
  });
const median = (values) => [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)];
const line = (name, took) =>
  `  ${name.padEnd(18)}  median ${median(took).toFixed(0).padStart(5)} ms, worst ${Math.max(...took)
    .toFixed(0)
    .padStart(5)} ms`;

try {
  const { organisationId } = await ask({ kind: 'sign up' });
  const db = openDatabase(config.databaseFile);
  const { spacecraftIds } = seedMarket(db, {
    organisationId,
    antennas: ANTENNAS,
    spacecraft: ROUNDS + 1,
    startMs: START_MS,
    sold: { oneAntennaIn: 1, each: SOLD_EACH, everyMs: (DAYS * DAY_MS) / SOLD_EACH },
  });
  const sold = db.$count(bookings);
  console.log(`${cpus().length} x ${cpus()[0]?.model ?? 'unknown'}, Node ${process.versions.node}, ${await sold} sold`);
  db.$client.close();
  const [warmUp, ...fresh] = spacecraftIds;
  await search(warmUp);
  const took = { first: [], again: [] };
  let passes = 0;
  for (const id of fresh) {
    const first = await search(id);
    passes = first.passes;
    took.first.push(first.tookMs);
    took.again.push((await search(id)).tookMs);
  }
  console.log(`1 spacecraft x ${ANTENNAS} antennas x ${DAYS} days: ${passes} passes in the last answer`);
  console.log(line('first search', took.first));
  console.log(line('the same again', took.again));
} finally {
  await asker.terminate();
  await app.close();
  rmSync(dataDir, { recursive: true, force: true });
}
