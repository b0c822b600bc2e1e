/** What the operator sees and answers about a contact that newer elements moved. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import type { Booking, Drift, Principal } from '@skyberth/shared';
import { BookingEnding } from '../bookings/booking-ending.service.js';
import { berthTaken } from '../bookings/booking-transitions.js';
import { BookingViews } from '../bookings/booking-views.js';
import { BookingRepository, type BookingRow } from '../bookings/bookings.repository.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError } from '../platform/domain-error.js';
import { type Db, refusalOf, write } from '../platform/transaction.js';
import { DriftRepository, type QuestionRow, WATCHED } from './drift.repository.js';
import { guardMs } from './drift-watch.js';
import { RetimingService } from './retiming.js';
import { shiftWords } from './shift-words.js';

const utc = (timeMs: number): string => new Date(timeMs).toISOString();

@Injectable()
export class DriftService {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly repository: DriftRepository,
    private readonly bookings: BookingRepository,
    private readonly retiming: RetimingService,
    private readonly ending: BookingEnding,
    private readonly views: BookingViews,
  ) {}

  /** Throws `not-found` for a booking of others. */
  of(caller: Principal, bookingId: string): Drift {
    const booking = this.bookings.forViewer(caller, bookingId);
    const check = this.repository.check(bookingId);
    const question = this.repository.openQuestion(this.db, bookingId);
    return {
      checkedUtc: check ? utc(check.checkedMs) : null,
      aosShiftS: seconds(check?.aosShiftMs),
      losShiftS: seconds(check?.losShiftMs),
      guardS: guardMs(booking) / 1000,
      retimes: this.repository.retimes(bookingId).map((retime) => ({
        atUtc: utc(retime.atMs),
        cause: retime.cause,
        from: { aosUtc: utc(retime.fromAosMs), losUtc: utc(retime.fromLosMs) },
        to: { aosUtc: utc(retime.toAosMs), losUtc: utc(retime.toLosMs) },
        aosShiftS: (retime.toAosMs - retime.fromAosMs) / 1000,
        losShiftS: (retime.toLosMs - retime.fromLosMs) / 1000,
        fromEpochUtc: retime.fromEpochUtc,
        toEpochUtc: retime.toEpochUtc,
      })),
      question: question && WATCHED.includes(booking.state) ? questionView(booking, question) : null,
    };
  }

  /** Throws `changed-meanwhile` where another question is open, and what the database refuses. */
  accept(caller: Principal, bookingId: string, questionId: string): Booking {
    return this.answer(caller, bookingId, { questionId, state: 'accepted' }, (tx, booking, question) => {
      const { toAosMs, toTcaMs, toLosMs, toPass, elementSetId } = question;
      if (toAosMs <= this.clock.nowMs())
        throw new DomainError('wrong-state', 'The new AOS is past; cancel this contact and book another pass.');
      const to = { aosMs: toAosMs, tcaMs: toTcaMs, losMs: toLosMs, pass: toPass };
      try {
        return this.retiming.apply(tx, booking, { to, elementSetId, acceptedBy: caller });
      } catch (error) {
        throw timeRefusal(error) ?? error;
      }
    });
  }

  /** The time that was sold is no longer there, so all of the price goes back, whatever the steps of the refund say. */
  refuse(caller: Principal, bookingId: string, questionId: string): Booking {
    return this.answer(caller, bookingId, { questionId, state: 'cancelled' }, (tx, booking, question) =>
      this.ending.cancel(tx, booking, {
        mover: { actor: 'operator', person: caller },
        refundPercent: 100,
        reason: `newer elements moved the pass: ${shiftWords({
          aosMs: question.toAosMs - booking.aosMs,
          losMs: question.toLosMs - booking.losMs,
        })}`,
      }),
    );
  }

  private answer(
    caller: Principal,
    bookingId: string,
    { questionId, state }: { questionId: string; state: 'accepted' | 'cancelled' },
    act: (tx: Db, booking: BookingRow, question: QuestionRow) => BookingRow,
  ): Booking {
    const changed = write(this.db, (tx) => {
      const booking = this.bookings.forViewer(caller, bookingId, tx);
      const question = this.repository.openQuestion(tx, bookingId);
      if (!question || !WATCHED.includes(booking.state))
        throw new DomainError('wrong-state', `Nothing is asked about berth ${booking.number} now.`);
      if (question.id !== questionId)
        throw new DomainError('changed-meanwhile', 'Newer elements have come meanwhile. Look at the new times first.');
      const answeredMs = this.clock.nowMs();
      this.repository.answer(tx, question.id, { state, answeredMs, answeredBy: caller.personId });
      return act(tx, booking, question);
    });
    return this.views.full(caller, changed);
  }
}

const seconds = (shiftMs: number | null | undefined): number | null =>
  shiftMs === null || shiftMs === undefined ? null : shiftMs / 1000;

function questionView(booking: BookingRow, question: QuestionRow): NonNullable<Drift['question']> {
  return {
    id: question.id,
    askedUtc: utc(question.askedMs),
    sentence: question.sentence,
    from: { aosUtc: utc(booking.aosMs), losUtc: utc(booking.losMs) },
    to: { aosUtc: utc(question.toAosMs), losUtc: utc(question.toLosMs) },
    aosShiftS: (question.toAosMs - booking.aosMs) / 1000,
    losShiftS: (question.toLosMs - booking.losMs) / 1000,
  };
}

function timeRefusal(error: unknown): DomainError | null {
  const refusal = refusalOf(error);
  if (refusal?.includes('berth-taken')) return berthTaken();
  if (refusal?.includes('spacecraft-busy'))
    return new DomainError(
      'spacecraft-busy',
      'The spacecraft has another contact at the new time. Let one of them go.',
    );
  return null;
}
