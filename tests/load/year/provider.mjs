/**
 * The payment provider in memory: balances, movements and events in the provider's own shapes, signed as the provider signs.
 * Its news are duplicated, dropped and reordered; its answers to orders fail now and then, before or after the deed.
 */
import Stripe from 'stripe';

export const WEBHOOK_SECRET = 'whsec_of_the_simulated_year';
const FEE_BASIS_POINTS = 150;
const FEE_FIXED = 25;
const DISPUTE_FEE = 1_500;
const MISCHIEF = { drop: 0.05, duplicate: 0.05, late: 0.15, failBefore: 0.02, failAfter: 0.02 };
const HOUR_MS = 3_600_000;

export class SimulatedProvider {
  #clock;
  #chance;
  #number = 0;
  #intents = new Map();
  #refunds = new Map();
  #disputes = new Map();
  #movements = [];
  #events = [];
  #queue = [];
  /** What happened, added up apart from the movements: what the ledger is held against. */
  tally = { captured: {}, refunded: {}, chargedBack: {}, givenBack: {}, fees: {}, transferred: {} };
  counts = { events: 0, dropped: 0, duplicated: 0, late: 0, orders: 0, orderFailures: 0 };

  constructor(clock, chance) {
    this.#clock = clock;
    this.#chance = chance;
  }

  authorise(intentId, { bookingId, amountMinor, currency }) {
    const charge = {
      id: `ch_${intentId}`,
      amount: amountMinor,
      amount_captured: 0,
      amount_refunded: 0,
      captured: false,
    };
    this.#intents.set(intentId, { id: intentId, bookingId, amountMinor, currency, status: 'requires_capture', charge });
  }

  /** The port of payments, as far as orders of the outbox need it. */
  port() {
    return {
      capture: (intentId, amountMinor) => this.#ordered(() => this.#capture(intentId, amountMinor), intentId),
      release: (intentId) => this.#ordered(() => this.#release(intentId), intentId),
      readIntent: async (intentId) => this.#facts(this.#intents.get(intentId)),
      readPage: async () => {
        throw new Error('No page is opened here.');
      },
    };
  }

