import type Stripe from 'stripe';
import { newId } from '../core/ids.js';
import type { Input } from '../core/input.js';
import { type Call, param, type Route } from '../http/call.js';
import { answerList } from '../http/lists.js';
import { attachMethod } from './attach.js';
import { readAddress } from './common.js';
import { usableMethod } from './payment-method-source.js';

function readFields(input: Input, customer: Stripe.Customer): Stripe.Customer {
  const invoiceSettings = input.group('invoice_settings');
  const address = input.group('address');
  const shown: Stripe.Customer = {
    ...customer,
    description: pick(input.textOrNull('description'), customer.description),
    email: pick(input.textOrNull('email', 512), customer.email),
    name: pick(input.textOrNull('name', 256), customer.name ?? null),
    phone: pick(input.textOrNull('phone', 20), customer.phone ?? null),
    tax_exempt: input.choice('tax_exempt', ['none', 'exempt', 'reverse'] as const) ?? customer.tax_exempt ?? 'none',
    preferred_locales: input.texts('preferred_locales') ?? customer.preferred_locales ?? [],
    metadata: input.metadata(customer.metadata),
    ...(address ? { address: readAddress(address) } : {}),
  };
  if (invoiceSettings) {
    const method = invoiceSettings.textOrNull('default_payment_method');
    if (method !== undefined) shown.invoice_settings = { ...shown.invoice_settings, default_payment_method: method };
  }
  return shown;
}

function pick<T>(given: T | undefined, current: T): T {
  return given === undefined ? current : given;
}

function create(call: Call): Stripe.Customer {
  const blank: Stripe.Customer = {
    id: newId('cus'),
    object: 'customer',
    address: null,
    balance: 0,
    created: call.desk.clock.nowS(),
    currency: null,
    customer_account: null,
    default_source: null,
    delinquent: false,
    description: null,
    discount: null,
    email: null,
    invoice_settings: { custom_fields: null, default_payment_method: null, footer: null, rendering_options: null },
    livemode: false,
    metadata: {},
    name: null,
    phone: null,
    preferred_locales: [],
    shipping: null,
    tax_exempt: 'none',
    test_clock: null,
  };
  const methodId = call.input.text('payment_method');
  const customer = readFields(call.input, blank);
  call.input.done();
  call.desk.insert('customer', customer, call.account);
  call.desk.emit('customer.created', customer, call.account);
  if (methodId !== undefined) attachMethod(call, usableMethod(call, methodId), customer.id);
  return customer;
}

function update(call: Call): Stripe.Customer {
  const before = call.desk.get('customer', param(call, 'id'), call.account);
  const after = readFields(call.input, before);
  call.input.done();
  const methodId = after.invoice_settings.default_payment_method;
  if (typeof methodId === 'string')
    call.desk.get('payment_method', methodId, call.account, 'invoice_settings[default_payment_method]');
  call.desk.store.save<'customer'>(after);
  call.desk.emit('customer.updated', after, call.account);
  return after;
}

function remove(call: Call): Stripe.DeletedCustomer {
  const customer = call.desk.get('customer', param(call, 'id'), call.account);
  call.input.done();
  call.desk.store.remove(customer.id);
  call.desk.emit('customer.deleted', customer, call.account);
  return { id: customer.id, object: 'customer', deleted: true };
}

function retrieve(call: Call): Stripe.Customer {
  call.input.done();
  return call.desk.get('customer', param(call, 'id'), call.account);
}

function list(call: Call): object {
  return answerList(call, 'customer', '/v1/customers', { where: { email: call.input.text('email') } });
}

export const customerRoutes: readonly Route[] = [
  { method: 'POST', path: '/v1/customers', run: create },
  { method: 'GET', path: '/v1/customers', run: list },
  { method: 'GET', path: '/v1/customers/:id', run: retrieve },
  { method: 'POST', path: '/v1/customers/:id', run: update },
  { method: 'DELETE', path: '/v1/customers/:id', run: remove },
];
