/** The ledger: written with the changes that cause its entries, read by finance, checked against itself. */
import { Inject, Injectable, Logger, type OnModuleInit } from '@nestjs/common';
import { type AccountName, checkLedger, type JournalEntry, type LedgerFault } from '@skyberth/money';
import type { ResponseOf, routes } from '@skyberth/shared';
import { JobsService } from '../jobs/jobs.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import type { Db } from '../platform/transaction.js';
import { LedgerRepository } from './ledger.repository.js';

const DAY_MS = 86_400_000;

@Injectable()
export class LedgerService implements OnModuleInit {
  private readonly log = new Logger('Ledger');

  constructor(
    private readonly repository: LedgerRepository,
    private readonly jobs: JobsService,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  onModuleInit(): void {
    this.jobs.every('ledger self-check', DAY_MS, () => {
      for (const fault of this.selfCheck()) this.log.error(fault.sentence);
    });
  }

  /** Writes an entry in the transaction of its cause. The same cause is written once, however often it is reported. */
  post(tx: Db, entry: JournalEntry, bookingId: string | null): void {
    if (this.repository.has(tx, entry.causeKey)) return;
    this.repository.add(tx, entry, { atMs: this.clock.nowMs(), bookingId });
  }

  /** What the entry of this cause credited to an account; zero where there is none. */
  creditedMinor(tx: Db, causeKey: string, account: AccountName): number {
    const amountMinor = this.repository.amountsOf(tx, causeKey).get(account) ?? 0;
    return amountMinor === 0 ? 0 : -amountMinor;
  }

  /** Everything that does not hold in the journal; empty when it is sound. */
  selfCheck(known: Parameters<typeof checkLedger>[1] = {}): LedgerFault[] {
    return checkLedger(this.repository.all(), known);
  }

  journal(query: { account?: string | undefined; page: number; pageSize: number }): ResponseOf<typeof routes.journal> {
    const { entries, total } = this.repository.page(query);
    const ids = entries.flatMap((entry) => entry.postings.flatMap((posting) => posting.organisationId ?? []));
    const names = this.repository.names([...new Set(ids)]);
    const items = entries.map((entry) => ({
      id: entry.id,
      atUtc: new Date(entry.atMs).toISOString(),
      cause: entry.cause,
      bookingNumber: entry.bookingNumber,
      bookingId: entry.bookingId,
      currency: entry.currency,
      postings: entry.postings.map(({ account, organisationId, amountMinor }) => ({
        account,
        organisationName: organisationId === null ? null : (names.get(organisationId) ?? null),
        amountMinor,
      })),
    }));
    return { items, total, page: query.page, pageSize: query.pageSize };
  }

  balances(): ResponseOf<typeof routes.balances> {
    return { items: this.repository.balances() };
  }
}
