/** How a sold contact ends: cancelled, flown and reported, or without its money. */
import { Injectable } from '@nestjs/common';
import type { ContactReport } from '@skyberth/shared';
import { InvoiceService } from '../invoices/invoices.service.js';
import { DomainError } from '../platform/domain-error.js';
import type { Db } from '../platform/transaction.js';
import { BookingMoney } from './booking-money.js';
import { BookingNotices, contactName } from './booking-notices.js';
import { pdfOf } from './booking-sale.service.js';
import { BookingTransitions, BY_CLOCK, BY_PAYMENT, type Mover } from './booking-transitions.js';
import { moneyText, utcText } from './booking-words.js';
import { BookingRepository, type BookingRow, REPORT_REMINDER } from './bookings.repository.js';

export interface Cancellation {
  readonly mover: Mover;
  readonly refundPercent: number;
  readonly reason: string;
}

const SIDES: Readonly<Partial<Record<Mover['actor'], string>>> = { operator: 'the operator', owner: 'the station' };

@Injectable()
export class BookingEnding {
  constructor(
    private readonly repository: BookingRepository,
    private readonly transitions: BookingTransitions,
    private readonly money: BookingMoney,
    private readonly notices: BookingNotices,
    private readonly invoices: InvoiceService,
  ) {}

  /** Before AOS; what was agreed for the time left goes back to the buyer. */
  cancel(tx: Db, booking: BookingRow, { mover, refundPercent, reason }: Cancellation): BookingRow {
    const side = SIDES[mover.actor] ?? 'Skyberth';
    const why = reason ? ` (${reason})` : '';
    const sentence = `Cancelled by ${side}${why}; ${refundPercent} % of the price goes back.`;
    const cancelled = this.transitions.apply(tx, booking.id, {
      cause: 'cancel',
      mover,
      sentence,
      data: { refundPercent },
    });
    const name = contactName(this.notices.names(tx, booking));
    const subject = `Cancelled: ${name}`;
    // Before the owner's answer there is no sale yet, so there is nothing to credit or to keep.
    this.close(tx, cancelled, { refundPercent, reason: `cancelled ${utcText(cancelled.changedMs)}, ${name}` });
    this.notices.toBuyer(tx, booking, { kind: 'cancelled', subject, sentences: [sentence] });
    this.notices.toStation(tx, booking, {
      kind: 'cancelled',
      subject,
      sentences: [sentence, 'The time is free again.'],
    });
    return cancelled;
  }

  /** Nobody's choice: the pass, or the dish, is no longer there. All of the price goes back, and other time is offered. */
  passLost(tx: Db, booking: BookingRow, { sentence, advice }: { sentence: string; advice: string }): BookingRow {
    const cancelled = this.transitions.apply(tx, booking.id, { cause: 'pass lost', mover: BY_CLOCK, sentence });
    const name = contactName(this.notices.names(tx, booking));
    this.close(tx, cancelled, { refundPercent: 100, reason: `pass lost, ${name}` });
    const subject = `Pass lost: ${name}`;
    this.notices.toBuyer(tx, booking, { kind: 'pass lost', subject, sentences: [sentence, advice] });
    this.notices.toStation(tx, booking, {
      kind: 'pass lost',
      subject,
      sentences: [sentence, 'The time is free again.'],
    });
    return cancelled;
  }

  /** The bank let the reservation go before the contact was charged. */
  authorisationRanOut(tx: Db, booking: BookingRow): BookingRow {
    const sentence = 'The reservation on the card ended and could not be renewed; nothing is charged.';
    const lapsed = this.transitions.apply(tx, booking.id, {
      cause: 'authorisation ran out',
      mover: BY_PAYMENT,
      sentence,
    });
    const name = contactName(this.notices.names(tx, booking));
    this.close(tx, lapsed, { refundPercent: 100, reason: `reservation ended, ${name}` });
    const subject = `No longer booked: ${name}`;
    this.notices.toBuyer(tx, booking, {
      kind: 'ran out',
      subject,
      sentences: [sentence, 'Book it again while it is for sale.'],
    });
    this.notices.toStation(tx, booking, { kind: 'ran out', subject, sentences: [sentence, 'The time is free again.'] });
    return lapsed;
  }

  /** The card was refused for a new reservation; the buyer is warned while there is time. */
  renewalRefused(tx: Db, booking: BookingRow, refusal: string): void {
    const sentence = `The price could not be reserved again: ${refusal} Without it the contact lapses when the reservation ends.`;
    this.transitions.note(tx, booking, { kind: 'payment refused', sentence, mover: BY_PAYMENT });
    const subject = `Your card was refused: ${contactName(this.notices.names(tx, booking))}`;
    this.notices.toBuyer(tx, booking, { kind: 'renewal refused', subject, sentences: [sentence] });
  }

