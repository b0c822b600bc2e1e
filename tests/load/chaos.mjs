/**
 * Many buyers in parallel on several server processes with one database file, processes killed at random, and afterwards a
 * reading of the database that must find nothing wrong: `node tests/load/chaos.mjs --commands 600 --buyers 20 --seed 1
 * --servers 2 [--keep FOLDER]`, after `npm run build`. Chances come from the seed; who comes first is the machine's own. Loopback only.
 * Prints the figures and ends with 1 where a fault was found. `--keep` leaves the database and `report.json` behind.
 */
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { parseArgs } from 'node:util';
import Database from 'better-sqlite3';
import { startStack } from '../../infra/run/stack.mjs';
import { freePort, ROOT } from '../../infra/run/toolbox.mjs';
import { actOfBuyer, actOfOwner } from '../faults/chaos/acts.mjs';
import { faultsIn } from '../faults/chaos/checker.mjs';
import { booksOf, comeToRest } from '../faults/chaos/ending.mjs';
import { openMarket } from '../faults/chaos/market.mjs';
import { Servers, startWire, stopOnSignal } from '../faults/chaos/servers.mjs';
import { chance } from './year/chance.mjs';

/** A process is killed every so many commands. */
const KILL_AFTER = { from: 40, to: 160 };
/** Nobody found anything to do: look again after so long. */
const IDLE_MS = 50;

const text = { type: 'string' };
const { values } = parseArgs({ options: { commands: text, buyers: text, seed: text, servers: text, keep: text } });
const settings = {
  commands: Number(values.commands ?? 2_000),
  buyers: Number(values.buyers ?? 50),
  seed: Number(values.seed ?? 1),
  servers: Number(values.servers ?? 2),
};
const bad = Object.entries(settings).find(([, value]) => !Number.isSafeInteger(value) || value < 1);
if (bad) throw new Error(`--${bad[0]} must be a whole number of at least 1.`);

const dataDir = values.keep ?? mkdtempSync(join(tmpdir(), 'skyberth-chaos-'));
mkdirSync(dataDir, { recursive: true });
const databaseFile = join(dataDir, 'skyberth.sqlite');
const failures = [];
const wirePort = await freePort();
const stack = await startStack({ port: wirePort, dataDir, api: false, demo: false });
const environment = { ...stack.environment, PASS_WORKERS: '0' };
const servers = new Servers({ script: join(ROOT, 'apps/api/dist/main.js'), environment, failures });
let eventsTo = () => servers.living[0]?.url ?? 'http://127.0.0.1:9';
const stopWire = await startWire(wirePort, () => eventsTo());
const stopAll = async () => {
  await servers.stop();
  await stack.stop();
  await stopWire();
  if (!values.keep) rmSync(dataDir, { recursive: true, force: true });
};
stopOnSignal(stopAll);
let report;
try {
  await servers.start(settings.servers);
  const market = await openMarket({
    databaseFile,
    servers,
    buyerCount: settings.buyers,
    seed: settings.seed,
    failures,
  });
  const game = await play(market);
  await servers.stop();
  const paymentsUrl = stack.urls.payments;
  const pointWire = (url) => {
    eventsTo = () => url;
  };
  const ledgerCheck = await comeToRest({ environment, paymentsUrl, databaseFile, pointWire });
  const receipts = market.buyers.flatMap((buyer) => buyer.receipts);
  const books = { ...(await booksOf(paymentsUrl, environment.STRIPE_SECRET_KEY)), receipts };
  const db = new Database(databaseFile, { readonly: true });
  const faults = { ...faultsIn(db, books), ledgerCheck, failures };
  report = { settings, ...game, ...figuresOf(db), faults, books };
  db.close();
  writeFileSync(join(dataDir, 'report.json'), JSON.stringify(report));
  print(report);
} finally {
  await stopAll();
}
process.exitCode = Object.values(report.faults).every((list) => list.length === 0) ? 0 : 1;

/** Everyone acts until so many commands were sent. */
async function play({ buyers, owner }) {
  const { whole } = chance(settings.seed + 1_000_003);
  const outcomes = {};
  let sent = 0;
  let cut = 0;
  let killAt = whole(KILL_AFTER.from, KILL_AFTER.to);
  const begunMs = performance.now();
  const take = (what) => {
    sent += 1;
    if (what.cut) cut += 1;
    outcomes[what.kind] ??= { done: 0, refused: 0, unanswered: 0 };
    outcomes[what.kind][what.status === 0 ? 'unanswered' : what.status < 300 ? 'done' : 'refused'] += 1;
    if (sent < killAt) return;
    if (servers.kill((below) => whole(0, below - 1))) killAt = sent + whole(KILL_AFTER.from, KILL_AFTER.to);
  };
  const acting = async (person, act) => {
    while (sent < settings.commands) {
      const what = await act(person);
      if (what) take(what);
      else await sleep(IDLE_MS);
    }
  };
  await Promise.all([acting(owner, actOfOwner), ...buyers.map((buyer) => acting(buyer, actOfBuyer))]);
  const tookS = (performance.now() - begunMs) / 1000;
  return { sent, cut, kills: servers.kills, tookS, outcomes };
}

function figuresOf(db) {
  const bookings = db.prepare('SELECT state, count(*) AS rows FROM bookings GROUP BY state').all();
  const payments = db.prepare('SELECT state, count(*) AS rows FROM payments GROUP BY state').all();
  const plain = (rows) => Object.fromEntries(rows.map((row) => [row.state, row.rows]));
  return { bookings: plain(bookings), payments: plain(payments) };
}

function print({ sent, cut, kills, tookS, outcomes, bookings, payments, faults }) {
  console.log(`${settings.buyers} buyers, ${settings.servers} servers, seed ${settings.seed}: ${sent} commands`);
  console.log(
    `  in ${tookS.toFixed(1)} s (${(sent / tookS).toFixed(0)} a second), ${kills} kills, ${cut} commands cut off`,
  );
  console.log('  bookings', JSON.stringify(bookings), 'payments', JSON.stringify(payments));
  console.table(outcomes);
  for (const [kind, list] of Object.entries(faults))
    console.log(`  ${kind}: ${list.length}`, list.length > 0 ? JSON.stringify(list.slice(0, 5)) : '');
}
