/** The provider's books against ours: fees, missed and late news, chargebacks, files, and months that close for good. */
import { LedgerService } from '@skyberth/api';
import { openDatabase } from '@skyberth/drizzle';
import { type BodyInput, type Booking, type Movement, routes } from '@skyberth/shared';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { openShop, type Shop } from './harness/shop.js';
import { must, type Person } from './harness.js';

let shop: Shop;
let finance: Person;
beforeAll(async () => {
  shop = await openShop({ antenna: { minNoticeMin: 0 }, days: 6 });
  finance = await shop.skyberth.people.staff('finance');
});
afterAll(() => shop?.stop());
afterEach(() => {
  shop.payments.keepBack();
  expect(shop.skyberth.app.get(LedgerService, { strict: false }).selfCheck()).toEqual([]);
});

const HOUR_MS = 3_600_000;
const call: Shop['skyberth']['call'] = (route, input) => shop.skyberth.call(route, input);
const GOOD: BodyInput<typeof routes.reportContact> = {
  outcome: 'good',
  cause: 'none',
  acquiredUtc: null,
  lostUtc: null,
  receivedBytes: null,
  ebN0Db: null,
  note: '',
};
let lastMs = 0;
/** A contact that was flown, reported and ordered to be charged. */
const flown = async (): Promise<Booking> => {
  const leastMs = Math.max(shop.skyberth.clock.nowMs() + HOUR_MS, lastMs + HOUR_MS);
  const pass = shop.passes.find((each) => Date.parse(each.geometry.aosUtc) > leastMs);
  if (!pass) throw new Error('The test has used up its passes.');
  lastMs = Date.parse(pass.geometry.losUtc);
  const { id, losUtc } = await shop.buy(pass);
  await shop.advanceTo(Date.parse(losUtc) + 1_000);
  await shop.skyberth.runJobs();
  await must(call(routes.reportContact, { params: { id }, body: GOOD, as: shop.owner }));
  await shop.settle();
  finance = await shop.skyberth.people.staff('finance');
  return shop.booking(id);
};
const read = () => must(call(routes.readMovements, { as: finance }));
const movements = async (state?: Movement['state']) =>
  (await must(call(routes.listMovements, { query: { state, pageSize: 200 }, as: finance }))).items;
const view = () => must(call(routes.reconciliation, { as: finance }));
const balance = async (account: string) =>
  (await must(call(routes.balances, { as: finance }))).items.find((item) => item.account === account)?.balanceMinor ??
  0;
const chargeOf = async (bookingId: string) => {
  const { data } = await shop.payments.stripe.charges.list({ limit: 100 });
  const charge = data.find((each) => each.metadata['skyberth_booking'] === bookingId && each.captured);
  if (!charge) throw new Error('The contact was not charged.');
  return charge;
};

