/** The outbox's rows: claimed with a lease, so that two processes never carry out the same one at once. */
import { Inject, Injectable } from '@nestjs/common';
import { outbox, type SkyberthDatabase } from '@skyberth/drizzle';
import { and, asc, count, desc, eq, isNull, lte, min, or, sql } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';
import { type Db, write } from '../platform/transaction.js';

export type OutboxRow = typeof outbox.$inferSelect;

/** A row that this process may carry out until `claimedUntilMs`, which also names the claim. */
export interface OutboxClaim {
  readonly id: string;
  readonly payload: string;
  readonly attempt: number;
  readonly claimedUntilMs: number;
}

@Injectable()
export class OutboxRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  /** Adds a row unless one with the same dedupe key is there already, done or not. */
  add(tx: Db, row: Pick<OutboxRow, 'id' | 'kind' | 'dedupeKey' | 'payload' | 'nextAttemptMs' | 'createdMs'>): void {
    tx.insert(outbox)
      .values({ ...row, state: 'pending', attempts: 0 })
      .onConflictDoNothing({ target: outbox.dedupeKey })
      .run();
  }

  /** Takes the oldest due row of this kind, or returns null. Looks before it locks: an idle poll writes nothing. */
  claim(kind: string, nowMs: number, leaseMs: number): OutboxClaim | null {
    if (!this.findDue(this.db, kind, nowMs)) return null;
    return write(this.db, (tx) => {
      const row = this.findDue(tx, kind, nowMs);
      if (!row) return null;
      const claimedUntilMs = nowMs + leaseMs;
      const attempt = row.attempts + 1;
      tx.update(outbox).set({ attempts: attempt, claimedUntilMs }).where(eq(outbox.id, row.id)).run();
      return { id: row.id, payload: row.payload, attempt, claimedUntilMs };
    });
  }

  private findDue(db: Db, kind: string, nowMs: number): OutboxRow | undefined {
    return db
      .select()
      .from(outbox)
      .where(
        and(
          eq(outbox.state, 'pending'),
          eq(outbox.kind, kind),
          lte(outbox.nextAttemptMs, nowMs),
          or(isNull(outbox.claimedUntilMs), lte(outbox.claimedUntilMs, nowMs)),
        ),
      )
      .orderBy(asc(outbox.nextAttemptMs), asc(outbox.id))
      .limit(1)
      .get();
  }

  /** Lengthens a claim; returns it, or null where another process holds the row by now. */
  renew(claim: OutboxClaim, claimedUntilMs: number): OutboxClaim | null {
    const changed = this.change(claim, { claimedUntilMs });
    return changed ? { ...claim, claimedUntilMs } : null;
  }

  finish(claim: OutboxClaim, doneMs: number, payload: string): void {
    this.change(claim, { state: 'done', doneMs, payload, claimedUntilMs: null, lastError: null });
  }

  postpone(claim: OutboxClaim, nextAttemptMs: number, lastError: string): void {
    this.change(claim, { nextAttemptMs, lastError, claimedUntilMs: null });
  }

  fail(claim: OutboxClaim, lastError: string): void {
    this.change(claim, { state: 'failed', lastError, claimedUntilMs: null });
  }

  /** Only the holder of the claim may change the row: a claim that ran out has no say any more. */
  private change(claim: OutboxClaim, values: Partial<OutboxRow>): boolean {
    const held = and(eq(outbox.id, claim.id), eq(outbox.claimedUntilMs, claim.claimedUntilMs));
    return this.db.update(outbox).set(values).where(held).run().changes === 1;
  }

  /** For the system page. */
  summary(): { pending: number; failed: number; oldestPendingMs: number | null } {
    const rows = this.db
      .select({ state: outbox.state, rows: count(), oldestMs: min(outbox.createdMs) })
      .from(outbox)
      .where(sql`${outbox.state} <> 'done'`)
      .groupBy(outbox.state)
      .all();
    const pending = rows.find((row) => row.state === 'pending');
    const failed = rows.find((row) => row.state === 'failed');
    return { pending: pending?.rows ?? 0, failed: failed?.rows ?? 0, oldestPendingMs: pending?.oldestMs ?? null };
  }

  recent(limit: number): OutboxRow[] {
    return this.db.select().from(outbox).orderBy(desc(outbox.createdMs), desc(outbox.id)).limit(limit).all();
  }
}
