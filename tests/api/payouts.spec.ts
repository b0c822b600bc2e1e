/** Payout runs: gathered once, looked at by two people with second factors, paid once whatever dies in between. */
import { DATABASE, LedgerService, OutboxRepository, PAYOUT_PORT, PayoutRepository, write } from '@skyberth/api';
import { openDatabase, type SkyberthDatabase } from '@skyberth/drizzle';
import { adjustmentEntry } from '@skyberth/money';
import { type BodyInput, type PayoutRun, routes } from '@skyberth/shared';
import { generateSync } from 'otplib';
import { afterAll, afterEach, beforeAll, describe, expect, it, vi } from 'vitest';
import { PASSWORD } from './harness/people.js';
import { openShop, type Shop } from './harness/shop.js';
import { must, type Person } from './harness.js';

const DAY_MS = 86_400_000;
const GOOD: BodyInput<typeof routes.reportContact> = {
  outcome: 'good',
  cause: 'none',
  acquiredUtc: null,
  lostUtc: null,
  receivedBytes: null,
  ebN0Db: null,
  note: '',
};
const SECOND_EMAIL = 'noor@skyberth.example';

let shop: Shop;
let first: Person;
let second: Person;
let lastMs = 0;
const secrets = new Map<string, string>();
const call: Shop['skyberth']['call'] = (route, input) => shop.skyberth.call(route, input);
const inside = <T>(type: new (...args: never[]) => T): T => shop.skyberth.app.get(type, { strict: false });

/** A code that was not used yet: the clock moves on by more than a step. */
async function codeOf(person: Person): Promise<string> {
  await shop.advance(31_000);
  const epoch = Math.floor(shop.skyberth.clock.nowMs() / 1000);
  return generateSync({ secret: secrets.get(person.email) ?? '', epoch });
}
async function enrol(person: Person): Promise<void> {
  const { secret } = await must(call(routes.beginSecondFactor, { body: { password: PASSWORD }, as: person }));
  secrets.set(person.email, secret);
  await must(call(routes.confirmSecondFactor, { body: { code: await codeOf(person) }, as: person }));
}
async function awake(): Promise<void> {
  first = await shop.skyberth.people.awake(first);
  second = await shop.skyberth.people.awake(second);
}
/** A contact that was flown, reported and charged, with its money at hand. */
async function flown(): Promise<number> {
  const leastMs = Math.max(shop.skyberth.clock.nowMs(), lastMs) + 3_600_000;
  const pass = shop.passes.find((each) => Date.parse(each.geometry.aosUtc) > leastMs);
  if (!pass) throw new Error('The test has used up its passes.');
  lastMs = Date.parse(pass.geometry.losUtc);
  const { id, losUtc } = await shop.buy(pass);
  await shop.advanceTo(Date.parse(losUtc) + 1_000);
  await shop.skyberth.runJobs();
  await must(call(routes.reportContact, { params: { id }, body: GOOD, as: shop.owner }));
  await shop.settle();
  await awake();
  return due();
}
const due = async () => (await must(call(routes.earnings, { as: shop.owner }))).currencies[0]?.dueMinor ?? 0;
const prepare = (minimumMinor = 0) =>
  must(call(routes.preparePayoutRun, { body: { currency: 'EUR', minimumMinor }, as: first }));
const one = (run: PayoutRun) => must(call(routes.getPayoutRun, { params: { id: run.id }, as: first }));
const review = async (run: PayoutRun, as = first) =>
  call(routes.reviewPayoutRun, { params: { id: run.id }, body: { code: await codeOf(as) }, as });
const approve = async (run: PayoutRun, as = second, expectedMinor = run.sendsMinor) =>
  call(routes.approvePayoutRun, { params: { id: run.id }, body: { code: await codeOf(as), expectedMinor }, as });
const transfers = async () => (await shop.payments.stripe.transfers.list({ limit: 100 })).data;

