/** Changes the times of a booked contact: with its history, its diary, the audit trail and word to both sides. */
import { Inject, Injectable } from '@nestjs/common';
import { BookingNotices, contactName } from '../bookings/booking-notices.js';
import { calendarOf } from '../bookings/booking-sale.service.js';
import { BookingTransitions, BY_CLOCK, type Mover } from '../bookings/booking-transitions.js';
import { utcText } from '../bookings/booking-words.js';
import type { BookingRow } from '../bookings/bookings.repository.js';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import type { Db } from '../platform/transaction.js';
import { DriftRepository } from './drift.repository.js';
import type { Carried } from './drift-geometry.js';
import { shiftWords } from './shift-words.js';

export interface Retiming {
  readonly to: Carried;
  readonly elementSetId: string;
  /** Null where the shift is inside the guard. */
  readonly acceptedBy: { readonly personId: string; readonly organisationId: string } | null;
}

@Injectable()
export class RetimingService {
  constructor(
    private readonly repository: DriftRepository,
    private readonly transitions: BookingTransitions,
    private readonly notices: BookingNotices,
    private readonly audit: AuditService,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  /** Set-up and teardown stay as long as they were. Throws what the database refuses: `berth-taken`, `spacecraft-busy`. */
  apply(tx: Db, booking: BookingRow, { to, elementSetId, acceptedBy }: Retiming): BookingRow {
    const changedMs = this.clock.nowMs();
    const times = {
      aosMs: to.aosMs,
      tcaMs: to.tcaMs,
      losMs: to.losMs,
      guardFromMs: to.aosMs - (booking.aosMs - booking.guardFromMs),
      guardToMs: to.losMs + (booking.guardToMs - booking.losMs),
      pass: to.pass,
      elementSetId,
    };
    const seq = this.repository.addRetime(tx, {
      bookingId: booking.id,
      atMs: changedMs,
      cause: acceptedBy ? 'accepted' : 'inside the guard',
      fromElementSetId: booking.elementSetId,
      toElementSetId: elementSetId,
      fromAosMs: booking.aosMs,
      fromLosMs: booking.losMs,
      toAosMs: times.aosMs,
      toTcaMs: times.tcaMs,
      toLosMs: times.losMs,
      toGuardFromMs: times.guardFromMs,
      toGuardToMs: times.guardToMs,
      fromPass: booking.pass,
      toPass: times.pass,
      acceptedBy: acceptedBy?.personId ?? null,
    });
    this.repository.setTimes(tx, booking.id, { ...times, changedMs });
    const moved = { ...booking, ...times, changedMs };
    const mover: Mover = acceptedBy ? { actor: 'operator', person: acceptedBy } : BY_CLOCK;
    const shift = shiftWords({ aosMs: to.aosMs - booking.aosMs, losMs: to.losMs - booking.losMs });
    const sentence = acceptedBy
      ? `The operator accepted the new times: ${shift}. The price stays.`
      : `Re-timed by newer elements: ${shift}. The price stays.`;
    this.transitions.note(tx, moved, { kind: 're-timed', sentence, mover });
    this.audit.record(tx, {
      caller: acceptedBy,
      action: 'booking.re-time',
      subject: `booking:${booking.id}`,
      data: { seq, fromAosMs: booking.aosMs, toAosMs: to.aosMs, fromLosMs: booking.losMs, toLosMs: to.losMs },
    });
    this.tell(tx, moved, { seq, sentence });
    return moved;
  }

  private tell(tx: Db, booking: BookingRow, { seq, sentence }: { seq: number; sentence: string }): void {
    const notice = {
      kind: `re-timed ${seq}`,
      subject: `New times: ${contactName(this.notices.names(tx, booking))}`,
      sentences: [
        sentence,
        `AOS is now ${utcText(booking.aosMs)}, LOS ${utcText(booking.losMs)}. The calendar file replaces the one before; load pointing and frequency tables anew.`,
      ],
      attachments: [calendarOf(booking)],
    };
    this.notices.toBuyer(tx, booking, notice);
    this.notices.toStation(tx, booking, notice);
  }
}
