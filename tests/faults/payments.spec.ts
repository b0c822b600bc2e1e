/** The server dies between two lines, the provider does not answer, and two hundred buyers pay at once. */
import { randomUUID } from 'node:crypto';
import { LedgerService, OutboxRepository, PaymentRepository } from '@skyberth/api';
import { routes } from '@skyberth/shared';
import Database from 'better-sqlite3';
import { afterAll, afterEach, beforeAll, describe, expect, it, vi } from 'vitest';
import { signEvent } from '../api/harness/payments.js';
import { openShop, type Shop } from '../api/harness/shop.js';
import { must } from '../api/harness.js';

let shop: Shop;
beforeAll(async () => {
  shop = await openShop({ antenna: { minNoticeMin: 0 } });
});
afterAll(() => shop?.stop());
afterEach(() => {
  vi.restoreAllMocks();
});

const call: Shop['skyberth']['call'] = (route, input) => shop.skyberth.call(route, input);
const inside = <T>(type: new (...args: never[]) => T): T => shop.skyberth.app.get(type, { strict: false });
const pay = (id: string, savedCardId: string | null = null) =>
  call(routes.checkout, { params: { id }, body: { savedCardId, saveCard: false }, as: shop.operator });
let used = 0;
const hold = () => {
  used += 1;
  const pass = shop.passes.filter((each) => Date.parse(each.geometry.aosUtc) > shop.skyberth.clock.nowMs() + 7_200_000)[
    used * 2
  ];
  if (!pass) throw new Error('The test has used up its passes.');
  return shop.hold(pass);
};

describe('a crash', () => {
  it('after the provider made the payment page loses nothing: the next attempt finds the same page', async () => {
    const { id } = await hold();
    const payments = inside(PaymentRepository);
    vi.spyOn(payments, 'update').mockImplementationOnce(() => {
      throw new Error('the process is gone');
    });
    expect((await pay(id)).status).toBe(500);
    const page = await shop.openPage(id);
    const { data } = await shop.payments.stripe.checkout.sessions.list({ limit: 100 });
    expect(data.filter((session) => session.client_reference_id === id).map((session) => session.url)).toEqual([page]);
  });

  it('after the provider made the intent of a saved card reserves once', async () => {
    const first = await hold();
    await shop.payments.payOnPage(await shop.openPage(first.id, { saveCard: true }), 'pm_card_visa');
    await shop.settle();
    const card = (await must(call(routes.savedCards, { as: shop.operator }))).items[0];
    const { id } = await hold();
    vi.spyOn(inside(PaymentRepository), 'update').mockImplementationOnce(() => {
      throw new Error('the process is gone');
    });
    expect((await pay(id, card?.id)).status).toBe(500);
    await must(pay(id, card?.id));
    await shop.settle();
    expect((await shop.booking(id)).state).toBe('confirmed');
    const { data } = await shop.payments.stripe.paymentIntents.list({ limit: 100 });
    expect(data.filter((intent) => intent.metadata.skyberth_booking === id)).toMatchObject([
      { status: 'requires_capture' },
    ]);
  });

  it('in the middle of an event leaves nothing half done, and the event comes again', async () => {
    const { id } = await hold();
    vi.spyOn(inside(PaymentRepository), 'closeEvent').mockImplementationOnce(() => {
      throw new Error('the process is gone');
    });
    await shop.payments.payOnPage(await shop.openPage(id), 'pm_card_visa');
    await shop.settle();
    await vi.waitFor(async () => expect((await shop.booking(id)).state).toBe('confirmed'), {
      timeout: 10_000,
      interval: 200,
    });
    await shop.settle();
    expect((await shop.booking(id)).events.filter((event) => event.kind === 'funds secured')).toHaveLength(1);
  });

  it('after a capture charges once when the order is carried out again', async () => {
    const { id } = await hold();
    await shop.payments.payOnPage(await shop.openPage(id), 'pm_card_visa');
    await shop.settle();
    const { refundNowMinor, toPayMinor } = await shop.booking(id);
    const body = { expectedRefundMinor: refundNowMinor ?? 0 };
    await must(call(routes.cancelBooking, { params: { id }, body, as: shop.operator }));
    // The order is done at the provider, and the process dies before it can say so: the claim runs out.
    vi.spyOn(inside(OutboxRepository), 'finish').mockImplementation(() => {});
    await shop.skyberth.drain();
    vi.restoreAllMocks();
    await shop.advance(61_000);
    await shop.settle();
    const keptMinor = toPayMinor - (refundNowMinor ?? 0);
    expect((await shop.booking(id)).payment).toMatchObject(
      keptMinor > 0 ? { state: 'captured', capturedMinor: keptMinor } : { state: 'released' },
    );
    expect(inside(LedgerService).selfCheck()).toEqual([]);
  });
});

