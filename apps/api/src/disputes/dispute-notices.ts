/** Mails about a dispute, to both sides. */
import { Injectable } from '@nestjs/common';
import { BookingNotices, contactName, type Notice } from '../bookings/booking-notices.js';
import { pdfOf } from '../bookings/booking-sale.service.js';
import { moneyText, utcText } from '../bookings/booking-words.js';
import type { BookingRow } from '../bookings/bookings.repository.js';
import { InvoiceService } from '../invoices/invoices.service.js';
import type { Db } from '../platform/transaction.js';
import type { DisputeRow } from './disputes.repository.js';

@Injectable()
export class DisputeNotices {
  constructor(
    private readonly notices: BookingNotices,
    private readonly invoices: InvoiceService,
  ) {}

  opened(tx: Db, booking: BookingRow, dispute: DisputeRow, text: string): void {
    const subject = `Dispute ${dispute.number} opened: ${this.name(tx, booking)}`;
    const kind = `dispute opened:${dispute.id}`;
    this.notices.toStation(tx, booking, {
      kind,
      subject,
      sentences: [
        `The operator says: ${text}`,
        `Answer by ${utcText(dispute.statementDueMs)}. After that it may be decided on what is there. Your earnings of this contact are set aside meanwhile.`,
      ],
    });
    this.notices.toBuyer(tx, booking, {
      kind,
      subject,
      sentences: [
        `The station was asked to answer by ${utcText(dispute.statementDueMs)}; a decision is due by ${utcText(dispute.decideByMs)}.`,
      ],
    });
  }

  said(
    tx: Db,
    booking: BookingRow,
    what: { dispute: DisputeRow; side: 'operator' | 'owner'; id: string; text: string },
  ): void {
    const { dispute, side, id, text } = what;
    this.toSide(tx, booking, side === 'operator' ? 'owner' : 'operator', {
      kind: `dispute statement:${id}`,
      subject: `Dispute ${dispute.number}: a new statement`,
      sentences: [`${side === 'operator' ? 'The operator' : 'The station'} says: ${text}`],
    });
  }

  asked(
    tx: Db,
    booking: BookingRow,
    what: { dispute: DisputeRow; side: 'operator' | 'owner'; id: string; text: string },
  ): void {
    const { dispute, side, id, text } = what;
    this.toSide(tx, booking, side, {
      kind: `dispute question:${id}`,
      subject: `Dispute ${dispute.number}: you are asked for more`,
      sentences: [`The marketplace asks: ${text}`],
    });
  }

  decided(
    tx: Db,
    booking: BookingRow,
    what: {
      dispute: DisputeRow;
      round: number;
      refundMinor: number;
      text: string;
      appealByMs: number | null;
      creditId: string | null;
    },
  ): void {
    const { dispute, round, refundMinor, text, appealByMs, creditId } = what;
    const result =
      refundMinor > 0
        ? `${moneyText(refundMinor, booking.currency)} go back to the operator.`
        : 'No money goes back to the operator.';
    const appeal =
      appealByMs === null ? 'This decision is final.' : `Either side may appeal once, until ${utcText(appealByMs)}.`;
    const notice = {
      kind: `dispute decided:${dispute.id}:${round}`,
      subject: `Dispute ${dispute.number} decided: ${this.name(tx, booking)}`,
      sentences: [result, `The reasons: ${text}`, appeal],
    };
    this.notices.toBuyer(tx, booking, notice);
    this.notices.toStation(tx, booking, notice);
    if (creditId === null) return;
    const credit = this.invoices.byId(creditId);
    this.notices.toBilling(tx, booking, {
      kind: `credit note:${creditId}`,
      subject: `Credit note ${credit.number}`,
      sentences: [`${moneyText(-credit.grossMinor, credit.currency)} are credited; the credit note is attached.`],
      attachments: [pdfOf(credit)],
    });
  }

  appealed(
    tx: Db,
    booking: BookingRow,
    what: { dispute: DisputeRow; side: 'operator' | 'owner'; text: string; decideByMs: number },
  ): void {
    const { dispute, side, text, decideByMs } = what;
    const notice = {
      kind: `dispute appealed:${dispute.id}`,
      subject: `Dispute ${dispute.number}: appeal`,
      sentences: [
        `${side === 'operator' ? 'The operator' : 'The station'} appeals: ${text}`,
        `Another person decides by ${utcText(decideByMs)}.`,
      ],
    };
    this.notices.toBuyer(tx, booking, notice);
    this.notices.toStation(tx, booking, notice);
  }

  private toSide(tx: Db, booking: BookingRow, side: 'operator' | 'owner', notice: Notice): void {
    if (side === 'operator') this.notices.toBuyer(tx, booking, notice);
    else this.notices.toStation(tx, booking, notice);
  }

  private name(tx: Db, booking: BookingRow): string {
    return contactName(this.notices.names(tx, booking));
  }
}
