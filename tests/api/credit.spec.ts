/** Buying on a monthly account: asked for, opened by finance, within its limit, billed, paid by card, reminded of. */
import { LedgerService } from '@skyberth/api';
import { type BodyInput, type Booking, routes } from '@skyberth/shared';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openShop, type Shop } from './harness/shop.js';
import { must, type Person } from './harness.js';

let shop: Shop;
beforeAll(async () => {
  shop = await openShop({ antenna: { minNoticeMin: 0 }, days: 6 });
});
afterAll(() => shop?.stop());

const DAY_MS = 86_400_000;
const HOUR_MS = 3_600_000;
const call: Shop['skyberth']['call'] = (route, input) => shop.skyberth.call(route, input);
const finance = () => shop.skyberth.people.staff('finance');
const mine = async () => (await must(call(routes.myCredit, { as: shop.operator }))).items[0];
const ask = (as: Person = shop.operator) =>
  call(routes.askCredit, { body: { currency: 'EUR', wishedMinor: 100_000, note: 'Daily passes.' }, as });
type Decision = BodyInput<typeof routes.decideCredit>;
const decide = async (change: Partial<Decision> = {}) => {
  const body: Decision = { decision: 'open', limitMinor: 100_000, termsDays: 14, reason: 'Known to us.', ...change };
  const { items } = await must(call(routes.listCredit, { as: await finance() }));
  return call(routes.decideCredit, { params: { id: items[0]?.id ?? '' }, body, as: await finance() });
};
let lastMs = 0;
const hold = async (): Promise<Booking> => {
  const leastMs = Math.max(shop.skyberth.clock.nowMs() + HOUR_MS, lastMs + HOUR_MS);
  const pass = shop.passes.find((each) => Date.parse(each.geometry.aosUtc) > leastMs);
  if (!pass) throw new Error('The test has used up its passes.');
  lastMs = Date.parse(pass.geometry.losUtc);
  return shop.hold(pass);
};
const buy = (id: string, as: Person = shop.operator) => call(routes.buyOnAccount, { params: { id }, as });
/** Moves both clocks by days, after which everybody signs in again. */
const later = async (days: number) => {
  shop.skyberth.clock.advance(days * DAY_MS);
  await shop.payments.hook('clock', { advanceMs: days * DAY_MS });
  Object.assign(shop.operator, await shop.skyberth.people.signIn(shop.operator.email));
};
const balance = (account: 'operator receivable' | 'provider clearing') =>
  shop.skyberth.app.get(LedgerService, { strict: false }).balanceMinor(account, 'EUR');

