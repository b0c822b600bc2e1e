import type Stripe from 'stripe';
import { checkAmount, checkChargeAmount, knownCurrency } from '../core/currencies.js';
import { badParameter, missing, refused } from '../core/errors.js';
import { newId } from '../core/ids.js';
import type { Input } from '../core/input.js';
import { type Call, param, type Route } from '../http/call.js';
import { answerList } from '../http/lists.js';
import { idOf } from './common.js';
import { blankIntent, readMethod, readMethodTypes } from './intent-input.js';
import { type ConfirmChoice, cancelIntent, captureIntent, confirmIntent, unexpectedState } from './intent-life.js';
import { readUrl } from './urls.js';

const CANCEL_REASONS = ['duplicate', 'fraudulent', 'requested_by_customer', 'abandoned'] as const;
const USAGES = ['off_session', 'on_session'] as const;

function create(call: Call): Stripe.PaymentIntent {
  const { input } = call;
  const amount = input.requiredInteger('amount');
  const currency = knownCurrency(input.requiredText('currency'));
  const id = newId('pi');
  const intent: Stripe.PaymentIntent = {
    ...blankIntent(call, id),
    amount,
    currency,
    ...readMethodTypes(input),
    capture_method:
      input.choice('capture_method', ['automatic', 'automatic_async', 'manual'] as const) ?? 'automatic_async',
    customer: readCustomer(call) ?? null,
    description: input.text('description') ?? null,
    metadata: input.metadata(),
    receipt_email: input.text('receipt_email') ?? null,
    setup_future_usage: input.choice('setup_future_usage', USAGES) ?? null,
    statement_descriptor_suffix: input.text('statement_descriptor_suffix', 22) ?? null,
    transfer_group: input.text('transfer_group') ?? null,
  };
  input.choice('confirmation_method', ['automatic'] as const);
  const confirm = input.flag('confirm') ?? false;
  const method = readMethod(call);
  const choice = readChoice(input);
  input.done();
  checkChargeAmount(amount, currency);
  if (!confirm && (choice.offSession || choice.returnUrl !== null)) {
    throw badParameter('confirm', 'off_session and return_url can only be given together with confirm=true.');
  }
  if (confirm && !method)
    throw refused('You cannot confirm a PaymentIntent without a payment method.', {
      param: 'payment_method',
      code: 'parameter_missing',
    });
  const stored: Stripe.PaymentIntent = method
    ? { ...intent, payment_method: method.id, status: 'requires_confirmation' }
    : intent;
  call.desk.insert('payment_intent', stored, call.account);
  call.desk.emit('payment_intent.created', stored, call.account);
  return confirm && method ? confirmIntent(call, stored, method, choice) : stored;
}

function confirm(call: Call): object {
  const intent = openIntent(call);
  const { input } = call;
  const method = readMethod(call);
  const usage = input.choice('setup_future_usage', USAGES);
  const receipt = input.text('receipt_email');
  const choice = readChoice(input);
  input.done();
  if (call.publishable && choice.offSession) throw badParameter('off_session', 'off_session needs a secret key.');
  const chosen = method ?? storedMethod(call, intent);
  const prepared: Stripe.PaymentIntent = {
    ...intent,
    setup_future_usage: usage ?? intent.setup_future_usage,
    receipt_email: receipt ?? intent.receipt_email,
  };
  return shown(call, confirmIntent(call, prepared, chosen, choice));
}

function storedMethod(call: Call, intent: Stripe.PaymentIntent): Stripe.PaymentMethod {
  const methodId = idOf(intent.payment_method);
  if (methodId !== null) return call.desk.get('payment_method', methodId, call.account, 'payment_method');
  if (['succeeded', 'canceled', 'requires_capture'].includes(intent.status)) throw unexpectedState(intent, 'confirmed');
  throw refused('You cannot confirm this PaymentIntent because it is missing a payment method.', {
    code: 'payment_intent_unexpected_state',
    payment_intent: intent,
  });
}

function capture(call: Call): Stripe.PaymentIntent {
  const intent = call.desk.get('payment_intent', param(call, 'id'), call.account);
  const amount = call.input.integer('amount_to_capture');
  const metadata = call.input.metadata(intent.metadata);
  if (call.input.flag('final_capture') === false)
    throw badParameter('final_capture', 'Capturing in several steps is not available for this card.');
  call.input.done();
  if (amount !== undefined) checkAmount(amount, intent.currency, 'amount_to_capture');
  return captureIntent(call, { ...intent, metadata }, amount);
}

