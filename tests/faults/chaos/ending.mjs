/**
 * The end of a trial: one more server on the same database, whose clock is moved past every hold, lease and pause, so that
 * everything that was left open comes to rest; and the payment service's own books.
 */
import { AdjustableClock, createApp, JobsService, LedgerCheckService, OutboxRunner, readConfig } from '@skyberth/api';
import Database from 'better-sqlite3';
import Stripe from 'stripe';

/** Longer than a hold, and than the lease of an outbox row whose process died. */
const STEP_MS = 11 * 60_000;
const MOST_STEPS = 12;

/** `pointWire` is told where events go from now on. Answers what the application's own check of the ledger found. */
export async function comeToRest({ environment, paymentsUrl, databaseFile, pointWire }) {
  const clock = new AdjustableClock();
  const app = await createApp(readConfig({ ...environment, PORT: '0', JOBS: 'off' }), { clock, quiet: true });
  try {
    await app.listen(0, '127.0.0.1');
    pointWire(`http://127.0.0.1:${app.getHttpServer().address().port}`);
    const [jobs, outbox] = [JobsService, OutboxRunner].map((each) => app.get(each, { strict: false }));
    for (let step = 0; step < MOST_STEPS; step += 1) {
      clock.advance(STEP_MS);
      await hook(paymentsUrl, 'clock', { advanceMs: STEP_MS });
      await jobs.runAll();
      await outbox.drain();
      await hook(paymentsUrl, 'deliveries/settle', {});
      await outbox.drain();
      if (isAtRest(databaseFile)) break;
    }
    return await app.get(LedgerCheckService, { strict: false }).run();
  } finally {
    await app.close();
  }
}

async function hook(url, path, body) {
  const headers = { 'content-type': 'application/json' };
  const answer = await fetch(`${url}/_test/${path}`, { method: 'POST', headers, body: JSON.stringify(body) });
  if (!answer.ok) throw new Error(`The hook ${path} answered ${answer.status}: ${await answer.text()}`);
}

function isAtRest(databaseFile) {
  const db = new Database(databaseFile, { readonly: true });
  const { left } = db
    .prepare(
      `SELECT (SELECT count(*) FROM outbox WHERE state = 'pending') + (SELECT count(*) FROM bookings WHERE state = 'held')
       + (SELECT count(*) FROM provider_events WHERE processed_ms IS NULL) AS left`,
    )
    .get();
  db.close();
  return left === 0;
}

/** Every intent and refund that the payment service knows, through the provider's own SDK. */
export async function booksOf(paymentsUrl, secretKey) {
  const { hostname, port } = new URL(paymentsUrl);
  const stripe = new Stripe(secretKey, { host: hostname, port, protocol: 'http', telemetry: false });
  const [intents, refunds] = [[], []];
  for await (const intent of stripe.paymentIntents.list({ limit: 100 })) {
    const { id, status, amount, amount_received } = intent;
    intents.push({ id, status, amountMinor: amount, receivedMinor: amount_received });
  }
  for await (const { payment_intent, amount } of stripe.refunds.list({ limit: 100 }))
    refunds.push({ intentId: payment_intent, amountMinor: amount });
  return { intents, refunds };
}
