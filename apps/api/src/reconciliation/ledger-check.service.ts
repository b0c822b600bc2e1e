/** The nightly check: the ledger against itself in parts, and against the balance that the provider says it holds. */
import { Inject, Injectable, Logger, type OnModuleInit } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import type { LedgerFault } from '@skyberth/money';
import type { LedgerCheck, ResponseOf, routes } from '@skyberth/shared';
import { JobsService } from '../jobs/jobs.service.js';
import { LedgerRepository } from '../ledger/ledger.repository.js';
import { LedgerService } from '../ledger/ledger.service.js';
import { LedgerCheckRepository } from '../ledger/ledger-check.repository.js';
import { PROVIDER_BOOKS, type ProviderBooks } from '../payments/provider-books.port.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { write } from '../platform/transaction.js';
import { ReconciliationService } from './reconciliation.service.js';

const DAY_MS = 86_400_000;
const LOOK_EVERY_MS = 600_000;

@Injectable()
export class LedgerCheckService implements OnModuleInit {
  private readonly log = new Logger('Ledger');

  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    @Inject(PROVIDER_BOOKS) private readonly books: ProviderBooks,
    private readonly ledger: LedgerService,
    private readonly repository: LedgerRepository,
    private readonly checks: LedgerCheckRepository,
    private readonly reconciliation: ReconciliationService,
    private readonly jobs: JobsService,
  ) {}

  onModuleInit(): void {
    this.jobs.every('ledger self-check', LOOK_EVERY_MS, async () => {
      const last = this.checks.lastCheck();
      if (!last || dayOf(last.atMs) < dayOf(this.clock.nowMs())) await this.run();
    });
  }

  /** Checks now and keeps what it found. */
  async run(): Promise<LedgerFault[]> {
    const faults: LedgerFault[] = [];
    for (const part of this.ledger.checkByParts()) {
      faults.push(...part);
      await new Promise((resolve) => setImmediate(resolve));
    }
    const provider = await this.againstProvider().catch((error: unknown) => {
      this.log.warn(`The provider could not be asked: ${error instanceof Error ? error.message : String(error)}`);
      return null;
    });
    faults.push(...(provider ?? []));
    for (const fault of faults) this.log.error(fault.sentence);
    const postings = this.repository.sums({}).reduce((sum, one) => sum + one.postings, 0);
    const check = { atMs: this.clock.nowMs(), postings, providerAsked: provider !== null, faults };
    write(this.db, (tx) => this.checks.addCheck(tx, check));
    return faults;
  }

  last(): LedgerCheck {
    const row = this.checks.lastCheck();
    if (!row) return null;
    const { atMs, postings, providerAsked, faults } = row;
    return { atUtc: new Date(atMs).toISOString(), postings, providerAsked, faults };
  }

  lastForSystem(): ResponseOf<typeof routes.systemLedgerCheck> {
    const last = this.last();
    return { atUtc: last?.atUtc ?? null, postings: last?.postings ?? 0, faults: last?.faults.length ?? 0 };
  }

  /** Two things must hold: its movements add up to its balance, and what the ledger lacks of them is listed one by one. */
  private async againstProvider(): Promise<LedgerFault[]> {
    await this.reconciliation.read();
    const balances = await this.books.balances();
    const { currencies, ageing, ledgerOnly } = this.reconciliation.view();
    const faults: LedgerFault[] = [];
    for (const [currency, heldMinor] of balances) {
      const sumMinor = currencies.find((one) => one.currency === currency)?.providerMinor ?? 0;
      if (sumMinor === heldMinor) continue;
      const sentence = `The provider holds ${heldMinor} minor units of ${currency}; its movements, as imported, add up to ${sumMinor}.`;
      faults.push({ kind: 'provider differs', sentence });
    }
    for (const { currency, differenceMinor, explainedMinor } of currencies) {
      if (differenceMinor === explainedMinor) continue;
      const unexplained = differenceMinor - explainedMinor;
      const sentence = `Provider and ledger differ by ${differenceMinor} minor units of ${currency}, of which ${unexplained} have no cause.`;
      faults.push({ kind: 'provider differs', sentence });
    }
    const old = ageing.slice(1).reduce((sum, band) => sum + band.movements, 0);
    const lonely = ledgerOnly.filter((entry) => entry.ageDays >= 1).length;
    if (old + lonely > 0) {
      const sentence = `${old} movements of the provider and ${lonely} entries are unmatched for more than a day.`;
      faults.push({ kind: 'provider differs', sentence });
    }
    return faults;
  }
}

const dayOf = (atMs: number): number => Math.floor(atMs / DAY_MS);
