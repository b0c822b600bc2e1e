/** Where a change writes down what must leave the process because of it. */
import { Inject, Injectable } from '@nestjs/common';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { newId } from '../platform/ids.js';
import type { Db } from '../platform/transaction.js';
import { OutboxRepository } from './outbox.repository.js';

export interface OutboxEntry {
  /** Which handler carries it out. */
  readonly kind: string;
  /** The same cause makes the same key; a second entry under it adds nothing. */
  readonly dedupeKey: string;
  /** Plain JSON. */
  readonly payload: unknown;
  readonly notBeforeMs?: number | undefined;
}

@Injectable()
export class OutboxService {
  constructor(
    private readonly rows: OutboxRepository,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  /** Must be called inside the write transaction of the change that causes it. */
  enqueue(tx: Db, entry: OutboxEntry): void {
    const nowMs = this.clock.nowMs();
    this.rows.add(tx, {
      id: newId(),
      kind: entry.kind,
      dedupeKey: entry.dedupeKey,
      payload: JSON.stringify(entry.payload ?? null),
      nextAttemptMs: entry.notBeforeMs ?? nowMs,
      createdMs: nowMs,
    });
  }
}
