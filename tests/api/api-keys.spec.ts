/** Programs with API keys: what is refused to them first, then a station report that the buyer sees. */
import { randomUUID } from 'node:crypto';
import { openDatabase } from '@skyberth/drizzle';
import { API_KEY_PREFIX, type ApiKeyScope, type Booking, routes, scopeOf } from '@skyberth/shared';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openShop, type Shop } from './harness/shop.js';
import { must, type Person } from './harness.js';

let shop: Shop;
let booking: Booking;
const call: Shop['skyberth']['call'] = (route, input) => shop.skyberth.call(route, input);
const bearing = (secret: string) => ({ Authorization: `Bearer ${secret}` });
const make = (as: Person, scopes: ApiKeyScope[], endsUtc: string | null = null) =>
  must(call(routes.makeApiKey, { body: { name: 'Console', scopes, endsUtc }, as }));
const read = (secret: string) => call(routes.listBookings, { query: {}, headers: bearing(secret) });
const report = (secret: string, key?: string) =>
  call(routes.reportLive, {
    params: { id: booking.id },
    body: { kind: 'acquired' },
    headers: bearing(secret),
    ...(key === undefined ? {} : { key }),
  });
const listed = async (as: Person, id: string) =>
  (await must(call(routes.listApiKeys, { as }))).items.find((one) => one.id === id);

beforeAll(async () => {
  shop = await openShop({ antenna: { minNoticeMin: 0 } });
  const [pass] = shop.passes;
  if (!pass) throw new Error('There is no pass.');
  booking = await shop.buy(pass);
});
afterAll(() => shop?.stop());

