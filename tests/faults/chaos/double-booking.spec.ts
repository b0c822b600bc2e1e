/**
 * Two server processes on one database file, sixteen buyers in parallel, and processes killed while they work: afterwards
 * nothing is booked twice and no money is astray. The checker that says so is tried as well: each fault that it looks for is
 * written into a copy of the database, and must be found.
 */
import { type ChildProcess, spawn } from 'node:child_process';
import { copyFileSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import Database from 'better-sqlite3';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { ROOT } from '../../../infra/run/toolbox.mjs';
import { type Books, faultsIn } from './checker.mjs';

const COMMANDS = 300;
const BUYERS = 16;
const SEED = 20_261_201;
const LIMIT_MS = 420_000;

interface Report {
  readonly sent: number;
  readonly kills: number;
  readonly outcomes: Readonly<Record<string, { readonly done: number }>>;
  readonly faults: Readonly<Record<string, readonly unknown[]>>;
  readonly books: Books;
}

let folder: string;
let child: ChildProcess;
let report: Report;

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'skyberth-chaos-'));
  const size = ['--commands', COMMANDS, '--buyers', BUYERS, '--seed', SEED, '--servers', 2].map(String);
  child = spawn(process.execPath, [join(ROOT, 'tests/load/chaos.mjs'), ...size, '--keep', folder], {
    stdio: ['ignore', 'ignore', 'inherit'],
  });
  await new Promise((resolve) => child.once('exit', resolve));
  report = JSON.parse(readFileSync(join(folder, 'report.json'), 'utf8')) as Report;
}, LIMIT_MS);
afterAll(async () => {
  if (child.exitCode === null) {
    child.kill('SIGTERM');
    await new Promise((resolve) => child.once('exit', resolve));
  }
  rmSync(folder, { recursive: true, force: true });
});

/** The faults in a copy of the database after `spoil`, with its guards taken away first, as no code could do. */
function faultsAfter(spoil: string, books: Books = report.books): Record<string, unknown[]> {
  const file = join(folder, 'spoilt.sqlite');
  copyFileSync(join(folder, 'skyberth.sqlite'), file);
  const db = new Database(file);
  try {
    db.pragma('foreign_keys = OFF');
    db.pragma('ignore_check_constraints = ON');
    const guards = db.prepare("SELECT name FROM sqlite_master WHERE type = 'trigger'").all() as { name: string }[];
    for (const { name } of guards) db.exec(`DROP TRIGGER "${name}"`);
    const before = db.prepare('SELECT total_changes() AS rows').get() as { rows: number };
    db.exec(spoil);
    const after = db.prepare('SELECT total_changes() AS rows').get() as { rows: number };
    if (spoil !== '' && after.rows === before.rows) throw new Error('Nothing was spoilt.');
    return faultsIn(db, books);
  } finally {
    db.close();
    rmSync(file);
  }
}

it('books nothing twice and loses no money while processes are killed', () => {
  expect(Object.entries(report.faults).filter(([, found]) => found.length > 0)).toEqual([]);
  expect(report.sent).toBeGreaterThanOrEqual(COMMANDS);
  expect(report.kills).toBeGreaterThan(0);
  for (const kind of ['hold', 'hold group', 'pay', 'pay group', 'let go', 'cancel', 'accept'])
    expect(report.outcomes[kind]?.done, kind).toBeGreaterThan(0);
});

describe('the checker', () => {
  const sold = "(SELECT id FROM bookings WHERE state = 'confirmed' ORDER BY number LIMIT 1)";
  const other = "(SELECT id FROM bookings WHERE state = 'confirmed' ORDER BY number DESC LIMIT 1)";
  const like = (columns: readonly string[]) =>
    `UPDATE bookings SET ${columns.map((name) => `${name} = (SELECT ${name} FROM bookings WHERE id = ${sold})`).join(', ')} WHERE id = ${other}`;
  const event = (kind: string, from: string, to: string) =>
    `INSERT INTO booking_events (id, booking_id, at_ms, kind, from_state, to_state, sentence)
     VALUES ('spoilt', ${sold}, 0, '${kind}', '${from}', '${to}', '')`;

  it.each([
    ['beamTwice', like(['antenna_id', 'beam', 'guard_from_ms', 'guard_to_ms'])],
    ['spacecraftTwice', like(['spacecraft_id', 'aos_ms', 'los_ms'])],
    [
      'halfGroups',
      "DELETE FROM booking_events WHERE rowid = (SELECT e.rowid FROM booking_events e JOIN booking_group_members m ON m.booking_id = e.booking_id WHERE e.kind LIKE 'funds secured%' LIMIT 1)",
    ],
    ['unlawfulMoves', event('funds secured', 'confirmed', 'confirmed')],
    ['unexplainedStates', `UPDATE bookings SET state = 'settled' WHERE id = ${sold}`],
    ['paymentsDiffer', `UPDATE payments SET amount_minor = amount_minor + 1 WHERE booking_id = ${sold}`],
    ['paymentsDiffer', `UPDATE payments SET captured_minor = 1 WHERE booking_id = ${sold}`],
    ['moneyWithoutBooking', `UPDATE payments SET intent_id = NULL WHERE booking_id = ${sold}`],
    ['paidForNothing', `DELETE FROM payments WHERE booking_id = ${sold}`],
    [
      'unbalancedEntries',
      "INSERT INTO journal_postings (entry_id, line, account, amount_minor) VALUES ('spoilt', 1, 'VAT', 1)",
    ],
    [
      'unsealedEntries',
      "INSERT INTO journal_entries (id, at_ms, cause_key, cause, currency) VALUES ('spoilt', 0, 'spoilt', '', 'EUR')",
    ],
    [
      'ledgerDiffers',
      "INSERT INTO journal_postings (entry_id, line, account, amount_minor) VALUES ('spoilt', 1, 'provider clearing', 1)",
    ],
    ['outboxLeft', "UPDATE outbox SET state = 'failed' WHERE rowid = 1"],
    ['eventsLeft', 'UPDATE provider_events SET processed_ms = NULL WHERE rowid = 1'],
  ])('finds %s', (kind, spoil) => {
    expect(faultsAfter(spoil)[kind]).not.toEqual([]);
  });

  it('finds a booking that was promised and is gone', () => {
    const [id] = report.books.receipts.flatMap(({ bookingIds }) => bookingIds);
    expect(faultsAfter(`DELETE FROM bookings WHERE id = '${id}'`)['bookingsLost']).toEqual([id]);
  });

  it('finds a command that was carried out twice', () => {
    const receipts = report.books.receipts.map((receipt) => ({ ...receipt, mayHaveMade: 0 }));
    const [forgotten] = receipts.filter(({ bookingIds }) => bookingIds.length > 0);
    const books = { ...report.books, receipts: receipts.filter((receipt) => receipt !== forgotten) };
    expect(faultsAfter('', books)['bookingsNobodyAskedFor']).not.toEqual([]);
  });
});
