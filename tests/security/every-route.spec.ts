/**
 * Walks every route of the contract with every kind of caller and with none. What must happen is read from the
 * permission table, so a route that is added is tested from the same moment.
 */
import { randomUUID } from 'node:crypto';
import { Validator } from '@seriousme/openapi-schema-validator';
import {
  can,
  fillPath,
  IDEMPOTENCY_HEADER,
  needsIdempotencyKey,
  PROBLEM_MEDIA_TYPE,
  type Principal,
  Problem,
  ROLES_OF_KIND,
  type RouteContract,
  type RouteName,
  routes,
} from '@skyberth/shared';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { type Person, type Skyberth, startSkyberth } from '../api/harness.js';
import { makeTargets } from './targets.js';
import { nowhere, type Targets, type Wish, wishes } from './wishes.js';

const ALL = Object.entries(routes) as [RouteName, RouteContract][];
const WRITES = ALL.filter(([, route]) => route.method !== 'GET');
type Who = Pick<Principal, 'organisationKind' | 'role'>;
const EVERYONE: Who[] = Object.entries(ROLES_OF_KIND).flatMap(([kind, roles]) =>
  roles.map((role) => ({ organisationKind: kind as Principal['organisationKind'], role })),
);
const nameOf = ({ organisationKind, role }: Who) => `${organisationKind} ${role}`;

let skyberth: Skyberth;
let strangers: Targets;
const people = new Map<string, Person>();

beforeAll(async () => {
  skyberth = await startSkyberth();
  const managers = { operator: await skyberth.people.operator(), owner: await skyberth.people.owner() };
  for (const who of EVERYONE) {
    const { organisationKind: kind, role } = who;
    const person =
      kind === 'staff'
        ? await skyberth.people.staff(role as 'admin' | 'finance')
        : role === 'manager'
          ? managers[kind]
          : await skyberth.people.member(managers[kind], role as 'member' | 'viewer');
    people.set(nameOf(who), person);
  }
  strangers = await makeTargets(skyberth);
});
afterAll(() => skyberth.stop());

interface Told {
  readonly status: number;
  readonly problem: Problem | null;
}
interface Extra {
  readonly as?: Person | undefined;
  readonly key?: string | null;
  readonly headers?: Record<string, string>;
}

async function send(route: RouteContract, wish: Wish, { as, key = randomUUID(), headers }: Extra = {}): Promise<Told> {
  const path = fillPath(route.path, wish.params);
  const response = await fetch(skyberth.url + path, {
    method: route.method,
    headers: {
      ...(wish.body === undefined ? {} : { 'Content-Type': 'application/json' }),
      ...(as ? { Cookie: as.jar.header(path) } : {}),
      ...(key === null ? {} : { [IDEMPOTENCY_HEADER]: key }),
      ...headers,
    },
    ...(wish.body === undefined ? {} : { body: JSON.stringify(wish.body) }),
  });
  if (response.headers.get('content-type')?.includes('text/event-stream')) {
    // A stream has no end of its own.
    await response.body?.cancel();
    return { status: response.status, problem: null };
  }
  const isProblem = response.headers.get('content-type')?.includes(PROBLEM_MEDIA_TYPE) ?? false;
  const text = await response.text();
  return { status: response.status, problem: isProblem ? Problem.parse(JSON.parse(text)) : null };
}
const wishFor = (name: RouteName, targets = nowhere()): Wish => wishes(targets)[name] ?? {};
/** What the table says. */
const may = (who: Who, { access }: RouteContract): boolean =>
  access === 'public' || access === 'signed-in' || can(who, access);
/** Somebody whom the table lets call the route. */
const permitted = (route: RouteContract): Person | undefined => {
  const who = EVERYONE.find((each) => may(each, route));
  return who && people.get(nameOf(who));
};

it('knows a call for every route that takes something', () => {
  const known = wishes(nowhere());
  const missing = ALL.filter(([name, route]) => (route.params || route.body) && !known[name]).map(([name]) => name);
  expect(missing).toEqual([]);
});

describe.each(ALL)('%s', (name, route) => {
  it('exists, and lets nobody in without a session unless it is public', async () => {
    const { status, problem } = await send(route, wishFor(name));
    expect(problem?.detail).not.toBe('There is nothing at this address.');
    expect(status).not.toBe(500);
    if (route.access === 'public') expect(problem?.code).not.toBe('not-signed-in');
    else expect({ status, code: problem?.code }).toEqual({ status: 401, code: 'not-signed-in' });
  });
});

const GUARDED = ALL.filter(([, route]) => route.access !== 'public');
const PAIRS = GUARDED.flatMap(([name, route]) => EVERYONE.map((who) => ({ name, route, who, caller: nameOf(who) })));
it.each(PAIRS)('$name treats $caller as the table says', async ({ name, route, who, caller }) => {
  const { status, problem } = await send(route, wishFor(name), { as: people.get(caller) });
  if (may(who, route)) expect([401, 403, 500]).not.toContain(status);
  else expect({ status, code: problem?.code }).toEqual({ status: 403, code: 'not-allowed' });
});

it.each(WRITES)('%s cannot be started from another site', async (name, route) => {
  for (const origin of ['https://other.example', 'null', skyberth.url.replace('127.0.0.1', 'localhost')]) {
    const { problem } = await send(route, wishFor(name), { as: permitted(route), headers: { Origin: origin } });
    expect(problem).toMatchObject({ status: 403, code: 'cross-site' });
  }
  const own = await send(route, wishFor(name), { headers: { Origin: skyberth.url } });
  expect(own.problem?.code).not.toBe('cross-site');
});

