import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { addSoldContact } from './harness/sold-contact.js';
import { antennaOnSale, STATION } from './harness/stations.js';
import { tleText } from './harness/tle.js';
import { must, routes, type Skyberth, startSkyberth } from './harness.js';

const HOUR_MS = 3_600_000;
let skyberth: Skyberth;
let neighbour: Server;
let neighbourStatus = 200;

beforeAll(async () => {
  neighbour = createServer((_request, response) => response.writeHead(neighbourStatus).end());
  await new Promise<void>((resolve) => neighbour.listen(0, '127.0.0.1', resolve));
  const { port } = neighbour.address() as AddressInfo;
  skyberth = await startSkyberth({ environment: { STAND_IN_HEALTH_URLS: `http://127.0.0.1:${port}/health` } });
  await skyberth.people.staff('admin');
});
afterAll(async () => {
  await skyberth.stop();
  neighbour.close();
});

describe('health', () => {
  it('is fine only while the services beside it are', async () => {
    expect(await must(skyberth.call(routes.health, {}))).toEqual({ status: 'ok' });
    neighbourStatus = 500;
    skyberth.clock.advance(2_000);
    const { problem } = await skyberth.call(routes.health, {});
    expect(problem).toMatchObject({ status: 503, code: 'unavailable' });
    expect(problem?.detail).toContain('answered 500');
    neighbourStatus = 200;
    skyberth.clock.advance(2_000);
    expect((await skyberth.call(routes.health, {})).status).toBe(200);
  });
});

describe('a mail', () => {
  it('waits in the outbox while the mail server refuses it for now, and leaves later, once', async () => {
    const person = await skyberth.people.operator();
    skyberth.mail.refuseWith(451);
    await skyberth.drain();
    expect(skyberth.mail.to(person.email)).toEqual([]);
    const admin = await adminView();
    expect(admin.outbox.recent).toContainEqual(
      expect.objectContaining({ kind: 'mail', state: 'pending', attempts: 1 }),
    );
    skyberth.mail.refuseWith(null);
    await skyberth.drain();
    expect(skyberth.mail.to(person.email)).toEqual([]);
    skyberth.clock.advance(6_000);
    await skyberth.drain();
    await skyberth.drain();
    expect(skyberth.mail.to(person.email)).toHaveLength(1);
  });

  it('is given up at once where the mail server refuses it for good', async () => {
    const person = await skyberth.people.operator();
    skyberth.mail.refuseWith(550);
    await skyberth.drain();
    skyberth.mail.refuseWith(null);
    skyberth.clock.advance(HOUR_MS);
    await skyberth.drain();
    expect(skyberth.mail.to(person.email)).toEqual([]);
    expect((await adminView()).outbox.failed).toBe(1);
  });
});

async function adminView() {
  return must(skyberth.call(routes.system, { as: await skyberth.people.staff('admin') }));
}

describe('the system page', () => {
  it('shows database, jobs and services', async () => {
    const view = await adminView();
    expect(view.database).toMatchObject({ integrity: 'ok' });
    expect(view.database.migrations).toBeGreaterThanOrEqual(2);
    expect(view.services[0]).toMatchObject({ ok: true, detail: 'answered 200' });
    expect(view.services.map((each) => each.name)).toContain('job: outbox');
  });
});

describe('home', () => {
  it('tells an owner what to answer and to report, an operator what is next, an admin what to approve', async () => {
    const [operator, owner] = [await skyberth.people.operator(), await skyberth.people.owner()];
    const admin = await skyberth.people.staff('admin');
    const { antenna } = await antennaOnSale(skyberth, owner);
    const text = tleText({ name: 'KNOT 2', catalogNumber: 92_002, epochMs: skyberth.clock.nowMs() - HOUR_MS });
    const spacecraftId =
      (await must(skyberth.call(routes.saveElements, { body: { text }, as: operator }))).spacecraft[0]?.id ?? '';
    const sold = { operator, owner, antennaId: antenna.id, spacecraftId };
    const nowMs = skyberth.clock.nowMs();
    const confirmed = addSoldContact(skyberth, { ...sold, aosMs: nowMs + 2 * HOUR_MS });
    addSoldContact(skyberth, { ...sold, aosMs: nowMs + 4 * HOUR_MS, state: 'awaiting owner' });
    addSoldContact(skyberth, { ...sold, aosMs: nowMs - 4 * HOUR_MS, state: 'reporting' });
    const draft = await must(
      skyberth.call(routes.createStation, { body: { ...STATION, name: 'Second rock' }, as: owner }),
    );
    await must(skyberth.call(routes.submitStation, { params: { id: draft.id }, as: owner }));

    const forOwner = await must(skyberth.call(routes.home, { as: owner }));
    expect(forOwner.counts).toEqual({ requests: 1, messages: 0 });
    expect(forOwner.waiting.map((each) => each.kind).sort()).toEqual(['contact', 'report', 'request']);
    const forOperator = await must(skyberth.call(routes.home, { as: operator }));
    expect(forOperator.waiting).toMatchObject([
      { kind: 'contact', path: `/bookings/${confirmed.booking}`, urgent: false },
    ]);
    const forAdmin = await must(skyberth.call(routes.home, { as: admin }));
    expect(forAdmin.counts).toEqual({ approvals: 1, disputes: 0 });
    expect(forAdmin.waiting.map((each) => each.sentence)).toContainEqual(expect.stringContaining('Second rock'));
    const stranger = await skyberth.people.owner();
    const empty = await must(skyberth.call(routes.home, { as: stranger }));
    expect(empty).toMatchObject({ waiting: [], counts: { requests: 0 } });
    expect(empty.money.flatMap(({ amounts }) => amounts)).toEqual([]);
    expect(empty.firstSteps.map(({ done }) => done)).toEqual([false, false, false, false, false]);

    const secured = forOperator.money.find(({ label }) => label === 'Secured for contacts to come')?.amounts ?? [];
    const bought = await must(skyberth.call(routes.listBookings, { query: {}, as: operator }));
    expect(secured).toEqual([
      {
        currency: bought.items[0]?.currency,
        amountMinor: bought.items.reduce((sum, { toPayMinor }) => sum + toPayMinor, 0),
      },
    ]);
    expect(forOperator.firstSteps.map(({ done }) => done)).toEqual([true, false, true]);
    expect(forOwner.firstSteps).toEqual([]);
  });

  it('warns of old elements', async () => {
    const operator = await skyberth.people.operator();
    const text = tleText({
      name: 'DUNLIN 3',
      catalogNumber: 92_003,
      epochMs: skyberth.clock.nowMs() - 40 * 24 * HOUR_MS,
    });
    await must(skyberth.call(routes.saveElements, { body: { text }, as: operator }));
    const { waiting } = await must(skyberth.call(routes.home, { as: operator }));
    expect(waiting).toMatchObject([{ kind: 'elements', urgent: true }]);
    expect(waiting[0]?.sentence).toContain('40.0 days old');
  });
});
