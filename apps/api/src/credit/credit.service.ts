/** Monthly accounts: asking, deciding, and buying within the limit. What is owed is what the ledger says. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { currencyExponent } from '@skyberth/money';
import type { BodyOf, CreditAccount, CreditBill, Principal, routes } from '@skyberth/shared';
import { BookingSale } from '../bookings/booking-sale.service.js';
import { moneyText } from '../bookings/booking-words.js';
import { BookingRepository } from '../bookings/bookings.repository.js';
import { PaymentOrders } from '../payments/payment-orders.js';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError, notFound } from '../platform/domain-error.js';
import { newId } from '../platform/ids.js';
import { type Db, write } from '../platform/transaction.js';
import { type AccountRow, type BillRow, CreditRepository } from './credit.repository.js';
import { CreditNotices } from './credit-notices.js';

const USUAL_TERMS_DAYS = 14;

@Injectable()
export class CreditService {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly repository: CreditRepository,
    private readonly bookings: BookingRepository,
    private readonly sale: BookingSale,
    private readonly orders: PaymentOrders,
    private readonly notices: CreditNotices,
    private readonly audit: AuditService,
  ) {}

  list(operatorId?: string): { items: CreditAccount[] } {
    return { items: this.repository.list(operatorId).map((account) => this.shown(account)) };
  }

  /** An open account stays open at its limit until finance has decided about another one. */
  ask(caller: Principal, wish: BodyOf<typeof routes.askCredit>): CreditAccount {
    const { currency, wishedMinor, note } = wish;
    currencyExponent(currency);
    const id = write(this.db, (tx) => {
      const known = this.repository.of(caller.organisationId, currency, tx);
      const asked = { wishedMinor, note, askedBy: caller.personId, askedMs: this.clock.nowMs() };
      const accountId = known?.id ?? newId();
      if (known) {
        this.repository.update(tx, known.id, { ...asked, state: known.state === 'open' ? 'open' : 'asked' });
      } else {
        this.repository.insert(tx, {
          id: accountId,
          operatorId: caller.organisationId,
          currency,
          state: 'asked',
          limitMinor: 0,
          termsDays: USUAL_TERMS_DAYS,
          decidedBy: null,
          decidedMs: null,
          reason: '',
          ...asked,
        });
      }
      this.audit.record(tx, {
        caller,
        action: 'credit.ask',
        subject: `credit:${accountId}`,
        data: { currency, wishedMinor },
      });
      return accountId;
    });
    return this.one(id);
  }

  /** Throws `not-found`; `bad-input` for an open account without a limit; `wrong-state` for closing what is not open. */
  decide(caller: Principal, id: string, wish: BodyOf<typeof routes.decideCredit>): CreditAccount {
    const { decision, limitMinor, termsDays, reason } = wish;
    write(this.db, (tx) => {
      const account = this.repository.byId(id, tx);
      if (!account) throw notFound('monthly account');
      if (decision === 'open' && limitMinor === 0) {
        throw new DomainError('bad-input', 'An open account needs a limit above nought.', [
          { pointer: '/limitMinor', detail: 'Name the limit.' },
        ]);
      }
      if (decision !== 'open' && (decision === 'close') !== (account.state === 'open')) {
        throw new DomainError('wrong-state', `The account is ${account.state}; it cannot be ${decision}d now.`);
      }
      const state = ({ open: 'open', refuse: 'refused', close: 'closed' } as const)[decision];
      const decided = { decidedBy: caller.personId, decidedMs: this.clock.nowMs(), reason };
      this.repository.update(tx, id, {
        state,
        ...decided,
        ...(decision === 'open' ? { limitMinor, termsDays } : { limitMinor: 0 }),
      });
      const data = { decision, limitMinor, reason };
      this.audit.record(tx, { caller, action: 'credit.decide', subject: `credit:${id}`, data });
      this.notices.decided(tx, { ...account, state, limitMinor, termsDays, reason, decidedMs: decided.decidedMs });
    });
    return this.one(id);
  }

  /**
   * Buys a held berth on account: the credit check stands in for the reserved card. Throws `hold-ended`, `wrong-state` where
   * there is nothing to buy or no open account, `over-limit` where the limit or an overdue bill forbids it.
   */
  buy(caller: Principal, bookingId: string): void {
    write(this.db, (tx) => {
      const booking = this.bookings.forViewer(caller, bookingId, tx);
      if (booking.state === 'lapsed' || (booking.state === 'held' && this.clock.nowMs() >= (booking.holdEndsMs ?? 0))) {
        throw new DomainError('hold-ended', `The hold of berth ${booking.number} has ended. Hold the pass again.`);
      }
      if (this.repository.isPurchase(tx, bookingId)) return;
      if (booking.state !== 'held')
        throw new DomainError('wrong-state', `Berth ${booking.number} is ${booking.state}; there is nothing to buy.`);
      const account = this.repository.of(booking.operatorId, booking.currency, tx);
      if (account?.state !== 'open') {
        throw new DomainError(
          'wrong-state',
          `You have no open monthly account in ${booking.currency}. Pay by card, or ask for one.`,
        );
      }
      this.check(tx, account, booking.toPayMinor);
      // A payment page that was opened before must not be paid as well.
      this.orders.release(tx, bookingId);
      this.repository.addPurchase(tx, {
        bookingId,
        accountId: account.id,
        amountMinor: booking.toPayMinor,
        boughtMs: this.clock.nowMs(),
      });
      this.audit.record(tx, { caller, action: 'credit.buy', subject: `booking:${bookingId}` });
      this.sale.fundsSecured(tx, booking);
    });
  }

  private check(tx: Db, account: AccountRow, amountMinor: number): void {
    if (this.repository.hasOverdue(tx, account.id, this.clock.nowMs())) {
      throw new DomainError('over-limit', 'A monthly bill is overdue. Pay it, or pay this contact by card.');
    }
    const { freeMinor } = this.use(tx, account);
    if (amountMinor <= freeMinor) return;
    const free = moneyText(Math.max(0, freeMinor), account.currency);
    const price = moneyText(amountMinor, account.currency);
    throw new DomainError('over-limit', `${price} are more than the ${free} that your monthly account still bears.`);
  }

  private use(tx: Db, account: AccountRow) {
    const owedMinor = this.repository.owedMinor(tx, account);
    const bookedMinor = this.repository.bookedMinor(tx, account.id);
    return { owedMinor, bookedMinor, freeMinor: account.limitMinor - owedMinor - bookedMinor };
  }

  private one(id: string): CreditAccount {
    const account = this.repository.byId(id);
    if (!account) throw notFound('monthly account');
    return this.shown(account);
  }

  private shown(account: AccountRow): CreditAccount {
    const { askedMs, decidedMs, decidedBy: _decider, askedBy: _asker, ...rest } = account;
    return {
      ...rest,
      operatorName: this.repository.operator(account.operatorId).name,
      askedUtc: new Date(askedMs).toISOString(),
      decidedUtc: decidedMs === null ? null : new Date(decidedMs).toISOString(),
      ...this.use(this.db, account),
      isBlocked: this.repository.hasOverdue(this.db, account.id, this.clock.nowMs()),
      bills: this.repository.bills(account.id).map((bill) => this.shownBill(bill)),
    };
  }

  private shownBill(bill: BillRow): CreditBill {
    const { id, number, month, currency, totalMinor, issuedMs, dueMs, paidMs } = bill;
    const isOverdue = paidMs === null && dueMs < this.clock.nowMs();
    return {
      id,
      number,
      month,
      currency,
      totalMinor,
      issuedUtc: new Date(issuedMs).toISOString(),
      dueUtc: new Date(dueMs).toISOString(),
      paidUtc: paidMs === null ? null : new Date(paidMs).toISOString(),
      state: paidMs !== null ? 'paid' : isOverdue ? 'overdue' : 'open',
      reminders: this.repository.reminders(id),
      lines: this.repository.lines(id).map(({ atMs, ...line }) => ({ ...line, atUtc: new Date(atMs).toISOString() })),
    };
  }
}
