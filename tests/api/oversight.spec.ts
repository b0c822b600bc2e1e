/** Standing of accounts and the audit trail, refusals first. */
import { openDatabase } from '@skyberth/drizzle';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { antennaOnSale } from './harness/stations.js';
import { must, type Person, routes, type Skyberth, startSkyberth } from './harness.js';

let skyberth: Skyberth;
let admin: Person;
beforeAll(async () => {
  skyberth = await startSkyberth();
  admin = await skyberth.people.staff('admin');
});
afterAll(() => skyberth.stop());

const suspend = (id: string, reason = 'Unpaid invoices.') =>
  skyberth.call(routes.suspendAccount, { params: { id }, body: { reason }, as: admin });
const reinstate = (id: string) =>
  skyberth.call(routes.reinstateAccount, { params: { id }, body: { reason: 'All paid.' }, as: admin });

describe('a suspension', () => {
  it('needs a reason, an organisation that exists, and is never the marketplace’s own', async () => {
    const owner = await skyberth.people.owner();
    expect((await suspend(owner.organisationId, '  ')).problem?.code).toBe('bad-input');
    expect((await suspend(owner.personId)).problem?.code).toBe('not-found');
    expect((await suspend(admin.organisationId)).problem?.code).toBe('not-allowed');
    expect((await reinstate(owner.organisationId)).problem?.code).toBe('wrong-state');
  });

  it('lets an organisation read but change nothing, until it is lifted, and tells its managers', async () => {
    const operator = await skyberth.people.operator();
    await must(suspend(operator.organisationId));
    expect((await suspend(operator.organisationId)).problem?.code).toBe('wrong-state');
    const body = { name: 'DUNLIN 1', shortName: 'D1' };
    const refused = await skyberth.call(routes.createSpacecraft, { body, as: operator });
    expect(refused.problem).toMatchObject({ status: 403, code: 'not-allowed' });
    expect(refused.problem?.detail).toContain('Unpaid invoices.');
    expect((await must(skyberth.call(routes.listSpacecraft, { query: {}, as: operator }))).items).toEqual([]);
    const home = await must(skyberth.call(routes.home, { as: operator }));
    expect(home.waiting[0]).toMatchObject({ kind: 'suspended', urgent: true });
    await skyberth.drain();
    expect(skyberth.mail.to(operator.email).map(({ subject }) => subject)).toContainEqual(
      expect.stringContaining('is suspended'),
    );
    await must(reinstate(operator.organisationId));
    expect((await skyberth.call(routes.createSpacecraft, { body, as: operator })).problem).toBeUndefined();
  });

  it('takes an owner’s antennas off the market', async () => {
    const owner = await skyberth.people.owner();
    const { station } = await antennaOnSale(skyberth, owner);
    const operator = await skyberth.people.operator();
    const onMarket = async () =>
      (await must(skyberth.call(routes.listMarketStations, { as: operator }))).items.some(
        ({ id }) => id === station.id,
      );
    expect(await onMarket()).toBe(true);
    await must(suspend(owner.organisationId));
    expect(await onMarket()).toBe(false);
    await must(reinstate(owner.organisationId));
    expect(await onMarket()).toBe(true);
  });
});

describe('the list of accounts', () => {
  it('finds by kind, part of a name and the address of a member, taking no character for a pattern', async () => {
    const operator = await skyberth.people.operator();
    const list = async (query: { search?: string; kind?: 'owner' | 'operator'; standing?: 'suspended' }) =>
      (await must(skyberth.call(routes.listAccounts, { query: { ...query, pageSize: 200 }, as: admin }))).items.map(
        ({ id }) => id,
      );
    expect(await list({ search: operator.email.toUpperCase() })).toEqual([operator.organisationId]);
    expect(await list({ search: '%' })).toEqual([]);
    expect(await list({ kind: 'owner' })).not.toContain(operator.organisationId);
    expect(await list({ standing: 'suspended' })).toEqual([]);
    const one = await must(skyberth.call(routes.getAccount, { params: { id: operator.organisationId }, as: admin }));
    expect(one).toMatchObject({ kind: 'operator', members: 1, people: [{ email: operator.email, role: 'manager' }] });
  });
});

describe('the audit trail', () => {
  it('shows who did what, newest first, a page at a time', async () => {
    const operator = await skyberth.people.operator();
    await must(suspend(operator.organisationId, 'First look.'));
    await must(reinstate(operator.organisationId));
    const subject = `organisation:${operator.organisationId}`;
    const query = { subject, action: 'organisation.', pageSize: 1 };
    const first = await must(skyberth.call(routes.listAudit, { query, as: admin }));
    expect(first.items).toMatchObject([{ action: 'organisation.reinstate', personName: 'admin' }]);
    const beforeSeq = first.nextBeforeSeq ?? 0;
    const second = await must(skyberth.call(routes.listAudit, { query: { ...query, beforeSeq }, as: admin }));
    expect(second.items[0]?.action).toBe('organisation.suspend');
    expect(JSON.parse(second.items[0]?.data ?? '{}')).toEqual({ reason: 'First look.' });
  });

  it('is found unbroken, and found broken where a row was written past the application', async () => {
    const whole = await must(skyberth.call(routes.checkAudit, { as: admin }));
    expect(whole).toMatchObject({ intact: true, brokenSeq: null });
    expect(whole.rows).toBeGreaterThan(3);
    const file = openDatabase(skyberth.databaseFile).$client;
    const triggers = file
      .prepare(`select name from sqlite_master where type = 'trigger' and tbl_name = 'audit_log'`)
      .all() as { name: string }[];
    expect(triggers.length).toBeGreaterThan(0);
    for (const { name } of triggers) file.exec(`drop trigger ${name}`);
    file.exec(`update audit_log set data = '{"note":"never happened"}' where seq = 3`);
    file.close();
    expect(await must(skyberth.call(routes.checkAudit, { as: admin }))).toMatchObject({ intact: false, brokenSeq: 3 });
  });
});
