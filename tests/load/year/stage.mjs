/** What the play stands on: a clock that is moved, a database in memory, no jobs and nobody outside. */
import { AdjustableClock, readConfig } from '@skyberth/api';
import { WEBHOOK_SECRET } from './provider.mjs';

export const START_MS = Date.UTC(2026, 0, 1);

/** A clock that stands still between the steps of the play. */
export class SteppedClock extends AdjustableClock {
  #nowMs = START_MS;
  nowMs() {
    return this.#nowMs;
  }
  set(timeMs) {
    this.#nowMs = timeMs;
  }
  advance(byMs) {
    this.#nowMs += byMs;
  }
}

/** Statements are compiled once: over a year of bookings, compiling them anew was a third of the time. */
export function keepStatements(client) {
  const known = new Map();
  const prepare = client.prepare.bind(client);
  client.prepare = (sql) => {
    const statement = known.get(sql) ?? prepare(sql);
    known.set(sql, statement);
    // The way rows come out belongs to the use, not to the statement.
    return statement.reader ? statement.raw(false) : statement;
  };
}

export const configOf = () => ({
  ...readConfig({
    PORT: '0',
    SKYBERTH_TOKEN_SECRET: 'a secret for the simulated year, 32 characters',
    PAYMENTS_URL: 'http://127.0.0.1:9',
    STRIPE_SECRET_KEY: 'sk_test_simulated',
    STRIPE_WEBHOOK_SECRET: WEBHOOK_SECRET,
    SMTP_URL: 'smtp://127.0.0.1:9',
    JOBS: 'off',
    PASS_WORKERS: '0',
  }),
  databaseFile: ':memory:',
});