describe('an API key', () => {
  it('is made by managers alone, within what their organisation may do, and not for a time that is past', async () => {
    const member = await shop.skyberth.people.member(shop.owner, 'member');
    const wish = (scopes: ApiKeyScope[], endsUtc: string | null = null) => ({ name: 'Console', scopes, endsUtc });
    const attempt = async (as: Person, body: ReturnType<typeof wish>) =>
      (await call(routes.makeApiKey, { body, as })).problem?.code;
    expect(await attempt(member, wish(['bookings.read']))).toBe('not-allowed');
    expect(await attempt(shop.owner, wish(['market.search']))).toBe('bad-input');
    expect(await attempt(shop.operator, wish(['bookings.report']))).toBe('bad-input');
    expect(await attempt(shop.owner, wish(['bookings.buy' as ApiKeyScope]))).toBe('bad-input');
    expect(await attempt(shop.owner, wish([]))).toBe('bad-input');
    const past = new Date(shop.skyberth.clock.nowMs() - 1).toISOString();
    expect(await attempt(shop.owner, wish(['bookings.read'], past))).toBe('bad-input');
  });

  it('is shown once and kept as a hash', async () => {
    const { apiKey, secret } = await make(shop.owner, ['bookings.read']);
    expect(secret).toMatch(/^sky_[\w-]{43}$/);
    expect(JSON.stringify(await must(call(routes.listApiKeys, { as: shop.owner })))).not.toContain(secret);
    const db = openDatabase(shop.skyberth.databaseFile);
    try {
      for (const table of ['api_keys', 'idempotency_keys', 'audit_log']) {
        expect(JSON.stringify(db.$client.prepare(`SELECT * FROM ${table}`).all())).not.toContain(secret);
      }
    } finally {
      db.$client.close();
    }
    expect(await listed(shop.operator, apiKey.id)).toBeUndefined();
  });

  it('opens nothing when it is wrong, revoked or past its end', async () => {
    const code = async (secret: string) => (await read(secret)).problem?.code;
    expect((await read(`${API_KEY_PREFIX}${'x'.repeat(43)}`)).problem).toMatchObject({
      status: 401,
      code: 'api-key-refused',
    });
    expect(await code('something else')).toBe('not-signed-in');
    const { apiKey, secret } = await make(shop.owner, ['bookings.read']);
    expect(await code(secret)).toBeUndefined();
    const params = { id: apiKey.id };
    expect((await call(routes.revokeApiKey, { params, as: shop.operator })).problem?.code).toBe('not-found');
    await must(call(routes.revokeApiKey, { params, as: shop.owner }));
    expect(await code(secret)).toBe('api-key-refused');
    expect((await call(routes.revokeApiKey, { params, as: shop.owner })).problem?.code).toBe('wrong-state');
    const endsUtc = new Date(shop.skyberth.clock.nowMs() + 60_000).toISOString();
    const short = await make(shop.owner, ['bookings.read'], endsUtc);
    expect(await code(short.secret)).toBeUndefined();
    await shop.advance(60_000);
    expect(await code(short.secret)).toBe('api-key-refused');
    expect((await listed(shop.owner, short.apiKey.id))?.state).toBe('ended');
  });

  it('is refused with a word of its own on every route that its scopes do not name, signed in or not', async () => {
    const { secret } = await make(shop.owner, ['bookings.read']);
    for (const route of Object.values(routes)) {
      if (scopeOf(route) === 'bookings.read') continue;
      const response = await fetch(shop.skyberth.url + route.path.replace(/:\w+/g, randomUUID()), {
        method: route.method,
        headers: { ...bearing(secret), Cookie: shop.owner.jar.header('/api') },
      });
      expect({ name: route.name, status: response.status }).toEqual({ name: route.name, status: 403 });
      await response.body?.cancel();
    }
  });

  it('never lets a dish move again, whatever its scopes: that is for a person', async () => {
    const { secret } = await make(shop.owner, ['bookings.report', 'run-sheet.read']);
    const params = { id: shop.antennaId };
    await must(call(routes.stopDish, { params, body: { reason: 'ice' }, headers: bearing(secret) }));
    expect((await call(routes.releaseDish, { params, headers: bearing(secret) })).problem?.code).toBe('not-allowed');
    await must(call(routes.releaseDish, { params, as: shop.owner }));
  });

  it('sees nothing of another organisation', async () => {
    const other = await shop.skyberth.people.owner();
    const { secret } = await make(other, ['bookings.read', 'bookings.report']);
    expect((await must(read(secret))).items).toEqual([]);
    expect((await report(secret)).problem?.code).toBe('not-found');
  });

  it('ends with the membership of its maker, and narrows with their role', async () => {
    const second = await shop.skyberth.people.member(shop.owner, 'manager');
    const { apiKey, secret } = await make(second, ['bookings.read', 'bookings.report']);
    const params = { personId: second.personId };
    await must(call(routes.changeMember, { params, body: { role: 'viewer' }, as: shop.owner }));
    expect((await report(secret)).problem?.code).toBe('not-allowed');
    await must(read(secret));
    await must(call(routes.removeMember, { params, as: shop.owner }));
    expect((await read(secret)).problem?.code).toBe('api-key-refused');
    expect((await listed(shop.owner, apiKey.id))?.state).toBe('maker left');
  });

  it('reads on for a suspended organisation, writes no message for it, and can still be revoked', async () => {
    const admin = await shop.skyberth.people.staff('admin');
    const { apiKey, secret } = await make(shop.owner, ['bookings.read', 'messages.write']);
    const params = { id: shop.owner.organisationId };
    await must(call(routes.suspendAccount, { params, body: { reason: 'A look.' }, as: admin }));
    await must(read(secret));
    const message = { params: { id: booking.id }, body: { text: 'Ahoy.' }, headers: bearing(secret) };
    expect((await call(routes.sendMessage, message)).problem?.detail).toContain('suspended');
    const wish = { name: 'Console', scopes: ['bookings.read' as const] };
    expect((await call(routes.makeApiKey, { body: wish, as: shop.owner })).problem?.code).toBe('not-allowed');
    await must(call(routes.revokeApiKey, { params: { id: apiKey.id }, as: shop.owner }));
    await must(call(routes.reinstateAccount, { params, body: { reason: 'Seen.' }, as: admin }));
  });

  it('cannot be widened, revived or made for somebody who is no manager, not even in the database', async () => {
    const { apiKey } = await make(shop.owner, ['bookings.read']);
    await must(call(routes.revokeApiKey, { params: { id: apiKey.id }, as: shop.owner }));
    const living = await make(shop.owner, ['bookings.read']);
    const member = await shop.skyberth.people.member(shop.owner, 'member');
    const db = openDatabase(shop.skyberth.databaseFile);
    const run = (text: string, ...values: string[]) => db.$client.prepare(text).run(...values);
    try {
      const scopes = `UPDATE api_keys SET scopes = '["bookings.read","bookings.report"]' WHERE id = ?`;
      expect(() => run(scopes, living.apiKey.id)).toThrow('never changes');
      const revive = 'UPDATE api_keys SET revoked_ms = NULL, revoked_by = NULL WHERE id = ?';
      expect(() => run(revive, apiKey.id)).toThrow('stays revoked');
      expect(() => run('DELETE FROM api_keys WHERE id = ?', apiKey.id)).toThrow('are kept');
      const copy = `INSERT INTO api_keys (id, organisation_id, person_id, name, hash, tail, scopes, created_ms)
        SELECT 'copy', organisation_id, ?, name, replace(hash, '0', '1'), tail, scopes, created_ms FROM api_keys WHERE id = ?`;
      expect(() => run(copy, member.personId, living.apiKey.id)).toThrow('only a manager');
    } finally {
      db.$client.close();
    }
  });

  it('reports for the station: the buyer sees it, the audit names the key, its last use is kept to the minute', async () => {
    const [first, second] = [await make(shop.owner, ['bookings.report']), await make(shop.owner, ['bookings.report'])];
    await shop.advanceTo(Date.parse(booking.aosUtc) + 1_000);
    const key = randomUUID();
    const sent = await must(report(first.secret, key));
    const again = await report(first.secret, key);
    expect(again.headers.get('Idempotent-Replayed')).toBe('true');
    // The same idempotency key is another key's own: no replay, a report of its own.
    const other = await report(second.secret, key);
    expect(other.headers.get('Idempotent-Replayed')).toBeNull();
    const events = await must(call(routes.contactEvents, { params: { id: booking.id }, as: shop.operator }));
    expect(events.items.filter(({ kind }) => kind === 'acquired').map(({ seq }) => seq)).toContain(sent.seq);
    expect((await shop.booking(booking.id)).state).toBe('under way');

    const db = openDatabase(shop.skyberth.databaseFile);
    try {
      const rows = db.$client
        .prepare('SELECT person_id, data FROM audit_log WHERE subject = ? ORDER BY seq DESC LIMIT 1')
        .all(`booking:${booking.id}`) as { person_id: string; data: string }[];
      expect(rows[0]?.person_id).toBe(shop.owner.personId);
      expect(JSON.parse(rows[0]?.data ?? '{}')).toMatchObject({ apiKeyId: first.apiKey.id });
    } finally {
      db.$client.close();
    }

    const used = (await listed(shop.owner, first.apiKey.id))?.lastUsedUtc;
    await shop.advance(30_000);
    await report(first.secret);
    expect((await listed(shop.owner, first.apiKey.id))?.lastUsedUtc).toBe(used);
    await shop.advance(31_000);
    await report(first.secret);
    expect((await listed(shop.owner, first.apiKey.id))?.lastUsedUtc).not.toBe(used);
  });

  it('that is wrong again and again has to wait, while good ones of the same address work on', async () => {
    const { secret } = await make(shop.operator, ['bookings.read']);
    const codes = [];
    for (let i = 0; i < 30; i += 1) codes.push((await read(`${API_KEY_PREFIX}${i}`)).problem?.code);
    expect(codes).toContain('too-many');
    await must(read(secret));
  });

  it('is one of twenty at most', async () => {
    const owner = await shop.skyberth.people.owner();
    for (let i = 0; i < 20; i += 1) await make(owner, ['bookings.read']);
    const body = { name: 'Console', scopes: ['bookings.read' as const] };
    expect((await call(routes.makeApiKey, { body, as: owner })).problem?.code).toBe('wrong-state');
  });
});
