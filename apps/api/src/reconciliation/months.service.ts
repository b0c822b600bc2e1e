/** Closing a month: what must be in order first, and then nothing can be dated inside it any more. Corrections go in the next. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { monthAfter, monthOf, monthSpan } from '@skyberth/money';
import type { Principal, ResponseOf, routes } from '@skyberth/shared';
import { LedgerRepository } from '../ledger/ledger.repository.js';
import { LedgerCheckRepository } from '../ledger/ledger-check.repository.js';
import { trialBalance } from '../ledger/trial-balance.js';
import { ReadingRepository } from '../payments/reading.repository.js';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError } from '../platform/domain-error.js';
import { write } from '../platform/transaction.js';
import { MonthRepository } from './months.repository.js';
import { ReconciliationService } from './reconciliation.service.js';

type MonthView = ResponseOf<typeof routes.closeMonth>;
const READING = 'movements';

@Injectable()
export class MonthService {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly repository: MonthRepository,
    private readonly ledger: LedgerRepository,
    private readonly checks: LedgerCheckRepository,
    private readonly reconciliation: ReconciliationService,
    private readonly readings: ReadingRepository,
    private readonly audit: AuditService,
  ) {}

  /** The month that can be closed next, with its checklist, and the closed ones before it, newest first. */
  list(): ResponseOf<typeof routes.listMonths> {
    const closed = this.repository.closed();
    const open = this.openMonths(closed[0]?.month).map((month, index) => this.openView(month, index === 0));
    return {
      items: [
        ...open.reverse(),
        ...closed.map(
          (row): MonthView => ({
            month: row.month,
            state: 'closed',
            closedUtc: new Date(row.closedMs).toISOString(),
            closedBy: row.personName,
            checklist: [],
            trialBalance: row.trialBalance,
          }),
        ),
      ],
    };
  }

  /** Throws `wrong-state` where it is not the next one, is not over, or its checklist is not in order. */
  close(caller: Principal, month: string): MonthView {
    const view = this.list().items.find((item) => item.month === month);
    if (view?.state !== 'can be closed') {
      const why = view?.checklist.filter((item) => !item.ok).map((item) => item.sentence) ?? [];
      throw new DomainError('wrong-state', [`${month} cannot be closed now.`, ...why].join(' '));
    }
    const { fromMs, toMs } = monthSpan(month);
    write(this.db, (tx) => {
      this.repository.close(tx, {
        month,
        fromMs,
        toMs,
        closedMs: this.clock.nowMs(),
        closedBy: caller.personId,
        trialBalance: view.trialBalance,
      });
      this.audit.record(tx, { caller, action: 'month.close', subject: `month:${month}` });
    });
    const closed = this.list().items.find((item) => item.month === month);
    if (!closed) throw new Error(`The month ${month} was not kept.`);
    return closed;
  }

  /** Every month from the one after the last closed, or the first with entries, to the running one; oldest first. */
  private openMonths(lastClosed: string | undefined): string[] {
    const running = monthOf(this.clock.nowMs());
    const first = lastClosed === undefined ? this.checks.monthsWithEntries()[0] : monthAfter(lastClosed);
    const months: string[] = [];
    for (let month = first ?? running; month <= running; month = monthAfter(month)) months.push(month);
    return months;
  }

  private openView(month: string, isNext: boolean): MonthView {
    const isOver = monthSpan(month).toMs <= this.clock.nowMs();
    const checklist = isOver && isNext ? this.checklist(month) : [];
    const isReady = isNext && checklist.every((item) => item.ok);
    return {
      month,
      state: isOver ? (isReady ? 'can be closed' : 'not ready') : 'running',
      closedUtc: null,
      closedBy: null,
      checklist,
      trialBalance: trialBalance(this.ledger, month),
    };
  }

  private checklist(month: string): MonthView['checklist'] {
    const { toMs } = monthSpan(month);
    const { contacts, payments, orders, chargebacks } = this.repository.unfinished(toMs);
    const reading = this.readings.find(READING);
    const open = this.reconciliation.openBefore(toMs);
    const check = this.checks.lastCheck();
    const faults = check?.faults.length ?? 0;
    const counted = (rows: number, one: string, many: string) => `${rows} ${rows === 1 ? one : many}`;
    return [
      {
        name: 'Contacts',
        ok: contacts === 0,
        sentence: `${counted(contacts, 'contact of the month waits', 'contacts of the month wait')} for a report or a decision.`,
      },
      {
        name: 'Payments',
        ok: payments + orders === 0,
        sentence: `${counted(payments, 'payment is', 'payments are')} on the way, ${counted(orders, 'order', 'orders')} to the provider failed for good.`,
      },
      {
        name: 'Provider read',
        ok: (reading?.readUntilMs ?? 0) >= toMs,
        sentence: `The provider must be read after the month’s end${reading ? '' : '; it never was'}.`,
      },
      {
        name: 'Reconciled',
        ok: open.movements + open.entries === 0,
        sentence: `${counted(open.movements, 'movement', 'movements')} of the provider and ${counted(open.entries, 'entry', 'entries')} have no counterpart.`,
      },
      {
        name: 'Ledger checked',
        ok: (check?.atMs ?? 0) >= toMs && faults === 0,
        sentence: `The check after the month’s end must find nothing; the last one found ${counted(faults, 'fault', 'faults')}.`,
      },
      {
        name: 'Chargebacks',
        ok: true,
        sentence: `${counted(chargebacks, 'chargeback is', 'chargebacks are')} open; what the bank decides is written in the month of its decision.`,
      },
    ];
  }
}