  begin(tx: Db, booking: BookingRow): void {
    this.transitions.apply(tx, booking.id, {
      cause: 'contact begins',
      mover: BY_CLOCK,
      sentence: 'AOS: the contact began.',
    });
  }

  end(tx: Db, booking: BookingRow): void {
    const sentence = 'LOS: the contact is over and its report is expected.';
    this.transitions.apply(tx, booking.id, { cause: 'contact ends', mover: BY_CLOCK, sentence });
  }

  /** The station says how it went, and money follows: nothing is charged for what failed, unless the spacecraft was the cause. */
  report(tx: Db, booking: BookingRow, given: { report: ContactReport; mover: Mover }): BookingRow {
    const { report, mover } = given;
    checkReport(report);
    const failed = report.outcome === 'failed';
    const cause = failed ? (booking.state === 'under way' ? 'contact broken off' : 'reported failed') : 'reported good';
    const charged = !failed || report.cause === 'spacecraft';
    const sentence = `${outcomeWords(report)} ${charged ? 'The price is charged.' : 'Nothing is charged.'}`;
    const moved = this.transitions.apply(tx, booking.id, {
      cause,
      mover,
      sentence,
      data: { outcome: report.outcome, cause: report.cause },
    });
    this.repository.setReport(tx, booking.id, report);
    this.closeFlown(tx, moved, { charged, sentence });
    return { ...moved, report };
  }

  /** Reminded and still silent: the contact is taken as flown, and the operator may dispute it. */
  reportOverdue(tx: Db, booking: BookingRow): void {
    const sentence = 'The station did not report in time; the contact is closed by rule and charged.';
    const moved = this.transitions.apply(tx, booking.id, { cause: 'report overdue', mover: BY_CLOCK, sentence });
    this.closeFlown(tx, moved, { charged: true, sentence });
  }

  remindOfReport(tx: Db, booking: BookingRow, dueMs: number): void {
    this.notices.toStation(tx, booking, {
      kind: 'report reminder',
      subject: `Please report: ${contactName(this.notices.names(tx, booking))}`,
      sentences: [`How did the contact go? Without a report by ${utcText(dueMs)} it is closed by rule.`],
    });
    const sentence = 'The station was reminded to report.';
    this.transitions.note(tx, booking, { kind: REPORT_REMINDER, sentence, mover: BY_CLOCK });
  }

  private closeFlown(tx: Db, booking: BookingRow, outcome: { charged: boolean; sentence: string }): void {
    const name = contactName(this.notices.names(tx, booking));
    const refundPercent = outcome.charged ? 0 : 100;
    this.close(tx, booking, { refundPercent, reason: `contact ${booking.state}, ${name}` });
    this.notices.toBuyer(tx, booking, {
      kind: 'reported',
      subject: `${outcome.charged ? 'Flown' : 'Failed'}: ${name}`,
      sentences: [outcome.sentence, 'If that is not how it was, open a dispute within 14 days of LOS.'],
    });
  }

  private close(tx: Db, booking: BookingRow, settlement: { refundPercent: number; reason: string }): void {
    const creditId = this.money.settle(tx, booking, settlement);
    const credit = creditId ? this.invoices.creditOfBooking(tx, booking.id) : undefined;
    if (!credit) return;
    this.notices.toBilling(tx, booking, {
      kind: 'credit note',
      subject: `Credit note ${credit.number}`,
      sentences: [`${moneyText(-credit.grossMinor, credit.currency)} are credited; the credit note is attached.`],
      attachments: [pdfOf(credit)],
    });
  }
}

function outcomeWords(report: ContactReport): string {
  if (report.outcome === 'good') return 'The station reports a good contact.';
  if (report.outcome === 'degraded') return `The station reports a degraded contact, cause: ${report.cause}.`;
  return `The station reports a failed contact, cause: ${report.cause}.`;
}

/** A report that contradicts itself decides about money and is sent back. */
function checkReport(report: ContactReport): void {
  const refuse = (pointer: string, detail: string): never => {
    throw new DomainError('bad-input', detail, [{ pointer, detail }]);
  };
  if (report.outcome === 'failed' && report.cause === 'none') refuse('/cause', 'Name the cause of the failure.');
  if (report.outcome === 'good' && report.cause !== 'none') refuse('/cause', 'A good contact has no cause of failure.');
  const { acquiredUtc, lostUtc } = report;
  if (acquiredUtc && lostUtc && Date.parse(lostUtc) <= Date.parse(acquiredUtc)) {
    refuse('/lostUtc', 'The signal was lost before it was acquired.');
  }
}
