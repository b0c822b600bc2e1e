import { createHmac } from 'node:crypto';
import { routes } from '@skyberth/shared';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { CookieJar } from './harness/client.js';
import { type Skyberth, startSkyberth } from './harness.js';

let skyberth: Skyberth;
beforeAll(async () => {
  skyberth = await startSkyberth();
});
afterAll(() => skyberth.stop());

const sessionOf = (person: { jar: CookieJar }) => skyberth.call(routes.session, { as: person });

/** RFC 8725, sections in brackets: what must not pass for an access token. */
describe('an access token', () => {
  const SECRET = 'a secret for tests only, thirty-two characters';
  const part = (value: object) => Buffer.from(JSON.stringify(value)).toString('base64url');
  let good: { header: Record<string, unknown>; claims: Record<string, unknown> };
  const make = (header: object, claims: object, { hash = 'sha256', secret = SECRET } = {}) => {
    const signed = `${part(header)}.${part(claims)}`;
    return `${signed}.${createHmac(hash, secret).update(signed).digest('base64url')}`;
  };
  const statusOf = async (token: string) => {
    const jar = new CookieJar();
    jar.set('skyberth_access', token);
    return (await sessionOf({ jar })).status;
  };

  beforeAll(async () => {
    const [header, claims] = ((await skyberth.people.operator()).jar.get('skyberth_access') ?? '')
      .split('.')
      .slice(0, 2)
      .map((text) => JSON.parse(Buffer.from(text, 'base64url').toString()) as Record<string, unknown>);
    good = { header: header ?? {}, claims: claims ?? {} };
  });

  it('is accepted as it was issued', async () => {
    expect(await statusOf(make(good.header, good.claims))).toBe(200);
  });

  it('is refused with another algorithm or none (3.1, 3.2)', async () => {
    const unsigned = `${part({ ...good.header, alg: 'none' })}.${part(good.claims)}.`;
    expect(await statusOf(unsigned)).toBe(401);
    expect(await statusOf(make({ ...good.header, alg: 'HS512' }, good.claims, { hash: 'sha512' }))).toBe(401);
  });

  it('is refused with another key (3.8)', async () => {
    expect(
      await statusOf(make(good.header, good.claims, { secret: 'another secret of more than 32 characters' })),
    ).toBe(401);
  });

  it('is refused with another issuer or audience (3.8, 3.9)', async () => {
    expect(await statusOf(make(good.header, { ...good.claims, iss: 'https://other.example' }))).toBe(401);
    expect(await statusOf(make(good.header, { ...good.claims, aud: 'https://other.example' }))).toBe(401);
  });

  it('is refused with another type, or with key hints in its header (3.10, 3.11)', async () => {
    expect(await statusOf(make({ ...good.header, typ: 'JWT' }, good.claims))).toBe(401);
    expect(await statusOf(make({ alg: good.header['alg'] }, good.claims))).toBe(401);
    expect(await statusOf(make({ ...good.header, jku: 'https://other.example/keys' }, good.claims))).toBe(401);
  });

  it('is refused for another person than the one of its session, and without an end', async () => {
    const other = await skyberth.people.operator();
    expect(await statusOf(make(good.header, { ...good.claims, sub: other.personId }))).toBe(401);
    const { exp: _exp, ...endless } = good.claims;
    expect(await statusOf(make(good.header, endless))).toBe(401);
  });

  it('is refused when it is no token at all', async () => {
    for (const junk of ['x', '..', 'e30.e30.', 'a.b.c']) expect(await statusOf(junk)).toBe(401);
  });
});
