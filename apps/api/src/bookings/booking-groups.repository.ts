/** Groups of bookings in the database. */
import { Inject, Injectable } from '@nestjs/common';
import { bookingGroupMembers, bookingGroups, bookings, type SkyberthDatabase } from '@skyberth/drizzle';
import { and, asc, eq, isNull } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';
import { notFound } from '../platform/domain-error.js';
import type { Db } from '../platform/transaction.js';
import type { BookingRow } from './bookings.repository.js';

export type GroupRow = typeof bookingGroups.$inferSelect;

@Injectable()
export class BookingGroupRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  insert(tx: Db, group: GroupRow, bookingIds: readonly string[]): void {
    tx.insert(bookingGroups).values(group).run();
    tx.insert(bookingGroupMembers)
      .values(bookingIds.map((bookingId) => ({ bookingId, groupId: group.id })))
      .run();
  }

  /** Throws `not-found` for the group of another organisation as for one that does not exist. */
  ofOperator(operatorId: string, groupId: string, tx: Db = this.db): GroupRow {
    const row = tx
      .select()
      .from(bookingGroups)
      .where(and(eq(bookingGroups.id, groupId), eq(bookingGroups.operatorId, operatorId)))
      .get();
    if (!row) throw notFound('group of bookings');
    return row;
  }

  /** The group that a booking was held with; null for one that was held alone. */
  groupIdOf(bookingId: string, tx: Db = this.db): string | null {
    const row = tx
      .select({ groupId: bookingGroupMembers.groupId })
      .from(bookingGroupMembers)
      .where(eq(bookingGroupMembers.bookingId, bookingId))
      .get();
    return row?.groupId ?? null;
  }

  /** By AOS, each with whether its money is secured. */
  members(groupId: string, tx: Db = this.db): { booking: BookingRow; isSecured: boolean }[] {
    return tx
      .select({ booking: bookings, securedMs: bookingGroupMembers.securedMs })
      .from(bookingGroupMembers)
      .innerJoin(bookings, eq(bookings.id, bookingGroupMembers.bookingId))
      .where(eq(bookingGroupMembers.groupId, groupId))
      .orderBy(asc(bookings.aosMs), asc(bookings.number))
      .all()
      .map(({ booking, securedMs }) => ({ booking, isSecured: securedMs !== null }));
  }

  secure(tx: Db, bookingId: string, securedMs: number): void {
    tx.update(bookingGroupMembers)
      .set({ securedMs })
      .where(and(eq(bookingGroupMembers.bookingId, bookingId), isNull(bookingGroupMembers.securedMs)))
      .run();
  }
}
