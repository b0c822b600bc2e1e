/**
 * The provider's movements are imported once each, their fees booked, and each is held against the entry that must say the
 * same. What differs is listed with its cause and what can be done about it.
 */
import { Inject, Injectable, Logger, type OnModuleInit } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { credit, debit, journalEntry, suspenseEntry, withdrawalEntry } from '@skyberth/money';
import type { BodyOf, Movement, Principal, QueryOf, ResponseOf, routes } from '@skyberth/shared';
import { JobsService } from '../jobs/jobs.service.js';
import { LedgerService } from '../ledger/ledger.service.js';
import { LedgerCheckRepository } from '../ledger/ledger-check.repository.js';
import { PROVIDER_BOOKS, type ProviderBooks, type ProviderMovement } from '../payments/provider-books.port.js';
import { ReadingRepository } from '../payments/reading.repository.js';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError, notFound } from '../platform/domain-error.js';
import { type Db, write } from '../platform/transaction.js';
import { ageing, causeOf, differenceOf, kindOf } from './matching.js';
import { MissedNews } from './missed-news.js';
import { MovementMatcher } from './movement-matcher.js';
import { readMovementsCsv } from './movements-csv.js';
import { type ListedMovement, type MovementRow, ReconciliationRepository } from './reconciliation.repository.js';

const READ_EVERY_MS = 600_000;
/** Read again each time, since a movement may become visible after a later one. */
const OVERLAP_MS = 3_600_000;
const DAY_MS = 86_400_000;
const READING = 'movements';
/** Younger than this, an entry without a movement is only waiting for the next reading. */
const SETTLING_MS = 1_800_000;

