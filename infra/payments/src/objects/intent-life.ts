import type Stripe from 'stripe';
import { AUTHENTICATION_FAILED, AUTHENTICATION_REQUIRED, type Refusal, refusalOf } from '../cards/declines.js';
import type { TestCard } from '../cards/test-cards.js';
import { declined, refused } from '../core/errors.js';
import type { Call, Work } from '../http/call.js';
import { attachMethod } from './attach.js';
import { attemptCharge, captureCharge, refundableMinor, releaseCharge } from './charge-life.js';
import { completeSession } from './checkout-life.js';
import { idOf } from './common.js';
import { openDispute } from './dispute-life.js';
import { type CardMemory, cardMemory, testCardOf } from './payment-method-source.js';

export interface ConfirmChoice {
  offSession: boolean;
  returnUrl: string | null;
  failOnAction: boolean;
}

/** The refusal for an operation that the intent's status does not allow. */
export function unexpectedState(intent: Stripe.PaymentIntent, action: string): Error {
  return refused(`This PaymentIntent could not be ${action} because it has a status of ${intent.status}.`, {
    code: 'payment_intent_unexpected_state',
    payment_intent: intent,
  });
}

/** Tries to pay: ends in requires_action, requires_capture or succeeded, or throws the bank's refusal with its record kept. */
export function confirmIntent(
  call: Call,
  intent: Stripe.PaymentIntent,
  method: Stripe.PaymentMethod,
  choice: ConfirmChoice,
): Stripe.PaymentIntent {
  if (!['requires_payment_method', 'requires_confirmation', 'requires_action'].includes(intent.status)) {
    throw unexpectedState(intent, 'confirmed');
  }
  const memory = cardMemory(call, method.id);
  checkOwner(intent, method, memory);
  needsReturnUrl(intent, choice);
  const card = testCardOf(memory);
  const chosen: Stripe.PaymentIntent = { ...intent, payment_method: method.id, next_action: null };
  if (!wantsConfirmation(card, memory, choice.offSession)) {
    if (card.slow) call.delayMs = call.desk.settings.slowAnswerMs;
    return charge(call, chosen, method, { card, offSession: choice.offSession, authenticated: false });
  }
  if (choice.offSession || choice.failOnAction) {
    throw failIntent(call, chosen, method, { card, offSession: choice.offSession, refusal: AUTHENTICATION_REQUIRED });
  }
  return askPayer(call, chosen, choice);
}

/** The payer's answer on the confirmation page. */
export function answerAuthentication(
  call: Call,
  intent: Stripe.PaymentIntent,
  approved: boolean,
): Stripe.PaymentIntent {
  if (intent.status !== 'requires_action') throw unexpectedState(intent, 'authenticated');
  const method = call.desk.get('payment_method', idOf(intent.payment_method) ?? '', call.account, 'payment_method');
  const card = testCardOf(cardMemory(call, method.id));
  const cleared: Stripe.PaymentIntent = { ...intent, next_action: null };
  if (approved) return charge(call, cleared, method, { card, offSession: false, authenticated: true });
  throw failIntent(call, cleared, method, {
    card,
    offSession: false,
    refusal: AUTHENTICATION_FAILED,
    withoutCharge: true,
  });
}

export function captureIntent(
  call: Call,
  intent: Stripe.PaymentIntent,
  amountMinor: number | undefined,
): Stripe.PaymentIntent {
  if (intent.status !== 'requires_capture') throw unexpectedState(intent, 'captured');
  const amount = amountMinor ?? intent.amount_capturable;
  if (amount > intent.amount_capturable) {
    throw refused(`You cannot capture ${amount}, more than the ${intent.amount_capturable} that is authorised.`, {
      code: 'amount_too_large',
      param: 'amount_to_capture',
    });
  }
  const authorised = call.desk.get('charge', idOf(intent.latest_charge) ?? '', call.account);
  const captured = captureCharge(call, authorised, amount);
  call.desk.unschedule('expire_authorisation', intent.id);
  const paid: Stripe.PaymentIntent = { ...intent, amount_capturable: 0, amount_received: amount, status: 'succeeded' };
  call.desk.store.save<'payment_intent'>(paid);
  call.desk.emit('payment_intent.succeeded', paid, call.account);
  disputeIfAsked(call, captured);
  return paid;
}

export function cancelIntent(
  work: Work,
  intent: Stripe.PaymentIntent,
  reason: Stripe.PaymentIntent.CancellationReason | null,
): Stripe.PaymentIntent {
  if (
    !['requires_payment_method', 'requires_confirmation', 'requires_action', 'requires_capture'].includes(intent.status)
  ) {
    throw unexpectedState(intent, 'canceled');
  }
  if (intent.status === 'requires_capture') {
    const authorised = work.desk.get('charge', idOf(intent.latest_charge) ?? '', work.account);
    releaseCharge(work, authorised, reason === 'automatic' ? 'charge.expired' : 'charge.refunded');
    work.desk.unschedule('expire_authorisation', intent.id);
  }
  const canceled: Stripe.PaymentIntent = {
    ...intent,
    amount_capturable: 0,
    canceled_at: work.desk.clock.nowS(),
    cancellation_reason: reason,
    next_action: null,
    status: 'canceled',
  };
  work.desk.store.save<'payment_intent'>(canceled);
  work.desk.emit('payment_intent.canceled', canceled, work.account);
  return canceled;
}

interface Paying {
  card: TestCard;
  offSession: boolean;
  authenticated: boolean;
}

