import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { CookieJar } from './harness/client.js';
import { databaseText } from './harness/database.js';
import { PASSWORD } from './harness/people.js';
import { must, type Person, routes, type Skyberth, startSkyberth } from './harness.js';

let skyberth: Skyberth;
beforeAll(async () => {
  skyberth = await startSkyberth();
});
afterAll(() => skyberth.stop());

const sessionOf = (person: { jar: CookieJar }) => skyberth.call(routes.session, { as: person });
const refresh = (jar: CookieJar) => skyberth.call(routes.refresh, { as: { jar } });
const wrong = (email: string) => skyberth.call(routes.signIn, { body: { email, password: 'not the password' } });
/** A browser of a thief: the same cookies, but it doesn't see what comes later. */
const copyOf = (jar: CookieJar): CookieJar => {
  const copy = new CookieJar();
  copy.set('skyberth_access', jar.get('skyberth_access') ?? '', '/api');
  copy.set('skyberth_refresh', jar.get('skyberth_refresh') ?? '', '/api/auth');
  return copy;
};

describe('signing up', () => {
  it('opens a session, mails a link, and the link confirms the address once', async () => {
    const person = await skyberth.people.operator();
    expect((await must(sessionOf(person))).person.emailVerified).toBe(false);
    await skyberth.drain();
    const token = skyberth.mail.tokenFor(person.email);
    await must(skyberth.call(routes.verifyEmail, { body: { token } }));
    expect((await must(sessionOf(person))).person.emailVerified).toBe(true);
    expect((await skyberth.call(routes.verifyEmail, { body: { token } })).problem?.code).toBe('not-found');
  });

  it('refuses a taken address, a taken name, a short password and a VAT number with wrong check digits', async () => {
    const person = await skyberth.people.operator();
    const { organisationName } = (await must(sessionOf(person))).active;
    const address = { line1: 'Quay 1', postalCode: '1', city: 'Porto Novo', country: 'DE' };
    const organisation = { name: 'Free Name', kind: 'operator', address, vatNumber: null } as const;
    const body = { name: 'Kim', email: 'free@people.example', password: PASSWORD, organisation };
    const attempt = async (change: object) =>
      (await skyberth.call(routes.signUp, { body: { ...body, ...change } })).problem;
    expect(await attempt({ email: person.email.toUpperCase() })).toMatchObject({
      code: 'already-exists',
      errors: [{ pointer: '/email' }],
    });
    expect(await attempt({ organisation: { ...organisation, name: organisationName.toUpperCase() } })).toMatchObject({
      code: 'already-exists',
      errors: [{ pointer: '/organisation/name' }],
    });
    expect(await attempt({ password: 'short' })).toMatchObject({ code: 'bad-input' });
    expect(await attempt({ organisation: { ...organisation, vatNumber: 'FI12345672' } })).toMatchObject({
      code: 'bad-input',
      errors: [{ pointer: '/organisation/vatNumber' }],
    });
  });

  it('cannot make staff', async () => {
    const address = { line1: 'Quay 1', postalCode: '1', city: 'Porto Novo', country: 'DE' };
    const organisation = { name: 'Sneaky', kind: 'staff' as 'owner', address };
    const body = { name: 'Kim', email: 'sneaky@people.example', password: PASSWORD, organisation };
    expect((await skyberth.call(routes.signUp, { body })).problem?.code).toBe('bad-input');
  });
});

describe('signing in', () => {
  it('says the same of an unknown address and of a wrong password', async () => {
    const person = await skyberth.people.operator();
    const [known, unknown] = [await wrong(person.email), await wrong('nobody@people.example')];
    expect(known.problem).toMatchObject({ status: 401, code: 'wrong-credentials' });
    expect(unknown.problem?.detail).toBe(known.problem?.detail);
  });

  it('sets cookies that scripts cannot read and other sites cannot send', async () => {
    const person = await skyberth.people.operator();
    const body = { email: person.email, password: PASSWORD };
    const cookies = (await skyberth.call(routes.signIn, { body })).headers.getSetCookie();
    expect(cookies).toHaveLength(2);
    for (const cookie of cookies) expect(cookie).toMatch(/HttpOnly; SameSite=Strict/);
    expect(cookies.find((each) => each.startsWith('skyberth_refresh'))).toContain('Path=/api/auth;');
  });

  it('slows guessing at one account down, and lets its owner in when the wait is over', async () => {
    const person = await skyberth.people.operator();
    const codes = [];
    for (let n = 0; n < 10; n += 1) codes.push((await wrong(person.email)).problem?.code);
    expect(codes.filter((code) => code === 'wrong-credentials')).toHaveLength(8);
    expect(codes.at(-1)).toBe('too-many');
    const parallel = await Promise.all(Array.from({ length: 20 }, () => wrong(person.email)));
    expect(parallel.every((answer) => answer.problem?.code === 'too-many')).toBe(true);
    skyberth.clock.advance(16_000);
    await expect(skyberth.people.signIn(person.email)).resolves.toMatchObject({ email: person.email });
  });

  it('counts guesses that come all at once', async () => {
    const person = await skyberth.people.operator();
    const answers = await Promise.all(Array.from({ length: 30 }, () => wrong(person.email)));
    expect(answers.filter((answer) => answer.problem?.code === 'wrong-credentials')).toHaveLength(8);
    skyberth.clock.advance(3_600_000);
  });
});

