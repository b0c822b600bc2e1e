import type Stripe from 'stripe';
import { refused } from '../core/errors.js';
import { type Call, param, type Route } from '../http/call.js';
import { answerList } from '../http/lists.js';
import { attachMethod } from './attach.js';
import { idOf } from './common.js';
import { createMethod, readBilling, usableMethod } from './payment-method-source.js';

function create(call: Call): Stripe.PaymentMethod {
  const method = createMethod(call, call.input);
  call.input.done();
  return method;
}

function retrieve(call: Call): Stripe.PaymentMethod {
  call.input.done();
  return call.desk.get('payment_method', param(call, 'id'), call.account);
}

function update(call: Call): Stripe.PaymentMethod {
  const before = call.desk.get('payment_method', param(call, 'id'), call.account);
  const billing = call.input.group('billing_details');
  const metadata = call.input.metadata(before.metadata ?? {});
  const after: Stripe.PaymentMethod = {
    ...before,
    metadata,
    billing_details: billing ? readBilling(billing) : before.billing_details,
  };
  call.input.done();
  if (!before.customer)
    throw refused('Attach this PaymentMethod to a customer before you change it.', {
      code: 'payment_method_unexpected_state',
    });
  call.desk.store.save<'payment_method'>(after);
  call.desk.emit('payment_method.updated', after, call.account);
  return after;
}

function attach(call: Call): Stripe.PaymentMethod {
  const customerId = call.input.requiredText('customer');
  call.input.done();
  return attachMethod(call, usableMethod(call, param(call, 'id'), 'id'), customerId);
}

function detach(call: Call): Stripe.PaymentMethod {
  call.input.done();
  const method = call.desk.get('payment_method', param(call, 'id'), call.account);
  if (idOf(method.customer) === null) {
    throw refused('This PaymentMethod is not attached to a customer, so it cannot be detached.', {
      code: 'payment_method_unexpected_state',
    });
  }
  const detached: Stripe.PaymentMethod = { ...method, customer: null };
  call.desk.store.save<'payment_method'>(detached);
  call.desk.store.setHidden(method.id, { usedUp: true });
  call.desk.emit('payment_method.detached', detached, call.account, { customer: idOf(method.customer) });
  return detached;
}

function list(call: Call): object {
  const customer = call.input.text('customer');
  const type = call.input.text('type');
  return answerList(call, 'payment_method', '/v1/payment_methods', { where: { customer, type } });
}

function listOfCustomer(call: Call): object {
  const customer = call.desk.get('customer', param(call, 'id'), call.account);
  const type = call.input.text('type');
  return answerList(call, 'payment_method', `/v1/customers/${customer.id}/payment_methods`, {
    where: { customer: customer.id, type },
  });
}

function retrieveOfCustomer(call: Call): Stripe.PaymentMethod {
  call.input.done();
  const method = call.desk.get('payment_method', param(call, 'method'), call.account);
  if (idOf(method.customer) !== param(call, 'id'))
    throw refused('This PaymentMethod does not belong to that customer.', { code: 'resource_missing' });
  return method;
}

export const paymentMethodRoutes: readonly Route[] = [
  { method: 'POST', path: '/v1/payment_methods', run: create, open: true },
  { method: 'GET', path: '/v1/payment_methods', run: list },
  { method: 'GET', path: '/v1/payment_methods/:id', run: retrieve },
  { method: 'POST', path: '/v1/payment_methods/:id', run: update },
  { method: 'POST', path: '/v1/payment_methods/:id/attach', run: attach },
  { method: 'POST', path: '/v1/payment_methods/:id/detach', run: detach },
  { method: 'GET', path: '/v1/customers/:id/payment_methods', run: listOfCustomer },
  { method: 'GET', path: '/v1/customers/:id/payment_methods/:method', run: retrieveOfCustomer },
];
