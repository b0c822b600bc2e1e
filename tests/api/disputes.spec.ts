/** Disputes from opening to appeal: refusals first, then evidence, decision and money to the cent. */
import { LedgerService } from '@skyberth/api';
import { type BodyInput, type Booking, type Dispute, routes } from '@skyberth/shared';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openShop, type Shop } from './harness/shop.js';
import { must, type Person } from './harness.js';

let shop: Shop;
let otherAdmin: Person;
beforeAll(async () => {
  shop = await openShop({ antenna: { minNoticeMin: 0 } });
  const first = await shop.skyberth.people.staff('admin');
  otherAdmin = await shop.skyberth.people.member(first, 'admin');
});
afterAll(() => shop?.stop());

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;
const call: Shop['skyberth']['call'] = (route, input) => shop.skyberth.call(route, input);
const again = (person: Person) => shop.skyberth.people.signIn(person.email);
const admin = async () => again(await shop.skyberth.people.staff('admin'));
let lastMs = 0;

/** A contact that was bought, flown and reported good with a silence in its middle. */
async function flown(): Promise<Booking> {
  const leastMs = Math.max(shop.skyberth.clock.nowMs() + HOUR_MS, lastMs + HOUR_MS);
  const pass = shop.passes.find((each) => Date.parse(each.geometry.aosUtc) > leastMs);
  if (!pass) throw new Error('The test has used up its passes.');
  lastMs = Date.parse(pass.geometry.losUtc);
  const booking = await shop.buy(pass);
  await shop.advanceTo(Date.parse(booking.losUtc) + 1_000);
  await shop.skyberth.runJobs();
  await shop.settle();
  return booking;
}
async function report(booking: Booking, change: Partial<BodyInput<typeof routes.reportContact>> = {}): Promise<void> {
  const body = {
    outcome: 'degraded',
    cause: 'station',
    acquiredUtc: booking.aosUtc,
    lostUtc: booking.losUtc,
    receivedBytes: 1_000_000,
    ebN0Db: 8,
    note: 'Receiver alarm.',
    ...change,
  } as const;
  await must(call(routes.reportContact, { params: { id: booking.id }, body, as: await again(shop.owner) }));
  await shop.settle();
}
const gapOf = (booking: Booking, share: number) => {
  const [aosMs, losMs] = [Date.parse(booking.aosUtc), Date.parse(booking.losUtc)];
  const fromMs = aosMs + Math.round((losMs - aosMs) / 4);
  return {
    gapFromUtc: new Date(fromMs).toISOString(),
    gapToUtc: new Date(fromMs + Math.round((losMs - aosMs) * share)).toISOString(),
  };
};
async function open(booking: Booking, change: object = {}) {
  const body = { reason: 'signal broken off', text: 'Frames stopped in the middle.', ...change } as const;
  return call(routes.openDispute, { params: { id: booking.id }, body, as: await again(shop.operator) });
}
async function decide(
  dispute: Dispute,
  terms: BodyInput<typeof routes.previewDecision>,
  as: Person,
): Promise<{ dispute: Dispute; refundMinor: number }> {
  const params = { id: dispute.id };
  const effect = await must(call(routes.previewDecision, { params, body: terms, as }));
  const body = { terms, text: 'The alarm covers the gap.', expectedRefundMinor: effect.refundMinor };
  const decided = await must(call(routes.decideDispute, { params, body, as }));
  await shop.settle();
  return { dispute: decided, refundMinor: effect.refundMinor };
}
const balance = (account: Parameters<LedgerService['balanceMinor']>[0], organisationId?: string) =>
  shop.skyberth.app.get(LedgerService, { strict: false }).balanceMinor(account, 'EUR', organisationId);
const sound = () => shop.skyberth.app.get(LedgerService, { strict: false }).selfCheck();

