/** Remembers the first answer to each idempotency key for a day. */
import { Inject, Injectable } from '@nestjs/common';
import { idempotencyKeys, type SkyberthDatabase } from '@skyberth/drizzle';
import { and, eq, lt } from 'drizzle-orm';
import { CLOCK, type ClockPort } from './clock.js';
import { DATABASE } from './database.module.js';
import { DomainError } from './domain-error.js';
import { sha256 } from './ids.js';
import { write } from './transaction.js';

const KEPT_MS = 24 * 3_600_000;
/** A claim without an answer for so long belongs to a process that died; the services below are idempotent themselves. */
const ABANDONED_MS = 60_000;

interface Claim {
  readonly caller: string;
  readonly key: string;
  readonly route: string;
  readonly organisationId: string;
  readonly body: unknown;
}
interface Handle {
  readonly caller: string;
  readonly key: string;
}
export type ClaimResult = { kind: 'first'; handle: Handle } | { kind: 'repeat'; status: number; answer: unknown };

@Injectable()
export class IdempotencyStore {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  /**
   * Takes the key, or returns the first answer. Throws `key-reused` for other input under the same key,
   * `in-progress` while the first request is still being carried out.
   */
  claim(claim: Claim): ClaimResult {
    const inputHash = sha256(JSON.stringify([claim.route, claim.organisationId, claim.body ?? null]));
    const nowMs = this.clock.nowMs();
    const handle = { caller: claim.caller, key: claim.key };
    return write(this.db, (tx) => {
      const mine = and(eq(idempotencyKeys.caller, claim.caller), eq(idempotencyKeys.key, claim.key));
      const earlier = tx.select().from(idempotencyKeys).where(mine).get();
      if (earlier && nowMs - earlier.createdMs < KEPT_MS) {
        if (earlier.inputHash !== inputHash) {
          throw new DomainError(
            'key-reused',
            'This idempotency key was already used for another request. Send a new key with a new wish.',
          );
        }
        if (earlier.status !== null) {
          return {
            kind: 'repeat' as const,
            status: earlier.status,
            answer: JSON.parse(earlier.answer ?? 'null') as unknown,
          };
        }
        if (nowMs - earlier.createdMs < ABANDONED_MS) {
          throw new DomainError('in-progress', 'The same request is still being carried out. Ask again in a moment.');
        }
      }
      if (earlier) tx.delete(idempotencyKeys).where(mine).run();
      tx.insert(idempotencyKeys)
        .values({ ...handle, route: claim.route, inputHash, createdMs: nowMs })
        .run();
      return { kind: 'first' as const, handle };
    });
  }

  finish(handle: Handle, status: number, answer: unknown): void {
    this.db
      .update(idempotencyKeys)
      .set({ status, answer: JSON.stringify(answer ?? null) })
      .where(and(eq(idempotencyKeys.caller, handle.caller), eq(idempotencyKeys.key, handle.key)))
      .run();
  }

  /** A refused request leaves no trace, so that a corrected one may use the same key. */
  release(handle: Handle): void {
    this.db
      .delete(idempotencyKeys)
      .where(and(eq(idempotencyKeys.caller, handle.caller), eq(idempotencyKeys.key, handle.key)))
      .run();
  }

  /** Forgets answers older than a day; called by the job runner. */
  forgetOld(): void {
    this.db
      .delete(idempotencyKeys)
      .where(lt(idempotencyKeys.createdMs, this.clock.nowMs() - KEPT_MS))
      .run();
  }
}
