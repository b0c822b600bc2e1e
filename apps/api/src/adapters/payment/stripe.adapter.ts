/** The payment port over the provider's own SDK. Where it connects to is configuration; the calls are the same everywhere. */
import { Inject, Injectable } from '@nestjs/common';
import type Stripe from 'stripe';
import type {
  BillPageOrder,
  CardFacts,
  IntentFacts,
  PageFacts,
  PageOrder,
  PaymentOrder,
  PaymentPort,
  ProviderEvent,
} from '../../payments/payment.port.js';
import { CONFIG, type Config } from '../../platform/config.js';
import { DomainError } from '../../platform/domain-error.js';
import { ask, stripeClient } from './stripe-client.js';
import {
  BILL_KEY,
  BOOKING_KEY,
  cardFacts,
  eventFacts,
  idOf,
  intentFacts,
  pageFacts,
  RENEWS_KEY,
  SAVES_CARD_KEY,
} from './stripe-facts.js';

/** Signed longer ago than this, an event is a replay; the provider's own libraries use the same figure. */
const SIGNATURE_TOLERANCE_S = 300;
/** Clocks differ a little; a signature from further ahead was not made by the provider just now. */
const SIGNATURE_AHEAD_S = 60;
const CARDS_SHOWN = 20;

@Injectable()
export class StripeAdapter implements PaymentPort {
  private readonly stripe: Stripe;

  constructor(@Inject(CONFIG) private readonly config: Config) {
    this.stripe = stripeClient(config);
  }

  async createCustomer(customer: { organisationId: string; name: string; email: string }): Promise<string> {
    const { organisationId, name, email } = customer;
    const made = await ask(
      this.stripe.customers.create(
        { name, email, metadata: { skyberth_organisation: organisationId } },
        { idempotencyKey: `skyberth:customer:${organisationId}` },
      ),
    );
    return made.id;
  }

  async cards(customerId: string): Promise<CardFacts[]> {
    const page = await ask(this.stripe.paymentMethods.list({ customer: customerId, type: 'card', limit: CARDS_SHOWN }));
    return page.data.flatMap((method) => cardFacts(method) ?? []);
  }

  async openPage(order: PageOrder): Promise<PageFacts> {
    const { bookingId, customerId, amountMinor, currency, description, idempotencyKey } = order;
    const session = await ask(
      this.stripe.checkout.sessions.create(
        {
          mode: 'payment',
          customer: customerId,
          client_reference_id: bookingId,
          metadata: { [BOOKING_KEY]: bookingId, [SAVES_CARD_KEY]: String(order.saveCard) },
          line_items: [
            {
              quantity: 1,
              price_data: {
                currency: currency.toLowerCase(),
                unit_amount: amountMinor,
                product_data: { name: description },
              },
            },
          ],
          allowed_payment_method_types: ['card'],
          payment_intent_data: {
            capture_method: 'manual',
            description,
            metadata: { [BOOKING_KEY]: bookingId },
            ...(order.saveCard ? { setup_future_usage: 'off_session' as const } : {}),
          },
          success_url: order.returnUrl,
          cancel_url: order.cancelUrl,
        },
        { idempotencyKey },
      ),
    );
    return pageFacts(session);
  }

  async openBillPage(order: BillPageOrder): Promise<PageFacts> {
    const { billId, customerId, amountMinor, currency, description, idempotencyKey } = order;
    const metadata = { [BILL_KEY]: billId };
    const session = await ask(
      this.stripe.checkout.sessions.create(
        {
          mode: 'payment',
          customer: customerId,
          client_reference_id: billId,
          metadata,
          line_items: [
            {
              quantity: 1,
              price_data: {
                currency: currency.toLowerCase(),
                unit_amount: amountMinor,
                product_data: { name: description },
              },
            },
          ],
          allowed_payment_method_types: ['card'],
          payment_intent_data: { description, metadata },
          success_url: order.returnUrl,
          cancel_url: order.cancelUrl,
        },
        { idempotencyKey },
      ),
    );
    return pageFacts(session);
  }

  async readPage(checkoutId: string): Promise<PageFacts> {
    return pageFacts(await ask(this.stripe.checkout.sessions.retrieve(checkoutId)));
  }

