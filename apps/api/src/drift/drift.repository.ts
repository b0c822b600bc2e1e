/** What newer elements did to booked contacts: the only place with SQL about it. */
import { Inject, Injectable } from '@nestjs/common';
import {
  bookingEphemerides,
  bookingRetimes,
  bookings,
  driftChecks,
  driftQuestions,
  elementSets,
  type SkyberthDatabase,
} from '@skyberth/drizzle';
import type { BookingState } from '@skyberth/shared';
import { and, asc, desc, eq, exists, gt, inArray, notExists, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/sqlite-core';
import type { BookingRow } from '../bookings/bookings.repository.js';
import { DATABASE } from '../platform/database.module.js';
import type { Db } from '../platform/transaction.js';

export type QuestionRow = typeof driftQuestions.$inferSelect;
export type CheckRow = typeof driftChecks.$inferSelect;
export type RetimeRow = typeof bookingRetimes.$inferSelect & {
  readonly fromEpochUtc: string;
  readonly toEpochUtc: string;
};

/** Sold or asked for, and not yet begun. */
export const WATCHED: readonly BookingState[] = ['awaiting owner', 'confirmed'];
/** Elements that another process was writing while a check began are met by the next one. */
const WRITING_MS = 5_000;

const fromElements = alias(elementSets, 'from_elements');
const toElements = alias(elementSets, 'to_elements');

@Injectable()
export class DriftRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  /**
   * Booked contacts to come whose spacecraft was given elements since they were last looked at, soonest first. One sold on the
   * operator's own ephemeris is left out: element sets know less than that.
   */
  due(nowMs: number, limit: number): BookingRow[] {
    const since = sql`coalesce(${driftChecks.checkedMs}, ${bookings.createdMs}) - ${WRITING_MS}`;
    return this.db
      .select({ booking: bookings })
      .from(bookings)
      .leftJoin(driftChecks, eq(driftChecks.bookingId, bookings.id))
      .where(
        and(
          inArray(bookings.state, [...WATCHED]),
          gt(bookings.aosMs, nowMs),
          notExists(
            this.db
              .select({ id: bookingEphemerides.bookingId })
              .from(bookingEphemerides)
              .where(eq(bookingEphemerides.bookingId, bookings.id)),
          ),
          exists(
            this.db
              .select({ id: elementSets.id })
              .from(elementSets)
              .where(and(eq(elementSets.spacecraftId, bookings.spacecraftId), gt(elementSets.addedMs, since))),
          ),
        ),
      )
      .orderBy(asc(bookings.aosMs))
      .limit(limit)
      .all()
      .map((row) => row.booking);
  }

  check(bookingId: string): CheckRow | undefined {
    return this.db.select().from(driftChecks).where(eq(driftChecks.bookingId, bookingId)).get();
  }

  saveCheck(tx: Db, check: CheckRow): void {
    const { bookingId: _same, ...change } = check;
    tx.insert(driftChecks).values(check).onConflictDoUpdate({ target: driftChecks.bookingId, set: change }).run();
  }

  openQuestion(tx: Db, bookingId: string): QuestionRow | undefined {
    return tx
      .select()
      .from(driftQuestions)
      .where(and(eq(driftQuestions.bookingId, bookingId), eq(driftQuestions.state, 'open')))
      .get();
  }

  ask(tx: Db, question: typeof driftQuestions.$inferInsert): void {
    tx.insert(driftQuestions).values(question).run();
  }

  answer(tx: Db, questionId: string, answer: Pick<QuestionRow, 'state' | 'answeredMs' | 'answeredBy'>): void {
    tx.update(driftQuestions).set(answer).where(eq(driftQuestions.id, questionId)).run();
  }

  /** Questions about contacts that have begun or ended some other way. */
  overtaken(tx: Db, nowMs: number): void {
    const gone = sql`${driftQuestions.bookingId} IN (SELECT ${bookings.id} FROM ${bookings} WHERE ${bookings.state} NOT IN ('awaiting owner', 'confirmed'))`;
    tx.update(driftQuestions)
      .set({ state: 'overtaken', answeredMs: nowMs })
      .where(and(eq(driftQuestions.state, 'open'), gone))
      .run();
  }

  anyOvertaken(): boolean {
    const row = this.db
      .select({ id: driftQuestions.id })
      .from(driftQuestions)
      .innerJoin(bookings, eq(bookings.id, driftQuestions.bookingId))
      .where(and(eq(driftQuestions.state, 'open'), sql`${bookings.state} NOT IN ('awaiting owner', 'confirmed')`))
      .limit(1)
      .get();
    return row !== undefined;
  }

  retimes(bookingId: string): RetimeRow[] {
    return this.db
      .select({
        retime: bookingRetimes,
        fromEpochUtc: fromElements.epochUtc,
        toEpochUtc: toElements.epochUtc,
      })
      .from(bookingRetimes)
      .innerJoin(fromElements, eq(fromElements.id, bookingRetimes.fromElementSetId))
      .innerJoin(toElements, eq(toElements.id, bookingRetimes.toElementSetId))
      .where(eq(bookingRetimes.bookingId, bookingId))
      .orderBy(desc(bookingRetimes.seq))
      .all()
      .map(({ retime, ...epochs }) => ({ ...retime, ...epochs }));
  }

  /** The permission of the database for the change that follows it. Answers its number. */
  addRetime(tx: Db, retime: typeof bookingRetimes.$inferInsert): number {
    return Number(tx.insert(bookingRetimes).values(retime).run().lastInsertRowid);
  }

  /** Refused by the database without `addRetime` of just these times, or where they overlap another booking. */
  setTimes(tx: Db, bookingId: string, times: BookedTimes & { readonly changedMs: number }): void {
    tx.update(bookings).set(times).where(eq(bookings.id, bookingId)).run();
  }
}

export type BookedTimes = Pick<
  BookingRow,
  'aosMs' | 'tcaMs' | 'losMs' | 'guardFromMs' | 'guardToMs' | 'pass' | 'elementSetId'
>;
