/**
 * Two servers on one database file, and buyers that hold, pay, cancel, wait and let go at random, by seed. Afterwards the
 * database is read by itself: no two contacts in each other's way, no money lost or doubled, every state with its history.
 */
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { BOOKING_TRANSITIONS, OCCUPYING_STATES, routes } from '@skyberth/shared';
import Database from 'better-sqlite3';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { elementsAt, type HoldWish, openShop, RADIO, type Shop, wishFor } from '../api/harness/shop.js';
import { must, type Person, type Skyberth, startSkyberth } from '../api/harness.js';

const SEED = 20_261_201;
const ROUNDS = 30;
const BUYERS = 6;
const PASSES = 8;

interface Buyer {
  readonly as: Person;
  readonly spacecraftId: string;
}

let shop: Shop;
let second: Skyberth;
let dataDir: string;
const buyers: Buyer[] = [];
const wishes: HoldWish[] = [];

beforeAll(async () => {
  dataDir = mkdtempSync(join(tmpdir(), 'skyberth-random-'));
  shop = await openShop({ antenna: { minNoticeMin: 0 }, server: { dataDir } });
  second = await startSkyberth({ dataDir, environment: shop.payments.environment });
  const { items } = await must(
    shop.skyberth.call(routes.listElements, { params: { id: shop.spacecraftId }, query: {}, as: shop.operator }),
  );
  const text = elementsAt(Date.parse(items[0]?.epochUtc ?? ''), 70_001, 70_001 % 360);
  for (let index = 0; index < BUYERS; index += 1) {
    const as = await shop.skyberth.people.operator();
    const body = { name: 'Twin', shortName: 'TW', catalogNumber: 70_001, radios: [RADIO] };
    const { id: spacecraftId } = await must(shop.skyberth.call(routes.createSpacecraft, { body, as }));
    await must(shop.skyberth.call(routes.saveElements, { body: { text, spacecraftId }, as }));
    buyers.push({ as, spacecraftId });
  }
  for (const pass of shop.passes.slice(-PASSES)) wishes.push(await wishFor(shop.skyberth, pass, shop.operator));
});
afterAll(async () => {
  await second?.stop();
  await shop?.stop();
  rmSync(dataDir, { recursive: true, force: true });
});

/** Numbers from 0 to below `below`, the same for the same seed (a linear congruence modulo 2^32). */
function chance(seed: number): (below: number) => number {
  let state = seed;
  return (below) => {
    state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0;
    return Math.floor((state / 2 ** 32) * below);
  };
}

/** One buyer does one thing on one of the servers. Refusals are part of the game; a failure of the server is not. */
async function act(pick: (below: number) => number): Promise<number> {
  const { as, spacecraftId } = buyers[pick(BUYERS)]!;
  const { call } = [shop.skyberth, second][pick(2)]!;
  const wish = { ...wishes[pick(PASSES)]!, spacecraftId };
  const other = { ...wishes[pick(PASSES)]!, spacecraftId };
  const kind = pick(8);
  const nth = pick(50);
  if (kind < 2) return (await call(routes.holdBerth, { body: wish, as })).status;
  if (kind === 2) return (await call(routes.holdGroup, { body: { items: [wish, other] }, as })).status;
  if (kind === 3) return (await call(routes.joinStandby, { body: wish, as })).status;
  const { items } = await must(call(routes.listBookings, { query: { pageSize: 200 }, as }));
  const held = items.filter(({ state }) => state === 'held');
  if (kind < 6 && held.length > 0) {
    const { id } = held[nth % held.length]!;
    const answer = await call(routes.checkout, { params: { id }, body: {}, as });
    if (answer.ok && answer.body.kind === 'redirect') await shop.payments.payOnPage(answer.body.url, 'pm_card_visa');
    return answer.status;
  }
  if (kind === 6 && held.length > 0) {
    const { id } = held[nth % held.length]!;
    return (await call(routes.letGo, { params: { id }, as })).status;
  }
  const sold = items.filter(({ state }) => state === 'confirmed');
  if (sold.length === 0) return 200;
  const { id, refundNowMinor } = await must(
    call(routes.getBooking, { params: { id: sold[nth % sold.length]!.id }, as }),
  );
  const body = { reason: 'at random', expectedRefundMinor: refundNowMinor ?? 0 };
  return (await call(routes.cancelBooking, { params: { id }, body, as })).status;
}

