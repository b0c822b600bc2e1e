import type Stripe from 'stripe';
import { AUTHENTICATION_FAILED, type Refusal, refusalOf } from '../cards/declines.js';
import { declined, missing, refused } from '../core/errors.js';
import { newId, randomText } from '../core/ids.js';
import { type Call, param, type Route } from '../http/call.js';
import { answerList } from '../http/lists.js';
import { attachMethod } from './attach.js';
import { idOf } from './common.js';
import { readMethod, readMethodTypes } from './intent-input.js';
import { cardMemory, testCardOf } from './payment-method-source.js';
import { readUrl } from './urls.js';

const CANCEL_REASONS = ['abandoned', 'duplicate', 'requested_by_customer'] as const;

function create(call: Call): Stripe.SetupIntent {
  const { input } = call;
  const id = newId('seti');
  const customerId = input.text('customer');
  const confirm = input.flag('confirm') ?? false;
  const intent: Stripe.SetupIntent = {
    ...blank(call, id),
    ...readMethodTypes(input),
    customer: customerId === undefined ? null : call.desk.get('customer', customerId, call.account, 'customer').id,
    description: input.text('description') ?? null,
    metadata: input.metadata(),
    usage: input.choice('usage', ['off_session', 'on_session'] as const) ?? 'off_session',
  };
  const method = readMethod(call);
  const returnUrl = readUrl(input, 'return_url');
  input.flag('use_stripe_sdk');
  input.done();
  const stored: Stripe.SetupIntent = method
    ? { ...intent, payment_method: method.id, status: 'requires_confirmation' }
    : intent;
  call.desk.insert('setup_intent', stored, call.account);
  call.desk.emit('setup_intent.created', stored, call.account);
  if (!confirm) return stored;
  if (!method)
    throw refused('You cannot confirm a SetupIntent without a payment method.', {
      param: 'payment_method',
      code: 'parameter_missing',
    });
  return confirmSetup(call, stored, method, returnUrl);
}

function confirm(call: Call): Stripe.SetupIntent {
  const intent = openSetup(call);
  const given = readMethod(call);
  const returnUrl = readUrl(call.input, 'return_url');
  call.input.flag('use_stripe_sdk');
  call.input.done();
  const storedId = idOf(intent.payment_method);
  const method = given ?? (storedId === null ? undefined : call.desk.get('payment_method', storedId, call.account));
  if (!method)
    throw refused('You cannot confirm this SetupIntent because it is missing a payment method.', {
      code: 'setup_intent_unexpected_state',
      setup_intent: intent,
    });
  return confirmSetup(call, intent, method, returnUrl);
}

/** Saves the card, or asks the payer first, or throws the bank's refusal with its record kept. */
export function confirmSetup(
  call: Call,
  intent: Stripe.SetupIntent,
  method: Stripe.PaymentMethod,
  returnUrl: string | null,
): Stripe.SetupIntent {
  if (!['requires_payment_method', 'requires_confirmation', 'requires_action'].includes(intent.status))
    throw unexpectedState(intent, 'confirmed');
  const memory = cardMemory(call, method.id);
  const owner = idOf(method.customer);
  if (memory.usedUp || (owner !== null && owner !== idOf(intent.customer))) {
    throw refused('The PaymentMethod belongs to another customer, or was used up or detached before. Make a new one.', {
      code: 'setup_intent_invalid_parameter',
      param: 'payment_method',
    });
  }
  const card = testCardOf(memory);
  const chosen: Stripe.SetupIntent = { ...intent, payment_method: method.id, next_action: null };
  if (card.decline) throw failSetup(call, chosen, method, refusalOf(card.decline));
  if (!card.authentication || card.authentication === 'on_session') return succeed(call, chosen, method);
  const url = `${call.baseUrl}/confirm/${intent.client_secret}`;
  const waiting: Stripe.SetupIntent = {
    ...chosen,
    status: 'requires_action',
    next_action: returnUrl
      ? { type: 'redirect_to_url', redirect_to_url: { return_url: returnUrl, url } }
      : { type: 'use_stripe_sdk', use_stripe_sdk: { type: 'three_d_secure_redirect', stripe_js: url } },
  };
  call.desk.store.save<'setup_intent'>(waiting);
  call.desk.store.setHidden(intent.id, { returnUrl });
  call.desk.emit('setup_intent.requires_action', waiting, call.account);
  return waiting;
}