describe('what the provider did', () => {
  it('is imported once, its fee is booked, and it is matched to the entry that says the same', async () => {
    const booking = await flown();
    const charge = await chargeOf(booking.id);
    await read();
    expect(await read()).toEqual({ imported: 0, matched: 0 });
    const found = (await movements()).filter((movement) => movement.sourceId === charge.id);
    expect(found).toMatchObject([
      { state: 'matched', amountMinor: booking.toPayMinor, bookingId: booking.id, why: null },
    ]);
    const held = await shop.payments.stripe.balance.retrieve();
    const heldMinor = [...held.available, ...held.pending].reduce((sum, each) => sum + each.amount, 0);
    expect(await balance('provider clearing')).toBe(heldMinor);
    expect(await balance('provider costs')).toBe(found[0]?.feeMinor);
    expect(await view()).toMatchObject({ currencies: [{ differenceMinor: 0, explainedMinor: 0 }], ledgerOnly: [] });
  });

  it('and of which no news came is listed with its cause, and asked for', async () => {
    shop.payments.keepBack('payment_intent.succeeded', 'charge.captured');
    const { id } = await flown();
    await read();
    const [open] = await movements('open');
    expect(open).toMatchObject({ actions: ['fetch', 'suspense'], bookingId: id });
    const { currencies } = await view();
    expect(currencies[0]?.differenceMinor).toBe(currencies[0]?.explainedMinor);
    expect(currencies[0]?.differenceMinor).toBe(open?.amountMinor);
    const resolve = { params: { id: open?.id ?? '' }, body: { action: 'fetch', reason: 'No news came.' } } as const;
    expect(await must(call(routes.resolveMovement, { ...resolve, as: finance }))).toMatchObject({ state: 'matched' });
    expect((await call(routes.resolveMovement, { ...resolve, as: finance })).problem?.code).toBe('wrong-state');
    expect((await shop.booking(id)).payment.state).toBe('captured');
  });

  it('is also found by reading the events that never came, in their order', async () => {
    shop.payments.keepBack('payment_intent.succeeded', 'charge.captured', 'charge.refunded');
    const { id } = await flown();
    const charge = await chargeOf(id);
    await shop.payments.stripe.refunds.create({ charge: charge.id, amount: 100 });
    await shop.settle();
    expect((await shop.booking(id)).payment).toMatchObject({ refundedMinor: 0 });
    await shop.advance(6 * 60_000);
    await shop.skyberth.runJobs();
    expect((await shop.booking(id)).payment).toMatchObject({ state: 'captured', refundedMinor: 100 });
    // The deliveries come after all, late and in the wrong order, and change nothing.
    const late = shop.payments.sent.filter((each) => /succeeded|refunded/.test(each.type)).reverse();
    for (const delivery of late) expect([200, 400]).toContain(await shop.payments.deliver(delivery));
    expect((await shop.booking(id)).payment).toMatchObject({ state: 'captured', refundedMinor: 100 });
    finance = await shop.skyberth.people.staff('finance');
    await read();
    expect(await movements('open')).toEqual([]);
  });

  it('and nobody can explain stands in suspense', async () => {
    await shop.payments.stripe.paymentIntents.create({
      amount: 777,
      currency: 'eur',
      allowed_payment_method_types: ['card'],
      payment_method: 'pm_card_visa',
      confirm: true,
    });
    await read();
    const [open] = await movements('open');
    expect(open).toMatchObject({ amountMinor: 777, actions: ['suspense'], why: 'Nobody here asked for this payment.' });
    const params = { id: open?.id ?? '' };
    const fetch = { action: 'fetch', reason: 'It might be known.' } as const;
    expect((await call(routes.resolveMovement, { params, body: fetch, as: finance })).problem?.code).toBe(
      'wrong-state',
    );
    const body = { action: 'suspense', reason: 'Nobody knows it.' } as const;
    await must(call(routes.resolveMovement, { params, body, as: finance }));
    expect(await balance('suspense')).toBe(-777);
    expect((await view()).currencies).toMatchObject([{ differenceMinor: 0 }]);
  });
});

