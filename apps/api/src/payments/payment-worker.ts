/** Carries out what was ordered from the provider, and asks it about payments of which no event has come. */
import { Inject, Injectable, Logger, type OnModuleInit } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { JobsService } from '../jobs/jobs.service.js';
import { OutboxRunner } from '../outbox/outbox.runner.js';
import { PermanentFailure } from '../outbox/permanent-failure.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError } from '../platform/domain-error.js';
import { write } from '../platform/transaction.js';
import { PAYMENT_PORT, type PaymentPort } from './payment.port.js';
import {
  CAPTURE,
  CaptureOrder,
  PaymentOrders,
  READ,
  REFUND,
  RELEASE,
  RENEW,
  ReadOrder,
  RefundOrder,
  ReleaseOrder,
  RenewOrder,
} from './payment-orders.js';
import { PaymentOutcomes } from './payment-outcomes.js';
import { PaymentRepository, type PaymentRow } from './payments.repository.js';

const SWEEP_EVERY_MS = 60_000;
/** Events usually come within a second; after this long one is taken to be lost. */
const EVENT_LATE_MS = 90_000;
/** A reservation is asked about once in a while, since its end also comes as an event. */
const RESERVED_ASK_MS = 3_600_000;
const SWEEP_LIMIT = 100;
const RENEW_EVERY_MS = 300_000;
/** Early enough for a buyer whose card is refused to do something about it. */
const RENEW_BEFORE_MS = 24 * 3_600_000;

@Injectable()
export class PaymentWorker implements OnModuleInit {
  private readonly log = new Logger('Payments');

  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    @Inject(PAYMENT_PORT) private readonly port: PaymentPort,
    private readonly payments: PaymentRepository,
    private readonly outcomes: PaymentOutcomes,
    private readonly orders: PaymentOrders,
    private readonly runner: OutboxRunner,
    private readonly jobs: JobsService,
  ) {}

  onModuleInit(): void {
    this.runner.register(REFUND, (payload) => this.refund(payload));
    this.runner.register(CAPTURE, (payload) => this.capture(payload));
    this.runner.register(RELEASE, (payload) => this.release(payload));
    this.runner.register(READ, (payload) => this.read(payload));
    this.runner.register(RENEW, (payload) => this.renew(payload));
    this.jobs.every('payments sweep', SWEEP_EVERY_MS, () => this.sweep());
    this.jobs.every('payments renewal', RENEW_EVERY_MS, () => this.orderRenewals());
  }

  /** Orders a new reservation for every one that would end too soon for its contact. */
  orderRenewals(): void {
    const ending = this.payments.endingReservations(this.clock.nowMs() + RENEW_BEFORE_MS);
    if (ending.length === 0) return;
    write(this.db, (tx) => {
      for (const payment of ending) this.orders.renew(tx, payment);
    });
  }

  /** Asks the provider about every payment that has waited too long for an event. One that fails is asked again later. */
  async sweep(): Promise<void> {
    const nowMs = this.clock.nowMs();
    for (const payment of this.payments.unsettled(nowMs - EVENT_LATE_MS, nowMs - RESERVED_ASK_MS, SWEEP_LIMIT)) {
      try {
        await this.askAbout(payment);
      } catch (error) {
        this.log.warn(`payment ${payment.id}: ${error instanceof Error ? error.message : String(error)}`);
      }
    }
  }

  private async askAbout(payment: PaymentRow): Promise<void> {
    const page = payment.checkoutId === null ? null : await this.port.readPage(payment.checkoutId);
    const intentId = payment.intentId ?? page?.intentId ?? null;
    const facts = intentId === null ? null : await this.port.readIntent(intentId);
    write(this.db, (tx) => {
      this.payments.update(tx, payment.id, { changedMs: this.clock.nowMs() });
      if (facts) this.outcomes.apply(tx, facts);
      if (page?.status === 'expired') this.outcomes.pageClosed(tx, page.checkoutId);
    });
  }

  private async capture(payload: unknown): Promise<void> {
    const { intentId, amountMinor } = CaptureOrder.parse(payload);
    const facts = await this.port.capture(intentId, amountMinor);
    if (facts.status === 'captured') return;
    if (facts.status !== 'released') throw new Error(`The intent ${intentId} is ${facts.status} instead of captured.`);
    write(this.db, (tx) => this.outcomes.apply(tx, facts));
    throw new PermanentFailure(`The reservation ${intentId} had ended before it was charged.`);
  }

  /** What is not taken yet can't be given back: until it is, the provider refuses, and this is tried again later. */
  private async refund(payload: unknown): Promise<void> {
    const { intentId, amountMinor, key } = RefundOrder.parse(payload);
    await this.port.refund(intentId, { amountMinor, key });
  }

  private async release(payload: unknown): Promise<void> {
    const order = ReleaseOrder.parse(payload);
    const page = order.checkoutId === null ? null : await this.port.closePage(order.checkoutId);
    for (const intentId of new Set([order.intentId, page?.intentId ?? null])) {
      if (intentId === null) continue;
      const facts = await this.port.release(intentId);
      if (facts.status === 'captured')
        throw new PermanentFailure(`The intent ${intentId} was charged and cannot be let go.`);
      if (facts.status !== 'released')
        throw new Error(`The intent ${intentId} is ${facts.status} instead of released.`);
    }
  }

  /** The new reservation takes over when its event comes; a refusal is told to the buyer, who has a day left. */
  private async renew(payload: unknown): Promise<void> {
    const { intentId, bookingId } = RenewOrder.parse(payload);
    try {
      await this.port.renew(intentId);
    } catch (error) {
      if (!(error instanceof DomainError) || error.code !== 'card-declined') throw error;
      write(this.db, (tx) => this.outcomes.renewalRefused(tx, bookingId, error.message));
      throw new PermanentFailure(error.message);
    }
  }

  private async read(payload: unknown): Promise<void> {
    const { intentId } = ReadOrder.parse(payload);
    const facts = await this.port.readIntent(intentId);
    write(this.db, (tx) => {
      const payment = this.payments.ofIntent(tx, intentId);
      if (!payment) return;
      const { card, captureBeforeMs } = facts;
      this.payments.update(tx, payment.id, { card, captureBeforeMs, changedMs: this.clock.nowMs() });
    });
  }
}
