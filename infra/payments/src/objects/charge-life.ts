import type Stripe from 'stripe';
import type { Refusal } from '../cards/declines.js';
import type { TestCard } from '../cards/test-cards.js';
import { chargeFeeMinor, postBalance } from '../core/balance.js';
import { newId, randomText } from '../core/ids.js';
import type { Work } from '../http/call.js';
import { idOf } from './common.js';
import { cardMemory, testCardOf } from './payment-method-source.js';

const DAY_S = 86_400;
/** How long an authorisation lives: published-values section j. */
const AUTHORISATION_S = 7 * DAY_S;
const VISA_MERCHANT_INITIATED_S = 4 * DAY_S + 18 * 3600;

export interface Attempt {
  intent: Stripe.PaymentIntent;
  method: Stripe.PaymentMethod;
  card: TestCard;
  offSession: boolean;
  /** The payer confirmed with the bank. */
  authenticated: boolean;
  refusal?: Refusal;
}

/** Asks the "bank". The charge is on record whether it was refused or not. */
export function attemptCharge(work: Work, attempt: Attempt): Stripe.Charge {
  const { intent, method, refusal } = attempt;
  const manual = intent.capture_method === 'manual';
  const charge: Stripe.Charge = {
    ...blankCharge(work, 'ch', intent.amount, intent.currency),
    billing_details: method.billing_details,
    calculated_statement_descriptor: 'LOCAL STAND-IN',
    customer: idOf(intent.customer),
    description: intent.description,
    failure_code: refusal?.code ?? null,
    failure_message: refusal?.message ?? null,
    metadata: intent.metadata,
    outcome: outcomeOf(refusal),
    paid: !refusal,
    payment_intent: intent.id,
    payment_method: method.id,
    payment_method_details: { type: 'card', card: cardDetails(work, attempt, manual && !refusal) },
    receipt_email: intent.receipt_email,
    statement_descriptor_suffix: intent.statement_descriptor_suffix,
    status: refusal ? 'failed' : 'succeeded',
    transfer_group: intent.transfer_group,
  };
  work.desk.insert('charge', charge, work.account);
  if (refusal) {
    work.desk.emit('charge.failed', charge, work.account);
    return charge;
  }
  if (manual) {
    work.desk.emit('charge.succeeded', charge, work.account);
    work.desk.schedule('expire_authorisation', intent.id, captureBefore(charge) ?? work.desk.clock.nowS());
    return charge;
  }
  const paid = bookCharge(work, charge, intent.amount);
  work.desk.emit('charge.succeeded', paid, work.account);
  return paid;
}

/** Takes the money of an authorised charge and gives the rest back to the card. */
export function captureCharge(work: Work, charge: Stripe.Charge, amountMinor: number): Stripe.Charge {
  const captured = bookCharge(work, charge, amountMinor);
  work.desk.emit('charge.captured', captured, work.account);
  return captured;
}

/**
 * Lets an authorisation go. The real service marks such a charge as refunded (its documentation of capture says so),
 * and so does this one; no money has moved, so there is neither a refund nor a balance row.
 */
export function releaseCharge(
  work: Work,
  charge: Stripe.Charge,
  event: 'charge.expired' | 'charge.refunded',
): Stripe.Charge {
  const released: Stripe.Charge = { ...charge, amount_refunded: charge.amount, refunded: true };
  work.desk.store.save<'charge'>(released);
  work.desk.emit(event, released, work.account);
  return released;
}

export function captureBefore(charge: Stripe.Charge): number | undefined {
  return charge.payment_method_details?.card?.capture_before;
}

/** Money of this charge that was taken and not yet given back. */
export function refundableMinor(charge: Stripe.Charge): number {
  return charge.captured ? charge.amount - charge.amount_refunded : 0;
}