  /** The port of the provider's books. */
  books() {
    const paged = async function* (rows) {
      for (let from = 0; from < rows.length; from += 100) yield rows.slice(from, from + 100);
    };
    return {
      balances: async () => new Map(Object.entries(this.balances())),
      movements: (sinceMs) => paged(newestFirst(this.#movements, sinceMs)),
      events: (sinceMs) => paged(newestFirst(this.#events, sinceMs).map(({ read }) => read())),
      chargeback: async (id) => this.readChargeback(id),
      refunded: async (id) => this.#refunds.get(id),
    };
  }

  /** Set by the play: how events and chargebacks read, by the application's own reading of the provider's shapes. */
  reading = { event: undefined, chargeback: undefined };

  readChargeback(id) {
    return this.reading.chargeback(this.#disputes.get(id));
  }

  /** What was taken and not given back. */
  leftMinor(intentId) {
    const { charge } = this.#intents.get(intentId);
    return charge.amount - charge.amount_refunded;
  }

  refund(intentId, amountMinor) {
    const intent = this.#intents.get(intentId);
    intent.charge.amount_refunded += amountMinor;
    const id = `re_${this.#next()}`;
    this.#move('refund', { sourceId: id, intent, amountMinor: -amountMinor });
    add(this.tally.refunded, intent.currency, amountMinor);
    this.#emit('charge.refunded', chargeOf(intent));
  }

  openDispute(intentId, amountMinor) {
    const intent = this.#intents.get(intentId);
    const id = `dp_${this.#next()}`;
    const row = this.#move('adjustment', {
      category: 'dispute',
      sourceId: id,
      intent,
      amountMinor: -amountMinor,
      feeMinor: DISPUTE_FEE,
    });
    const dispute = {
      id,
      object: 'dispute',
      charge: intent.charge.id,
      payment_intent: intentId,
      amount: amountMinor,
      currency: intent.currency.toLowerCase(),
      reason: 'fraudulent',
      status: 'needs_response',
      balance_transactions: [{ amount: row.amountMinor }],
    };
    this.#disputes.set(id, dispute);
    add(this.tally.chargedBack, intent.currency, amountMinor);
    this.#emit('charge.dispute.created', { ...dispute });
    this.#emit('charge.dispute.funds_withdrawn', { ...dispute });
    return id;
  }

  closeDispute(id, verdict) {
    const dispute = this.#disputes.get(id);
    dispute.status = verdict;
    if (verdict === 'won') {
      const intent = this.#intents.get(dispute.payment_intent);
      this.#move('adjustment', { category: 'dispute_reversal', sourceId: id, intent, amountMinor: dispute.amount });
      dispute.balance_transactions = [...dispute.balance_transactions, { amount: dispute.amount }];
      add(this.tally.givenBack, intent.currency, dispute.amount);
      this.#emit('charge.dispute.funds_reinstated', { ...dispute });
    }
    this.#emit('charge.dispute.closed', { ...dispute });
  }

  /** Money to an owner's account; answers the transfer's id, or null where it fails. */
  transfer(currency, amountMinor) {
    if (this.#chance.is(0.03)) return null;
    const id = `tr_${this.#next()}`;
    this.#move('transfer', { sourceId: id, intent: { id: null, currency }, amountMinor: -amountMinor });
    add(this.tally.transferred, currency, amountMinor);
    return id;
  }

  balances() {
    const sums = {};
    for (const movement of this.#movements) add(sums, movement.currency, movement.netMinor);
    return sums;
  }

  /** News that are due by now, as signed deliveries, in the order in which they happen to arrive. */
  deliveries() {
    const nowMs = this.#clock.nowMs();
    const due = this.#queue.filter((one) => one.dueMs <= nowMs).sort((a, b) => a.dueMs - b.dueMs);
    this.#queue = this.#queue.filter((one) => one.dueMs > nowMs);
    return due.map(({ body }) => {
      const timestamp = Math.floor(nowMs / 1000);
      const signature = Stripe.webhooks.generateTestHeaderString({ payload: body, secret: WEBHOOK_SECRET, timestamp });
      return { body: Buffer.from(body), signature };
    });
  }

  async #ordered(deed, intentId) {
    this.counts.orders += 1;
    const failsBefore = this.#chance.is(MISCHIEF.failBefore);
    if (!failsBefore) deed();
    if (failsBefore || this.#chance.is(MISCHIEF.failAfter)) {
      this.counts.orderFailures += 1;
      throw new Error('The provider does not answer.');
    }
    return this.#facts(this.#intents.get(intentId));
  }

  #capture(intentId, amountMinor) {
    const intent = this.#intents.get(intentId);
    if (intent.status !== 'requires_capture') return;
    const { charge, currency } = intent;
    Object.assign(intent, { status: 'succeeded', receivedMinor: amountMinor });
    // Letting the rest go counts as refunded there.
    Object.assign(charge, {
      captured: true,
      amount_captured: amountMinor,
      amount_refunded: charge.amount - amountMinor,
    });
    const share = Math.floor((amountMinor * FEE_BASIS_POINTS + 5_000) / 10_000);
    const feeMinor = Math.min(amountMinor, share + FEE_FIXED);
    this.#move('charge', { sourceId: charge.id, intent, amountMinor, feeMinor });
    add(this.tally.captured, currency, amountMinor);
    this.#emit('payment_intent.succeeded', this.#intentObject(intent));
  }

  #release(intentId) {
    const intent = this.#intents.get(intentId);
    if (intent.status !== 'requires_capture') return;
    intent.status = 'canceled';
    this.#emit('payment_intent.canceled', this.#intentObject(intent));
  }

  #move(type, { category = type, sourceId, intent, amountMinor, feeMinor = 0 }) {
    const { currency } = intent;
    const atMs = Math.floor(this.#clock.nowMs() / 1000) * 1000;
    const movement = {
      id: `txn_${this.#next()}`,
      type,
      category,
      sourceId,
      intentId: intent.id,
      amountMinor,
      feeMinor,
      netMinor: amountMinor - feeMinor,
      currency,
      atMs,
      availableMs: atMs,
      description: '',
      createdMs: atMs,
    };
    this.#movements.push(movement);
    add(this.tally.fees, currency, feeMinor);
    return movement;
  }

  #emit(type, object) {
    const createdMs = Math.floor(this.#clock.nowMs() / 1000) * 1000;
    const event = { id: `evt_${this.#next()}`, object: 'event', type, created: createdMs / 1000, data: { object } };
    const body = JSON.stringify(event);
    this.#events.push({
      createdMs,
      read: () => ({ ...this.reading.event(JSON.parse(body)), payload: body, createdMs }),
    });
    this.counts.events += 1;
    if (this.#chance.is(MISCHIEF.drop)) {
      this.counts.dropped += 1;
      return;
    }
    const late = this.#chance.is(MISCHIEF.late);
    if (late) this.counts.late += 1;
    const dueMs = this.#clock.nowMs() + (late ? this.#chance.next() * 30 * HOUR_MS : 0);
    this.#queue.push({ dueMs, body });
    if (!this.#chance.is(MISCHIEF.duplicate)) return;
    this.counts.duplicated += 1;
    this.#queue.push({ dueMs: dueMs + this.#chance.next() * 10 * HOUR_MS, body });
  }

  #intentObject(intent) {
    return {
      id: intent.id,
      object: 'payment_intent',
      status: intent.status,
      amount: intent.amountMinor,
      amount_capturable: 0,
      amount_received: intent.receivedMinor ?? 0,
      currency: intent.currency.toLowerCase(),
      metadata: { skyberth_booking: intent.bookingId },
      latest_charge: intent.charge.id,
      last_payment_error: null,
      next_action: null,
    };
  }

  #facts(intent) {
    const STATUS = { requires_capture: 'authorised', succeeded: 'captured', canceled: 'released' };
    return {
      intentId: intent.id,
      bookingId: intent.bookingId,
      billId: null,
      renews: null,
      status: STATUS[intent.status],
      amountMinor: intent.amountMinor,
      capturableMinor: intent.status === 'requires_capture' ? intent.amountMinor : 0,
      receivedMinor: intent.receivedMinor ?? 0,
      currency: intent.currency,
      card: 'Card ending 0000',
      captureBeforeMs: null,
      failure: null,
      redirectUrl: null,
    };
  }

  #next() {
    this.#number += 1;
    return String(this.#number).padStart(9, '0');
  }
}

const add = (sums, currency, minor) => {
  sums[currency] = (sums[currency] ?? 0) + minor;
};

/** Rows are kept in order of time, so those since an instant are the last ones. */
function newestFirst(rows, sinceMs) {
  const found = [];
  for (let index = rows.length - 1; index >= 0 && rows[index].createdMs >= sinceMs; index -= 1) found.push(rows[index]);
  return found;
}

const chargeOf = ({ id, currency, charge }) => ({
  ...charge,
  object: 'charge',
  payment_intent: id,
  currency: currency.toLowerCase(),
});
