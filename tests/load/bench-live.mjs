/**
 * Measures live contacts on the built server: many listeners on one contact, reports of the station one after another, and how
 * long each listener waits for each of them, from the sending of the report. Loopback only. Run it with
 * `node --expose-gc tests/load/bench-live.mjs`, after `npm run build`. Nothing here is part of the tests: figures depend on the machine.
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
import { seedContact } from './seed-contact.mjs';

const LISTENERS = 500;
const REPORTS = 60;
const BETWEEN_MS = 250;

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
  PASS_WORKERS: '0',
});
const app = await createApp(config, { quiet: true });
await app.listen(0, '127.0.0.1');
const url = `http://127.0.0.1:${app.getHttpServer().address().port}`;
const quantile = (sorted, share) => sorted[Math.min(sorted.length - 1, Math.floor(sorted.length * share))];
const mb = (bytes) => `${(bytes / 1e6).toFixed(1)} MB`;

try {
  const db = openDatabase(config.databaseFile);
  const { tokenSecret } = config;
  const { bookingId, ownerCookie, listenerCookies } = seedContact(db, { listeners: LISTENERS, tokenSecret });
  db.$client.close();
  const listeners = new Worker(new URL('./listeners.mjs', import.meta.url), {
    workerData: { url: `${url}/api/contacts/${bookingId}/live`, cookies: listenerCookies },
  });
  const heard = (kind) =>
    new Promise((resolve) => listeners.on('message', (message) => message.kind === kind && resolve(message)));
  globalThis.gc?.();
  const beforeBytes = process.memoryUsage().heapUsed;
  const open = heard('open');
  listeners.postMessage('open');
  await open;
  await sleep(500);
  globalThis.gc?.();
  const openBytes = process.memoryUsage().heapUsed;
  const delay = monitorEventLoopDelay({ resolution: 5 });
  delay.enable();
  const sentMs = new Map();
  for (let i = 0; i < REPORTS; i += 1) {
    const begunMs = performance.timeOrigin + performance.now();
    const response = await fetch(`${url}/api/contacts/${bookingId}/reports`, {
      method: 'POST',
      headers: { 'Content-Type': 'application/json', 'Idempotency-Key': randomUUID(), Cookie: ownerCookie },
      body: JSON.stringify({ kind: 'bytes', bytes: i }),
    });
    const { seq } = await response.json();
    if (!response.ok) throw new Error(`The report was refused: ${response.status}`);
    sentMs.set(seq, begunMs);
    await sleep(BETWEEN_MS);
  }
  delay.disable();
  const told = heard('heard');
  listeners.postMessage('tell');
  const { times } = await told;
  const waits = times
    .filter(([seq]) => sentMs.has(seq))
    .map(([seq, atMs]) => atMs - sentMs.get(seq))
    .sort((a, b) => a - b);
  console.log(`${cpus().length} x ${cpus()[0]?.model ?? 'unknown'}, Node ${process.versions.node}`);
  console.log(`${LISTENERS} listeners, ${REPORTS} reports: ${waits.length} of ${LISTENERS * REPORTS} heard`);
  console.log(
    `  from report to listener  median ${quantile(waits, 0.5).toFixed(0)} ms, p99 ${quantile(waits, 0.99).toFixed(0)} ms, worst ${waits.at(-1).toFixed(0)} ms`,
  );
  console.log(
    `  event loop delay         p99 ${(delay.percentile(99) / 1e6).toFixed(0)} ms, worst ${(delay.max / 1e6).toFixed(0)} ms`,
  );
  console.log(
    `  heap                     ${mb(beforeBytes)} before, ${mb(openBytes)} with all listening, ${((openBytes - beforeBytes) / LISTENERS / 1000).toFixed(1)} kB each; RSS ${mb(process.memoryUsage().rss)}`,
  );
  await listeners.terminate();
  if (waits.length !== LISTENERS * REPORTS) process.exitCode = 1;
} finally {
  await app.close();
  rmSync(dataDir, { recursive: true, force: true });
}