describe('a dispute', () => {
  it('cannot be opened by strangers, before the contact is over, twice, too late, or where nothing was charged', async () => {
    const booking = await flown();
    const body = { reason: 'other', text: 'x' } as const;
    const params = { id: booking.id };
    const stranger = await shop.skyberth.people.operator();
    expect((await call(routes.openDispute, { params, body, as: stranger })).problem?.code).toBe('not-found');
    expect((await call(routes.openDispute, { params, body, as: await again(shop.owner) })).problem?.code).toBe(
      'not-allowed',
    );
    const outside = { gapFromUtc: '2020-01-01T00:00:00Z', gapToUtc: '2020-01-01T00:01:00Z' };
    expect((await open(booking, outside)).problem?.code).toBe('bad-input');
    expect((await open(booking, { gapFromUtc: booking.aosUtc })).problem?.code).toBe('bad-input');
    await report(booking, { outcome: 'failed', cause: 'station' });
    const refused = await open(booking);
    expect(refused.problem).toMatchObject({ code: 'wrong-state' });
    expect(refused.problem?.detail).toContain('Nothing was charged');

    const coming = await shop.buy(
      shop.passes.find((each) => Date.parse(each.geometry.aosUtc) > lastMs + HOUR_MS) ??
        (() => {
          throw new Error('no pass');
        })(),
    );
    lastMs = Date.parse(coming.losUtc);
    expect((await open(coming)).problem?.code).toBe('wrong-state');
    await shop.advanceTo(Date.parse(coming.losUtc) + 1_000);
    await shop.skyberth.runJobs();
    await report(coming);
    expect((await shop.booking(coming.id)).state).toBe('settled');
    await must(open(coming));
    expect((await open(coming)).problem?.code).toBe('already-exists');
  });

  it('sets the earnings aside, shows evidence to both sides, and the journal to the admin alone', async () => {
    const booking = await flown();
    await report(booking);
    const setAside = -balance('dispute reserve', shop.owner.organisationId);
    const dispute = await must(open(booking, gapOf(booking, 0.5)));
    expect((await shop.booking(booking.id)).state).toBe('in dispute');
    expect(dispute.heldMinor).toBeGreaterThan(0);
    expect(-balance('dispute reserve', shop.owner.organisationId) - setAside).toBe(dispute.heldMinor);
    expect(dispute.suggestedBasisPoints).toBeGreaterThan(4_990);
    expect(dispute.suggestedBasisPoints).toBeLessThan(5_010);
    const { evidence } = dispute;
    expect(evidence.gap?.from).toBe('the operator');
    expect(evidence.track.length).toBeGreaterThan(10);
    for (const point of evidence.track) expect(point.elevationDeg).toBeGreaterThanOrEqual(point.maskDeg - 0.1);
    expect(evidence.station.map(({ kind }) => kind)).toEqual(['acquired', 'lost', 'note']);
    expect(evidence.findings.map(({ title }) => title)).toContain('Visible throughout.');
    expect(evidence.findings).toContainEqual(
      expect.objectContaining({ weight: 'fault', title: 'Reported cause: station.' }),
    );
    expect(evidence.mails.length).toBeGreaterThan(0);

    const params = { id: dispute.id };
    const forOwner = await must(call(routes.getDispute, { params, as: await again(shop.owner) }));
    expect(forOwner).toMatchObject({ money: [], actions: ['state'] });
    const forAdmin = await must(call(routes.getDispute, { params, as: await admin() }));
    expect(forAdmin.money.length).toBeGreaterThan(2);
    expect(forAdmin.actions).toEqual(['decide', 'assemble', 'ask']);
    const stranger = await shop.skyberth.people.owner();
    expect((await call(routes.getDispute, { params, as: stranger })).problem?.code).toBe('not-found');

    const said = {
      text: 'The receiver was restarted.',
      observations: [{ atUtc: booking.tcaUtc, kind: 'note' as const, words: 'restart' }],
    };
    const answered = await must(call(routes.stateInDispute, { params, body: said, as: await again(shop.owner) }));
    expect(answered.statements.map(({ side }) => side)).toEqual(['operator', 'owner']);
    const asked = await must(
      call(routes.askInDispute, { params, body: { side: 'owner', text: 'The log?' }, as: await admin() }),
    );
    expect(asked.statements.at(-1)).toMatchObject({ side: 'admin', text: 'To the station: The log?' });
    await shop.settle();
    expect(
      shop.skyberth.mail
        .to(shop.owner.email)
        .some(({ subject }) => subject.includes(`Dispute ${dispute.number} opened`)),
    ).toBe(true);
  });

  it('decided in part gives back what was shown, to the cent, through the provider, with a credit note', async () => {
    const booking = await flown();
    await report(booking);
    const payableBefore = balance('owner payable', shop.owner.organisationId);
    const clearingBefore = balance('provider clearing');
    const dispute = await must(open(booking, gapOf(booking, 0.4)));
    const as = await admin();
    const terms = { outcome: 'part', refundBasisPoints: 5_000, borneBy: 'owner' } as const;
    const params = { id: dispute.id };
    const wrong = { terms, text: 'So.', expectedRefundMinor: 1 };
    expect((await call(routes.decideDispute, { params, body: wrong, as })).problem?.code).toBe('price-changed');
    const odd = { ...terms, outcome: 'full' } as const;
    expect((await call(routes.previewDecision, { params, body: odd, as })).problem?.code).toBe('bad-input');
    const { dispute: decided, refundMinor } = await decide(dispute, terms, as);
    expect(decided.state).toBe('decided');
    const after = await shop.booking(booking.id);
    expect(after.state).toBe('settled');
    expect(after.payment.refundedMinor).toBe(refundMinor);
    expect(Math.abs(refundMinor - booking.toPayMinor / 2)).toBeLessThanOrEqual(2);
    expect(balance('dispute reserve', shop.owner.organisationId)).toBe(-(await openReserves()));
    expect(clearingBefore - balance('provider clearing')).toBe(refundMinor);
    const lost = decided.decisions[0]?.effect.lines.find(({ words }) => words.startsWith('Less for'))?.amountMinor ?? 0;
    expect(balance('owner payable', shop.owner.organisationId) - payableBefore).toBe(-lost);
    expect(balance('refunds')).toBe(0);
    const notes = await must(call(routes.listInvoices, { query: { pageSize: 200 }, as: await again(shop.operator) }));
    const credit = notes.items.find((one) => one.bookingId === booking.id && one.kind === 'credit note');
    expect(credit?.grossMinor).toBe(-refundMinor);
    expect(sound()).toEqual([]);
    expect(
      (await call(routes.decideDispute, { params, body: { ...wrong, expectedRefundMinor: refundMinor }, as })).problem
        ?.code,
    ).toBe('wrong-state');
  });

  it('is appealed once and decided by another admin; more goes back, never less than was given', async () => {
    const booking = await flown();
    await report(booking);
    const dispute = await must(open(booking, gapOf(booking, 0.4)));
    const first = await admin();
    const { refundMinor: once } = await decide(
      dispute,
      { outcome: 'part', refundBasisPoints: 2_500, borneBy: 'owner' },
      first,
    );
    const params = { id: dispute.id };
    const body = { text: 'The gap was longer.' };
    const appealed = await must(call(routes.appealDecision, { params, body, as: await again(shop.operator) }));
    expect(appealed).toMatchObject({ state: 'appealed', appealedBy: 'operator' });
    expect((await call(routes.appealDecision, { params, body, as: await again(shop.owner) })).problem?.code).toBe(
      'wrong-state',
    );
    const full = { outcome: 'full', refundBasisPoints: 10_000, borneBy: 'owner' } as const;
    const effect = await must(call(routes.previewDecision, { params, body: full, as: first }));
    const decision = { terms: full, text: 'All of it.', expectedRefundMinor: effect.refundMinor };
    expect((await call(routes.decideDispute, { params, body: decision, as: await again(first) })).problem?.code).toBe(
      'not-allowed',
    );
    const { dispute: closed, refundMinor: more } = await decide(appealed, full, await again(otherAdmin));
    expect(closed).toMatchObject({ state: 'closed', decisions: [{ round: 1 }, { round: 2 }] });
    expect(once + more).toBe(booking.toPayMinor);
    const after = await shop.booking(booking.id);
    expect(after).toMatchObject({ state: 'failed', payment: { state: 'refunded', refundedMinor: booking.toPayMinor } });
    expect(sound()).toEqual([]);
    expect((await call(routes.appealDecision, { params, body, as: await again(shop.owner) })).problem?.code).toBe(
      'wrong-state',
    );
  });

  it('borne by the marketplace leaves the owner what was earned', async () => {
    const booking = await flown();
    await report(booking);
    const payable = balance('owner payable', shop.owner.organisationId);
    const dispute = await must(open(booking));
    await decide(dispute, { outcome: 'full', refundBasisPoints: 10_000, borneBy: 'marketplace' }, await admin());
    expect(balance('owner payable', shop.owner.organisationId)).toBe(payable);
    expect((await shop.booking(booking.id)).payment.refundedMinor).toBe(booking.toPayMinor);
    expect(sound()).toEqual([]);
  });

  it('opened before the report charges first, so that no reservation runs out, and stands for ever after the appeal time', async () => {
    const booking = await flown();
    expect((await shop.booking(booking.id)).state).toBe('reporting');
    const dispute = await must(open(booking, { reason: 'no signal' }));
    await shop.settle();
    expect((await shop.booking(booking.id)).payment.capturedMinor).toBe(booking.toPayMinor);
    await decide(dispute, { outcome: 'none', refundBasisPoints: 0, borneBy: 'owner' }, await admin());
    expect((await shop.booking(booking.id)).state).toBe('settled');
    shop.skyberth.clock.advance(15 * DAY_MS);
    await shop.skyberth.runJobs();
    const params = { id: dispute.id };
    expect((await must(call(routes.getDispute, { params, as: await admin() }))).state).toBe('closed');
    expect((await open(booking)).problem?.code).toBe('already-exists');
    const { items } = await must(call(routes.precedents, { query: { reason: 'no signal' }, as: await admin() }));
    expect(items).toMatchObject([{ outcome: 'none', refundBasisPoints: 0 }]);
    expect(sound()).toEqual([]);
  });
});

/** What open disputes still hold. */
async function openReserves(): Promise<number> {
  const { items } = await must(
    call(routes.listDisputes, { query: { state: 'open', pageSize: 200 }, as: await admin() }),
  );
  let sum = 0;
  for (const { id } of items)
    sum += (await must(call(routes.getDispute, { params: { id }, as: await admin() }))).heldMinor;
  return sum;
}