it.each(WRITES.filter(([, route]) => needsIdempotencyKey(route)))(
  '%s needs an idempotency key',
  async (name, route) => {
    for (const key of [null, 'short', 'x'.repeat(256)]) {
      const { problem } = await send(route, wishFor(name), { as: permitted(route), key });
      expect(problem).toMatchObject({ status: 428, code: 'key-missing' });
    }
  },
);

/** Routes on things that belong to somebody, and how to call them as a manager of another organisation of that kind. */
const OWNED = ALL.filter(([, route]) => ['own', 'parties'].includes(route.data) && route.params);
describe.each(OWNED)('%s', (name, route) => {
  it.each(['operator', 'owner'] as const)('does not show what belongs to others to another %s', async (kind) => {
    const who = { organisationKind: kind, role: 'manager' } as const;
    const wish = wishFor(name, strangers);
    const { status, problem } = await send(route, wish, { as: people.get(nameOf(who)) });
    expect({ status, code: problem?.code }).toEqual(
      may(who, route) ? { status: 404, code: 'not-found' } : { status: 403, code: 'not-allowed' },
    );
  });
});

describe('calls that name somebody else’s things in their body', () => {
  it.each(['readElements', 'saveElements', 'searchPasses', 'passDetail', 'holdBerth'] as const)(
    '%s finds nothing',
    async (name) => {
      const { problem } = await send(routes[name], wishFor(name, strangers), { as: people.get('operator manager') });
      expect(problem?.code).toBe('not-found');
    },
  );
});

describe('what is sent to the API', () => {
  const raw = (body: string, headers: Record<string, string>, path: string = routes.signIn.path) =>
    fetch(skyberth.url + path, { method: 'POST', body, headers });

  it('is refused when it is too large', async () => {
    const response = await raw(JSON.stringify({ text: 'x'.repeat(9_500_000) }), { 'Content-Type': 'application/json' });
    expect(Problem.parse(await response.json())).toMatchObject({ status: 413, code: 'too-large' });
  });

  it('is refused when it is no JSON, or no JSON by its own word', async () => {
    const broken = await raw('{"email":', { 'Content-Type': 'application/json' });
    expect(Problem.parse(await broken.json())).toMatchObject({ status: 400, code: 'bad-input' });
    const form = await raw('email=a@b.example', { 'Content-Type': 'application/x-www-form-urlencoded' });
    expect(Problem.parse(await form.json())).toMatchObject({ status: 400, code: 'bad-input' });
  });

  it('cannot reach into the prototypes of objects', async () => {
    const body = '{"email":"a@b.example","password":"x","__proto__":{"role":"admin"},"constructor":{"prototype":{}}}';
    const response = await raw(body, { 'Content-Type': 'application/json' });
    expect(response.status).toBe(401);
    expect(({} as Record<string, unknown>)['role']).toBeUndefined();
  });

  it('finds a problem detail at every address that does not exist', async () => {
    for (const path of ['/api/nothing', '/api/../etc/passwd', '/api/bookings/%00', '/api/stations/not-an-id']) {
      const response = await fetch(skyberth.url + path, {
        headers: { Cookie: people.get('owner manager')?.jar.header('/api') ?? '' },
      });
      expect([400, 404]).toContain(response.status);
      Problem.parse(await response.json());
    }
  });

  it('is answered with headers that keep a browser careful', async () => {
    const { headers } = await fetch(skyberth.url + routes.health.path);
    expect(headers.get('content-security-policy')).toContain("default-src 'self'");
    expect(headers.get('x-content-type-options')).toBe('nosniff');
    expect(headers.get('x-powered-by')).toBeNull();
    expect(headers.get('access-control-allow-origin')).toBeNull();
  });
});

describe('an idempotency key', () => {
  const invite = (key: string, email: string, who = 'operator manager') =>
    send(routes.inviteMember, { body: { name: 'Kim', email, role: 'viewer' } }, { as: people.get(who), key });

  it('gives the first answer again to the same request', async () => {
    const [key, email] = [randomUUID(), `${randomUUID()}@people.example`];
    expect((await invite(key, email)).status).toBe(201);
    expect((await invite(key, email)).status).toBe(201);
    expect((await invite(randomUUID(), email)).problem?.code).toBe('already-exists');
  });

  it('is refused for another request, and belongs to its caller alone', async () => {
    const key = randomUUID();
    expect((await invite(key, `${randomUUID()}@people.example`)).status).toBe(201);
    expect((await invite(key, `${randomUUID()}@people.example`)).problem?.code).toBe('key-reused');
    expect((await invite(key, `${randomUUID()}@people.example`, 'owner manager')).status).toBe(201);
  });

  it('may be used again after a refusal', async () => {
    const key = randomUUID();
    expect((await invite(key, 'no address')).problem?.code).toBe('bad-input');
    expect((await invite(key, `${randomUUID()}@people.example`)).status).toBe(201);
  });
});

describe('the description of the API', () => {
  it('is valid OpenAPI 3.1 and names every route', async () => {
    const document = (await (await fetch(skyberth.url + routes.openapi.path)).json()) as {
      paths: Record<string, Record<string, { operationId: string }>>;
    };
    const { valid, errors } = await new Validator().validate(document);
    expect(errors ?? []).toEqual([]);
    expect(valid).toBe(true);
    const described = Object.values(document.paths).flatMap((methods) =>
      Object.values(methods).map((each) => each.operationId),
    );
    expect(described.sort()).toEqual(ALL.map(([name]) => name).sort());
  });
});