it('leaves nothing booked twice, no money astray, and every booking with a lawful history', async () => {
  const pick = chance(SEED);
  const statuses: number[] = [];
  for (let round = 0; round < ROUNDS; round += 1) {
    statuses.push(...(await Promise.all(Array.from({ length: BUYERS }, () => act(pick)))));
    await Promise.all([shop.skyberth.runJobs(), second.runJobs()]);
  }
  await shop.payments.settled();
  await shop.settle();
  await second.drain();
  await shop.settle();
  expect(statuses.filter((status) => status >= 500)).toEqual([]);
  expect(statuses.filter((status) => status < 300).length).toBeGreaterThan(ROUNDS);
  const db = new Database(shop.skyberth.databaseFile, { readonly: true });
  const found = faultsIn(db);
  const { sold } = db.prepare("SELECT count(*) sold FROM booking_events WHERE kind = 'funds secured'").get() as {
    sold: number;
  };
  db.close();
  expect(found).toEqual({
    overlaps: [],
    unlawful: [],
    unexplained: [],
    money: [],
    unbalanced: [],
    outbox: [],
    halves: [],
  });
  expect(sold).toBeGreaterThan(0);
  const { data } = await shop.payments.stripe.paymentIntents.list({ limit: 100 });
  const astray = data.filter(
    ({ status, metadata }) => status === 'requires_capture' && !isSold(metadata['skyberth_booking']),
  );
  expect(astray.map(({ id }) => id)).toEqual([]);
});

/** Whether the money that is reserved at the provider belongs to a booking that still wants it. */
function isSold(bookingId: string | undefined): boolean {
  const db = new Database(shop.skyberth.databaseFile, { readonly: true });
  const row = db.prepare('SELECT state FROM bookings WHERE id = ?').get(bookingId) as { state: string } | undefined;
  db.close();
  return row !== undefined && ['confirmed', 'awaiting owner'].includes(row.state);
}

/** Everything in the database that must not be; each list is empty where all is well. */
function faultsIn(db: Database.Database): Record<string, unknown[]> {
  const busy = OCCUPYING_STATES.map((state) => `'${state}'`).join(',');
  const lawful = new Set(BOOKING_TRANSITIONS.map((move) => `${move.from ?? ''}|${move.event}|${move.to}`));
  const events = db
    .prepare(
      'SELECT booking_id, kind, from_state, to_state FROM booking_events WHERE to_state IS NOT NULL ORDER BY rowid',
    )
    .all() as { booking_id: string; kind: string; from_state: string | null; to_state: string }[];
  const last = new Map<string, string>();
  const unlawful = events.filter(({ booking_id, kind, from_state, to_state }) => {
    const isNext = (last.get(booking_id) ?? null) === from_state;
    last.set(booking_id, to_state);
    return !isNext || !lawful.has(`${from_state ?? ''}|${kind}|${to_state}`);
  });
  const bookings = db.prepare('SELECT id, state FROM bookings').all() as { id: string; state: string }[];
  const all = (sql: string) => db.prepare(sql).all();
  return {
    overlaps: all(`SELECT a.number FROM bookings a JOIN bookings b ON a.antenna_id = b.antenna_id AND a.beam = b.beam
      AND a.id < b.id AND a.guard_from_ms < b.guard_to_ms AND b.guard_from_ms < a.guard_to_ms
      WHERE a.state IN (${busy}) AND b.state IN (${busy})`),
    unlawful,
    unexplained: bookings.filter(({ id, state }) => last.get(id) !== state),
    money: all(`SELECT b.number, b.state, p.state FROM bookings b LEFT JOIN payments p ON p.booking_id = b.id
      WHERE b.state = 'confirmed' AND (p.state IS NULL OR p.state <> 'authorised')
      OR b.state IN ('lapsed','declined') AND p.state NOT IN ('released')
      OR b.state = 'cancelled' AND p.state IN ('waiting for the buyer','authorised','capturing','releasing')`),
    unbalanced: all('SELECT currency FROM journal_postings GROUP BY entry_id, currency HAVING sum(amount_minor) <> 0'),
    outbox: all("SELECT kind, last_error FROM outbox WHERE state <> 'done'"),
    halves: all(`SELECT m.group_id FROM booking_group_members m JOIN bookings b ON b.id = m.booking_id
      GROUP BY m.group_id HAVING count(DISTINCT b.state = 'held') > 1`),
  };
}
