import type Stripe from 'stripe';
import type { Desk } from '../core/desk.js';
import type { StoredEvent } from '../core/kinds.js';
import { PLATFORM } from '../core/store.js';
import type { MischiefMaker } from './mischief.js';

export interface Delivery {
  seq: number;
  event_id: string;
  endpoint_id: string;
  state: 'waiting' | 'held' | 'delivered' | 'failed' | 'dropped';
  position: number;
  attempts: number;
  next_ms: number;
  last_status: number | null;
  last_error: string | null;
}

const ENDPOINTS_MAX = 16;

/** Plans deliveries in the same transaction as the event, so that a crash neither loses nor invents one. */
export class Outbox {
  constructor(
    private readonly desk: Desk,
    private readonly mischief: MischiefMaker,
  ) {}

  enqueue(event: StoredEvent, account: string): void {
    for (const endpoint of this.#listeners(event, account)) {
      const plan = this.mischief.planFor(event.type);
      for (let copy = 0; copy < plan.copies; copy += 1) this.#insert(event.id, endpoint.id, plan.state, plan.delayMs);
      if (plan.releaseReversed) this.release({ reversed: true });
    }
  }

  /** Sends an event again to every endpoint that wants it, whatever became of it before. */
  resend(event: StoredEvent, account: string): number {
    const endpoints = this.#listeners(event, account);
    for (const endpoint of endpoints) this.#insert(event.id, endpoint.id, 'waiting', 0);
    return endpoints.length;
  }

  /** Lets held deliveries go, in their own order or the last one first. */
  release(options: { reversed: boolean }): number {
    const held = this.desk.store.sql("SELECT seq FROM deliveries WHERE state = 'held' ORDER BY seq").all() as {
      seq: number;
    }[];
    const order = options.reversed ? [...held].reverse() : held;
    const last = (
      this.desk.store.sql('SELECT coalesce(max(position), 0) AS last FROM deliveries').get() as { last: number }
    ).last;
    order.forEach(({ seq }, index) => {
      this.desk.store
        .sql("UPDATE deliveries SET state = 'waiting', next_ms = ?, position = ? WHERE seq = ?")
        .run(this.desk.clock.nowMs(), last + 1 + index, seq);
    });
    return held.length;
  }

  /** The next delivery that is due, or when the earliest one will be. */
  next(): { due?: Delivery; waitMs?: number } {
    const nowMs = this.desk.clock.nowMs();
    const due = this.desk.store
      .sql("SELECT * FROM deliveries WHERE state = 'waiting' AND next_ms <= ? ORDER BY position LIMIT 1")
      .get(nowMs) as Delivery | undefined;
    if (due) return { due };
    const row = this.desk.store.sql("SELECT min(next_ms) AS next FROM deliveries WHERE state = 'waiting'").get() as {
      next: number | null;
    };
    return row.next === null ? {} : { waitMs: Math.max(1, row.next - nowMs) };
  }

  /** Writes down how an attempt ended; a failed one is tried again after the next pause of the schedule. */
  record(delivery: Delivery, outcome: { status: number | null; error: string | null }): void {
    const delivered = outcome.status !== null && outcome.status >= 200 && outcome.status < 300;
    const attempts = delivery.attempts + 1;
    const pauseMs = this.desk.settings.retryDelaysMs[attempts - 1];
    const state = delivered ? 'delivered' : pauseMs === undefined ? 'failed' : 'waiting';
    this.desk.store
      .sql('UPDATE deliveries SET state = ?, attempts = ?, next_ms = ?, last_status = ?, last_error = ? WHERE seq = ?')
      .run(state, attempts, this.desk.clock.nowMs() + (pauseMs ?? 0), outcome.status, outcome.error, delivery.seq);
  }

  #insert(eventId: string, endpointId: string, state: Delivery['state'], delayMs: number): void {
    const last = (
      this.desk.store.sql('SELECT coalesce(max(position), 0) AS last FROM deliveries').get() as { last: number }
    ).last;
    this.desk.store
      .sql('INSERT INTO deliveries (event_id, endpoint_id, state, position, next_ms) VALUES (?, ?, ?, ?, ?)')
      .run(eventId, endpointId, state, last + 1, this.desk.clock.nowMs() + delayMs);
  }

  #listeners(event: StoredEvent, account: string): Stripe.WebhookEndpoint[] {
    const endpoints = this.desk.store
      .list('webhook_endpoint', { account: PLATFORM, limit: ENDPOINTS_MAX })
      .items.reverse();
    return endpoints.filter((endpoint) => {
      if (endpoint.status !== 'enabled') return false;
      const wantsConnected = this.desk.store.hidden(endpoint.id).connect === true;
      if (wantsConnected !== (account !== PLATFORM)) return false;
      return endpoint.enabled_events.includes('*') || endpoint.enabled_events.includes(event.type);
    });
  }
}
