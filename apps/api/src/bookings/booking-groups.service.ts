/** Several passes held, paid and let go together: all of them, or none. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { type BookingGroup, type FieldError, MOST_IN_GROUP, type Principal } from '@skyberth/shared';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError } from '../platform/domain-error.js';
import { newId } from '../platform/ids.js';
import { type Db, write } from '../platform/transaction.js';
import { BookingGroupRepository, type GroupRow } from './booking-groups.repository.js';
import { BookingSale } from './booking-sale.service.js';
import { BookingViews } from './booking-views.js';
import type { BookingRow } from './bookings.repository.js';
import { HOLD_MS, HoldService, type HoldWish, MOST_HOLDS, type PreparedHold } from './hold.service.js';

/** A group comes on top of what may be held singly. */
const MOST_WITH_GROUPS = MOST_HOLDS + MOST_IN_GROUP;

@Injectable()
export class BookingGroupsService {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly groups: BookingGroupRepository,
    private readonly holds: HoldService,
    private readonly sale: BookingSale,
    private readonly views: BookingViews,
  ) {}

  /** Throws `group-refused` with a field for every item that cannot be had; nothing is held then. */
  async hold(caller: Principal, items: readonly HoldWish[]): Promise<BookingGroup> {
    const faults: FieldError[] = [];
    const prepared: PreparedHold[] = [];
    // One after the other: a pass is computed on every thread that there is.
    for (const [index, wish] of items.entries()) {
      const one = await this.holds
        .prepare(caller.organisationId, wish)
        .catch((error: unknown) => faultOf(error, index));
      if ('pointer' in one) faults.push(one);
      else prepared.push(one);
    }
    if (faults.length > 0) throw refused(faults, items.length);
    const group = write(this.db, (tx) => this.insert(tx, caller, prepared));
    return this.view(caller, group);
  }

  get(caller: Principal, groupId: string): BookingGroup {
    return this.view(caller, this.groups.ofOperator(caller.organisationId, groupId));
  }

  /** Gives all of it back. Throws `wrong-state` where nothing is held any more. */
  letGo(caller: Principal, groupId: string): BookingGroup {
    const group = write(this.db, (tx) => {
      const found = this.groups.ofOperator(caller.organisationId, groupId, tx);
      const held = this.groups.members(groupId, tx).filter(({ booking }) => booking.state === 'held');
      if (held.length === 0)
        throw new DomainError('wrong-state', 'Nothing of this group is held any more, so nothing can be let go.');
      for (const { booking } of held) this.sale.letGo(tx, booking, { actor: 'operator', person: caller });
      return found;
    });
    return this.view(caller, group);
  }

  /** All rows or, by the error that ends the transaction, none; every item that fails is named. */
  private insert(tx: Db, caller: Principal, prepared: readonly PreparedHold[]): GroupRow {
    const faults: FieldError[] = [];
    const bookings: BookingRow[] = [];
    for (const [index, one] of prepared.entries()) {
      try {
        bookings.push(this.holds.insert(tx, caller, one, { most: MOST_WITH_GROUPS }));
      } catch (error) {
        faults.push(faultOf(error, index));
      }
    }
    if (faults.length > 0) throw refused(faults, prepared.length);
    const createdMs = this.clock.nowMs();
    const holdEndsMs = Math.min(...bookings.map((booking) => booking.holdEndsMs ?? createdMs + HOLD_MS));
    const group = { id: newId(), operatorId: caller.organisationId, createdBy: caller.personId, createdMs, holdEndsMs };
    const ids = bookings.map((booking) => booking.id);
    this.groups.insert(tx, group, ids);
    return group;
  }

  private view(caller: Principal, group: GroupRow): BookingGroup {
    const members = this.groups.members(group.id);
    const totals = new Map<string, number>();
    for (const { booking } of members)
      totals.set(booking.currency, (totals.get(booking.currency) ?? 0) + booking.toPayMinor);
    return {
      groupId: group.id,
      holdEndsUtc: new Date(group.holdEndsMs).toISOString(),
      state: stateOf(members),
      totals: [...totals].map(([currency, toPayMinor]) => ({ currency, toPayMinor })),
      bookings: members.map(({ booking }) => this.views.full(caller, booking)),
    };
  }
}

/** Sold once none is a hold any more and all were secured; later lives of single contacts change nothing about that. */
function stateOf(members: readonly { booking: BookingRow; isSecured: boolean }[]): BookingGroup['state'] {
  const isHeld = members.some(({ booking }) => booking.state === 'held');
  if (isHeld) return members.some((member) => member.isSecured) ? 'partly secured' : 'held';
  return members.every((member) => member.isSecured) ? 'bought' : 'ended';
}

/** A refusal as the fault of one item; what is no refusal is thrown on. */
function faultOf(error: unknown, index: number): FieldError {
  if (!(error instanceof DomainError)) throw error;
  return { pointer: `/items/${index}`, detail: error.message };
}

const refused = (faults: readonly FieldError[], of: number): DomainError =>
  new DomainError(
    'group-refused',
    `${faults.length} of ${of} passes cannot be had, so none is held. Change or leave out those that are named.`,
    faults,
  );