describe('a session', () => {
  it('ends its access after 15 minutes and goes on with the refresh token', async () => {
    const person = await skyberth.people.operator();
    skyberth.clock.advance(15 * 60_000 + 1_000);
    expect((await sessionOf(person)).status).toBe(401);
    await must(refresh(person.jar));
    expect((await sessionOf(person)).status).toBe(200);
  });

  it('ends altogether when a refresh token is used twice, for the thief and for the owner', async () => {
    const person = await skyberth.people.operator();
    const stolen = copyOf(person.jar);
    await must(refresh(person.jar));
    skyberth.clock.advance(11_000);
    expect((await refresh(stolen)).problem?.code).toBe('session-ended');
    expect((await sessionOf(person)).status).toBe(401);
    expect((await refresh(person.jar)).problem?.code).toBe('session-ended');
  });

  it('ends when the thief came first and the owner second', async () => {
    const person = await skyberth.people.operator();
    const thief = copyOf(person.jar);
    await must(refresh(thief));
    skyberth.clock.advance(11_000);
    expect((await refresh(person.jar)).problem?.code).toBe('session-ended');
    expect((await sessionOf({ jar: thief })).status).toBe(401);
    expect((await refresh(thief)).problem?.code).toBe('session-ended');
  });

  it('gives a second tab nothing in the same moment, and keeps the session', async () => {
    const person = await skyberth.people.operator();
    const tabs = Array.from({ length: 5 }, () => copyOf(person.jar));
    const answers = await Promise.all(tabs.map(refresh));
    expect(answers.filter((answer) => answer.ok)).toHaveLength(1);
    for (const answer of answers.filter((each) => !each.ok)) {
      expect(answer.problem?.code).toBe('in-progress');
      expect(answer.headers.getSetCookie()).toEqual([]);
    }
    const winner = tabs[answers.findIndex((answer) => answer.ok)] as CookieJar;
    expect((await sessionOf({ jar: winner })).status).toBe(200);
    await must(refresh(winner));
  });

  it('is over at once after signing out, also for a copied access token', async () => {
    const person = await skyberth.people.operator();
    const copy = copyOf(person.jar);
    await must(skyberth.call(routes.signOut, { as: person }));
    expect(person.jar.get('skyberth_access')).toBeUndefined();
    expect((await sessionOf({ jar: copy })).status).toBe(401);
    expect((await refresh(copy)).problem?.code).toBe('session-ended');
    await must(skyberth.call(routes.signOut, {}));
  });

  it('ends after 14 days without use', async () => {
    const person = await skyberth.people.operator();
    skyberth.clock.advance(14 * 86_400_000 + 1);
    expect((await refresh(person.jar)).problem?.code).toBe('session-ended');
  });

  it('does not come from a made-up refresh token', async () => {
    const jar = new CookieJar();
    jar.set('skyberth_refresh', 'made-up', '/api/auth');
    expect((await refresh(jar)).problem?.code).toBe('session-ended');
    expect((await refresh(new CookieJar())).problem?.code).toBe('session-ended');
  });
});

describe('a forgotten password', () => {
  it('is replaced through the mailed link, once, and ends every session', async () => {
    const person = await skyberth.people.operator();
    const elsewhere = await skyberth.people.signIn(person.email);
    await must(skyberth.call(routes.requestPasswordReset, { body: { email: person.email } }));
    await skyberth.drain();
    const token = skyberth.mail.tokenFor(person.email);
    const body = { token, password: 'another long sentence for tests' };
    await must(skyberth.call(routes.setPassword, { body }));
    expect((await sessionOf(person)).status).toBe(401);
    expect((await sessionOf(elsewhere)).status).toBe(401);
    expect((await skyberth.call(routes.setPassword, { body })).problem?.code).toBe('not-found');
    expect((await skyberth.call(routes.signIn, { body: { email: person.email, password: PASSWORD } })).status).toBe(
      401,
    );
    await skyberth.people.signIn(person.email, body.password);
    await skyberth.drain();
    expect(skyberth.mail.to(person.email).at(-1)?.subject).toBe('Your password was changed');
  });

  it('answers the same for an unknown address and mails nothing', async () => {
    const answer = await skyberth.call(routes.requestPasswordReset, { body: { email: 'nobody@people.example' } });
    await skyberth.drain();
    expect(answer.status).toBe(200);
    expect(skyberth.mail.to('nobody@people.example')).toEqual([]);
  });

  it('does not work with a link that is an hour old, or that confirms an address', async () => {
    const person = await skyberth.people.operator();
    await skyberth.drain();
    const verify = { token: skyberth.mail.tokenFor(person.email), password: 'another long sentence for tests' };
    expect((await skyberth.call(routes.setPassword, { body: verify })).problem?.code).toBe('not-found');
    await must(skyberth.call(routes.requestPasswordReset, { body: { email: person.email } }));
    await skyberth.drain();
    const body = { token: skyberth.mail.tokenFor(person.email), password: 'another long sentence for tests' };
    skyberth.clock.advance(3_600_001);
    expect((await skyberth.call(routes.setPassword, { body })).problem?.code).toBe('not-found');
  });

  it('keeps no link in the outbox once the mail has left', async () => {
    const person = await skyberth.people.operator();
    await skyberth.drain();
    expect(databaseText(skyberth, 'outbox')).not.toContain(skyberth.mail.tokenFor(person.email));
  });
});

