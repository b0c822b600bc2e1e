/** Bills of monthly accounts: made when a month is over, paid by card on the provider's page, reminded of in three steps. */
import { Inject, Injectable, type OnModuleInit } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { captureEntry, monthAfter, monthOf, monthSpan, sumMinor } from '@skyberth/money';
import type { Principal } from '@skyberth/shared';
import { JobsService } from '../jobs/jobs.service.js';
import { LedgerService } from '../ledger/ledger.service.js';
import { type IntentFacts, PAYMENT_PORT, type PaymentPort } from '../payments/payment.port.js';
import { PaymentOutcomes } from '../payments/payment-outcomes.js';
import { PaymentRepository } from '../payments/payments.repository.js';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { CONFIG, type Config } from '../platform/config.js';
import { DATABASE } from '../platform/database.module.js';
import { notFound } from '../platform/domain-error.js';
import { newId } from '../platform/ids.js';
import { type Db, write } from '../platform/transaction.js';
import { type AccountRow, type BillRow, CreditRepository } from './credit.repository.js';
import { CreditNotices, REMINDER_STEPS } from './credit-notices.js';

const LOOK_EVERY_MS = 3_600_000;
const DAY_MS = 86_400_000;
/** Days past due at which each reminder goes out. */
const REMIND_AFTER_DAYS = [1, 8, 15] as const;

