import type { Desk } from '../core/desk.js';
import { PLATFORM } from '../core/store.js';
import type { Delivery, Outbox } from './outbox.js';
import { signatureHeader } from './signature.js';

/** The longest sleep between two looks; the clock may be pushed forward meanwhile. */
const LONGEST_WAIT_MS = 60_000;

/**
 * Carries deliveries to their endpoints, one after the other. The real service promises no order;
 * here the order is the events' own unless a test asks for another, so that what fails can be repeated.
 */
export class Courier {
  #timer: NodeJS.Timeout | undefined;
  #running: Promise<void> | undefined;
  readonly #stop = new AbortController();

  constructor(
    private readonly desk: Desk,
    private readonly outbox: Outbox,
  ) {}

  /** Starts a round unless one is under way. Called after every change and whenever time was moved. */
  wake(): void {
    if (this.#running || this.#stop.signal.aborted) return;
    clearTimeout(this.#timer);
    this.#running = this.#round().finally(() => {
      this.#running = undefined;
      this.#sleepUntilNext();
    });
  }

  /** Waits until nothing is due any more: what tests do before they look at the receiver. */
  async settled(): Promise<void> {
    this.wake();
    await this.#running;
  }

  async close(): Promise<void> {
    this.#stop.abort();
    clearTimeout(this.#timer);
    await this.#running;
  }

  #sleepUntilNext(): void {
    if (this.#stop.signal.aborted) return;
    const next = this.outbox.next();
    const waitMs = next.due ? 0 : next.waitMs;
    if (waitMs === undefined) return;
    this.#timer = setTimeout(() => this.wake(), Math.min(waitMs, LONGEST_WAIT_MS));
    this.#timer.unref();
  }

  async #round(): Promise<void> {
    // The first step waits, so that the caller's transaction has ended before anything is sent.
    await Promise.resolve();
    while (!this.#stop.signal.aborted) {
      const { due } = this.outbox.next();
      if (!due) return;
      const outcome = await this.#attempt(due);
      if (this.#stop.signal.aborted) return;
      this.outbox.record(due, outcome);
    }
  }

  async #attempt(delivery: Delivery): Promise<{ status: number | null; error: string | null }> {
    const { store, clock, settings } = this.desk;
    const endpoint = store.find('webhook_endpoint', delivery.endpoint_id);
    const event = store.find('event', delivery.event_id, store.accountOf(delivery.event_id) ?? PLATFORM);
    if (endpoint?.status !== 'enabled' || !event)
      return { status: null, error: 'the endpoint is gone or switched off' };
    const body = JSON.stringify({ ...event, pending_webhooks: 1 }, null, 2);
    const secret = String(store.hidden(endpoint.id).secret);
    try {
      const response = await fetch(endpoint.url, {
        method: 'POST',
        body,
        headers: {
          'content-type': 'application/json; charset=utf-8',
          'stripe-signature': signatureHeader(secret, clock.nowS(), body),
          'user-agent': 'Skyberth payment stand-in',
        },
        redirect: 'manual',
        signal: AbortSignal.any([this.#stop.signal, AbortSignal.timeout(settings.deliveryTimeoutMs)]),
      });
      await response.body?.cancel();
      return { status: response.status, error: null };
    } catch (error) {
      return { status: null, error: error instanceof Error ? reasonOf(error) : String(error) };
    }
  }
}

function reasonOf(error: Error): string {
  return error.cause instanceof Error ? `${error.message}: ${error.cause.message}` : error.message;
}