/** A charge with nothing decided yet; `py` is the prefix of a transfer as its receiver sees it. */
export function blankCharge(work: Work, prefix: 'ch' | 'py', amountMinor: number, currency: string): Stripe.Charge {
  return {
    id: newId(prefix),
    object: 'charge',
    amount: amountMinor,
    amount_captured: 0,
    amount_refunded: 0,
    application: null,
    application_fee: null,
    application_fee_amount: null,
    balance_transaction: null,
    billing_details: { address: null, email: null, name: null, phone: null, tax_id: null },
    calculated_statement_descriptor: null,
    captured: false,
    created: work.desk.clock.nowS(),
    currency,
    customer: null,
    description: null,
    disputed: false,
    failure_balance_transaction: null,
    failure_code: null,
    failure_message: null,
    fraud_details: {},
    livemode: false,
    metadata: {},
    on_behalf_of: null,
    outcome: null,
    paid: true,
    payment_intent: null,
    payment_method: null,
    payment_method_details: null,
    receipt_email: null,
    receipt_number: null,
    receipt_url: null,
    refunded: false,
    review: null,
    shipping: null,
    source: null,
    source_transfer: null,
    statement_descriptor: null,
    statement_descriptor_suffix: null,
    status: 'succeeded',
    transfer_data: null,
    transfer_group: null,
  };
}

function bookCharge(work: Work, charge: Stripe.Charge, amountMinor: number): Stripe.Charge {
  const settings = work.desk.settings;
  const card = testCardOf(cardMemory(work, idOf(charge.payment_method) ?? ''));
  const settlesInS = card.bypassPending ? 0 : settings.settlementDays * DAY_S;
  const row = postBalance(work.desk, {
    account: work.account,
    type: 'charge',
    reportingCategory: 'charge',
    amountMinor,
    feeMinor: chargeFeeMinor(work.desk, amountMinor),
    currency: charge.currency,
    sourceId: charge.id,
    description: charge.description,
    availableOnS: work.desk.clock.nowS() + settlesInS,
  });
  const booked: Stripe.Charge = {
    ...charge,
    amount_captured: amountMinor,
    amount_refunded: charge.amount - amountMinor,
    balance_transaction: row.id,
    captured: true,
  };
  work.desk.store.save<'charge'>(booked);
  return booked;
}

function outcomeOf(refusal: Refusal | undefined): Stripe.Charge.Outcome {
  return {
    advice_code: null,
    network_advice_code: null,
    network_decline_code: null,
    network_status: refusal ? 'declined_by_network' : 'approved_by_network',
    reason: refusal?.declineCode ?? null,
    risk_level: 'normal',
    risk_score: 10,
    seller_message: refusal ? 'The bank returned a decline.' : 'Payment complete.',
    type: refusal ? 'issuer_declined' : 'authorized',
  };
}

function cardDetails(work: Work, attempt: Attempt, held: boolean): Stripe.Charge.PaymentMethodDetails.Card {
  const shown = attempt.method.card;
  if (!shown) throw new Error('only cards are held here');
  const life = attempt.offSession && shown.brand === 'visa' ? VISA_MERCHANT_INITIATED_S : AUTHORISATION_S;
  return {
    amount_authorized: attempt.refusal ? null : attempt.intent.amount,
    authorization_code: attempt.refusal ? null : randomText(6).toUpperCase(),
    brand: shown.brand,
    ...(held ? { capture_before: work.desk.clock.nowS() + life } : {}),
    checks: {
      address_line1_check: null,
      address_postal_code_check: null,
      cvc_check: attempt.offSession ? null : 'pass',
    },
    country: shown.country,
    electronic_commerce_indicator: attempt.authenticated ? '05' : null,
    exp_month: shown.exp_month,
    exp_year: shown.exp_year,
    extended_authorization: { status: 'disabled' },
    fingerprint: shown.fingerprint ?? null,
    funding: shown.funding,
    incremental_authorization: { status: 'unavailable' },
    installments: null,
    last4: shown.last4,
    mandate: null,
    multicapture: { status: 'unavailable' },
    network: shown.brand,
    network_transaction_id: null,
    overcapture: { maximum_amount_capturable: attempt.intent.amount, status: 'unavailable' },
    regulated_status: 'unregulated',
    three_d_secure: attempt.authenticated
      ? {
          authentication_flow: 'challenge',
          electronic_commerce_indicator: '05',
          exemption_indicator: null,
          result: 'authenticated',
          result_reason: null,
          transaction_id: randomText(24),
          version: '2.2.0',
        }
      : null,
    transaction_link_id: null,
    wallet: null,
  };
}
