/** The one function that moves a clearance: by the shared table, with history and audit in the same transaction. */
import { Inject, Injectable } from '@nestjs/common';
import { type ClearanceAct, type ClearanceActor, clearanceMove, type Principal } from '@skyberth/shared';
import { BookingEnding } from '../bookings/booking-ending.service.js';
import { BookingNotices, contactName } from '../bookings/booking-notices.js';
import { BookingTransitions, BY_CLOCK } from '../bookings/booking-transitions.js';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DomainError } from '../platform/domain-error.js';
import { newId } from '../platform/ids.js';
import type { Db } from '../platform/transaction.js';
import { ClearanceBook } from './clearance-book.js';
import { ClearanceNotices } from './clearance-notices.js';
import { ClearancesRepository, type NamedClearance } from './clearances.repository.js';

export interface ClearanceStep {
  readonly act: Exclude<ClearanceAct, 'request'>;
  readonly actor: ClearanceActor;
  readonly caller: Principal | null;
  /** What the history says, for both sides to read. */
  readonly sentence: string;
  readonly conditions?: string;
}

@Injectable()
export class ClearanceTransitions {
  constructor(
    private readonly repository: ClearancesRepository,
    private readonly book: ClearanceBook,
    private readonly notices: ClearanceNotices,
    private readonly audit: AuditService,
    private readonly bookingEnding: BookingEnding,
    private readonly bookingNotices: BookingNotices,
    private readonly bookings: BookingTransitions,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  /** Throws `wrong-state` where the table has no such move. What can no longer be transmitted is cancelled at once. */
  apply(tx: Db, clearance: NamedClearance, step: ClearanceStep): void {
    const move = clearanceMove(clearance.state, step.act, step.actor);
    if (!move) {
      throw new DomainError(
        'wrong-state',
        `Clearance ${clearance.number} is ${clearance.state}; “${step.act}” is not possible now.`,
      );
    }
    const nowMs = this.clock.nowMs();
    const conditions = step.conditions === undefined ? {} : { conditions: step.conditions };
    this.repository.change(tx, clearance.id, { state: move.to, changedMs: nowMs, ...conditions });
    this.record(tx, clearance, { ...step, toState: move.to });
    this.notices.moved(tx, { ...clearance, ...conditions, state: move.to }, step);
    if (clearance.state === 'in force') this.endContacts(tx, clearance, step);
  }

  record(
    tx: Db,
    clearance: Pick<NamedClearance, 'id'>,
    step: { readonly act: ClearanceAct; readonly toState: NamedClearance['state'] } & Pick<
      ClearanceStep,
      'caller' | 'sentence'
    >,
  ): void {
    this.repository.addEvent(tx, {
      id: newId(),
      clearanceId: clearance.id,
      atMs: this.clock.nowMs(),
      toState: step.toState,
      sentence: step.sentence,
      personId: step.caller?.personId ?? null,
    });
    this.audit.record(tx, {
      caller: step.caller,
      action: `clearance.${step.act}`,
      subject: `clearance:${clearance.id}`,
      data: { to: step.toState, sentence: step.sentence },
    });
  }

  /** The clearance is over: contacts that no other one permits are cancelled in full, and one under way is warned. */
  private endContacts(tx: Db, clearance: NamedClearance, step: ClearanceStep): void {
    const sentence = `Clearance ${clearance.number} to transmit in ${clearance.band} band is over: ${step.sentence}`;
    for (const booking of this.book.bookingsToCome(tx, clearance.id)) {
      if (this.book.permits(tx, booking)) continue;
      this.bookingEnding.passLost(tx, booking, {
        sentence,
        advice: 'Ask for a new clearance, or book the pass for downlink only.',
      });
    }
    for (const booking of this.book.bookingsUnderWay(tx, clearance.id)) {
      if (this.book.permits(tx, booking)) continue;
      this.bookings.note(tx, booking, { kind: 'clearance over', sentence, mover: BY_CLOCK });
      const notice = {
        kind: 'clearance over',
        subject: `Stop transmitting: ${contactName(this.bookingNotices.names(tx, booking))}`,
        sentences: [sentence, 'Nothing more may be transmitted in this contact.'],
      };
      this.bookingNotices.toStation(tx, booking, notice);
      this.bookingNotices.toBuyer(tx, booking, notice);
    }
  }
}