describe('a chargeback', () => {
  it('takes the money, sets the earnings aside, and brings both back when it is won', async () => {
    const booking = await flown();
    const payableMinor = await balance('owner payable');
    const receivableMinor = await balance('operator receivable');
    const charge = await chargeOf(booking.id);
    await shop.payments.hook('disputes', { charge: charge.id, reason: 'fraudulent' });
    await shop.settle();
    const [opened] = (await must(call(routes.listChargebacks, { query: {}, as: finance }))).items;
    expect(opened).toMatchObject({ bookingId: booking.id, state: 'open', amountMinor: booking.toPayMinor });
    expect(opened?.reservedMinor).toBeGreaterThan(0);
    expect(await balance('dispute reserve')).toBe(-(opened?.reservedMinor ?? 0));
    expect(await balance('owner payable')).toBe(payableMinor + (opened?.reservedMinor ?? 0));
    expect((await shop.booking(booking.id)).events.at(-1)?.kind).toBe('chargeback opened');
    await shop.payments.hook(`disputes/${opened?.id}/close`, { verdict: 'won' });
    await shop.settle();
    expect(await balance('dispute reserve')).toBe(0);
    expect(await balance('owner payable')).toBe(payableMinor);
    expect(await balance('operator receivable')).toBe(receivableMinor);
    await read();
    expect(await movements('open')).toEqual([]);
  });

  it('that is lost undoes the sale, also when its news come in the wrong order and twice', async () => {
    const payableMinor = await balance('owner payable');
    const feeMinor = await balance('marketplace fee');
    const booking = await flown();
    shop.payments.keepBack('charge.dispute.created', 'charge.dispute.funds_withdrawn', 'charge.dispute.closed');
    const charge = await chargeOf(booking.id);
    await shop.payments.hook('disputes', { charge: charge.id, reason: 'product_not_received' });
    const { data } = await shop.payments.stripe.disputes.list({ charge: charge.id });
    await shop.payments.hook(`disputes/${data[0]?.id}/close`, { verdict: 'lost' });
    await shop.payments.settled();
    const news = shop.payments.sent.filter((each) => each.body.includes(`"${data[0]?.id}"`)).reverse();
    expect(news.length).toBeGreaterThanOrEqual(3);
    for (const delivery of [...news, ...news]) expect(await shop.payments.deliver(delivery)).toBe(200);
    expect(await balance('owner payable')).toBe(payableMinor);
    expect(await balance('marketplace fee')).toBe(feeMinor);
    expect(await balance('dispute reserve')).toBe(0);
    expect(await balance('operator receivable')).toBe(0);
    await read();
    expect(await movements('open')).toEqual([]);
  });
});

describe('a file of movements', () => {
  const HEAD = 'id,type,amount,fee,net,currency,created,description';
  const send = (text: string) => call(routes.importMovements, { body: { text }, as: finance });

  it('is imported once, quoted or not', async () => {
    const text = `${HEAD}\r\ntxn_from_file,payout,-500,0,-500,eur,2026-12-01T00:00:00Z,"To our bank, ""main"""\r\n`;
    expect(await must(send(text))).toMatchObject({ imported: 1, known: 0 });
    expect(await must(send(text))).toMatchObject({ imported: 0, known: 1 });
    const [open] = await movements('open');
    expect(open).toMatchObject({ description: 'To our bank, "main"', actions: ['withdrawal', 'suspense'] });
    const body = { action: 'withdrawal', reason: 'Seen on the bank statement.' } as const;
    await must(call(routes.resolveMovement, { params: { id: 'txn_from_file' }, body, as: finance }));
    expect(await balance('bank')).toBe(500);
  });

  it.each([
    ['without a column', 'id,type\ntxn_1,charge\n'],
    ['with a sum that does not add up', `${HEAD}\ntxn_1,charge,100,3,98,EUR,2026-12-01T00:00:00Z,\n`],
    ['with a broken amount', `${HEAD}\ntxn_1,charge,1.5,0,1.5,EUR,2026-12-01T00:00:00Z,\n`],
    ['with a broken time', `${HEAD}\ntxn_1,charge,1,0,1,EUR,yesterday,\n`],
  ])('%s is refused as a whole', async (_what, text) => {
    const good = `${text}txn_good,charge,1,0,1,EUR,2026-12-01T00:00:00Z,\n`;
    expect((await send(good)).problem?.code).toBe('bad-input');
    expect((await movements()).map((movement) => movement.id)).not.toContain('txn_good');
  });
});

