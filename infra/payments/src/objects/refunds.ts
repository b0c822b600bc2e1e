import type Stripe from 'stripe';
import { checkAmount } from '../core/currencies.js';
import { badParameter, refused } from '../core/errors.js';
import { type Call, param, type Route } from '../http/call.js';
import { answerList } from '../http/lists.js';
import { refundableMinor } from './charge-life.js';
import { idOf } from './common.js';
import { makeRefund } from './refund-life.js';

const REASONS = ['duplicate', 'fraudulent', 'requested_by_customer'] as const;

function create(call: Call): Stripe.Refund {
  const { input } = call;
  const chargeId = input.text('charge');
  const intentId = input.text('payment_intent');
  const amount = input.integer('amount');
  const reason = input.choice('reason', REASONS) ?? null;
  const metadata = input.metadata();
  input.done();
  if ((chargeId === undefined) === (intentId === undefined)) {
    throw badParameter(
      'charge',
      'Give either charge or payment_intent.',
      chargeId === undefined ? 'parameter_missing' : 'parameters_exclusive',
    );
  }
  const charge = call.desk.get('charge', chargeId ?? chargeOfIntent(call, intentId ?? ''), call.account, 'charge');
  if (amount !== undefined) checkAmount(amount, charge.currency, 'amount');
  return makeRefund(call, { charge, amountMinor: amount ?? refundableMinor(charge), reason, metadata });
}

function chargeOfIntent(call: Call, intentId: string): string {
  const intent = call.desk.get('payment_intent', intentId, call.account, 'payment_intent');
  const chargeId = idOf(intent.latest_charge);
  if (chargeId !== null) return chargeId;
  throw refused(`This PaymentIntent (${intentId}) does not have a successful charge to refund.`, {
    code: 'payment_intent_unexpected_state',
    param: 'payment_intent',
  });
}

function retrieve(call: Call): Stripe.Refund {
  call.input.done();
  return call.desk.get('refund', param(call, 'id'), call.account);
}

function update(call: Call): Stripe.Refund {
  const before = call.desk.get('refund', param(call, 'id'), call.account);
  const after: Stripe.Refund = { ...before, metadata: call.input.metadata(before.metadata ?? {}) };
  call.input.done();
  call.desk.store.save<'refund'>(after);
  call.desk.emit('refund.updated', after, call.account);
  call.desk.emit('charge.refund.updated', after, call.account);
  return after;
}

function list(call: Call): object {
  const where = { charge: call.input.text('charge'), payment_intent: call.input.text('payment_intent') };
  return answerList(call, 'refund', '/v1/refunds', { where });
}

export const refundRoutes: readonly Route[] = [
  { method: 'POST', path: '/v1/refunds', run: create },
  { method: 'GET', path: '/v1/refunds', run: list },
  { method: 'GET', path: '/v1/refunds/:id', run: retrieve },
  { method: 'POST', path: '/v1/refunds/:id', run: update },
];
