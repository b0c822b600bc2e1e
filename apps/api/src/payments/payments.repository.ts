/** Payments, and the provider's events, in the database. */
import { Inject, Injectable } from '@nestjs/common';
import { bookings, organisations, payments, providerEvents, type SkyberthDatabase } from '@skyberth/drizzle';
import { and, asc, eq, inArray, lte, or } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';
import type { Db } from '../platform/transaction.js';

export type PaymentRow = typeof payments.$inferSelect;
export type PaymentChange = Partial<Omit<PaymentRow, 'id' | 'bookingId' | 'currency' | 'amountMinor' | 'createdMs'>>;

/** States in which the provider may know something that we do not. */
const UNSETTLED = ['waiting for the buyer', 'authorised', 'capturing', 'releasing'] as const;

@Injectable()
export class PaymentRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  ofBooking(bookingId: string, tx: Db = this.db): PaymentRow | undefined {
    return tx.select().from(payments).where(eq(payments.bookingId, bookingId)).get();
  }

  ofIntent(tx: Db, intentId: string): PaymentRow | undefined {
    return tx.select().from(payments).where(eq(payments.intentId, intentId)).get();
  }

  ofPage(tx: Db, checkoutId: string): PaymentRow | undefined {
    return tx.select().from(payments).where(eq(payments.checkoutId, checkoutId)).get();
  }

  insert(tx: Db, payment: typeof payments.$inferInsert): void {
    tx.insert(payments).values(payment).run();
  }

  update(tx: Db, paymentId: string, change: PaymentChange & { changedMs: number }): void {
    tx.update(payments).set(change).where(eq(payments.id, paymentId)).run();
  }

  /**
   * Payments to ask the provider about: unchanged since `quietSinceMs`, or, where money is only reserved and nothing is
   * expected to happen, since `reservedSinceMs`. Longest unasked first.
   */
  unsettled(quietSinceMs: number, reservedSinceMs: number, limit: number): PaymentRow[] {
    return this.db
      .select()
      .from(payments)
      .where(
        and(
          inArray(payments.state, [...UNSETTLED]),
          or(
            and(
              inArray(payments.state, ['waiting for the buyer', 'capturing', 'releasing']),
              lte(payments.changedMs, quietSinceMs),
            ),
            and(eq(payments.state, 'authorised'), lte(payments.changedMs, reservedSinceMs)),
          ),
        ),
      )
      .orderBy(asc(payments.changedMs))
      .limit(limit)
      .all();
  }

  /** Reservations that end before `endsBeforeMs` while their booking still needs them. */
  endingReservations(endsBeforeMs: number): { intentId: string; bookingId: string }[] {
    return this.db
      .select({ intentId: payments.intentId, bookingId: payments.bookingId })
      .from(payments)
      .innerJoin(bookings, eq(bookings.id, payments.bookingId))
      .where(
        and(
          eq(payments.state, 'authorised'),
          lte(payments.captureBeforeMs, endsBeforeMs),
          inArray(bookings.state, ['awaiting owner', 'confirmed', 'under way', 'reporting']),
        ),
      )
      .all()
      .flatMap(({ intentId, bookingId }) => (intentId === null ? [] : [{ intentId, bookingId }]));
  }

  /** Stores an event; false where it was stored before. */
  addEvent(tx: Db, event: typeof providerEvents.$inferInsert): boolean {
    return tx.insert(providerEvents).values(event).onConflictDoNothing().run().changes === 1;
  }

  /** Which of these events were stored before. */
  knownEvents(eventIds: readonly string[]): Set<string> {
    const rows = this.db
      .select({ id: providerEvents.id })
      .from(providerEvents)
      .where(inArray(providerEvents.id, [...eventIds]))
      .all();
    return new Set(rows.map((row) => row.id));
  }

  closeEvent(tx: Db, eventId: string, processedMs: number, outcome: string): void {
    tx.update(providerEvents).set({ processedMs, outcome }).where(eq(providerEvents.id, eventId)).run();
  }

  buyer(organisationId: string): { name: string; billingEmail: string; providerCustomerId: string | null } {
    const row = this.db
      .select({
        name: organisations.name,
        billingEmail: organisations.billingEmail,
        providerCustomerId: organisations.providerCustomerId,
      })
      .from(organisations)
      .where(eq(organisations.id, organisationId))
      .get();
    if (!row) throw new Error(`There is no organisation ${organisationId}.`);
    return row;
  }

  setCustomer(tx: Db, organisationId: string, providerCustomerId: string): void {
    tx.update(organisations).set({ providerCustomerId }).where(eq(organisations.id, organisationId)).run();
  }
}
