/** Messages and how far people have read: the only place with SQL about it. */
import { Inject, Injectable } from '@nestjs/common';
import {
  antennas,
  bookings,
  messageReads,
  messages,
  organisations,
  people,
  type SkyberthDatabase,
  spacecraft,
} from '@skyberth/drizzle';
import type { BookingState, MessageSide } from '@skyberth/shared';
import { and, asc, desc, eq, gt, ne, type SQL, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/sqlite-core';
import { type Viewer, visibleTo } from '../bookings/bookings.repository.js';
import { DATABASE } from '../platform/database.module.js';
import type { Db } from '../platform/transaction.js';

export type MessageRow = typeof messages.$inferSelect;

export interface ThreadRow {
  readonly bookingId: string;
  readonly bookingNumber: number;
  readonly bookingState: BookingState;
  readonly spacecraftName: string;
  readonly antennaName: string;
  readonly operatorName: string;
  readonly ownerName: string;
  readonly aosMs: number;
  readonly lastMs: number;
  readonly lastByName: string;
  readonly lastText: string;
  readonly newCount: number;
}

const operators = alias(organisations, 'operators');
const owners = alias(organisations, 'owners');

@Injectable()
export class MessagesRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  add(tx: Db, row: Omit<MessageRow, 'seq'>): void {
    tx.insert(messages).values(row).run();
  }

  byId(tx: Db, id: string): MessageRow | undefined {
    return tx.select().from(messages).where(eq(messages.id, id)).get();
  }

  ofBooking(bookingId: string, db: Db = this.db): { row: MessageRow; name: string }[] {
    return db
      .select({ row: messages, name: people.name })
      .from(messages)
      .innerJoin(people, eq(people.id, messages.personId))
      .where(eq(messages.bookingId, bookingId))
      .orderBy(asc(messages.seq))
      .all();
  }

  /** Messages that a person has sent since `sinceMs`. */
  sentBy(tx: Db, personId: string, sinceMs: number): number {
    const row = tx
      .select({ rows: sql<number>`count(*)` })
      .from(messages)
      .where(and(eq(messages.personId, personId), gt(messages.atMs, sinceMs)))
      .get();
    return row?.rows ?? 0;
  }

  readUpTo(db: Db, personId: string, bookingId: string): number {
    const mine = and(eq(messageReads.personId, personId), eq(messageReads.bookingId, bookingId));
    return db.select({ seq: messageReads.seq }).from(messageReads).where(mine).get()?.seq ?? 0;
  }

  markRead(tx: Db, row: typeof messageReads.$inferInsert): void {
    tx.insert(messageReads)
      .values(row)
      .onConflictDoUpdate({
        target: [messageReads.personId, messageReads.bookingId],
        set: { seq: sql`max(${messageReads.seq}, excluded.seq)` },
      })
      .run();
  }

  threads(
    viewer: Viewer,
    query: { side: MessageSide; personId: string; onlyNew: boolean; page: number; pageSize: number },
  ): { rows: ThreadRow[]; total: number } {
    const news = this.news(query.side, query.personId);
    const last = this.db
      .select({ bookingId: messages.bookingId, seq: sql<number>`max(${messages.seq})`.as('last_seq') })
      .from(messages)
      .groupBy(messages.bookingId)
      .as('last');
    const where = and(visibleTo(viewer), query.onlyNew ? sql`${news} > 0` : undefined);
    const rows = this.db
      .select({
        bookingId: bookings.id,
        bookingNumber: bookings.number,
        bookingState: bookings.state,
        spacecraftName: spacecraft.name,
        antennaName: antennas.name,
        operatorName: operators.name,
        ownerName: owners.name,
        aosMs: bookings.aosMs,
        lastMs: messages.atMs,
        lastByName: people.name,
        lastText: messages.text,
        newCount: news,
      })
      .from(last)
      .innerJoin(messages, eq(messages.seq, last.seq))
      .innerJoin(bookings, eq(bookings.id, last.bookingId))
      .innerJoin(spacecraft, eq(spacecraft.id, bookings.spacecraftId))
      .innerJoin(antennas, eq(antennas.id, bookings.antennaId))
      .innerJoin(operators, eq(operators.id, bookings.operatorId))
      .innerJoin(owners, eq(owners.id, bookings.ownerId))
      .innerJoin(people, eq(people.id, messages.personId))
      .where(where)
      .orderBy(desc(last.seq))
      .limit(query.pageSize)
      .offset((query.page - 1) * query.pageSize)
      .all();
    const total = this.db
      .select({ rows: sql<number>`count(*)` })
      .from(last)
      .innerJoin(bookings, eq(bookings.id, last.bookingId))
      .where(where)
      .get();
    return { rows, total: total?.rows ?? 0 };
  }

  /** How many messages of the other side a person has not read, over all contacts. */
  newFor(viewer: Viewer, side: MessageSide, personId: string): number {
    const row = this.db
      .select({ rows: sql<number>`count(*)` })
      .from(messages)
      .innerJoin(bookings, eq(bookings.id, messages.bookingId))
      .leftJoin(messageReads, and(eq(messageReads.bookingId, messages.bookingId), eq(messageReads.personId, personId)))
      .where(and(visibleTo(viewer), ne(messages.side, side), gt(messages.seq, sql`coalesce(${messageReads.seq}, 0)`)))
      .get();
    return row?.rows ?? 0;
  }

  private news(side: MessageSide, personId: string): SQL<number> {
    return sql<number>`(select count(*) from messages as unread where unread.booking_id = ${bookings.id}
      and unread.side <> ${side} and unread.seq > coalesce((select done.seq from message_reads as done
      where done.person_id = ${personId} and done.booking_id = ${bookings.id}), 0))`;
  }
}
