/** A year of money against a provider whose news are spoiled, and invoice numbers from several processes at once. */
import { spawn } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { bookings, invoices, migrateDatabase, openDatabase } from '@skyberth/drizzle';
import { asc } from 'drizzle-orm';
import { expect, it } from 'vitest';
import { playYear } from '../load/year/play.mjs';
import { bookingRow, makeWorld, quoteOf } from '../load/year/world.mjs';

it('ends a year of 600 bookings with books that agree to the last minor unit', async () => {
  const year = await playYear({ bookings: 600, seed: 7 });
  expect(year.disagreements).toEqual([]);
  expect(year.bookings).toBe(600);
  // The year was not an easy one.
  for (const trouble of [
    'refunds',
    'chargebacks',
    'dropped',
    'duplicated',
    'late',
    'orderFailures',
    'missedRead',
  ] as const) {
    expect([trouble, year[trouble] > 0]).toEqual([trouble, true]);
  }
}, 180_000);

const PROCESSES = 4;
const INVOICES = 1_000;

it('numbers a thousand invoices of four processes without a gap', async () => {
  const folder = mkdtempSync(join(tmpdir(), 'skyberth-series-'));
  const file = join(folder, 'series.sqlite');
  const db = openDatabase(file);
  try {
    migrateDatabase(db);
    addBookings(db);
    const script = fileURLToPath(new URL('issue-invoices.mjs', import.meta.url));
    const codes = await Promise.all(
      Array.from({ length: PROCESSES }, (_, part) => exitOf([script, file, String(part), String(PROCESSES)])),
    );
    expect(codes).toEqual(Array.from({ length: PROCESSES }, () => 0));
    const rows = db.select().from(invoices).orderBy(asc(invoices.seq)).all();
    expect(rows.map((row) => row.seq)).toEqual(Array.from({ length: INVOICES }, (_, index) => index + 1));
    expect(new Set(rows.map((row) => row.bookingId)).size).toBe(INVOICES);
    expect(new Set(rows.map((row) => row.number)).size).toBe(INVOICES);
  } finally {
    db.$client.close();
    rmSync(folder, { recursive: true, force: true });
  }
}, 120_000);

/** The processes run the built files, as the threads of the server do. */
const exitOf = (args: string[]): Promise<number | null> =>
  new Promise((resolve) => {
    const child = spawn(process.execPath, args, { stdio: ['ignore', 'inherit', 'inherit'] });
    child.on('exit', resolve);
  });

function addBookings(db: ReturnType<typeof openDatabase>): void {
  const nowMs = Date.UTC(2026, 11, 1);
  const { personId, operators, owners } = makeWorld(db, nowMs);
  const [operator, owner] = [operators[0], owners[0]];
  if (!operator || !owner) throw new Error('The world is empty.');
  const quote = quoteOf({ currency: 'EUR', netMinor: 10_000, vatMinor: 2_550, rateBasisPoints: 2_550 });
  for (let index = 0; index < INVOICES; index += 1) {
    const id = `00000000-0000-7000-9000-${index.toString(16).padStart(12, '0')}`;
    const aosMs = nowMs + index * 600_000;
    db.insert(bookings)
      .values(bookingRow({ operator, owner, quote, personId, id, number: 2_000 + index, aosMs, nowMs }))
      .run();
  }
}
