/**
 * Reads a database after the fact and lists everything in it that must not be. It knows the state table and the payment
 * service's own books, and nothing of the application's code, so that a fault there can't hide itself here.
 */
import { BOOKING_TRANSITIONS, OCCUPYING_STATES } from '@skyberth/shared';

const BUSY = OCCUPYING_STATES.map((state) => `'${state}'`).join(',');
const RESERVED = 'requires_capture';
const CHARGED = 'succeeded';
/** What the provider must say of an intent, by what our payment says. */
const PROVIDER_SAYS = {
  authorised: [RESERVED],
  captured: [CHARGED],
  refunded: [CHARGED],
  released: ['canceled'],
};

/**
 * @param db an open better-sqlite3 database
 * @param books `{ intents, refunds }` of the payment service, and `receipts` of the buyers: what each hold command answered
 * @returns each kind of fault with its findings; every list is empty where all is well
 */
export function faultsIn(db, { intents, refunds, receipts }) {
  return {
    ...berthFaults(db),
    ...historyFaults(db),
    ...moneyFaults(db, intents, refunds),
    ...onceFaults(db, receipts),
  };
}

function berthFaults(db) {
  return {
    beamTwice: db
      .prepare(
        `SELECT a.number AS one, b.number AS other FROM bookings a JOIN bookings b ON a.antenna_id = b.antenna_id
         AND a.beam = b.beam AND a.id < b.id AND a.guard_from_ms < b.guard_to_ms AND b.guard_from_ms < a.guard_to_ms
         WHERE a.state IN (${BUSY}) AND b.state IN (${BUSY})`,
      )
      .all(),
    spacecraftTwice: db
      .prepare(
        `SELECT a.number AS one, b.number AS other FROM bookings a JOIN bookings b ON a.spacecraft_id = b.spacecraft_id
         AND a.id < b.id AND a.aos_ms < b.los_ms AND b.aos_ms < a.los_ms
         WHERE a.state IN (${BUSY}) AND b.state IN (${BUSY})`,
      )
      .all(),
    halfGroups: db
      .prepare(
        `SELECT m.group_id FROM booking_group_members m JOIN bookings b ON b.id = m.booking_id GROUP BY m.group_id
         HAVING count(DISTINCT EXISTS (SELECT 1 FROM booking_events e WHERE e.booking_id = b.id
           AND e.kind IN ('funds secured', 'funds secured, owner asked'))) > 1`,
      )
      .all(),
  };
}

/** Each history must be a walk along the state table, from nothing to where the booking stands. */
function historyFaults(db) {
  const lawful = new Set(BOOKING_TRANSITIONS.map((move) => `${move.from ?? ''}|${move.event}|${move.to}`));
  const last = new Map();
  const unlawful = db
    .prepare(
      'SELECT booking_id, kind, from_state, to_state FROM booking_events WHERE to_state IS NOT NULL ORDER BY rowid',
    )
    .all()
    .filter(({ booking_id, kind, from_state, to_state }) => {
      const isNext = (last.get(booking_id) ?? null) === from_state;
      last.set(booking_id, to_state);
      return !isNext || !lawful.has(`${from_state ?? ''}|${kind}|${to_state}`);
    });
  const bookings = db.prepare('SELECT id, number, state FROM bookings').all();
  return { unlawfulMoves: unlawful, unexplainedStates: bookings.filter(({ id, state }) => last.get(id) !== state) };
}

