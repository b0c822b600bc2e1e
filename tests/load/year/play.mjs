/**
 * A year of the marketplace, played through the application's own code on a clock that is moved: sales, captures, partial
 * captures, releases, refunds, chargebacks and payouts in four currencies, against a provider whose news are spoiled. At the
 * end every missed event is read, and the books must agree to the last minor unit.
 */
import {
  BookingMoney,
  BookingRepository,
  chargebackFacts,
  createApp,
  DATABASE,
  eventFacts,
  InvoiceService,
  LedgerCheckService,
  LedgerRepository,
  LedgerService,
  newId,
  OutboxRunner,
  PAYMENT_PORT,
  PaymentEvents,
  PROVIDER_BOOKS,
  ReconciliationService,
  write,
} from '@skyberth/api';
import { bookings, payments } from '@skyberth/drizzle';
import { payoutArrivedEntry, payoutEntry, percentOf, reverseEntry } from '@skyberth/money';
import { count, eq } from 'drizzle-orm';
import { chance } from './chance.mjs';
import { SimulatedProvider } from './provider.mjs';
import { configOf, keepStatements, START_MS, SteppedClock } from './stage.mjs';
import { bookingRow, makeWorld, quoteOf } from './world.mjs';

const DAY_MS = 86_400_000;
const HOUR_MS = 3_600_000;
const DAYS = 365;
/** Days at the end in which nothing is sold and everything comes to rest; a late event may take two. */
const REST_DAYS = 8;
/**
 * Further apart than the longest guarded interval, so that the database's search for overlaps meets no neighbours; with all
 * contacts of a year on a few antennas it would look at a thousand each time. When they fly does not matter to money.
 */
const SLOT_MS = 701_000_000;

/** Plays `count` bookings; answers what was played and everything that does not agree (nothing, when all is right). */
export async function playYear({ bookings: bookingCount, seed }) {
  const clock = new SteppedClock();
  const luck = chance(seed);
  const provider = new SimulatedProvider(clock, luck);
  provider.reading = { event: eventFacts, chargeback: chargebackFacts };
  const app = await createApp(configOf(), { clock, quiet: true });
  await app.init();
  const get = (token) => app.get(token, { strict: false });
  Object.assign(get(PAYMENT_PORT), provider.port());
  Object.assign(get(PROVIDER_BOOKS), provider.books());
  const db = get(DATABASE);
  db.$client.pragma('synchronous = OFF');
  keepStatements(db.$client);
  const year = new Year({ get, db, clock, luck, provider, world: makeWorld(db, START_MS), bookingCount });
  try {
    for (let day = 0; day < DAYS + REST_DAYS; day += 1) await year.day(day);
    return { ...year.played, ...provider.counts, disagreements: await year.disagreements() };
  } finally {
    await app.close();
  }
}

class Year {
  played = {
    bookings: 0,
    released: 0,
    refunds: 0,
    chargebacks: 0,
    won: 0,
    lost: 0,
    payouts: 0,
    payoutsFailed: 0,
    missedRead: 0,
  };
  #number = 1_000;
  #slots = new Map();
  #captured = [];
  #disputes = [];

  constructor(parts) {
    Object.assign(this, parts);
    this.ledger = this.get(LedgerService);
    this.events = this.get(PaymentEvents);
    this.reconciliation = this.get(ReconciliationService);
  }

