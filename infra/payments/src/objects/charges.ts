import type Stripe from 'stripe';
import { type Call, param, type Route } from '../http/call.js';
import { answerList } from '../http/lists.js';

function retrieve(call: Call): Stripe.Charge {
  call.input.done();
  return call.desk.get('charge', param(call, 'id'), call.account);
}

function update(call: Call): Stripe.Charge {
  const before = call.desk.get('charge', param(call, 'id'), call.account);
  const after: Stripe.Charge = {
    ...before,
    description: call.input.textOrNull('description') ?? (call.input.has('description') ? null : before.description),
    metadata: call.input.metadata(before.metadata),
    transfer_group: call.input.text('transfer_group') ?? before.transfer_group,
  };
  call.input.done();
  call.desk.store.save<'charge'>(after);
  call.desk.emit('charge.updated', after, call.account);
  return after;
}

function list(call: Call): object {
  const { input } = call;
  const where = {
    customer: input.text('customer'),
    payment_intent: input.text('payment_intent'),
    transfer_group: input.text('transfer_group'),
  };
  return answerList(call, 'charge', '/v1/charges', { where });
}

export const chargeRoutes: readonly Route[] = [
  { method: 'GET', path: '/v1/charges', run: list },
  { method: 'GET', path: '/v1/charges/:id', run: retrieve },
  { method: 'POST', path: '/v1/charges/:id', run: update },
];