function moneyFaults(db, intents, refunds) {
  const byId = new Map(intents.map((intent) => [intent.id, intent]));
  const backMinor = new Map();
  for (const { intentId, amountMinor } of refunds)
    backMinor.set(intentId, (backMinor.get(intentId) ?? 0) + amountMinor);
  const payments = db
    .prepare(
      `SELECT b.number, b.state AS booking, b.to_pay_minor, p.* FROM payments p JOIN bookings b ON b.id = p.booking_id`,
    )
    .all();
  const owned = new Set(payments.map(({ intent_id }) => intent_id));
  const differs = payments.filter((payment) => {
    const intent = byId.get(payment.intent_id);
    if (!intent) return payment.intent_id !== null || ['authorised', 'captured', 'refunded'].includes(payment.state);
    const said = PROVIDER_SAYS[payment.state];
    return (
      intent.amountMinor !== payment.amount_minor ||
      payment.amount_minor !== payment.to_pay_minor ||
      intent.receivedMinor !== payment.captured_minor ||
      (backMinor.get(intent.id) ?? 0) !== payment.refunded_minor ||
      (said ? !said.includes(intent.status) : [RESERVED, CHARGED].includes(intent.status))
    );
  });
  return {
    paymentsDiffer: differs.map(({ number, state }) => ({ number, state })),
    moneyWithoutBooking: intents.filter(({ id, status }) => [RESERVED, CHARGED].includes(status) && !owned.has(id)),
    paidForNothing: db
      .prepare(
        `SELECT b.number, b.state, p.state AS payment FROM bookings b LEFT JOIN payments p ON p.booking_id = b.id
         WHERE b.state IN ('confirmed', 'awaiting owner') AND (p.state IS NULL OR p.state <> 'authorised')
         OR b.state IN ('lapsed', 'declined') AND p.state NOT IN ('released')
         OR b.state = 'cancelled' AND p.state NOT IN ('released', 'captured', 'refunded')`,
      )
      .all(),
    ...ledgerFaults(db, intents, refunds),
  };
}

function ledgerFaults(db, intents, refunds) {
  const heldMinor =
    intents.reduce((sum, { receivedMinor }) => sum + receivedMinor, 0) -
    refunds.reduce((sum, { amountMinor }) => sum + amountMinor, 0);
  const { bookedMinor } = db
    .prepare(
      `SELECT coalesce(sum(amount_minor), 0) AS bookedMinor FROM journal_postings
       WHERE account IN ('provider clearing', 'provider costs')`,
    )
    .get();
  return {
    unbalancedEntries: db
      .prepare('SELECT entry_id FROM journal_postings GROUP BY entry_id, currency HAVING sum(amount_minor) <> 0')
      .all(),
    unsealedEntries: db.prepare('SELECT cause_key FROM journal_entries WHERE sealed = 0').all(),
    ledgerDiffers: bookedMinor === heldMinor ? [] : [{ bookedMinor, heldMinor }],
  };
}

/** Nothing is lost on the way out or in, and no command had two effects. */
function onceFaults(db, receipts) {
  const bookings = db.prepare('SELECT id, operator_id FROM bookings').all();
  const known = new Set(bookings.map(({ id }) => id));
  const answered = new Set(receipts.flatMap(({ bookingIds }) => bookingIds));
  const offered = new Set(
    db
      .prepare('SELECT booking_id FROM standby_entries WHERE booking_id IS NOT NULL')
      .all()
      .map((row) => row.booking_id),
  );
  // A command that was cut off may have been carried out, once.
  const allowance = new Map();
  for (const { operatorId, mayHaveMade } of receipts)
    allowance.set(operatorId, (allowance.get(operatorId) ?? 0) + mayHaveMade);
  const extra = bookings.filter(({ id, operator_id }) => {
    if (answered.has(id) || offered.has(id)) return false;
    const left = allowance.get(operator_id) ?? 0;
    allowance.set(operator_id, left - 1);
    return left <= 0;
  });
  return {
    bookingsLost: [...answered].filter((id) => !known.has(id)),
    bookingsNobodyAskedFor: extra,
    outboxLeft: db.prepare("SELECT kind, state, attempts, last_error FROM outbox WHERE state <> 'done'").all(),
    eventsLeft: db.prepare('SELECT id, type FROM provider_events WHERE processed_ms IS NULL').all(),
  };
}
