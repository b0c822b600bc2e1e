/** The one function that moves a booking: by the shared table, with its diary and the audit trail in the same transaction. */
import { Inject, Injectable } from '@nestjs/common';
import { type BookingActor, type BookingCause, bookingTransition } from '@skyberth/shared';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DomainError } from '../platform/domain-error.js';
import { newId } from '../platform/ids.js';
import { type Db, refusalOf } from '../platform/transaction.js';
import { BookingRepository, type BookingRow, type NewBooking } from './bookings.repository.js';

/** Who or what moves it: a person of one side, the payment provider, or the clock. */
export interface Mover {
  readonly actor: BookingActor;
  readonly person: { readonly personId: string; readonly organisationId: string } | null;
}

export const BY_CLOCK: Mover = { actor: 'clock', person: null };
export const BY_PAYMENT: Mover = { actor: 'payment', person: null };

export interface Move {
  readonly cause: BookingCause;
  readonly mover: Mover;
  /** What the diary of the contact says, for both sides to read. */
  readonly sentence: string;
  readonly data?: Readonly<Record<string, unknown>>;
}

@Injectable()
export class BookingTransitions {
  constructor(
    private readonly repository: BookingRepository,
    private readonly audit: AuditService,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  /**
   * Moves a booking and answers it as it now is. Throws `wrong-state` where the table has no such move from the state that
   * the booking has in this transaction, whatever the caller saw before.
   */
  apply(tx: Db, bookingId: string, move: Move): BookingRow {
    const booking = this.repository.byId(tx, bookingId);
    if (!booking) throw new Error(`There is no booking ${bookingId}.`);
    const transition = bookingTransition(booking.state, move.cause, move.mover.actor);
    if (!transition) {
      throw new DomainError(
        'wrong-state',
        `Berth ${booking.number} is ${booking.state}; “${move.cause}” is not possible now.`,
      );
    }
    const changedMs = this.clock.nowMs();
    this.setState(tx, bookingId, { state: transition.to, changedMs });
    this.record(tx, booking, { ...move, fromState: booking.state, toState: transition.to });
    return { ...booking, state: transition.to, changedMs };
  }

  private setState(tx: Db, bookingId: string, change: { state: BookingRow['state']; changedMs: number }): void {
    try {
      this.repository.setState(tx, bookingId, change);
    } catch (error) {
      throw refusalOf(error)?.includes('not-cleared') ? notCleared() : error;
    }
  }

  /** Creates a held booking. Throws `berth-taken` or `spacecraft-busy` where the database refuses the time. */
  hold(tx: Db, booking: NewBooking & { state: 'held' }, move: Omit<Move, 'cause'>): BookingRow {
    if (!bookingTransition(null, 'hold', move.mover.actor)) throw new Error(`${move.mover.actor} cannot hold.`);
    try {
      this.repository.insert(tx, booking);
    } catch (error) {
      throw holdRefusal(error) ?? error;
    }
    const row = this.repository.byId(tx, booking.id);
    if (!row) throw new Error('The hold was not kept.');
    this.record(tx, row, { ...move, cause: 'hold', fromState: null, toState: 'held' });
    return row;
  }

  /** Something worth the diary that moves nothing, such as a declined card. */
  note(tx: Db, booking: BookingRow, note: { kind: string; sentence: string; mover: Mover }): void {
    this.repository.addEvent(tx, {
      id: newId(),
      bookingId: booking.id,
      atMs: this.clock.nowMs(),
      kind: note.kind,
      fromState: null,
      toState: null,
      sentence: note.sentence,
      actorId: note.mover.person?.personId ?? null,
      actorOrganisationId: note.mover.person?.organisationId ?? null,
    });
  }

  private record(tx: Db, booking: BookingRow, move: Move & { fromState: string | null; toState: string }): void {
    this.repository.addEvent(tx, {
      id: newId(),
      bookingId: booking.id,
      atMs: this.clock.nowMs(),
      kind: move.cause,
      fromState: move.fromState,
      toState: move.toState,
      sentence: move.sentence,
      actorId: move.mover.person?.personId ?? null,
      actorOrganisationId: move.mover.person?.organisationId ?? null,
    });
    this.audit.record(tx, {
      caller: move.mover.person,
      action: `booking.${move.cause}`,
      subject: `booking:${booking.id}`,
      data: { from: move.fromState, to: move.toState, by: move.mover.actor, ...move.data },
    });
  }
}

/** The refusal of the database's own guard in words, or null where the error is another. */
function holdRefusal(error: unknown): DomainError | null {
  const refusal = refusalOf(error);
  if (refusal?.includes('berth-taken')) return berthTaken();
  if (refusal?.includes('spacecraft-busy')) {
    return new DomainError(
      'spacecraft-busy',
      'The spacecraft already has a hold or a contact at that time. Let that one go first, or choose another pass.',
    );
  }
  return null;
}

/** The database lets nothing be sold or begin that transmits without leave. */
export const notCleared = (): DomainError =>
  new DomainError(
    'not-cleared',
    'No clearance in force covers this contact from AOS to LOS, so nothing may be transmitted. Ask for one under Clearances, or book it for downlink only.',
  );

export const berthTaken = (): DomainError =>
  new DomainError('berth-taken', 'Someone else has just taken that time on this antenna. Choose another pass.');