  async closePage(checkoutId: string): Promise<PageFacts> {
    const expired = this.stripe.checkout.sessions.expire(checkoutId);
    return await ask(expired.then(pageFacts), () => this.readPage(checkoutId));
  }

  async createIntent(order: PaymentOrder & { readonly saveCard: boolean }): Promise<IntentFacts> {
    const { bookingId, customerId, amountMinor, currency, description, idempotencyKey } = order;
    const intent = await ask(
      this.stripe.paymentIntents.create(
        {
          amount: amountMinor,
          currency: currency.toLowerCase(),
          customer: customerId,
          capture_method: 'manual',
          description,
          metadata: { [BOOKING_KEY]: bookingId },
          ...(order.saveCard ? { setup_future_usage: 'off_session' as const } : {}),
        },
        { idempotencyKey },
      ),
    );
    return intentFacts(intent);
  }

  async confirmIntent(intentId: string, confirm: { cardId: string; returnUrl: string }): Promise<IntentFacts> {
    const confirmed = this.stripe.paymentIntents.confirm(intentId, {
      payment_method: confirm.cardId,
      return_url: confirm.returnUrl,
      off_session: false,
      expand: ['latest_charge'],
    });
    return await ask(confirmed.then(intentFacts), () => this.readIntent(intentId));
  }

  async renew(intentId: string): Promise<IntentFacts> {
    const old = await ask(this.stripe.paymentIntents.retrieve(intentId));
    const [customer, card] = [idOf(old.customer), idOf(old.payment_method)];
    if (customer === null || card === null) throw new Error(`The intent ${intentId} has no card to reserve on again.`);
    const intent = await ask(
      this.stripe.paymentIntents.create(
        {
          amount: old.amount,
          currency: old.currency,
          customer,
          payment_method: card,
          capture_method: 'manual',
          off_session: true,
          confirm: true,
          ...(old.description === null ? {} : { description: old.description }),
          metadata: { ...old.metadata, [RENEWS_KEY]: intentId },
          expand: ['latest_charge'],
        },
        { idempotencyKey: `skyberth:renew:${intentId}` },
      ),
    );
    return intentFacts(intent);
  }

  async readIntent(intentId: string): Promise<IntentFacts> {
    return intentFacts(await ask(this.stripe.paymentIntents.retrieve(intentId, { expand: ['latest_charge'] })));
  }

  async capture(intentId: string, amountMinor: number): Promise<IntentFacts> {
    const captured = this.stripe.paymentIntents.capture(
      intentId,
      { amount_to_capture: amountMinor, expand: ['latest_charge'] },
      { idempotencyKey: `skyberth:capture:${intentId}:${amountMinor}` },
    );
    return await ask(captured.then(intentFacts), () => this.readIntent(intentId));
  }

  async refund(intentId: string, { amountMinor, key }: { amountMinor: number; key: string }): Promise<void> {
    await ask(
      this.stripe.refunds.create(
        { payment_intent: intentId, amount: amountMinor, reason: 'requested_by_customer' },
        { idempotencyKey: `skyberth:refund:${key}` },
      ),
    );
  }

  async release(intentId: string): Promise<IntentFacts> {
    const released = this.stripe.paymentIntents.cancel(
      intentId,
      { cancellation_reason: 'requested_by_customer' },
      { idempotencyKey: `skyberth:release:${intentId}` },
    );
    return await ask(released.then(intentFacts), () => this.readIntent(intentId));
  }

  verifyEvent(rawBody: Buffer, signature: string, nowMs: number): ProviderEvent {
    let event: Stripe.Event;
    try {
      const secret = this.config.stripeWebhookSecret;
      event = this.stripe.webhooks.constructEvent(rawBody, signature, secret, SIGNATURE_TOLERANCE_S, undefined, nowMs);
    } catch {
      throw badSignature();
    }
    if (signedAtS(signature) > nowMs / 1000 + SIGNATURE_AHEAD_S) throw badSignature();
    return eventFacts(event);
  }
}

const badSignature = (): DomainError =>
  new DomainError('bad-signature', 'The event is not signed by the payment provider, or was signed too long ago.');

/** The library refuses signatures that are too old, and lets those from the future pass. */
function signedAtS(signature: string): number {
  return Number(/(?:^|,)\s*t=(\d+)/.exec(signature)?.[1] ?? Number.POSITIVE_INFINITY);
}