beforeAll(async () => {
  shop = await openShop({ antenna: { minNoticeMin: 0 }, days: 6 });
  first = await shop.skyberth.people.staff('finance');
  const admin = await shop.skyberth.people.staff('admin');
  const invitation = { name: 'Noor Haddad', email: SECOND_EMAIL, role: 'finance' } as const;
  await must(call(routes.inviteMember, { body: invitation, as: admin }));
  await shop.skyberth.drain();
  const token = shop.skyberth.mail.tokenFor(SECOND_EMAIL);
  await must(call(routes.setPassword, { body: { token, password: PASSWORD } }));
  second = await shop.skyberth.people.signIn(SECOND_EMAIL);
  // The marketplace's own money at the provider, for what it gives to owners.
  await shop.payments.stripe.paymentIntents.create({
    amount: 20_000,
    currency: 'eur',
    allowed_payment_method_types: ['card'],
    payment_method: 'pm_card_visa',
    confirm: true,
  });
});
afterAll(() => shop?.stop());
afterEach(() => {
  vi.restoreAllMocks();
  expect(inside(LedgerService).selfCheck()).toEqual([]);
});

describe('the second factor', () => {
  it('wants the password, and a first code', async () => {
    const wrong = await call(routes.beginSecondFactor, { body: { password: 'a guess' }, as: first });
    expect(wrong.problem?.code).toBe('bad-input');
    await must(call(routes.beginSecondFactor, { body: { password: PASSWORD }, as: first }));
    const guess = await call(routes.confirmSecondFactor, { body: { code: '000000' }, as: first });
    expect(guess.problem?.code).toBe('bad-input');
    await enrol(first);
    const again = await call(routes.beginSecondFactor, { body: { password: PASSWORD }, as: first });
    expect(again.problem?.code).toBe('wrong-state');
    expect((await must(call(routes.secondFactor, { as: first }))).sinceUtc).not.toBeNull();
  });
});

describe('a payout run', () => {
  it('holds back what has no account, and lets nobody act without a second factor', async () => {
    await flown();
    const run = await prepare();
    expect(run.lines).toMatchObject([{ state: 'held back', toPayMinor: await due(), contactCount: 1 }]);
    expect(run.sendsMinor).toBe(0);
    const without = await call(routes.reviewPayoutRun, {
      params: { id: run.id },
      body: { code: '123456' },
      as: second,
    });
    expect(without.problem).toMatchObject({ code: 'wrong-state' });
    await must(call(routes.dropPayoutRun, { params: { id: run.id }, as: first }));
    await enrol(second);
    const { url } = await must(call(routes.givePayoutAccount, { as: shop.owner }));
    await fetch(url, { method: 'POST', redirect: 'manual' });
  });

  it('started twice at once is one run, and settles nothing twice', async () => {
    const body = { currency: 'EUR', minimumMinor: 0 };
    const answers = await Promise.all([first, second].map((as) => call(routes.preparePayoutRun, { body, as })));
    expect(answers.map((answer) => answer.status).sort()).toEqual([201, 409]);
    const db = openDatabase(shop.skyberth.databaseFile);
    const copy = () =>
      db.$client
        .prepare(
          "INSERT INTO payout_items SELECT 'copy', line_id, entry_id, posting_line, 1 FROM payout_items WHERE live = 1 LIMIT 1",
        )
        .run();
    expect(copy).toThrow(/UNIQUE/);
    db.$client.close();
    const { items } = await must(call(routes.listPayoutRuns, { query: {}, as: first }));
    await must(call(routes.dropPayoutRun, { params: { id: items[0]?.id ?? '' }, as: first }));
  });

  it('needs two people: the API and the database refuse one in both seats, and a code counts once', async () => {
    const run = await prepare();
    const early = await approve(run);
    expect(early.problem?.code).toBe('wrong-state');
    const code = await codeOf(first);
    const params = { id: run.id };
    await must(call(routes.reviewPayoutRun, { params, body: { code }, as: first }));
    const own = await approve(run, first);
    expect(own.problem).toMatchObject({ status: 403, code: 'not-allowed' });
    const db = openDatabase(shop.skyberth.databaseFile);
    const seat = "UPDATE payout_runs SET state = 'approved', approved_by = reviewed_by, approved_ms = 1 WHERE id = ?";
    expect(() => db.$client.prepare(seat).run(run.id)).toThrow(/payout_runs_two_people|payout_runs_maker/);
    const skip = "UPDATE payout_lines SET state = 'paying' WHERE run_id = ?";
    expect(() => db.$client.prepare(skip).run(run.id)).toThrow('the run is not approved');
    db.$client.close();
    expect((await approve(run, second, run.sendsMinor + 1)).problem?.code).toBe('changed-meanwhile');
    // A change asks for a new review, and the code of the old one is used up.
    const line = { ...params, lineId: run.lines[0]?.id ?? '' };
    await must(
      call(routes.adjustPayoutLine, { params: line, body: { amountMinor: 250, reason: 'set-up twice' }, as: first }),
    );
    expect((await one(run)).state).toBe('draft');
    const replay = await call(routes.reviewPayoutRun, { params, body: { code }, as: first });
    expect(replay.problem?.code).toBe('bad-input');
    await must(call(routes.dropPayoutRun, { params, as: first }));
  });

  it('comes back when the transfer is refused, and pays to the cent when it is not', async () => {
    await shop.advance(60_000);
    const before = await prepare();
    await must(review(before));
    await must(approve(before));
    // The card's money has not settled at the provider yet.
    await shop.settle();
    expect((await one(before)).lines).toMatchObject([{ state: 'failed' }]);
    await shop.advance(8 * DAY_MS);
    await awake();
    const owed = await due();
    const run = await prepare();
    expect(run.lines).toMatchObject([{ state: 'ready', toPayMinor: owed, adjustedMinor: 250 }]);
    await must(review(run));
    await must(approve(run));
    await shop.settle();
    expect(await one(run)).toMatchObject({ state: 'done', lines: [{ state: 'paid', toPayMinor: owed }] });
    expect(await transfers()).toMatchObject([{ amount: owed, transfer_group: run.lines[0]?.id }]);
    expect(await must(call(routes.earnings, { as: shop.owner }))).toMatchObject({
      currencies: [{ dueMinor: 0, paidMinor: owed }],
    });
    const nothing = await call(routes.preparePayoutRun, { body: { currency: 'EUR' }, as: first });
    expect(nothing.problem?.code).toBe('wrong-state');
    const subjects = shop.skyberth.mail.to(shop.owner.email).map((mail) => mail.subject);
    expect(subjects.filter((subject) => subject.includes('on their way'))).toHaveLength(1);
  });
});

