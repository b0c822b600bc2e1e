/**
 * Carries out what the outbox holds: at least once, in order within a kind, kinds beside each other so that a mail
 * server that does not answer delays no payment. A handler must therefore be idempotent; its `id` is the same each time.
 */
import { Inject, Injectable, Logger, type OnModuleInit } from '@nestjs/common';
import { JobsService } from '../jobs/jobs.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { MOST_ATTEMPTS, waitAfterMs } from './back-off.js';
import { type OutboxClaim, OutboxRepository } from './outbox.repository.js';
import { PermanentFailure } from './permanent-failure.js';

/** A process that died holds its row for so long; a living one renews its claim well before. */
const LEASE_MS = 60_000;
const RENEW_EVERY_MS = 20_000;
const POLL_MS = 500;
/** Enough to recognise an error by, not so much that a page of HTML fills the table. */
const ERROR_LENGTH = 500;

export interface OutboxContext {
  readonly id: string;
  /** From 1. */
  readonly attempt: number;
}
export type OutboxHandler = (payload: unknown, context: OutboxContext) => Promise<void>;

export interface HandlerOptions {
  /** What to keep of the payload once it is done, where it held something secret. */
  readonly keepWhenDone?: (payload: unknown) => unknown;
}

interface Registered extends HandlerOptions {
  readonly handle: OutboxHandler;
}

@Injectable()
export class OutboxRunner implements OnModuleInit {
  private readonly log = new Logger('Outbox');
  private readonly handlers = new Map<string, Registered>();

  constructor(
    private readonly rows: OutboxRepository,
    private readonly jobs: JobsService,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  onModuleInit(): void {
    this.jobs.every('outbox', POLL_MS, () => this.drain());
  }

  /** Says who carries out a kind; called once a kind, when modules start. */
  register(kind: string, handle: OutboxHandler, options: HandlerOptions = {}): void {
    if (this.handlers.has(kind)) throw new Error(`Two handlers for the outbox kind ${kind}.`);
    this.handlers.set(kind, { handle, ...options });
  }

  /** Carries out everything that is due, also what that makes due, until nothing is. */
  async drain(): Promise<void> {
    for (;;) {
      const done = await Promise.all([...this.handlers].map(([kind, handler]) => this.drainKind(kind, handler)));
      if (done.every((rows) => rows === 0)) return;
    }
  }

  private async drainKind(kind: string, handler: Registered): Promise<number> {
    let rows = 0;
    for (;;) {
      const claim = this.rows.claim(kind, this.clock.nowMs(), LEASE_MS);
      if (!claim) return rows;
      await this.carryOut(kind, handler, claim);
      rows += 1;
    }
  }

  private async carryOut(kind: string, handler: Registered, claim: OutboxClaim): Promise<void> {
    let held: OutboxClaim = claim;
    const renewing = setInterval(() => {
      held = this.rows.renew(held, this.clock.nowMs() + LEASE_MS) ?? held;
    }, RENEW_EVERY_MS);
    renewing.unref();
    const payload: unknown = JSON.parse(claim.payload);
    try {
      await handler.handle(payload, { id: claim.id, attempt: claim.attempt });
      const kept = handler.keepWhenDone ? JSON.stringify(handler.keepWhenDone(payload)) : claim.payload;
      this.rows.finish(held, this.clock.nowMs(), kept);
    } catch (error) {
      this.putBack(kind, held, error);
    } finally {
      clearInterval(renewing);
    }
  }

  private putBack(kind: string, claim: OutboxClaim, error: unknown): void {
    const reason = (error instanceof Error ? error.message : String(error)).slice(0, ERROR_LENGTH);
    if (error instanceof PermanentFailure || claim.attempt >= MOST_ATTEMPTS) {
      this.log.error(`${kind} ${claim.id} failed for good after attempt ${claim.attempt}: ${reason}`);
      this.rows.fail(claim, reason);
      return;
    }
    this.log.warn(`${kind} ${claim.id} attempt ${claim.attempt}: ${reason}`);
    this.rows.postpone(claim, this.clock.nowMs() + waitAfterMs(claim.attempt), reason);
  }
}
