/**
 * The payment provider as the application sees it. Every call may be repeated: it answers with how things stand, also when
 * an earlier call with the same key has already done it. Throws `card-declined` where the bank refused, `payment-unavailable`
 * where the provider did not answer, so that it is not known whether anything happened.
 */
import type { ChargebackFacts } from './provider-books.port.js';

/** Amounts are whole minor units; currencies are ISO 4217 in capitals. */
export interface IntentFacts {
  readonly intentId: string;
  /** Our booking, from the metadata that we gave; null for an intent that is not ours. */
  readonly bookingId: string | null;
  /** Our monthly bill, from the metadata that we gave; null for every other intent. */
  readonly billId: string | null;
  /** The intent whose reservation this one takes over; null for a first one. */
  readonly renews: string | null;
  readonly status: 'unpaid' | 'waiting for the bank' | 'authorised' | 'captured' | 'released' | 'other';
  readonly amountMinor: number;
  /** What is reserved and can still be taken. */
  readonly capturableMinor: number;
  /** What has been taken. */
  readonly receivedMinor: number;
  readonly currency: string;
  /** Brand and last four digits, where the provider told them with this answer. */
  readonly card: string | null;
  /** When the reservation ends, UTC milliseconds, where told. */
  readonly captureBeforeMs: number | null;
  /** Why the last attempt failed, in words for the buyer. */
  readonly failure: string | null;
  /** Where the buyer must go to satisfy the bank. */
  readonly redirectUrl: string | null;
}

export interface PageFacts {
  readonly checkoutId: string;
  readonly status: 'open' | 'complete' | 'expired';
  readonly url: string | null;
  /** Whether paying there keeps the card for later. */
  readonly savesCard: boolean;
  /** The intent behind the page, once the provider has made one. */
  readonly intentId: string | null;
}

export interface PaymentOrder {
  readonly bookingId: string;
  readonly customerId: string;
  readonly amountMinor: number;
  readonly currency: string;
  /** What the buyer reads on the provider's page and the bank statement's detail. */
  readonly description: string;
  /** The same for every repeat of the same wish. */
  readonly idempotencyKey: string;
}

export interface PageOrder extends PaymentOrder {
  readonly saveCard: boolean;
  /** Where the provider sends the buyer afterwards. */
  readonly returnUrl: string;
  readonly cancelUrl: string;
}

/** A bill is paid at once: nothing is reserved first. */
export interface BillPageOrder extends Omit<PageOrder, 'bookingId' | 'saveCard'> {
  readonly billId: string;
}

export interface CardFacts {
  readonly id: string;
  readonly brand: string;
  readonly last4: string;
  /** `MM/YY`. */
  readonly expires: string;
}

/** A verified event, reduced to what it says about money of ours. */
export interface ProviderEvent {
  readonly id: string;
  readonly type: string;
  readonly about:
    | { readonly kind: 'intent'; readonly intent: IntentFacts }
    | { readonly kind: 'page closed'; readonly checkoutId: string; readonly bookingId: string | null }
    | {
        readonly kind: 'refunded';
        readonly chargeId: string;
        readonly intentId: string | null;
        readonly currency: string;
        /** All that was given back of what was taken, so far. */
        readonly refundedMinor: number;
      }
    | { readonly kind: 'chargeback'; readonly chargeback: ChargebackFacts }
    | { readonly kind: 'other' };
}

export interface PaymentPort {
  createCustomer(customer: { organisationId: string; name: string; email: string }): Promise<string>;
  cards(customerId: string): Promise<CardFacts[]>;
  /** The page stays open for a day unless it is closed; the end of a hold closes it. */
  openPage(order: PageOrder): Promise<PageFacts>;
  openBillPage(order: BillPageOrder): Promise<PageFacts>;
  readPage(checkoutId: string): Promise<PageFacts>;
  /** Nobody can pay on the page any more, unless it was already paid: the answer says so. */
  closePage(checkoutId: string): Promise<PageFacts>;
  /** An intent without a card: nothing is reserved until it is confirmed. */
  createIntent(order: PaymentOrder & { readonly saveCard: boolean }): Promise<IntentFacts>;
  /** Reserves the amount on a saved card; the buyer is present, so the bank may ask them. */
  confirmIntent(intentId: string, confirm: { cardId: string; returnUrl: string }): Promise<IntentFacts>;
  readIntent(intentId: string): Promise<IntentFacts>;
  /**
   * Reserves the same again on the same card, without the buyer, before the reservation ends; the old one stays until it is
   * released. The new intent says which one it renews.
   */
  renew(intentId: string): Promise<IntentFacts>;
  /** Takes `amountMinor` of what is reserved and lets the rest go. */
  capture(intentId: string, amountMinor: number): Promise<IntentFacts>;
  /** Gives back part of what was taken; the same `key` is carried out once. */
  refund(intentId: string, refund: { amountMinor: number; key: string }): Promise<void>;
  /** Lets a reservation, or an unpaid intent, go. */
  release(intentId: string): Promise<IntentFacts>;
  /** Verifies signature and age. Throws `bad-signature`. */
  verifyEvent(rawBody: Buffer, signature: string, nowMs: number): ProviderEvent;
}
export const PAYMENT_PORT = Symbol('PaymentPort');
