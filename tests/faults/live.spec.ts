/** A server that goes away during a contact, and two servers on one database. */
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { type Booking, type ContactEvent, routes } from '@skyberth/shared';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { addressOfStream, type Listening, listen } from '../api/harness/listen.js';
import { openShop, type Shop } from '../api/harness/shop.js';
import { must, type Skyberth, startSkyberth } from '../api/harness.js';

let dataDir: string;
let shop: Shop;
let second: Skyberth;
let booking: Booking;
const path = () => `/api/contacts/${booking.id}/live`;
const bytes = (events: readonly ContactEvent[]) =>
  events.flatMap((event) => (event.kind === 'bytes' ? [event.value] : []));
const heard = (listening: Listening, count: number) => listening.until((events) => bytes(events).length >= count);
const report = (server: Skyberth, count: number) =>
  must(
    server.call(routes.reportLive, {
      params: { id: booking.id },
      body: { kind: 'bytes', bytes: count },
      as: shop.owner,
    }),
  );

beforeAll(async () => {
  dataDir = mkdtempSync(join(tmpdir(), 'skyberth-live-'));
  shop = await openShop({ antenna: { minNoticeMin: 0 }, server: { dataDir } });
  const [pass] = shop.passes;
  if (!pass) throw new Error('There is no pass.');
  booking = await shop.buy(pass);
  await shop.advanceTo(Date.parse(booking.aosUtc) + 1_000);
  await shop.skyberth.runJobs();
  second = await startSkyberth({ dataDir });
  second.clock.set(shop.skyberth.clock.nowMs());
});
afterAll(async () => {
  // A client reconnects after a stream that it broke off; a connection that asks nothing would be waited for.
  second?.app.getHttpServer().closeAllConnections();
  await second?.stop();
  await shop?.payments.stop();
  rmSync(dataDir, { recursive: true, force: true });
});

describe('listeners', () => {
  it('hear at one server what a station reports at the other', async () => {
    const listening = await listen(addressOfStream(second.url, path()), shop.operator);
    await report(shop.skyberth, 1);
    await report(second, 2);
    expect(bytes(await heard(listening, 2))).toEqual([1, 2]);
    listening.close();
  });

  it('go on where they were when their server is gone, and lose and repeat nothing', async () => {
    const before = await listen(addressOfStream(shop.skyberth.url, path()), shop.operator);
    await report(shop.skyberth, 3);
    const first = await heard(before, 3);
    const last = first.at(-1)?.seq ?? 0;
    await shop.skyberth.stop();
    await report(second, 4);
    await report(second, 5);
    const after = await listen(addressOfStream(second.url, path()), shop.operator, last);
    await report(second, 6);
    const rest = await heard(after, 3);
    after.close();
    expect(bytes([...first, ...rest])).toEqual([1, 2, 3, 4, 5, 6]);
    const { items } = await must(second.call(routes.contactEvents, { params: { id: booking.id }, as: shop.operator }));
    expect([...first, ...rest].map((event) => event.seq)).toEqual(items.map((event) => event.seq));
  });
});