@Injectable()
export class ReconciliationService implements OnModuleInit {
  private readonly log = new Logger('Reconciliation');

  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    @Inject(PROVIDER_BOOKS) private readonly books: ProviderBooks,
    private readonly repository: ReconciliationRepository,
    private readonly readings: ReadingRepository,
    private readonly ledger: LedgerService,
    private readonly months: LedgerCheckRepository,
    private readonly matcher: MovementMatcher,
    private readonly news: MissedNews,
    private readonly audit: AuditService,
    private readonly jobs: JobsService,
  ) {}

  onModuleInit(): void {
    this.jobs.every('provider movements', READ_EVERY_MS, () => this.readWhenDue());
  }

  private async readWhenDue(): Promise<void> {
    const nowMs = this.clock.nowMs();
    const last = this.readings.find(READING);
    if (last && nowMs - last.ranMs < READ_EVERY_MS) return;
    await this.read().catch((error: unknown) => {
      this.log.warn(`movements: ${error instanceof Error ? error.message : String(error)}`);
      const note = 'The provider could not be read the last time.';
      this.readings.save(READING, { readUntilMs: last?.readUntilMs ?? 0, ranMs: nowMs, note });
    });
  }

  /** Imports what the provider did since the last time, and matches. */
  async read(): Promise<{ imported: number; matched: number }> {
    const nowMs = this.clock.nowMs();
    const sinceMs = Math.max(0, (this.readings.find(READING)?.readUntilMs ?? 0) - OVERLAP_MS);
    let imported = 0;
    for await (const page of this.books.movements(sinceMs)) imported += this.import(page, 'provider');
    const matched = this.matcher.match();
    const note = `${imported} new movements, ${matched} matched`;
    this.readings.save(READING, { readUntilMs: nowMs, ranMs: nowMs, note });
    return { imported, matched };
  }

  /** Throws `bad-input` with every line that cannot be read; then nothing is imported. */
  importFile(caller: Principal, text: string): { imported: number; known: number; matched: number } {
    const read = readMovementsCsv(text);
    if (!read.ok) {
      const first = read.errors[0]?.detail ?? '';
      throw new DomainError('bad-input', `The file cannot be imported. ${first}`, read.errors.slice(0, 50));
    }
    const imported = this.import(read.movements, 'file');
    const matched = this.matcher.match();
    const known = read.movements.length - imported;
    write(this.db, (tx) =>
      this.audit.record(tx, {
        caller,
        action: 'reconciliation.import',
        subject: 'provider',
        data: { imported, known },
      }),
    );
    return { imported, known, matched };
  }

  view(): ResponseOf<typeof routes.reconciliation> {
    const nowMs = this.clock.nowMs();
    const reading = this.readings.find(READING);
    const open = this.repository.open();
    const ledgerOnly = this.repository.ledgerOnly(this.openSinceMs());
    const provider = this.repository.netByCurrency();
    const currencies = [...new Set([...provider.keys(), ...ledgerOnly.map((entry) => entry.currency)])].sort();
    const sumOf = (rows: readonly { currency: string; amountMinor: number }[], currency: string) =>
      rows.reduce((sum, row) => sum + (row.currency === currency ? row.amountMinor : 0), 0);
    return {
      readUtc: reading ? new Date(reading.ranMs).toISOString() : null,
      note: reading?.note ?? 'The provider has not been read yet.',
      currencies: currencies.map((currency) => {
        const providerMinor = provider.get(currency) ?? 0;
        const ledgerMinor = this.ledger.balanceMinor('provider clearing', currency);
        return {
          currency,
          providerMinor,
          ledgerMinor,
          differenceMinor: providerMinor - ledgerMinor,
          explainedMinor: sumOf(open, currency) - sumOf(ledgerOnly, currency),
        };
      }),
      ageing: ageing(open.map((row) => (nowMs - row.atMs) / DAY_MS)),
      ledgerOnly: ledgerOnly
        .filter((entry) => entry.atMs <= nowMs - SETTLING_MS)
        .slice(0, 200)
        .map(({ causeKey: _key, atMs, ...entry }) => ({
          ...entry,
          atUtc: new Date(atMs).toISOString(),
          ageDays: Math.floor((nowMs - atMs) / DAY_MS),
        })),
    };
  }

  list(query: QueryOf<typeof routes.listMovements>): ResponseOf<typeof routes.listMovements> {
    const { rows, total } = this.repository.page(query);
    return { items: rows.map((row) => this.shown(row)), total, page: query.page, pageSize: query.pageSize };
  }

  /** Throws `wrong-state` where the movement needs nothing or not this, and `not-found`. */
  async resolve(caller: Principal, id: string, wish: BodyOf<typeof routes.resolveMovement>): Promise<Movement> {
    const before = this.repository.listed(id);
    if (!before) throw notFound('movement');
    if (!this.shown(before).actions.includes(wish.action)) {
      throw new DomainError(
        'wrong-state',
        `The movement ${id} is ${before.state}; “${wish.action}” does not help here.`,
      );
    }
    if (wish.action === 'fetch') await this.news.fetch(before);
    write(this.db, (tx) => {
      if (wish.action !== 'fetch') this.book(tx, before, wish);
      const data = { action: wish.action, reason: wish.reason };
      this.audit.record(tx, { caller, action: 'reconciliation.resolve', subject: `movement:${id}`, data });
    });
    this.matcher.match();
    const after = this.repository.listed(id);
    if (!after) throw notFound('movement');
    return this.shown(after);
  }

  /** What differs and is dated before `beforeMs`: movements without an entry, and entries without a movement. */
  openBefore(beforeMs: number): { movements: number; entries: number } {
    return {
      movements: this.repository.open(beforeMs).length,
      entries: this.repository.ledgerOnly(this.openSinceMs(), beforeMs).length,
    };
  }

  /** Nothing before the end of the last closed month can be open: the month would not have closed. */
  private openSinceMs(): number {
    return this.months.closedMonths()[0]?.toMs ?? 0;
  }

  private import(movements: readonly ProviderMovement[], importedFrom: MovementRow['importedFrom']): number {
    const nowMs = this.clock.nowMs();
    return write(this.db, (tx) => {
      const fresh = movements.filter((movement) =>
        this.repository.add(tx, {
          ...movement,
          importedMs: nowMs,
          importedFrom,
          state: 'open',
          entryCause: null,
          changedMs: nowMs,
        }),
      );
      for (const movement of fresh) this.bookFee(tx, movement);
      return fresh.length;
    });
  }

  /** The provider keeps its fee out of what it moved; a fee that stands alone is a movement of its own. */
  private bookFee(tx: Db, movement: ProviderMovement): void {
    const alone = kindOf(movement) === 'fee';
    const feeMinor = alone ? movement.feeMinor - movement.amountMinor : movement.feeMinor;
    if (feeMinor === 0) return;
    const head = {
      causeKey: `provider-fee:${movement.id}`,
      cause: `Fee of the payment provider on ${movement.sourceId ?? movement.id}`,
      currency: movement.currency,
    };
    const postings = [debit('provider costs', feeMinor), credit('provider clearing', feeMinor)];
    const bookingId = movement.intentId === null ? null : this.repository.bookingOfIntent(tx, movement.intentId);
    this.ledger.post(tx, journalEntry(head, postings), bookingId);
  }

  private book(tx: Db, movement: MovementRow, wish: BodyOf<typeof routes.resolveMovement>): void {
    const { id, currency, amountMinor } = movement;
    const changedMs = this.clock.nowMs();
    if (wish.action === 'withdrawal') {
      const head = { causeKey: `withdrawal:${id}`, cause: `Moved to our bank: ${wish.reason}`, currency };
      this.ledger.post(tx, withdrawalEntry(head, { amountMinor: -amountMinor }), null);
      this.repository.update(tx, id, { state: 'matched', entryCause: head.causeKey, changedMs });
      return;
    }
    const other = this.sameCause(tx, movement);
    const head = { causeKey: `suspense:${id}`, cause: `Movement ${id} in suspense: ${wish.reason}`, currency };
    const differenceMinor = amountMinor - (other?.amountMinor ?? 0);
    if (differenceMinor !== 0) this.ledger.post(tx, suspenseEntry(head, { amountMinor: differenceMinor }), null);
    const entryCause = other?.causeKey ?? head.causeKey;
    this.repository.update(tx, id, { state: 'in suspense', entryCause, changedMs });
  }

  private sameCause(tx: Db, movement: MovementRow) {
    const cause = causeOf(kindOf(movement), movement);
    return cause === null ? undefined : this.repository.freeEntry(tx, cause);
  }

  private shown(row: ListedMovement): Movement {
    const {
      atMs,
      availableMs: _available,
      importedMs: _imported,
      changedMs: _changed,
      category: _category,
      ...rest
    } = row;
    const { intentId, ...movement } = rest;
    const difference =
      row.state === 'open'
        ? differenceOf(kindOf(row), {
            isOurs: intentId !== null && this.repository.bookingOfIntent(this.db, intentId) !== null,
            ledgerMinor: this.sameCause(this.db, row)?.amountMinor ?? null,
            amountMinor: row.amountMinor,
          })
        : null;
    return {
      ...movement,
      atUtc: new Date(atMs).toISOString(),
      why: difference?.why ?? (row.state === 'in suspense' ? 'Nobody could explain it yet.' : null),
      actions: [...(difference?.actions ?? [])],
      ageDays: Math.max(0, Math.floor((this.clock.nowMs() - atMs) / DAY_MS)),
    };
  }
}
