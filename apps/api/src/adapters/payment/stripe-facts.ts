/** The provider's objects, reduced to what the application knows about payments. */
import type Stripe from 'stripe';
import type { CardFacts, IntentFacts, PageFacts, ProviderEvent } from '../../payments/payment.port.js';
import type { ChargebackFacts, RefundedFacts } from '../../payments/provider-books.port.js';

export const BOOKING_KEY = 'skyberth_booking';
export const BILL_KEY = 'skyberth_bill';
export const RENEWS_KEY = 'skyberth_renews';
export const SAVES_CARD_KEY = 'skyberth_saves_card';

const STATUS: Readonly<Record<Stripe.PaymentIntent.Status, IntentFacts['status']>> = {
  requires_payment_method: 'unpaid',
  requires_confirmation: 'unpaid',
  requires_action: 'waiting for the bank',
  processing: 'other',
  requires_capture: 'authorised',
  succeeded: 'captured',
  canceled: 'released',
};

export function intentFacts(intent: Stripe.PaymentIntent): IntentFacts {
  const charge = typeof intent.latest_charge === 'object' ? intent.latest_charge : null;
  const card = charge?.payment_method_details?.card;
  return {
    intentId: intent.id,
    bookingId: intent.metadata?.[BOOKING_KEY] ?? null,
    billId: intent.metadata?.[BILL_KEY] ?? null,
    renews: intent.metadata?.[RENEWS_KEY] ?? null,
    status: STATUS[intent.status] ?? 'other',
    amountMinor: intent.amount,
    capturableMinor: intent.amount_capturable,
    receivedMinor: intent.amount_received,
    currency: intent.currency.toUpperCase(),
    card: card ? cardName(card.brand, card.last4) : null,
    captureBeforeMs: card?.capture_before === undefined ? null : card.capture_before * 1000,
    failure: intent.last_payment_error ? refusalSentence(intent.last_payment_error) : null,
    redirectUrl: intent.next_action?.redirect_to_url?.url ?? null,
  };
}

export const pageFacts = (session: Stripe.Checkout.Session): PageFacts => ({
  checkoutId: session.id,
  status: pageStatus(session.status),
  url: session.url,
  savesCard: session.metadata?.[SAVES_CARD_KEY] === 'true',
  intentId: idOf(session.payment_intent),
});

function pageStatus(status: string | null): PageFacts['status'] {
  return status === 'complete' || status === 'expired' ? status : 'open';
}

export function cardFacts(method: Stripe.PaymentMethod): CardFacts | null {
  const card = method.card;
  if (!card) return null;
  const month = String(card.exp_month).padStart(2, '0');
  return {
    id: method.id,
    brand: capital(card.brand),
    last4: card.last4,
    expires: `${month}/${String(card.exp_year).slice(-2)}`,
  };
}

export function eventFacts(event: Stripe.Event): ProviderEvent {
  return { id: event.id, type: event.type, about: aboutOf(event) };
}

function aboutOf(event: Stripe.Event): ProviderEvent['about'] {
  switch (event.type) {
    case 'payment_intent.amount_capturable_updated':
    case 'payment_intent.payment_failed':
    case 'payment_intent.succeeded':
    case 'payment_intent.canceled':
      return { kind: 'intent', intent: intentFacts(event.data.object) };
    case 'checkout.session.expired':
      return {
        kind: 'page closed',
        checkoutId: event.data.object.id,
        bookingId: event.data.object.metadata?.[BOOKING_KEY] ?? null,
      };
    case 'charge.refunded': {
      const charge = event.data.object;
      return charge.captured ? refundedFacts(charge) : { kind: 'other' };
    }
    case 'charge.dispute.created':
    case 'charge.dispute.updated':
    case 'charge.dispute.closed':
    case 'charge.dispute.funds_withdrawn':
    case 'charge.dispute.funds_reinstated':
      return { kind: 'chargeback', chargeback: chargebackFacts(event.data.object) };
    default:
      return { kind: 'other' };
  }
}

/** Letting part of a reservation go counts as refunded there, though it was never taken. */
export function refundedFacts(charge: Stripe.Charge): RefundedFacts {
  const neverTaken = charge.amount - charge.amount_captured;
  return {
    kind: 'refunded',
    chargeId: charge.id,
    intentId: idOf(charge.payment_intent),
    currency: charge.currency.toUpperCase(),
    refundedMinor: Math.max(0, charge.amount_refunded - neverTaken),
  };
}

/** An inquiry, which takes no money, is open until it becomes a dispute or ends without one. */
export function chargebackFacts(dispute: Stripe.Dispute): ChargebackFacts {
  const moved = dispute.balance_transactions;
  const won = dispute.status === 'won' || dispute.status === 'warning_closed' || dispute.status === 'prevented';
  return {
    chargebackId: dispute.id,
    chargeId: idOf(dispute.charge) ?? '',
    intentId: idOf(dispute.payment_intent),
    amountMinor: dispute.amount,
    currency: dispute.currency.toUpperCase(),
    reason: dispute.reason.replaceAll('_', ' '),
    state: won ? 'won' : dispute.status === 'lost' ? 'lost' : 'open',
    withdrawn: moved.some((row) => row.amount < 0),
    reinstated: moved.some((row) => row.amount > 0),
  };
}

const REFUSALS: Readonly<Record<string, string>> = {
  insufficient_funds: 'The bank says that there is not enough money on the card.',
  expired_card: 'The card has expired.',
  incorrect_cvc: 'The security code does not match the card.',
  lost_card: 'The bank refused the card. Ask your bank, or use another card.',
  stolen_card: 'The bank refused the card. Ask your bank, or use another card.',
  authentication_required: 'The bank wants to ask you first, and could not.',
  payment_intent_authentication_failure: 'The bank could not make sure that it was you.',
};

/** A refused card in our own words; which code it was stays with the provider. */
export function refusalSentence(refusal: { code?: string | undefined; decline_code?: string | undefined }): string {
  const known = REFUSALS[refusal.decline_code ?? ''] ?? REFUSALS[refusal.code ?? ''];
  return known ?? 'The bank refused the card without giving a reason.';
}

export const idOf = (reference: string | { id: string } | null): string | null =>
  typeof reference === 'string' ? reference : (reference?.id ?? null);

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
export const cardName = (brand: string | null, last4: string | null): string =>
  `${capital(brand ?? 'card')} ending ${last4 ?? '????'}`;