describe('an organisation', () => {
  it('is seen and changed by its manager only', async () => {
    const manager = await skyberth.people.operator();
    const viewer = await skyberth.people.member(manager, 'viewer');
    const body = { vatNumber: 'FI 1234567-1' };
    expect((await skyberth.call(routes.updateOrganisation, { body, as: viewer })).problem?.code).toBe('not-allowed');
    expect((await must(skyberth.call(routes.updateOrganisation, { body, as: manager }))).vatNumber).toBe('FI12345671');
    expect((await must(skyberth.call(routes.organisation, { as: viewer }))).vatNumber).toBe('FI12345671');
  });

  it('cannot take the name of another', async () => {
    const [a, b] = [await skyberth.people.operator(), await skyberth.people.operator()];
    const { name } = await must(skyberth.call(routes.organisation, { as: b }));
    const answer = await skyberth.call(routes.updateOrganisation, { body: { name }, as: a });
    expect(answer.problem?.code).toBe('already-exists');
  });

  it('keeps its last manager, and counts an invited one only when they have come', async () => {
    const manager = await skyberth.people.operator();
    const me = { personId: manager.personId };
    const demote = () => skyberth.call(routes.changeMember, { params: me, body: { role: 'viewer' }, as: manager });
    const leave = () => skyberth.call(routes.removeMember, { params: me, as: manager });
    expect((await demote()).problem?.code).toBe('wrong-state');
    const body = { name: 'Sam', email: 'sam@people.example', role: 'manager' } as const;
    expect((await must(skyberth.call(routes.inviteMember, { body, as: manager }))).state).toBe('invited');
    expect((await leave()).problem?.code).toBe('wrong-state');
    await skyberth.people.member(manager, 'manager');
    expect((await demote()).status).toBe(200);
  });

  it('shuts a removed member out at once', async () => {
    const manager = await skyberth.people.operator();
    const member = await skyberth.people.member(manager, 'member');
    const params = { personId: member.personId };
    await must(skyberth.call(routes.removeMember, { params, as: manager }));
    expect((await sessionOf(member)).status).toBe(401);
    const body = { email: member.email, password: PASSWORD };
    expect((await skyberth.call(routes.signIn, { body })).problem?.code).toBe('not-allowed');
    expect((await skyberth.call(routes.removeMember, { params, as: manager })).problem?.code).toBe('not-found');
  });

  it('lets a changed role count at the next request', async () => {
    const manager = await skyberth.people.operator();
    const member = await skyberth.people.member(manager, 'member');
    const params = { personId: member.personId };
    await must(skyberth.call(routes.changeMember, { params, body: { role: 'manager' }, as: manager }));
    expect((await must(sessionOf(member))).active.role).toBe('manager');
  });

  it('does not reach into another one', async () => {
    const [a, b] = [await skyberth.people.operator(), await skyberth.people.operator()];
    const params = { personId: b.personId };
    expect((await skyberth.call(routes.removeMember, { params, as: a })).problem?.code).toBe('not-found');
    const answer = await skyberth.call(routes.changeMember, { params, body: { role: 'viewer' }, as: a });
    expect(answer.problem?.code).toBe('not-found');
  });

  it('can be one of several for a person, who switches between them', async () => {
    const [a, b] = [await skyberth.people.operator(), await skyberth.people.owner()];
    const body = { name: 'whatever', email: a.email, role: 'viewer' } as const;
    await must(skyberth.call(routes.inviteMember, { body, as: b }));
    expect((await skyberth.call(routes.inviteMember, { body, as: b })).problem?.code).toBe('already-exists');
    const to = { organisationId: b.organisationId };
    expect((await must(skyberth.call(routes.switchOrganisation, { body: to, as: a }))).active).toMatchObject({
      organisationKind: 'owner',
      role: 'viewer',
    });
    await must(refresh(a.jar));
    expect((await must(sessionOf(a))).active.organisationId).toBe(b.organisationId);
    const stranger = await skyberth.people.operator();
    expect((await skyberth.call(routes.switchOrganisation, { body: to, as: stranger })).problem?.code).toBe(
      'not-found',
    );
  });
});

describe('the first staff', () => {
  it('come by invitation, each with their own role', async () => {
    const roles: [Person, string][] = [
      [await skyberth.people.staff('admin'), 'admin'],
      [await skyberth.people.staff('finance'), 'finance'],
    ];
    for (const [person, role] of roles) {
      expect((await must(sessionOf(person))).active).toMatchObject({ organisationKind: 'staff', role });
    }
  });
});
