/** What a change of a booking orders from the provider: written into the outbox in the transaction of the change. */
import { Inject, Injectable } from '@nestjs/common';
import { z } from 'zod';
import { OutboxService } from '../outbox/outbox.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import type { Db } from '../platform/transaction.js';
import { PaymentRepository, type PaymentRow } from './payments.repository.js';

export const CAPTURE = 'payment.capture';
export const RELEASE = 'payment.release';
export const READ = 'payment.read';
export const RENEW = 'payment.renew';
export const REFUND = 'payment.refund';

export const CaptureOrder = z.object({ intentId: z.string(), amountMinor: z.int().positive() });
export const ReleaseOrder = z.object({ intentId: z.string().nullable(), checkoutId: z.string().nullable() });
export const ReadOrder = z.object({ intentId: z.string() });
export const RefundOrder = z.object({ intentId: z.string(), amountMinor: z.int().positive(), key: z.string() });
export const RenewOrder = z.object({ intentId: z.string(), bookingId: z.string() });

@Injectable()
export class PaymentOrders {
  constructor(
    private readonly payments: PaymentRepository,
    private readonly outbox: OutboxService,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  /** Takes this much of what is reserved; the rest goes back to the buyer by the same step. */
  capture(tx: Db, payment: PaymentRow, amountMinor: number): void {
    if (!payment.intentId) throw new Error(`Nothing is reserved for payment ${payment.id}.`);
    this.payments.update(tx, payment.id, { state: 'capturing', changedMs: this.clock.nowMs() });
    const { intentId } = payment;
    this.outbox.enqueue(tx, {
      kind: CAPTURE,
      dedupeKey: `${CAPTURE}:${intentId}`,
      payload: { intentId, amountMinor } satisfies z.input<typeof CaptureOrder>,
    });
  }

  /** Lets everything go that is reserved or could still be paid for this booking. */
  release(tx: Db, bookingId: string): void {
    const payment = this.payments.ofBooking(bookingId, tx);
    if (!payment || !['waiting for the buyer', 'authorised'].includes(payment.state)) return;
    const { intentId, checkoutId } = payment;
    const atProvider = intentId !== null || checkoutId !== null;
    const state = atProvider ? 'releasing' : 'released';
    this.payments.update(tx, payment.id, { state, changedMs: this.clock.nowMs() });
    if (!atProvider) return;
    this.outbox.enqueue(tx, {
      kind: RELEASE,
      dedupeKey: `${RELEASE}:${bookingId}:${intentId ?? ''}:${checkoutId ?? ''}`,
      payload: { intentId, checkoutId } satisfies z.input<typeof ReleaseOrder>,
    });
  }

  /** Lets one reservation go that no booking stands behind (any more). */
  releaseIntent(tx: Db, intentId: string): void {
    this.outbox.enqueue(tx, {
      kind: RELEASE,
      dedupeKey: `${RELEASE}:intent:${intentId}`,
      payload: { intentId, checkoutId: null } satisfies z.input<typeof ReleaseOrder>,
    });
  }

  /** Closes one page that nobody may pay on any more. */
  closePage(tx: Db, checkoutId: string): void {
    this.outbox.enqueue(tx, {
      kind: RELEASE,
      dedupeKey: `${RELEASE}:page:${checkoutId}`,
      payload: { intentId: null, checkoutId } satisfies z.input<typeof ReleaseOrder>,
    });
  }

  /** Reserves again before a reservation ends; once for each reservation. */
  renew(tx: Db, payment: { intentId: string; bookingId: string }): void {
    const { intentId, bookingId } = payment;
    this.outbox.enqueue(tx, {
      kind: RENEW,
      dedupeKey: `${RENEW}:${intentId}`,
      payload: { intentId, bookingId } satisfies z.input<typeof RenewOrder>,
    });
  }

  /** Asks for what events do not tell: the card, and how long the reservation lasts. */
  read(tx: Db, intentId: string): void {
    this.outbox.enqueue(tx, {
      kind: READ,
      dedupeKey: `${READ}:${intentId}`,
      payload: { intentId } satisfies z.input<typeof ReadOrder>,
    });
  }

  /** Gives so much of what was taken back to the card; `key` names the cause, which is carried out once. */
  refund(tx: Db, payment: PaymentRow, refund: { amountMinor: number; key: string }): void {
    if (!payment.intentId) throw new Error(`Nothing was taken for payment ${payment.id}.`);
    const payload = { intentId: payment.intentId, ...refund };
    this.outbox.enqueue(tx, { kind: REFUND, dedupeKey: `${REFUND}:${refund.key}`, payload });
  }
}
