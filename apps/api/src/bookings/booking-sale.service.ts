/** From a hold to a sold contact, or to nothing: secured funds, the owner's answer, and time that ran out. */
import { Inject, Injectable } from '@nestjs/common';
import { ClearanceBook } from '../clearances/clearance-book.js';
import { InvoiceService } from '../invoices/invoices.service.js';
import { PaymentOrders } from '../payments/payment-orders.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import type { Db } from '../platform/transaction.js';
import { BookingGroupRepository } from './booking-groups.repository.js';
import { BookingNotices, contactName } from './booking-notices.js';
import { BookingTransitions, BY_CLOCK, BY_PAYMENT, type Mover } from './booking-transitions.js';
import { moneyText, utcText } from './booking-words.js';
import type { BookingRow } from './bookings.repository.js';

@Injectable()
export class BookingSale {
  constructor(
    private readonly transitions: BookingTransitions,
    private readonly notices: BookingNotices,
    private readonly invoices: InvoiceService,
    private readonly orders: PaymentOrders,
    private readonly clearances: ClearanceBook,
    private readonly groups: BookingGroupRepository,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  /**
   * The price of a held booking is reserved. One that was held with others waits until that is so for all of them, and then
   * they are sold in this same transaction: none without the rest.
   */
  fundsSecured(tx: Db, booking: BookingRow): BookingRow {
    const groupId = this.groups.groupIdOf(booking.id, tx);
    if (groupId === null) return this.sell(tx, booking);
    this.groups.secure(tx, booking.id, this.clock.nowMs());
    const members = this.groups.members(groupId, tx);
    const isWhole = members.every((member) => member.isSecured && member.booking.state === 'held');
    if (!isWhole) {
      const sentence = `${moneyText(booking.toPayMinor, booking.currency)} are secured; sold once that is so for the whole group.`;
      this.transitions.note(tx, booking, { kind: 'secured with its group', sentence, mover: BY_PAYMENT });
      return booking;
    }
    if (!members.every((member) => this.clearances.permits(tx, member.booking))) {
      for (const member of members) this.clearanceLost(tx, member.booking);
      return { ...booking, state: 'cancelled' };
    }
    for (const member of members) this.sell(tx, member.booking);
    return { ...booking, state: booking.answerByMs === null ? 'confirmed' : 'awaiting owner' };
  }

  /** Where the owner answers each request (frozen with the hold), ask; else sell. */
  private sell(tx: Db, booking: BookingRow): BookingRow {
    if (!this.clearances.permits(tx, booking)) return this.clearanceLost(tx, booking);
    const secured = `${moneyText(booking.toPayMinor, booking.currency)} are secured`;
    if (booking.answerByMs === null) {
      return this.confirm(tx, booking, {
        cause: 'funds secured',
        mover: BY_PAYMENT,
        sentence: `Confirmed: ${secured}.`,
      });
    }
    const until = utcText(booking.answerByMs);
    const asked = this.transitions.apply(tx, booking.id, {
      cause: 'funds secured, owner asked',
      mover: BY_PAYMENT,
      sentence: `The station is asked; ${secured}. Answer due by ${until}.`,
    });
    const name = contactName(this.notices.names(tx, booking));
    this.notices.toStation(tx, booking, {
      kind: 'asked',
      subject: `Please answer by ${until}: ${name}`,
      sentences: ['An operator asks for this contact. Accept or decline it; without an answer the request lapses.'],
    });
    this.notices.toBuyer(tx, booking, {
      kind: 'asked',
      subject: `The station is asked: ${name}`,
      sentences: [`${secured} and nothing is charged before the contact. The station answers by ${until}.`],
    });
    return asked;
  }

  /** The leave to transmit went between hold and payment: what was reserved goes back. */
  private clearanceLost(tx: Db, booking: BookingRow): BookingRow {
    const sentence = 'No clearance to transmit is in force any more, so the contact was not sold; nothing is charged.';
    const lost = this.transitions.apply(tx, booking.id, { cause: 'pass lost', mover: BY_CLOCK, sentence });
    this.orders.release(tx, booking.id);
    this.notices.toBuyer(tx, booking, {
      kind: 'pass lost',
      subject: `Not booked: ${contactName(this.notices.names(tx, booking))}`,
      sentences: [sentence, 'Ask for a clearance, or book the pass for downlink only.'],
    });
    return lost;
  }

  accept(tx: Db, booking: BookingRow, mover: Mover): BookingRow {
    return this.confirm(tx, booking, { cause: 'owner accepts', mover, sentence: 'The station accepted; confirmed.' });
  }

  decline(tx: Db, booking: BookingRow, decision: { mover: Mover; reason: string }): BookingRow {
    const { mover, reason } = decision;
    const sentence = `The station declined: ${reason}`;
    const declined = this.transitions.apply(tx, booking.id, { cause: 'owner declines', mover, sentence });
    this.orders.release(tx, booking.id);
    this.notices.toBuyer(tx, booking, {
      kind: 'declined',
      subject: `Declined: ${contactName(this.notices.names(tx, booking))}`,
      sentences: [sentence, 'What was reserved is let go; nothing is charged.'],
    });
    return declined;
  }

  /** The buyer gives a hold back. */
  letGo(tx: Db, booking: BookingRow, mover: Mover): BookingRow {
    const released = this.transitions.apply(tx, booking.id, {
      cause: 'let go',
      mover,
      sentence: 'The hold was let go.',
    });
    this.orders.release(tx, booking.id);
    return released;
  }

  /** The time of a hold is over. */
  lapseHold(tx: Db, booking: BookingRow): BookingRow {
    const sentence = 'The hold ran out; nothing is charged.';
    const lapsed = this.transitions.apply(tx, booking.id, { cause: 'hold ran out', mover: BY_CLOCK, sentence });
    this.orders.release(tx, booking.id);
    return lapsed;
  }

  /** The station did not answer in time, or the contact would have begun. */
  answerOverdue(tx: Db, booking: BookingRow): BookingRow {
    const sentence = 'The station did not answer in time; nothing is charged.';
    const lapsed = this.transitions.apply(tx, booking.id, { cause: 'answer overdue', mover: BY_CLOCK, sentence });
    this.orders.release(tx, booking.id);
    const name = contactName(this.notices.names(tx, booking));
    const subject = `No answer in time: ${name}`;
    this.notices.toBuyer(tx, booking, { kind: 'unanswered', subject, sentences: [sentence, 'Look for another pass.'] });
    this.notices.toStation(tx, booking, {
      kind: 'unanswered',
      subject,
      sentences: ['The request has lapsed; the time is free again.'],
    });
    return lapsed;
  }

  /** Money came for a hold that is over: it goes back, and the buyer hears why. */
  tooLate(tx: Db, booking: BookingRow, intentId: string): void {
    this.orders.releaseIntent(tx, intentId);
    const sentence = 'The payment came after the hold had ended. What was reserved is let go; nothing is charged.';
    this.transitions.note(tx, booking, { kind: 'payment too late', sentence, mover: BY_PAYMENT });
    this.notices.toBuyer(tx, booking, {
      kind: `too late:${intentId}`,
      subject: `Not booked, the hold had ended: ${contactName(this.notices.names(tx, booking))}`,
      sentences: [sentence, 'If the pass is still for sale you can hold it again.'],
    });
  }

  private confirm(
    tx: Db,
    booking: BookingRow,
    move: { cause: 'funds secured' | 'owner accepts'; mover: Mover; sentence: string },
  ): BookingRow {
    const confirmed = this.transitions.apply(tx, booking.id, move);
    const names = this.notices.names(tx, booking);
    const name = contactName(names);
    const subject = `${name}, ${utcText(booking.aosMs)} to ${utcText(booking.losMs)}`;
    const invoice = this.invoices.issue(tx, booking, subject);
    this.notices.toBuyer(tx, booking, {
      kind: 'confirmed',
      subject: `Confirmed: ${name}`,
      sentences: [
        'The contact is yours. The price is secured, and charged after the contact: to your card, or on your monthly account.',
      ],
      attachments: [calendarOf(booking)],
    });
    this.notices.toBilling(tx, booking, {
      kind: 'invoice',
      subject: `Invoice ${invoice.number}: ${name}`,
      sentences: [
        'The invoice is attached. Nothing is to be transferred: the card is charged after the contact, or the month’s bill collects it.',
      ],
      attachments: [pdfOf(invoice)],
    });
    this.notices.toStation(tx, booking, {
      kind: 'confirmed',
      subject: `Sold: ${name}`,
      sentences: [
        `${names.operatorName} has bought this contact. Report how it went after LOS; you are paid for reported contacts.`,
      ],
      attachments: [calendarOf(booking)],
    });
    return confirmed;
  }
}

export const CALENDAR_ATTACHMENT = 'contact calendar';

/** The contact as a calendar file; made when the mail is sent, so it holds the times of that moment. */
export const calendarOf = (booking: BookingRow) => ({
  fileName: `berth-${booking.number}.ics`,
  contentType: 'text/calendar; charset=utf-8',
  ref: { kind: CALENDAR_ATTACHMENT, id: booking.id },
});

/** The PDF of an invoice or credit note as an attachment. */
export const pdfOf = (invoice: { id: string; number: string }) => ({
  fileName: `${invoice.number}.pdf`,
  contentType: 'application/pdf',
  ref: { kind: 'invoice', id: invoice.id },
});