describe('a provider that does not answer', () => {
  it('is asked again until it does, and lets the reservation go', async () => {
    const { id } = await hold();
    await shop.payments.payOnPage(await shop.openPage(id), 'pm_card_visa');
    await shop.settle();
    const booking = await shop.booking(id);
    await shop.payments.hook('faults', { mode: 'answer', status: 500, match: 'POST /v1/payment_intents/', times: 6 });
    const body = { reason: 'Ice on the dish.', expectedRefundMinor: booking.toPayMinor };
    await must(call(routes.cancelBooking, { params: { id }, body, as: shop.owner }));
    await shop.skyberth.drain();
    expect((await shop.booking(id)).payment.state).toBe('releasing');
    await shop.payments.hook('faults/clear');
    await shop.advance(120_000);
    await shop.settle();
    expect((await shop.booking(id)).payment.state).toBe('released');
  });
});

describe('two hundred payments at once', () => {
  it('make two hundred confirmed bookings and two hundred invoices without a gap', async () => {
    const { id } = await hold();
    await pay(id);
    const copies = copyHolds(id, 200);
    const nowS = Math.floor(shop.skyberth.clock.nowMs() / 1000);
    const events = copies.map((copy) => signEvent(securedEvent(copy), nowS));
    const answers = await Promise.all(events.map((event) => shop.payments.deliver(event)));
    expect(answers.filter((status) => status !== 200)).toEqual([]);
    const db = new Database(shop.skyberth.databaseFile, { readonly: true });
    const states = db
      .prepare(
        'SELECT state, count(*) AS rows FROM bookings WHERE id IN (SELECT value FROM json_each(?)) GROUP BY state',
      )
      .all(JSON.stringify(copies.map((copy) => copy.bookingId)));
    const numbers = db
      .prepare("SELECT seq FROM invoices WHERE kind = 'invoice' ORDER BY seq")
      .pluck()
      .all() as number[];
    db.close();
    expect(states).toEqual([{ state: 'confirmed', rows: 200 }]);
    expect(numbers.length).toBeGreaterThanOrEqual(200);
    expect(numbers).toEqual(numbers.map((_each, index) => index + 1));
  });
});

interface Copy {
  bookingId: string;
  toPayMinor: number;
  currency: string;
}

/** The hold many times over, each an hour after the one before, with its payment waiting; written past the API to save time. */
function copyHolds(id: string, count: number): Copy[] {
  const db = new Database(shop.skyberth.databaseFile, { timeout: 5_000 });
  type Row = Record<string, number | string | null>;
  const booking = db.prepare('SELECT * FROM bookings WHERE id = ?').get(id) as Row;
  const payment = db.prepare('SELECT * FROM payments WHERE booking_id = ?').get(id) as Row;
  const write = (table: string, row: Row) => {
    const columns = Object.keys(row);
    db.prepare(`INSERT INTO ${table} (${columns.join(',')}) VALUES (${columns.map(() => '?').join(',')})`).run(
      ...Object.values(row),
    );
  };
  const last = db.prepare('SELECT max(number) AS number, max(guard_to_ms) AS ms FROM bookings').get() as {
    number: number;
    ms: number;
  };
  const shiftMs = last.ms - Number(booking.aos_ms) + 86_400_000;
  const copies = db.transaction(() =>
    Array.from({ length: count }, (_none, index): Copy => {
      const moved = { ...booking, id: randomUUID(), number: last.number + 1 + index };
      for (const column of ['aos_ms', 'tca_ms', 'los_ms', 'guard_from_ms', 'guard_to_ms']) {
        Object.assign(moved, { [column]: Number(booking[column]) + shiftMs + index * 3_600_000 });
      }
      write('bookings', moved);
      write('payments', {
        ...payment,
        id: randomUUID(),
        booking_id: moved.id,
        intent_id: null,
        checkout_id: null,
        checkout_url: null,
      });
      return { bookingId: moved.id, toPayMinor: Number(booking.to_pay_minor), currency: String(booking.currency) };
    }),
  )();
  db.close();
  return copies;
}

function securedEvent({ bookingId, toPayMinor, currency }: Copy) {
  const object = {
    id: `pi_${bookingId}`,
    object: 'payment_intent',
    status: 'requires_capture',
    amount: toPayMinor,
    amount_capturable: toPayMinor,
    amount_received: 0,
    currency: currency.toLowerCase(),
    metadata: { skyberth_booking: bookingId },
    latest_charge: null,
    last_payment_error: null,
    next_action: null,
  };
  return {
    id: `evt_${bookingId}`,
    object: 'event',
    type: 'payment_intent.amount_capturable_updated',
    data: { object },
  };
}
