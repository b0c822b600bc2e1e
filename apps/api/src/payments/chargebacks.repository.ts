/** Payments that banks took back, in the database. */
import { Inject, Injectable } from '@nestjs/common';
import { bookings, chargebacks, organisations, type SkyberthDatabase } from '@skyberth/drizzle';
import { count, desc, eq } from 'drizzle-orm';
import { alias } from 'drizzle-orm/sqlite-core';
import { DATABASE } from '../platform/database.module.js';
import type { Db } from '../platform/transaction.js';

export type ChargebackRow = typeof chargebacks.$inferSelect;
export interface ListedChargeback extends ChargebackRow {
  readonly bookingNumber: number;
  readonly operatorName: string;
  readonly ownerName: string;
}

const operators = alias(organisations, 'operators');
const owners = alias(organisations, 'owners');

@Injectable()
export class ChargebackRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  byId(tx: Db, id: string): ChargebackRow | undefined {
    return tx.select().from(chargebacks).where(eq(chargebacks.id, id)).get();
  }

  insert(tx: Db, row: ChargebackRow): void {
    tx.insert(chargebacks).values(row).run();
  }

  update(tx: Db, id: string, change: Partial<Pick<ChargebackRow, 'state' | 'reservedMinor' | 'closedMs'>>): void {
    tx.update(chargebacks).set(change).where(eq(chargebacks.id, id)).run();
  }

  page(query: { page: number; pageSize: number }): { rows: ListedChargeback[]; total: number } {
    const total = this.db.select({ rows: count() }).from(chargebacks).get()?.rows ?? 0;
    const rows = this.db
      .select({
        chargeback: chargebacks,
        bookingNumber: bookings.number,
        operatorName: operators.name,
        ownerName: owners.name,
      })
      .from(chargebacks)
      .innerJoin(bookings, eq(bookings.id, chargebacks.bookingId))
      .innerJoin(operators, eq(operators.id, chargebacks.operatorId))
      .innerJoin(owners, eq(owners.id, chargebacks.ownerId))
      .orderBy(desc(chargebacks.openedMs), desc(chargebacks.id))
      .limit(query.pageSize)
      .offset((query.page - 1) * query.pageSize)
      .all();
    return { rows: rows.map(({ chargeback, ...names }) => ({ ...chargeback, ...names })), total };
  }
}
