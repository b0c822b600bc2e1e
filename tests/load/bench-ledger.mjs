/**
 * How fast the ledger answers over many postings: fills a database with entries through the same triggers, then asks the
 * real server's own reading service. `node tests/load/bench-ledger.mjs [--postings 1000000]`; prints one line of JSON.
 * Build first (`npm run build`).
 */
import { randomUUID } from 'node:crypto';
import { mkdtempSync, rmSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { performance } from 'node:perf_hooks';
import { parseArgs } from 'node:util';
import { LedgerCheckRepository, LedgerReading, LedgerRepository, LedgerService } from '@skyberth/api';
import { migrateDatabase, openDatabase } from '@skyberth/drizzle';

const { values } = parseArgs({ options: { postings: { type: 'string', default: '1000000' } } });
const postings = Number(values.postings);
const PER_ENTRY = 4;
const YEARS_MS = 3 * 365 * 86_400_000;
const NOW_MS = Date.UTC(2026, 11, 1);
const RUNS = 30;

const folder = mkdtempSync(join(tmpdir(), 'skyberth-ledger-'));
const file = join(folder, 'ledger.sqlite');
const db = openDatabase(file);
try {
  migrateDatabase(db);
  const fillMs = fill(db, Math.ceil(postings / PER_ENTRY));
  const repository = new LedgerRepository(db);
  const reading = new LedgerReading(repository);
  const ledger = new LedgerService(repository, new LedgerCheckRepository(db), { nowMs: () => NOW_MS });
  const account = { account: 'owner payable', currency: 'EUR', limit: 50 };
  const middle = placeInTheMiddle(db);
  const party = reading.parties(account).items[0].organisationId;
  const figures = {
    journalNewest: slowest(() => reading.journal({ limit: 50 })),
    journalInTheMiddle: slowest(() => reading.journal({ limit: 50, after: middle })),
    linesNewest: slowest(() => reading.lines(account)),
    linesInTheMiddle: slowest(() => reading.lines({ ...account, after: middle })),
    linesOfAParty: slowest(() => reading.lines({ ...account, organisationId: party })),
    linesOfAMonth: slowest(() => reading.lines({ ...account, fromMonth: '2025-06', toMonth: '2025-06' })),
    balances: slowest(() => reading.balances()),
    months: slowest(() => reading.months({ currency: 'EUR' })),
  };
  const checkFrom = performance.now();
  const faults = ledger.selfCheck().length;
  const rows = db.$client.prepare('SELECT count(*) AS rows FROM journal_postings').get().rows;
  console.log(
    JSON.stringify({
      postings: rows,
      megabytes: Math.round(statSync(file).size / 1e6),
      fillS: round(fillMs / 1000),
      slowestOfMs: RUNS,
      ...figures,
      selfCheckMs: round(performance.now() - checkFrom),
      faults,
    }),
  );
} finally {
  db.$client.close();
  rmSync(folder, { recursive: true, force: true });
}

/** Sales of three years to forty owners in two currencies, each entry sealed as the application does. */
function fill(database, entries) {
  const from = performance.now();
  const client = database.$client;
  client.pragma('synchronous = OFF');
  const organisations = Array.from({ length: 80 }, (_, index) => {
    const id = randomUUID();
    client
      .prepare(
        "INSERT INTO organisations (id, kind, name, address, billing_email, created_ms) VALUES (?, ?, ?, '{}', 'bills@meter.example', 0)",
      )
      .run(id, index % 2 === 0 ? 'operator' : 'owner', `Measured ${index}`);
    return id;
  });
  const head = client.prepare(
    'INSERT INTO journal_entries (id, at_ms, cause_key, cause, currency, sealed) VALUES (?, ?, ?, ?, ?, 0)',
  );
  const line = client.prepare(
    'INSERT INTO journal_postings (entry_id, line, account, organisation_id, amount_minor, at_ms, currency) VALUES (?, ?, ?, ?, ?, ?, ?)',
  );
  const seal = client.prepare('UPDATE journal_entries SET sealed = 1 WHERE id = ?');
  const some = client.transaction((first, count) => {
    for (let index = first; index < first + count; index += 1) {
      const atMs = Math.round(NOW_MS - YEARS_MS + (YEARS_MS * index) / entries);
      const id = idOf(atMs, index);
      const currency = index % 5 === 0 ? 'NOK' : 'EUR';
      const pair = (index % 40) * 2;
      const gross = 5_000 + (index % 9_000);
      const vat = Math.round(gross / 5);
      const fee = Math.round(gross / 12);
      head.run(id, atMs, `sale:${index}`, `Berth ${index}`, currency);
      line.run(id, 1, 'operator receivable', organisations[pair], gross, atMs, currency);
      line.run(id, 2, 'owner payable', organisations[pair + 1], fee + vat - gross, atMs, currency);
      line.run(id, 3, 'VAT', null, -vat, atMs, currency);
      line.run(id, 4, 'marketplace fee', null, -fee, atMs, currency);
      seal.run(id);
    }
  });
  for (let index = 0; index < entries; index += 10_000) some(index, Math.min(10_000, entries - index));
  client.exec('ANALYZE');
  return performance.now() - from;
}

/** A version 7 UUID of that time. */
function idOf(atMs, index) {
  const time = atMs.toString(16).padStart(12, '0');
  const low = index.toString(16).padStart(12, '0');
  return `${time.slice(0, 8)}-${time.slice(8)}-7000-8000-${low}`;
}

function placeInTheMiddle(database) {
  const { at_ms: atMs, id } = database.$client
    .prepare('SELECT at_ms, id FROM journal_entries WHERE at_ms >= ? ORDER BY at_ms LIMIT 1')
    .get(NOW_MS - YEARS_MS / 2);
  return `${atMs}_${id}_2`;
}

/** Milliseconds of the slowest of several runs, the first one, cold, included. */
function slowest(work) {
  let most = 0;
  for (let run = 0; run < RUNS; run += 1) {
    const from = performance.now();
    work();
    most = Math.max(most, performance.now() - from);
  }
  return round(most);
}

function round(value) {
  return Math.round(value * 10) / 10;
}