  async day(day) {
    const { clock } = this;
    const share = (upTo) => Math.floor((this.bookingCount * Math.min(upTo, DAYS)) / DAYS);
    const today = share(day + 1) - share(day);
    for (let half = 0; half < 2; half += 1) {
      clock.set(START_MS + day * DAY_MS + half * 12 * HOUR_MS);
      const sold = half === 0 ? Math.ceil(today / 2) : Math.floor(today / 2);
      for (let index = 0; index < sold; index += 1) this.#sell();
      await this.get(OutboxRunner).drain();
      this.#deliver();
      clock.advance(HOUR_MS);
      if (day < DAYS) this.#afterwards();
      this.#deliver();
    }
    clock.set(START_MS + day * DAY_MS + 20 * HOUR_MS);
    this.#decideDisputes(day >= DAYS);
    this.#deliver();
    if (day % 3 === 2 || day >= DAYS) {
      this.played.missedRead += await this.events.readMissed();
      await this.reconciliation.read();
    }
    if (day % 7 === 6 && day < DAYS) this.#payOut(day);
  }

  /** A contact that was bought, flown and reported, with what is kept of its price: all, a part, or nothing. */
  #sell() {
    const { luck, world, db } = this;
    const [operator, owner] = [luck.one(world.operators), luck.one(world.owners)];
    const netMinor = luck.whole(owner.from, owner.to);
    const vatMinor = percentOf(netMinor, operator.rateBasisPoints);
    const quote = quoteOf({ currency: owner.currency, netMinor, vatMinor, rateBasisPoints: operator.rateBasisPoints });
    const booking = this.#bookingOf({ operator, owner, quote });
    const intentId = `pi_${booking.id}`;
    const money = { currency: quote.currency, amountMinor: quote.toPayMinor };
    this.provider.authorise(intentId, { bookingId: booking.id, ...money });
    const refundPercent = luck.is(0.8) ? 0 : luck.one([25, 50, 75, 100, 100]);
    write(db, (tx) => {
      tx.insert(bookings).values(booking).run();
      const times = { createdMs: booking.createdMs, changedMs: booking.createdMs };
      tx.insert(payments)
        .values({
          id: newId(),
          bookingId: booking.id,
          intentId,
          state: 'authorised',
          ...money,
          capturedMinor: 0,
          refundedMinor: 0,
          card: 'Card ending 0000',
          ...times,
        })
        .run();
      const row = this.get(BookingRepository).byId(tx, booking.id);
      this.get(InvoiceService).issue(tx, row, `Contact ${booking.number}`);
      this.get(BookingMoney).settle(tx, row, { refundPercent, reason: 'a contact of the year' });
      tx.update(bookings).set({ state: 'settled' }).where(eq(bookings.id, booking.id)).run();
    });
    this.played.bookings += 1;
    if (refundPercent === 100) this.played.released += 1;
    else this.#captured.push({ bookingId: booking.id, intentId });
  }

  /** What happens to charged contacts later: refunds in one or more parts, and chargebacks. */
  #afterwards() {
    const { luck, provider, db } = this;
    const due = this.#captured;
    this.#captured = [];
    for (const one of due) {
      const payment = db.select().from(payments).where(eq(payments.intentId, one.intentId)).get();
      if (payment.state === 'capturing') {
        // Its news are not here yet; the bank and the owner cannot act on it before the provider has taken it either.
        this.#captured.push(one);
        continue;
      }
      // What the provider still holds: the news of an earlier refund may not be here yet.
      const left = provider.leftMinor(one.intentId);
      if (left > 1 && luck.is(0.06)) {
        provider.refund(one.intentId, luck.is(0.4) ? left : luck.whole(1, left - 1));
        this.played.refunds += 1;
        if (luck.is(0.5)) this.#captured.push(one);
      } else if (left === payment.capturedMinor && luck.is(0.015)) {
        this.#disputes.push(provider.openDispute(one.intentId, luck.is(0.7) ? left : luck.whole(1, left)));
        this.played.chargebacks += 1;
      }
    }
  }

  /** Banks take their time; at the end some are still open. */
  #decideDisputes(isOver) {
    const undecided = [];
    for (const id of this.#disputes) {
      if (isOver || !this.luck.is(0.06)) {
        undecided.push(id);
        continue;
      }
      const verdict = this.luck.is(0.4) ? 'won' : 'lost';
      this.provider.closeDispute(id, verdict);
      this.played[verdict] += 1;
    }
    this.#disputes = undecided;
  }

  /** Every owner gets what is payable; a transfer that fails is taken back and comes with the next run. */
  #payOut(day) {
    for (const { organisationId, currency, debitMinor, creditMinor } of this.get(LedgerRepository).sums({
      account: 'owner payable',
    })) {
      const amountMinor = creditMinor - debitMinor;
      if (amountMinor <= 0) continue;
      const key = `${organisationId}:${currency}:${day}`;
      const cause = `Payout of day ${day}`;
      const payout = { ownerId: organisationId, amountMinor };
      const ordered = payoutEntry({ causeKey: `payout:${key}`, cause, currency }, payout);
      const transferId = this.provider.transfer(currency, amountMinor);
      const outcome =
        transferId === null
          ? reverseEntry(ordered, { causeKey: `payout-failed:${key}`, cause: `${cause} came back` })
          : payoutArrivedEntry({ causeKey: `transfer:${transferId}`, cause, currency }, payout);
      write(this.db, (tx) => {
        this.ledger.post(tx, ordered, null);
        this.ledger.post(tx, outcome, null);
      });
      this.played[transferId === null ? 'payoutsFailed' : 'payouts'] += 1;
    }
  }

  /** A delivery that fails is tried again by reading; so is one that never comes. */
  #deliver() {
    for (const { body, signature } of this.provider.deliveries()) {
      try {
        this.events.receive(body, signature);
      } catch (error) {
        // The provider would send it again; here the next reading brings it, which is the harder case.
        if (!/came before the news/.test(error.message)) throw error;
      }
    }
  }

  #bookingOf({ operator, owner, quote }) {
    // Each antenna and each spacecraft has its own row of times, so that nothing overlaps.
    const slot = Math.max(this.#slots.get(owner.antennaId) ?? 0, this.#slots.get(operator.spacecraftId) ?? 0) + SLOT_MS;
    this.#slots.set(owner.antennaId, slot).set(operator.spacecraftId, slot);
    this.#number += 1;
    const aosMs = START_MS + slot;
    const times = { aosMs, nowMs: this.clock.nowMs() };
    return bookingRow({
      operator,
      owner,
      quote,
      personId: this.world.personId,
      id: newId(),
      number: this.#number,
      ...times,
    });
  }

  /** Everything that does not hold at the end, in sentences. */
  async disagreements() {
    const faults = (await this.get(LedgerCheckService).run()).map((fault) => fault.sentence);
    const { tally } = this.provider;
    const balances = this.provider.balances();
    const differ = (what, ours, theirs) => {
      if (ours !== theirs) faults.push(`${what}: ${ours} here, ${theirs} by the provider's own count.`);
    };
    const open = this.db.select({ rows: count() }).from(payments).where(eq(payments.state, 'capturing')).get().rows;
    differ('Payments that wait for their news', open, 0);
    for (const currency of Object.keys(tally.captured)) {
      const of = (account) => this.ledger.balanceMinor(account, currency);
      const sum = (name) => tally[name][currency] ?? 0;
      const taken = sum('captured') - sum('refunded') - sum('chargedBack') + sum('givenBack');
      differ(`Provider clearing in ${currency}`, of('provider clearing'), balances[currency]);
      differ(`Provider costs in ${currency}`, of('provider costs'), sum('fees'));
      differ(`Balance in ${currency}`, taken - sum('fees') - sum('transferred'), balances[currency]);
      // What was paid out and what is still owed, kept or reserved is all that was taken, less what operators owe again.
      const owed = -['owner payable', 'dispute reserve', 'payout clearing', 'refunds', 'VAT', 'marketplace fee']
        .map(of)
        .reduce((total, minor) => total + minor, 0);
      differ(`Payouts and balances in ${currency}`, sum('transferred') + owed - of('operator receivable'), taken);
    }
    return faults;
  }
}