function charge(
  call: Call,
  intent: Stripe.PaymentIntent,
  method: Stripe.PaymentMethod,
  paying: Paying,
): Stripe.PaymentIntent {
  const decline = paying.card.decline ?? paying.card.declineOnlyCharges;
  if (decline) throw failIntent(call, intent, method, { ...paying, refusal: refusalOf(decline) });
  const made = attemptCharge(call, { intent, method, ...paying });
  const held = intent.capture_method === 'manual';
  const paid: Stripe.PaymentIntent = {
    ...intent,
    amount_capturable: held ? intent.amount : 0,
    amount_received: held ? 0 : intent.amount,
    last_payment_error: null,
    latest_charge: made.id,
    status: held ? 'requires_capture' : 'succeeded',
  };
  call.desk.store.save<'payment_intent'>(paid);
  call.desk.emit(held ? 'payment_intent.amount_capturable_updated' : 'payment_intent.succeeded', paid, call.account);
  keepOrUseUp(call, paid, method);
  completeSession(call, paid);
  if (!held) disputeIfAsked(call, made);
  return paid;
}

interface Failure {
  card: TestCard;
  offSession: boolean;
  refusal: Refusal;
  withoutCharge?: true;
}

function failIntent(call: Call, intent: Stripe.PaymentIntent, method: Stripe.PaymentMethod, failure: Failure): Error {
  const { refusal } = failure;
  const made = failure.withoutCharge
    ? undefined
    : attemptCharge(call, {
        intent,
        method,
        card: failure.card,
        offSession: failure.offSession,
        authenticated: false,
        refusal,
      });
  const codes = { code: refusal.code, ...(refusal.declineCode ? { decline_code: refusal.declineCode } : {}) };
  const failed: Stripe.PaymentIntent = {
    ...intent,
    last_payment_error: {
      type: 'card_error',
      message: refusal.message,
      payment_method: method,
      ...codes,
      ...(made ? { charge: made.id } : {}),
    },
    latest_charge: made?.id ?? intent.latest_charge,
    payment_method: null,
    status: 'requires_payment_method',
  };
  call.desk.store.save<'payment_intent'>(failed);
  call.desk.emit('payment_intent.payment_failed', failed, call.account);
  return declined(refusal.message, {
    ...codes,
    payment_intent: failed,
    payment_method: method,
    ...(made ? { charge: made.id } : {}),
  });
}

function askPayer(call: Call, intent: Stripe.PaymentIntent, choice: ConfirmChoice): Stripe.PaymentIntent {
  const url = `${call.baseUrl}/confirm/${intent.client_secret}`;
  const waiting: Stripe.PaymentIntent = {
    ...intent,
    status: 'requires_action',
    next_action: choice.returnUrl
      ? { type: 'redirect_to_url', redirect_to_url: { return_url: choice.returnUrl, url } }
      : { type: 'use_stripe_sdk', use_stripe_sdk: { type: 'three_d_secure_redirect', stripe_js: url } },
  };
  call.desk.store.save<'payment_intent'>(waiting);
  call.desk.store.setHidden(intent.id, { returnUrl: choice.returnUrl });
  call.desk.emit('payment_intent.requires_action', waiting, call.account);
  return waiting;
}

function wantsConfirmation(card: TestCard, memory: CardMemory, offSession: boolean): boolean {
  if (card.authentication === 'always') return true;
  if (card.authentication === 'on_session') return !offSession;
  return card.authentication === 'unless_set_up' && !memory.setUp;
}

function checkOwner(intent: Stripe.PaymentIntent, method: Stripe.PaymentMethod, memory: CardMemory): void {
  const owner = idOf(method.customer);
  if (owner !== null && owner !== idOf(intent.customer)) {
    throw refused('The PaymentMethod belongs to a customer. Give that customer on the PaymentIntent to use it.', {
      code: 'payment_intent_invalid_parameter',
      param: 'payment_method',
    });
  }
  if (memory.usedUp) {
    throw refused('The PaymentMethod was used before without a customer, or was detached. It may not be used again.', {
      code: 'payment_intent_invalid_parameter',
      param: 'payment_method',
    });
  }
}

function needsReturnUrl(intent: Stripe.PaymentIntent, choice: ConfirmChoice): void {
  const automatic = intent.automatic_payment_methods;
  if (!automatic?.enabled || automatic.allow_redirects === 'never' || choice.returnUrl !== null || choice.offSession)
    return;
  throw refused(
    'This PaymentIntent accepts payment methods that redirect. Give a return_url, or create it with allowed_payment_method_types or with automatic_payment_methods[allow_redirects]=never.',
    { code: 'payment_intent_invalid_parameter', param: 'return_url' },
  );
}

/** A card either becomes the customer's, when the intent says so, or has been used once and for all. */
function keepOrUseUp(call: Call, intent: Stripe.PaymentIntent, method: Stripe.PaymentMethod): void {
  const customer = idOf(intent.customer);
  if (customer !== null && intent.setup_future_usage) {
    attachMethod(call, method, customer);
    if (intent.setup_future_usage === 'off_session') call.desk.store.setHidden(method.id, { setUp: true });
  } else if (idOf(method.customer) === null) {
    call.desk.store.setHidden(method.id, { usedUp: true });
  }
}

function disputeIfAsked(work: Work, charge: Stripe.Charge): void {
  const reason = testCardOf(cardMemory(work, idOf(charge.payment_method) ?? '')).dispute;
  if (reason) openDispute(work, charge, refundableMinor(charge), reason);
}