describe('the ledger', () => {
  it('walks an account back line by line, and its running balance is that of the sums', async () => {
    const account = 'provider clearing';
    const query = { account, currency: 'EUR', limit: 3 };
    const whole = await must(call(routes.ledgerLines, { query: { ...query, limit: 200 }, as: finance }));
    const seen: typeof whole.items = [];
    for (let after: string | undefined; ; ) {
      const page = await must(call(routes.ledgerLines, { query: { ...query, after }, as: finance }));
      seen.push(...page.items);
      if (page.next === null) break;
      after = page.next;
    }
    expect(seen).toEqual(whole.items);
    expect(whole.items).toHaveLength(whole.postings);
    expect(whole.items[0]?.balanceMinor).toBe(whole.closingMinor);
    expect(whole.closingMinor).toBe(await balance(account));
    const last = whole.items.at(-1);
    expect(last?.balanceMinor).toBe(last?.amountMinor);
  });

  it('is written to files that add up', async () => {
    const month = new Date(shop.skyberth.clock.nowMs()).toISOString().slice(0, 7);
    const text = async (file: string) => {
      const headers = { Cookie: finance.jar.header('/api') };
      const response = await fetch(`${shop.skyberth.url}/api/ledger/files/${file}?month=${month}`, { headers });
      expect(response.headers.get('content-type')).toContain('text/csv');
      return (await response.text()).trim().split('\r\n');
    };
    const [head, ...lines] = await text('journal.csv');
    expect(head).toBe('entry,at,cause,reference,account,organisation,currency,debit,credit');
    const cents = (cell: string | undefined) => Math.round(Number(cell ?? 0) * 100);
    const sums = lines.map((line) => line.split(',').slice(-2));
    expect(sums.reduce((sum, [debit, credit]) => sum + cents(debit) - cents(credit), 0)).toBe(0);
    const closing = (await text('trial-balance.csv')).slice(1).map((line) => cents(line.split(',').at(-1)));
    expect(closing.reduce((sum, minor) => sum + minor, 0)).toBe(0);
    expect((await text('vat-summary.csv')).length).toBeGreaterThan(1);
  });

  it('is checked against itself and the provider', async () => {
    const { check } = await must(call(routes.runLedgerCheck, { as: finance }));
    // The invented movement of the file is not the provider's: that is what the check is for.
    expect(check?.providerAsked).toBe(true);
    expect(check?.faults.map((fault) => fault.kind)).toEqual(['provider differs']);
    const admin = await shop.skyberth.people.staff('admin');
    expect(await must(call(routes.systemLedgerCheck, { as: admin }))).toMatchObject({ faults: 1 });
  });
});

describe('a month', () => {
  it('that is running, or not in order, cannot be closed; a closed one takes no entry and stays closed', async () => {
    const month = new Date(shop.skyberth.clock.nowMs()).toISOString().slice(0, 7);
    const close = () => call(routes.closeMonth, { params: { month }, as: finance });
    expect((await close()).problem?.code).toBe('wrong-state');
    const db = openDatabase(shop.skyberth.databaseFile);
    const [fromMs, toMs] = [Date.parse(`${month}-01T00:00:00Z`), shop.skyberth.clock.nowMs()];
    try {
      // What the database itself refuses, whatever the code above it believes.
      const insert = db.$client.prepare(
        "INSERT INTO closed_months (month, from_ms, to_ms, closed_ms, closed_by, trial_balance) VALUES (?, ?, ?, ?, (SELECT id FROM people LIMIT 1), '[]')",
      );
      expect(() => insert.run(month, fromMs, toMs, toMs - 1)).toThrow('closes after its end');
      db.$client.exec('BEGIN');
      insert.run(month, fromMs, toMs, toMs);
      expect(() => insert.run('2030-01', toMs + 1, toMs + 2, toMs + 3)).toThrow('one after the other');
      const entry = db.$client.prepare(
        "INSERT INTO journal_entries (id, at_ms, cause_key, cause, currency) VALUES ('e', ?, 'k', 'late', 'EUR')",
      );
      expect(() => entry.run(toMs - 1)).toThrow('month is closed');
      expect(() => db.$client.exec('DELETE FROM closed_months')).toThrow('cannot be opened again');
      db.$client.exec('ROLLBACK');
    } finally {
      db.$client.close();
    }
  });
});

it('lets nobody but finance look at it', async () => {
  for (const as of [shop.owner, shop.operator, await shop.skyberth.people.staff('admin')]) {
    expect((await call(routes.reconciliation, { as: await shop.skyberth.people.awake(as) })).problem?.code).toBe(
      'not-allowed',
    );
  }
});