function cancel(call: Call): Stripe.PaymentIntent {
  const intent = call.desk.get('payment_intent', param(call, 'id'), call.account);
  const reason = call.input.choice('cancellation_reason', CANCEL_REASONS) ?? null;
  call.input.done();
  return cancelIntent(call, intent, reason);
}

function update(call: Call): Stripe.PaymentIntent {
  const before = call.desk.get('payment_intent', param(call, 'id'), call.account);
  const { input } = call;
  const amount = input.integer('amount');
  const currency = input.has('currency') ? knownCurrency(input.requiredText('currency')) : undefined;
  const customer = readCustomer(call);
  const method = readMethod(call);
  const usage = input.choice('setup_future_usage', USAGES);
  const after: Stripe.PaymentIntent = {
    ...before,
    description: input.textOrNull('description') ?? (input.has('description') ? null : before.description),
    metadata: input.metadata(before.metadata),
    receipt_email: input.textOrNull('receipt_email') ?? (input.has('receipt_email') ? null : before.receipt_email),
    transfer_group: input.text('transfer_group') ?? before.transfer_group,
  };
  input.done();
  const changesPayment = [amount, currency, customer, method, usage].some((value) => value !== undefined);
  if (changesPayment) {
    if (!['requires_payment_method', 'requires_confirmation', 'requires_action'].includes(before.status))
      throw unexpectedState(before, 'changed');
    after.amount = amount ?? before.amount;
    after.currency = currency ?? before.currency;
    checkChargeAmount(after.amount, after.currency);
    if (customer !== undefined) after.customer = customer;
    if (usage !== undefined) after.setup_future_usage = usage;
    if (method) after.payment_method = method.id;
    after.next_action = null;
    after.status = idOf(after.payment_method) === null ? 'requires_payment_method' : 'requires_confirmation';
  }
  call.desk.store.save<'payment_intent'>(after);
  return after;
}

function retrieve(call: Call): object {
  const intent = openIntent(call);
  call.input.done();
  return shown(call, intent);
}

function list(call: Call): object {
  return answerList(call, 'payment_intent', '/v1/payment_intents', {
    where: { customer: call.input.text('customer') },
  });
}

/** The intent of the path; a browser, and whoever gives a client secret, must give the right one. */
function openIntent(call: Call): Stripe.PaymentIntent {
  const intent = call.desk.get('payment_intent', param(call, 'id'), call.account, 'intent');
  const secret = call.input.text('client_secret');
  if (secret === undefined ? call.publishable : secret !== intent.client_secret)
    throw missing('payment intent', intent.id, 'client_secret');
  return intent;
}

/** What a browser may see of an intent. */
const SHOWN_TO_BROWSERS = new Set(
  'id object amount automatic_payment_methods canceled_at cancellation_reason capture_method client_secret confirmation_method created currency description last_payment_error livemode next_action payment_method payment_method_types processing receipt_email setup_future_usage shipping status'.split(
    ' ',
  ),
);

function shown(call: Call, intent: Stripe.PaymentIntent): object {
  if (!call.publishable) return intent;
  return Object.fromEntries(Object.entries(intent).filter(([field]) => SHOWN_TO_BROWSERS.has(field)));
}

function readCustomer(call: Call): string | undefined {
  const id = call.input.text('customer');
  return id === undefined ? undefined : call.desk.get('customer', id, call.account, 'customer').id;
}

function readChoice(input: Input): ConfirmChoice {
  input.flag('use_stripe_sdk');
  return {
    offSession: input.flag('off_session') ?? false,
    returnUrl: readUrl(input, 'return_url'),
    failOnAction: input.flag('error_on_requires_action') ?? false,
  };
}

export const paymentIntentRoutes: readonly Route[] = [
  { method: 'POST', path: '/v1/payment_intents', run: create },
  { method: 'GET', path: '/v1/payment_intents', run: list },
  { method: 'GET', path: '/v1/payment_intents/:id', run: retrieve, open: true },
  { method: 'POST', path: '/v1/payment_intents/:id', run: update },
  { method: 'POST', path: '/v1/payment_intents/:id/confirm', run: confirm, open: true },
  { method: 'POST', path: '/v1/payment_intents/:id/capture', run: capture },
  { method: 'POST', path: '/v1/payment_intents/:id/cancel', run: cancel },
];
