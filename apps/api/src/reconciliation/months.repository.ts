/** Closed months in the database, and what must be done before a month can close. */
import { Inject, Injectable } from '@nestjs/common';
import {
  bookings,
  chargebacks,
  closedMonths,
  outbox,
  payments,
  people,
  type SkyberthDatabase,
} from '@skyberth/drizzle';
import { and, count, desc, eq, inArray, like, lt, type SQL } from 'drizzle-orm';
import type { SQLiteTable } from 'drizzle-orm/sqlite-core';
import { DATABASE } from '../platform/database.module.js';
import type { Db } from '../platform/transaction.js';

export type ClosedMonthRow = typeof closedMonths.$inferSelect;

@Injectable()
export class MonthRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  closed(): (ClosedMonthRow & { personName: string })[] {
    return this.db
      .select({ month: closedMonths, personName: people.name })
      .from(closedMonths)
      .innerJoin(people, eq(people.id, closedMonths.closedBy))
      .orderBy(desc(closedMonths.month))
      .all()
      .map(({ month, personName }) => ({ ...month, personName }));
  }

  close(tx: Db, row: ClosedMonthRow): void {
    tx.insert(closedMonths).values(row).run();
  }

  /** What is still under way and would change the money of contacts that ended before `toMs`. */
  unfinished(toMs: number): { contacts: number; payments: number; orders: number; chargebacks: number } {
    return {
      contacts: this.rows(
        bookings,
        and(lt(bookings.losMs, toMs), inArray(bookings.state, ['under way', 'reporting', 'in dispute'])),
      ),
      payments: this.rows(
        payments,
        and(lt(payments.changedMs, toMs), inArray(payments.state, ['capturing', 'refunding', 'releasing'])),
      ),
      orders: this.rows(
        outbox,
        and(eq(outbox.state, 'failed'), like(outbox.kind, 'payment.%'), lt(outbox.createdMs, toMs)),
      ),
      chargebacks: this.rows(chargebacks, and(eq(chargebacks.state, 'open'), lt(chargebacks.openedMs, toMs))),
    };
  }

  private rows(table: SQLiteTable, where: SQL | undefined): number {
    return this.db.select({ rows: count() }).from(table).where(where).get()?.rows ?? 0;
  }
}