/** Where the server can die while a line is carried out. */
const DEATHS: [string, () => void][] = [
  [
    'before the transfer is ordered',
    () => void vi.spyOn(port(), 'transfer').mockRejectedValueOnce(new Error('the process is gone')),
  ],
  [
    'after the transfer and before it is written',
    () =>
      void vi.spyOn(inside(PayoutRepository), 'changeLine').mockImplementationOnce(() => {
        throw new Error('the process is gone');
      }),
  ],
  [
    'after it is written and before the order is crossed out',
    () => void vi.spyOn(inside(OutboxRepository), 'finish').mockImplementation(() => {}),
  ],
];
const port = () =>
  shop.skyberth.app.get<{ transfer(order: unknown): Promise<unknown> }>(PAYOUT_PORT, { strict: false });

describe('a crash', () => {
  it.each(DEATHS)('%s pays once', async (_where, die) => {
    const sent = (await transfers()).length;
    const body = { currency: 'EUR', minimumMinor: 0 };
    await awake();
    giveSomething();
    const run = await must(call(routes.preparePayoutRun, { body, as: first }));
    await must(review(run));
    await must(approve(run));
    die();
    await shop.skyberth.drain();
    vi.restoreAllMocks();
    await shop.advance(10 * 60_000);
    await shop.settle();
    await awake();
    expect((await one(run)).lines).toMatchObject([{ state: 'paid' }]);
    expect(await transfers()).toHaveLength(sent + 1);
    expect(await due()).toBe(0);
  });
});

let given = 0;
/** Earnings without a contact: what finance gives. */
function giveSomething(): void {
  given += 1;
  const head = { causeKey: `adjust:test-${given}`, cause: 'Adjustment: a test', currency: 'EUR' };
  const entry = adjustmentEntry(head, { ownerId: shop.owner.organisationId, amountMinor: 1_000 + given });
  const db = shop.skyberth.app.get<SkyberthDatabase>(DATABASE, { strict: false });
  write(db, (tx) => inside(LedgerService).post(tx, entry, null));
}
