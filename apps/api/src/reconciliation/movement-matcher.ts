/** Finds the journal entry that says the same as a movement of the provider. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { reverseEntry, suspenseEntry } from '@skyberth/money';
import { LedgerService } from '../ledger/ledger.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { type Db, write } from '../platform/transaction.js';
import { causeOf, kindOf } from './matching.js';
import { type MovementRow, ReconciliationRepository } from './reconciliation.repository.js';

const MATCH_LIMIT = 5_000;

@Injectable()
export class MovementMatcher {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly repository: ReconciliationRepository,
    private readonly ledger: LedgerService,
  ) {}

  /** Finds the entries of movements that have none yet; answers how many it found. */
  match(): number {
    let matched = 0;
    for (const movement of this.repository.unmatched(MATCH_LIMIT)) {
      if (write(this.db, (tx) => this.matchOne(tx, movement))) matched += 1;
    }
    return matched;
  }

  private matchOne(tx: Db, movement: MovementRow): boolean {
    const kind = kindOf(movement);
    if (kind === 'refund') return this.matchRefunds(tx, movement);
    const cause = causeOf(kind, movement);
    const found = cause === null ? undefined : this.repository.freeEntry(tx, cause);
    const expectedMinor = kind === 'fee' ? movement.netMinor : movement.amountMinor;
    if (!found || found.amountMinor !== expectedMinor || found.currency !== movement.currency) return false;
    this.settle(tx, movement, found.causeKey);
    return true;
  }

  /**
   * A refund has the entry of its amount. Where news came in the wrong order one entry stands for several refunds, which the
   * provider counts one by one: then all that is open of the payment must add up on both sides.
   */
  private matchRefunds(tx: Db, movement: MovementRow): boolean {
    const now = this.repository.byId(movement.id, tx);
    if (movement.intentId === null || now?.state === 'matched') return false;
    const entries = this.repository.freeEntriesOfIntent(tx, movement.intentId, 'returned:');
    const exact = entries.find((entry) => entry.amountMinor === movement.amountMinor);
    if (exact) {
      this.settle(tx, movement, exact.causeKey);
      return true;
    }
    const refunds = this.repository.openRefunds(tx, movement.intentId);
    const sumOf = (rows: readonly { amountMinor: number }[]) => rows.reduce((sum, row) => sum + row.amountMinor, 0);
    if (entries.length === 0 || entries.length > refunds.length || sumOf(refunds) !== sumOf(entries)) return false;
    const causes = entries.map((entry) => entry.causeKey);
    // An entry stands for one movement in the database; the others name the last entry and themselves.
    refunds.forEach((refund, index) => {
      this.settle(tx, refund, causes[index] ?? `${causes.at(-1)}+${refund.id}`);
    });
    return true;
  }

  private settle(tx: Db, movement: MovementRow, entryCause: string): void {
    if (movement.state === 'in suspense') this.clearSuspense(tx, movement);
    this.repository.update(tx, movement.id, { state: 'matched', entryCause, changedMs: this.clock.nowMs() });
  }

  /** The explanation came after all: what stood in suspense is taken back. */
  private clearSuspense(tx: Db, movement: MovementRow): void {
    const { id, amountMinor, currency } = movement;
    const cause = `Movement ${id} in suspense`;
    const entry = suspenseEntry({ causeKey: `suspense:${id}`, cause, currency }, { amountMinor });
    const head = { causeKey: `suspense-cleared:${id}`, cause: `${cause}, explained` };
    this.ledger.post(tx, reverseEntry(entry, head), null);
  }
}