@Injectable()
export class BillService implements OnModuleInit {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    @Inject(CONFIG) private readonly config: Config,
    @Inject(PAYMENT_PORT) private readonly port: PaymentPort,
    private readonly repository: CreditRepository,
    private readonly notices: CreditNotices,
    private readonly ledger: LedgerService,
    private readonly payments: PaymentRepository,
    private readonly outcomes: PaymentOutcomes,
    private readonly audit: AuditService,
    private readonly jobs: JobsService,
  ) {}

  onModuleInit(): void {
    this.outcomes.whenBill((tx, billId, facts) => this.paid(tx, billId, facts));
    this.jobs.every('monthly bills', LOOK_EVERY_MS, () => {
      this.issueDue();
      this.remind();
    });
  }

  /** One bill an account and finished month, of everything delivered before its end that no bill has collected. */
  issueDue(): void {
    const running = monthOf(this.clock.nowMs());
    for (const account of this.repository.list()) {
      if (account.decidedMs === null) continue;
      for (let month = monthOf(account.decidedMs); month < running; month = monthAfter(month)) {
        write(this.db, (tx) => this.issue(tx, account, month));
      }
    }
  }

  /** The next reminder of each overdue bill, once its day has come. */
  remind(): void {
    const nowMs = this.clock.nowMs();
    for (const bill of this.repository.overdueBills(nowMs)) {
      write(this.db, (tx) => {
        const account = this.repository.byId(bill.accountId, tx);
        const step = this.repository.reminders(bill.id, tx) + 1;
        const afterDays = REMIND_AFTER_DAYS[step - 1];
        if (!account || step > REMINDER_STEPS || afterDays === undefined) return;
        if (nowMs < bill.dueMs + afterDays * DAY_MS) return;
        this.repository.addReminder(tx, { billId: bill.id, step, sentMs: nowMs });
        this.notices.remind(tx, account, { bill, step });
        this.audit.record(tx, { caller: null, action: 'credit.remind', subject: `bill:${bill.id}`, data: { step } });
      });
    }
  }

  /** The provider's page for a bill; null where it is paid. Throws `not-found` for another's bill. */
  async pay(caller: Principal, billId: string): Promise<{ url: string | null }> {
    const bill = this.repository.bill(billId);
    const account = bill && this.repository.byId(bill.accountId);
    if (!bill || account?.operatorId !== caller.organisationId) throw notFound('bill');
    if (bill.paidMs !== null) return { url: null };
    if (bill.checkoutId !== null) {
      const page = await this.port.readPage(bill.checkoutId);
      if (page.status === 'complete') return { url: null };
      if (page.status === 'open' && page.url !== null) return { url: page.url };
    }
    const page = await this.port.openBillPage({
      billId,
      customerId: await this.customerOf(account.operatorId),
      amountMinor: bill.totalMinor,
      currency: bill.currency,
      description: `Monthly bill ${bill.number}, ${bill.month}`,
      returnUrl: `${this.config.publicUrl}/monthly-account?paid=1`,
      cancelUrl: `${this.config.publicUrl}/monthly-account`,
      idempotencyKey: `skyberth:bill:${billId}:${bill.checkoutId ?? 'first'}`,
    });
    write(this.db, (tx) => this.repository.updateBill(tx, billId, { checkoutId: page.checkoutId }));
    return { url: page.url };
  }

  private issue(tx: Db, account: AccountRow, month: string): void {
    if (this.repository.hasBillOf(tx, account.id, month)) return;
    const entries = this.repository.unbilled(tx, account, monthSpan(month).toMs);
    const totalMinor = sumMinor(entries.map((entry) => entry.amountMinor));
    // What is nought or in the operator's favour is carried into the next bill.
    if (totalMinor <= 0) return;
    const issuedMs = this.clock.nowMs();
    const series = `SKM-${new Date(issuedMs).getUTCFullYear()}`;
    const seq = this.repository.nextSeq(tx, series);
    const bill: BillRow = {
      id: newId(),
      accountId: account.id,
      series,
      seq,
      number: `${series}-${String(seq).padStart(6, '0')}`,
      month,
      issuedMs,
      dueMs: issuedMs + account.termsDays * DAY_MS,
      currency: account.currency,
      totalMinor,
      checkoutId: null,
      intentId: null,
      paidMs: null,
    };
    this.repository.addBill(tx, bill, entries);
    this.notices.billed(tx, account, bill);
    const data = { number: bill.number, totalMinor };
    this.audit.record(tx, { caller: null, action: 'credit.bill', subject: `bill:${bill.id}`, data });
  }

  /** The provider's word that a bill was paid; repeats change nothing. */
  private paid(tx: Db, billId: string, facts: IntentFacts): string {
    const bill = this.repository.bill(billId, tx);
    const account = bill && this.repository.byId(bill.accountId, tx);
    if (!bill || !account) return 'no bill of ours';
    if (facts.status !== 'captured') return 'not paid yet';
    if (bill.paidMs !== null && bill.intentId === facts.intentId) return 'known';
    const head = {
      causeKey: `capture:${facts.intentId}`,
      cause: `Card payment of monthly bill ${bill.number}`,
      currency: facts.currency,
    };
    const payment = { operatorId: account.operatorId, amountMinor: facts.receivedMinor };
    this.ledger.post(tx, captureEntry(head, payment), null);
    if (bill.paidMs !== null || facts.receivedMinor !== bill.totalMinor || facts.currency !== bill.currency) {
      // The money is the operator's all the same and stands against what it owes; a person of finance must look.
      this.audit.record(tx, {
        caller: null,
        action: 'credit.odd-payment',
        subject: `bill:${billId}`,
        data: { ...facts },
      });
      return 'paid twice or oddly, to be looked at';
    }
    this.repository.updateBill(tx, billId, { paidMs: this.clock.nowMs(), intentId: facts.intentId });
    this.audit.record(tx, { caller: null, action: 'credit.paid', subject: `bill:${billId}` });
    return 'bill paid';
  }

  private async customerOf(organisationId: string): Promise<string> {
    const buyer = this.payments.buyer(organisationId);
    if (buyer.providerCustomerId !== null) return buyer.providerCustomerId;
    const customerId = await this.port.createCustomer({ organisationId, name: buyer.name, email: buyer.billingEmail });
    write(this.db, (tx) => this.payments.setCustomer(tx, organisationId, customerId));
    return customerId;
  }
}