/** The payer's answer on the confirmation page. */
export function answerSetup(call: Call, intent: Stripe.SetupIntent, approved: boolean): Stripe.SetupIntent {
  if (intent.status !== 'requires_action') throw unexpectedState(intent, 'authenticated');
  const method = call.desk.get('payment_method', idOf(intent.payment_method) ?? '', call.account);
  const cleared: Stripe.SetupIntent = { ...intent, next_action: null };
  if (approved) return succeed(call, cleared, method);
  throw failSetup(call, cleared, method, { ...AUTHENTICATION_FAILED, code: 'setup_intent_authentication_failure' });
}

function succeed(call: Call, intent: Stripe.SetupIntent, method: Stripe.PaymentMethod): Stripe.SetupIntent {
  const customerId = idOf(intent.customer);
  if (customerId !== null) attachMethod(call, method, customerId);
  call.desk.store.setHidden(method.id, { setUp: true });
  const done: Stripe.SetupIntent = { ...intent, last_setup_error: null, status: 'succeeded' };
  call.desk.store.save<'setup_intent'>(done);
  call.desk.emit('setup_intent.succeeded', done, call.account);
  return done;
}

function failSetup(call: Call, intent: Stripe.SetupIntent, method: Stripe.PaymentMethod, refusal: Refusal): Error {
  const codes = { code: refusal.code, ...(refusal.declineCode ? { decline_code: refusal.declineCode } : {}) };
  const failed: Stripe.SetupIntent = {
    ...intent,
    last_setup_error: { type: 'card_error', message: refusal.message, payment_method: method, ...codes },
    payment_method: null,
    status: 'requires_payment_method',
  };
  call.desk.store.save<'setup_intent'>(failed);
  call.desk.emit('setup_intent.setup_failed', failed, call.account);
  return declined(refusal.message, { ...codes, setup_intent: failed, payment_method: method });
}

function cancel(call: Call): Stripe.SetupIntent {
  const intent = call.desk.get('setup_intent', param(call, 'id'), call.account);
  const reason = call.input.choice('cancellation_reason', CANCEL_REASONS) ?? null;
  call.input.done();
  if (intent.status === 'succeeded' || intent.status === 'canceled') throw unexpectedState(intent, 'canceled');
  const canceled: Stripe.SetupIntent = {
    ...intent,
    cancellation_reason: reason,
    next_action: null,
    status: 'canceled',
  };
  call.desk.store.save<'setup_intent'>(canceled);
  call.desk.emit('setup_intent.canceled', canceled, call.account);
  return canceled;
}

function retrieve(call: Call): Stripe.SetupIntent {
  const intent = openSetup(call);
  call.input.done();
  return intent;
}

function openSetup(call: Call): Stripe.SetupIntent {
  const intent = call.desk.get('setup_intent', param(call, 'id'), call.account, 'intent');
  const secret = call.input.text('client_secret');
  if (secret === undefined ? call.publishable : secret !== intent.client_secret)
    throw missing('setup intent', intent.id, 'client_secret');
  return intent;
}

function list(call: Call): object {
  const where = { customer: call.input.text('customer'), payment_method: call.input.text('payment_method') };
  return answerList(call, 'setup_intent', '/v1/setup_intents', { where });
}

function unexpectedState(intent: Stripe.SetupIntent, action: string): Error {
  return refused(`This SetupIntent could not be ${action} because it has a status of ${intent.status}.`, {
    code: 'setup_intent_unexpected_state',
    setup_intent: intent,
  });
}

function blank(call: Call, id: string): Stripe.SetupIntent {
  return {
    id,
    object: 'setup_intent',
    allowed_payment_method_types: null,
    application: null,
    automatic_payment_methods: null,
    cancellation_reason: null,
    client_secret: `${id}_secret_${randomText(24)}`,
    created: call.desk.clock.nowS(),
    customer: null,
    description: null,
    excluded_payment_method_types: null,
    last_setup_error: null,
    latest_attempt: null,
    livemode: false,
    mandate: null,
    metadata: {},
    next_action: null,
    on_behalf_of: null,
    payment_method: null,
    payment_method_configuration_details: null,
    payment_method_options: null,
    payment_method_types: ['card'],
    single_use_mandate: null,
    status: 'requires_payment_method',
    usage: 'off_session',
  };
}

export const setupIntentRoutes: readonly Route[] = [
  { method: 'POST', path: '/v1/setup_intents', run: create },
  { method: 'GET', path: '/v1/setup_intents', run: list },
  { method: 'GET', path: '/v1/setup_intents/:id', run: retrieve, open: true },
  { method: 'POST', path: '/v1/setup_intents/:id/confirm', run: confirm, open: true },
  { method: 'POST', path: '/v1/setup_intents/:id/cancel', run: cancel },
];
