import { Clock } from './clock.js';
import { missing } from './errors.js';
import { newId } from './ids.js';
import { API_VERSION, type Kind, type Kinds, type StoredEvent } from './kinds.js';
import type { Settings } from './settings.js';
import { PLATFORM, Store } from './store.js';

/** Who caused the change that is being written; events repeat it. */
export interface Cause {
  requestId: string | null;
  idempotencyKey: string | null;
}

/** Told of each new event inside the transaction that wrote it, so that a delivery is never lost or invented. */
export type EventListener = (event: StoredEvent, account: string) => void;

export type Task = 'expire_authorisation' | 'funds_available' | 'payout_arrives' | 'refund_fails' | 'expire_session';

/** Store, clock, settings and events in one hand: what every operation of the service needs. */
export class Desk {
  readonly store: Store;
  readonly clock: Clock;
  cause: Cause = { requestId: null, idempotencyKey: null };
  onEvent: EventListener = () => {};

  constructor(readonly settings: Settings) {
    this.store = new Store(settings.dataDir);
    this.clock = new Clock(this.store, settings.startOffsetMs);
  }

  /** The object, or the API's 404 naming the parameter that pointed at it. */
  get<K extends Kind>(kind: K, id: string, account = PLATFORM, param = 'id'): Kinds[K] {
    const found = this.store.find(kind, id, account);
    if (!found) throw missing(kind.replaceAll('_', ' '), id, param);
    return found;
  }

  insert<K extends Kind>(kind: K, body: Kinds[K], account = PLATFORM, hidden: object = {}): Kinds[K] {
    this.store.insert(kind, body, this.clock.nowS(), account, hidden);
    return body;
  }

  /** Writes an event; its data is what the object is now, whatever becomes of it later. */
  emit(type: string, object: object, account = PLATFORM, previous?: object): void {
    const event: StoredEvent = {
      id: newId('evt'),
      object: 'event',
      ...(account === PLATFORM ? {} : { account }),
      api_version: API_VERSION,
      created: this.clock.nowS(),
      data: { object, ...(previous ? { previous_attributes: previous } : {}) },
      livemode: false,
      pending_webhooks: 0,
      request: { id: this.cause.requestId, idempotency_key: this.cause.idempotencyKey },
      type,
    };
    this.store.insert('event', event, event.created, account);
    this.onEvent(event, account);
  }

  schedule(task: Task, ref: string, dueS: number): void {
    this.store.sql('INSERT INTO timers (due_ms, task, ref) VALUES (?, ?, ?)').run(dueS * 1000, task, ref);
  }

  unschedule(task: Task, ref: string): void {
    this.store.sql('DELETE FROM timers WHERE task = ? AND ref = ?').run(task, ref);
  }
}