describe('a monthly account', () => {
  it('is asked for by a manager, and opened by finance alone', async () => {
    const member = await shop.skyberth.people.member(shop.operator, 'member');
    expect((await ask(member)).problem?.code).toBe('not-allowed');
    expect((await ask(shop.owner)).problem?.code).toBe('not-allowed');
    const held = await hold();
    expect((await buy(held.id)).problem?.code).toBe('wrong-state');
    expect(await must(ask())).toMatchObject({ state: 'asked', limitMinor: 0, freeMinor: 0 });
    expect((await buy(held.id)).problem?.code).toBe('wrong-state');
    expect((await decide({ limitMinor: 0 })).problem?.code).toBe('bad-input');
    expect((await decide({ decision: 'close' })).problem?.code).toBe('wrong-state');
    for (const as of [shop.operator, await shop.skyberth.people.staff('admin')]) {
      expect((await call(routes.listCredit, { as })).problem?.code).toBe('not-allowed');
    }
    expect(await must(decide({ limitMinor: held.toPayMinor }))).toMatchObject({ state: 'open' });
    await must(call(routes.letGo, { params: { id: held.id }, as: shop.operator }));
  });

  it('buys a hold without a card, and no more than the limit bears, however many ask at once', async () => {
    const [first, second] = [await hold(), await hold()];
    await must(decide({ limitMinor: Math.max(first.toPayMinor, second.toPayMinor) }));
    const answers = await Promise.all([buy(first.id), buy(second.id)]);
    expect(answers.map((answer) => answer.problem?.code ?? 'bought').sort()).toEqual(['bought', 'over-limit']);
    const won = answers[0]?.ok ? first : second;
    const lost = answers[0]?.ok ? second : first;
    expect((await shop.booking(won.id)).state).toBe('confirmed');
    expect((await shop.booking(lost.id)).state).toBe('held');
    await must(buy(won.id));
    expect((await mine())?.bookedMinor).toBe(won.toPayMinor);
    expect((await buy(won.id, await shop.skyberth.people.operator())).problem?.code).toBe('not-found');
    await must(decide({ limitMinor: 100_000 }));
    await must(buy(lost.id));
  });

  it('is billed when the month is over, and a bill is paid once by card', async () => {
    const bought = await mine();
    await shop.advanceTo(lastMs + 1_000);
    await shop.skyberth.runJobs();
    for (const pass of [0, 1]) {
      const { items } = await must(call(routes.listBookings, { query: {}, as: shop.owner }));
      const due = items.filter((booking) => booking.state === 'reporting')[0];
      if (!due && pass === 0) throw new Error('No contact was flown.');
      if (!due) continue;
      const body = { outcome: 'good', cause: 'none', acquiredUtc: null, lostUtc: null, receivedBytes: null } as const;
      const report = { ...body, ebN0Db: null, note: '' };
      await must(call(routes.reportContact, { params: { id: due.id }, body: report, as: shop.owner }));
    }
    const owed = await mine();
    expect(owed).toMatchObject({ owedMinor: bought?.bookedMinor, bookedMinor: 0, bills: [] });
    expect(balance('operator receivable')).toBe(owed?.owedMinor);
    await later(31);
    await shop.skyberth.runJobs();
    await shop.skyberth.runJobs();
    const bill = (await mine())?.bills[0];
    expect((await mine())?.bills).toHaveLength(1);
    expect(bill).toMatchObject({ state: 'open', totalMinor: owed?.owedMinor });
    expect(bill?.lines.reduce((sum, line) => sum + line.amountMinor, 0)).toBe(bill?.totalMinor);
    expect(bill?.lines.every((line) => line.invoiceNumber?.startsWith('SKB-'))).toBe(true);
  });

  it('is blocked while a bill is overdue, after three reminders still, and free when it is paid', async () => {
    const bill = (await mine())?.bills[0];
    const pay = (as: Person = shop.operator) => call(routes.payBill, { params: { id: bill?.id ?? '' }, as });
    expect((await pay(await shop.skyberth.people.operator())).problem?.code).toBe('not-found');
    for (const days of [16, 7, 7, 7]) {
      await later(days);
      await shop.skyberth.runJobs();
      await shop.skyberth.runJobs();
    }
    expect(await mine()).toMatchObject({ isBlocked: true, bills: [{ state: 'overdue', reminders: 3 }] });
    const reminders = shop.skyberth.mail.to(shop.operator.email).filter((mail) => /reminder/i.test(mail.subject));
    expect(reminders.length).toBe(3);
    const { url } = await must(pay());
    expect((await must(pay())).url).toBe(url);
    await shop.payments.payOnPage(url ?? '', 'pm_card_visa');
    await shop.settle();
    expect(await mine()).toMatchObject({ isBlocked: false, owedMinor: 0, bills: [{ state: 'paid' }] });
    expect((await must(pay())).url).toBeNull();
    expect(balance('operator receivable')).toBe(0);
    await must(call(routes.readMovements, { as: await finance() }));
    const open = await must(call(routes.listMovements, { query: { state: 'open' }, as: await finance() }));
    expect(open.items).toEqual([]);
    expect(shop.skyberth.app.get(LedgerService, { strict: false }).selfCheck()).toEqual([]);
  });
});

describe('a finished month', () => {
  it('closes once all is in order, in the order of the months, and takes no entry any more', async () => {
    const as = await finance();
    await must(call(routes.runLedgerCheck, { as }));
    const { items } = await must(call(routes.listMonths, { as }));
    const next = items.filter((item) => item.state !== 'running').at(-1);
    expect(next).toMatchObject({ state: 'can be closed' });
    expect(next?.checklist.every((item) => item.ok)).toBe(true);
    const later = items.find((item) => item.state === 'not ready')?.month ?? '2020-01';
    expect((await call(routes.closeMonth, { params: { month: later }, as })).problem?.code).toBe('wrong-state');
    const closed = await must(call(routes.closeMonth, { params: { month: next?.month ?? '' }, as }));
    expect(closed).toMatchObject({ state: 'closed', trialBalance: next?.trialBalance });
    expect((await call(routes.closeMonth, { params: { month: next?.month ?? '' }, as })).problem?.code).toBe(
      'wrong-state',
    );
  });
});
