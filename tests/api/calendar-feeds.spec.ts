/** Contacts in people's own calendars, by a secret address. */
import { calendarFeeds, openDatabase } from '@skyberth/drizzle';
import { MOST_CALENDAR_FEEDS, routes } from '@skyberth/shared';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openShop, type Shop } from './harness/shop.js';
import { antennaOnSale } from './harness/stations.js';
import { must, type Person } from './harness.js';

let shop: Shop;
beforeAll(async () => {
  shop = await openShop({ antenna: { minNoticeMin: 0 } });
});
afterAll(() => shop?.stop());

const call: Shop['skyberth']['call'] = (route, input) => shop.skyberth.call(route, input);
const make = (as: Person, antennaId: string | null = null) =>
  must(call(routes.makeCalendarFeed, { body: { antennaId }, as }));
/** The address as a calendar program sees it; the test's server has another port than its configuration says. */
const pathOf = (url: string) => new URL(url).pathname;
const read = (url: string) => fetch(shop.skyberth.url + pathOf(url));
/** The lines of the feed, unfolded by RFC 5545 3.1, of each event. */
async function events(url: string): Promise<string[][]> {
  const text = await (await read(url)).text();
  return text
    .replaceAll('\r\n ', '')
    .split('BEGIN:VEVENT')
    .slice(1)
    .map((event) => event.split('\r\n'));
}
const value = (event: readonly string[] | undefined, name: string) =>
  event?.find((line) => line.startsWith(`${name}:`))?.slice(name.length + 1);

describe('a calendar address', () => {
  it('is refused for the antenna of another, and beyond a bound', async () => {
    const stranger = await shop.skyberth.people.owner();
    const { antenna } = await antennaOnSale(shop.skyberth, stranger);
    const answer = await call(routes.makeCalendarFeed, { body: { antennaId: antenna.id }, as: shop.owner });
    expect(answer.problem?.code).toBe('not-found');
    const buyer = await call(routes.makeCalendarFeed, { body: { antennaId: antenna.id }, as: shop.operator });
    expect(buyer.problem?.code).toBe('not-found');
    for (let made = 0; made < MOST_CALENDAR_FEEDS; made += 1) await make(stranger);
    const more = await call(routes.makeCalendarFeed, { body: {}, as: stranger });
    expect(more.problem?.code).toBe('wrong-state');
  });

  it('shows nothing to those who guess it, and keeps them waiting', async () => {
    const codes = [];
    for (let guess = 0; guess < 25; guess += 1) {
      codes.push((await read(`http://x.example/api/feeds/${'a'.repeat(42)}${guess % 10}.ics`)).status);
    }
    expect(new Set(codes)).toEqual(new Set([404, 429]));
    const { url } = await make(shop.operator);
    expect((await read(url)).status).toBe(200);
    // After a quiet hour the guesses are forgotten.
    await shop.advance(3_700_000);
  });

  it('keeps no secret in the database', async () => {
    const { url, feed } = await make(shop.operator);
    const token = /feeds\/(.+)\.ics$/.exec(url)?.[1] ?? '';
    expect(token.length).toBeGreaterThanOrEqual(43);
    const db = openDatabase(shop.skyberth.databaseFile);
    const rows = JSON.stringify(db.select().from(calendarFeeds).all());
    db.$client.close();
    expect(rows).toContain(feed.id);
    expect(rows).not.toContain(token);
    expect(JSON.stringify(await must(call(routes.listCalendarFeeds, { as: shop.operator })))).not.toContain(token);
  });

  it('opens nothing once it is revoked, which only its maker can do', async () => {
    const { url, feed } = await make(shop.operator);
    const params = { id: feed.id };
    const colleague = await shop.skyberth.people.member(shop.operator, 'viewer');
    expect((await call(routes.revokeCalendarFeed, { params, as: colleague })).status).toBe(404);
    expect((await read(url)).status).toBe(200);
    await must(call(routes.revokeCalendarFeed, { params, as: shop.operator }));
    expect((await read(url)).status).toBe(404);
    expect((await call(routes.revokeCalendarFeed, { params, as: shop.operator })).status).toBe(404);
  });

  it('opens nothing once its maker has left the organisation', async () => {
    const colleague = await shop.skyberth.people.member(shop.operator, 'viewer');
    const { url } = await make(colleague);
    expect((await read(url)).status).toBe(200);
    await must(call(routes.removeMember, { params: { personId: colleague.personId }, as: shop.operator }));
    expect((await read(url)).status).toBe(404);
  });
});

describe('the calendar behind it', () => {
  /** RFC 5545 3.8.4.7 UID, 3.8.7.4 SEQUENCE, 3.8.1.11 STATUS. */
  it('keeps a cancelled contact under the same UID, with STATUS:CANCELLED and a larger SEQUENCE', async () => {
    const { url } = await make(shop.operator);
    const bought = await shop.buy(shop.passes.at(-1)!);
    const before = (await events(url)).find((event) => value(event, 'UID')?.includes(bought.id));
    expect(value(before, 'STATUS')).toBe('CONFIRMED');
    await shop.advance(5_000);
    const params = { id: bought.id };
    const body = { reason: '', expectedRefundMinor: (await shop.booking(bought.id)).refundNowMinor ?? -1 };
    await must(call(routes.cancelBooking, { params, body, as: shop.operator }));
    const after = (await events(url)).find((event) => value(event, 'UID') === value(before, 'UID'));
    expect(value(after, 'STATUS')).toBe('CANCELLED');
    expect(Number(value(after, 'SEQUENCE'))).toBeGreaterThan(Number(value(before, 'SEQUENCE')));
  });

  it('is text/calendar in lines of at most 75 octets, the same from one reading to the next', async () => {
    const { url } = await make(shop.operator);
    const first = await read(url);
    expect(first.headers.get('content-type')).toMatch(/^text\/calendar/);
    const text = await first.text();
    expect(text.startsWith('BEGIN:VCALENDAR\r\nVERSION:2.0\r\n')).toBe(true);
    // RFC 5545 3.1.
    expect(text.split('\r\n').filter((line) => Buffer.byteLength(line) > 75)).toEqual([]);
    await shop.advance(5_000);
    expect(await (await read(url)).text()).toBe(text);
  });

  it('leaves out holds that came to nothing', async () => {
    const { url } = await make(shop.operator);
    const held = await shop.hold(shop.passes.at(-2)!);
    const uids = async () => (await events(url)).map((event) => value(event, 'UID')).join(' ');
    expect(await uids()).not.toContain(held.id);
    await must(call(routes.letGo, { params: { id: held.id }, as: shop.operator }));
    expect(await uids()).not.toContain(held.id);
  });

  it('of one antenna shows its contacts to its owner, and nobody else their own', async () => {
    const bought = await shop.buy(shop.passes.at(-3)!);
    const { url } = await make(shop.owner, shop.antennaId);
    const uids = (await events(url)).map((event) => value(event, 'UID'));
    expect(uids.filter((uid) => uid?.includes(bought.id))).toHaveLength(1);
    const stranger = await make(await shop.skyberth.people.operator());
    expect(await events(stranger.url)).toEqual([]);
  });
});
