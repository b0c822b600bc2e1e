import type Stripe from 'stripe';
import { checkChargeAmount, knownCurrency } from '../core/currencies.js';
import { badParameter, missing, refused } from '../core/errors.js';
import { newId } from '../core/ids.js';
import type { Input } from '../core/input.js';
import { type Call, param, type Route, type Work } from '../http/call.js';
import { answerList } from '../http/lists.js';
import { closeSession, planOf, type SessionPlan } from './checkout-life.js';
import { idOf } from './common.js';
import { blankIntent } from './intent-input.js';
import { cancelIntent } from './intent-life.js';
import { readUrl } from './urls.js';

type Session = Stripe.Checkout.Session;

const LEAST_OPEN_S = 30 * 60;
const LONGEST_OPEN_S = 24 * 3600;
const MOST_ITEMS = 100;

interface Item {
  amountMinor: number;
  currency: string;
  name: string;
}

function create(call: Call): Session {
  const { input } = call;
  const mode = input.choice('mode', ['payment'] as const);
  if (mode === undefined) throw badParameter('mode', 'You must give mode; this local service holds "payment".');
  const items = (input.groups('line_items') ?? []).map(readItem);
  const [first] = items;
  if (!first || items.length > MOST_ITEMS) throw badParameter('line_items', `Give 1 to ${MOST_ITEMS} line items.`);
  if (items.some((item) => item.currency !== first.currency)) {
    throw badParameter('line_items', 'All line items must have the same currency.');
  }
  const amountMinor = items.reduce((sum, item) => sum + item.amountMinor, 0);
  const customer = input.text('customer');
  const types = input.texts('allowed_payment_method_types');
  if (types?.some((type) => type !== 'card')) {
    throw badParameter('allowed_payment_method_types', 'Only "card" is held by this local service.');
  }
  const successUrl = readUrl(input, 'success_url');
  if (successUrl === null)
    throw badParameter('success_url', 'Missing required param: success_url.', 'parameter_missing');
  const id = newId('cs_test');
  const session: Session = {
    ...blankSession(call, id),
    allowed_payment_method_types: types ?? null,
    amount_subtotal: amountMinor,
    amount_total: amountMinor,
    cancel_url: readUrl(input, 'cancel_url'),
    client_reference_id: input.text('client_reference_id', 200) ?? null,
    currency: first.currency,
    customer: customer === undefined ? null : call.desk.get('customer', customer, call.account, 'customer').id,
    expires_at: readExpiry(call),
    metadata: input.metadata(),
    success_url: successUrl,
    url: `${call.baseUrl}/checkout/${id}`,
  };
  const plan = readPlan(input.group('payment_intent_data'));
  input.done();
  checkChargeAmount(amountMinor, first.currency);
  call.desk.insert('checkout.session', session, call.account, { plan, names: items.map((item) => item.name) });
  call.desk.schedule('expire_session', id, session.expires_at);
  return session;
}

function readItem(item: Input): Item {
  const quantity = item.requiredInteger('quantity');
  if (quantity < 1) throw badParameter(item.name('quantity'), 'quantity must be at least 1.');
  const price = item.group('price_data');
  if (!price) throw badParameter(item.name('price_data'), 'This local service holds no prices; give price_data.');
  const product = price.group('product_data');
  if (!product)
    throw badParameter(price.name('product_data'), 'This local service holds no products; give product_data.');
  const unitMinor = price.requiredInteger('unit_amount');
  if (unitMinor < 0) throw badParameter(price.name('unit_amount'), 'unit_amount must not be negative.');
  const amountMinor = unitMinor * quantity;
  return {
    amountMinor,
    currency: knownCurrency(price.requiredText('currency')),
    name: product.requiredText('name', 250),
  };
}

function readExpiry(call: Call): number {
  const nowS = call.desk.clock.nowS();
  const expiresS = call.input.integer('expires_at') ?? nowS + LONGEST_OPEN_S;
  if (expiresS < nowS + LEAST_OPEN_S || expiresS > nowS + LONGEST_OPEN_S) {
    throw badParameter('expires_at', 'The `expires_at` timestamp must be between 30 minutes and 24 hours from now.');
  }
  return expiresS;
}

function readPlan(data: Input | undefined): SessionPlan {
  return {
    captureMethod: data?.choice('capture_method', ['automatic_async', 'manual'] as const) ?? 'automatic_async',
    description: data?.text('description') ?? null,
    metadata: data?.metadata() ?? {},
    setupFutureUsage: data?.choice('setup_future_usage', ['off_session', 'on_session'] as const) ?? null,
  };
}

/** The intent behind the page: made when somebody first tries to pay, and the same for every further try. */
export function intentOfSession(call: Call, session: Session): Stripe.PaymentIntent {
  const earlier = idOf(session.payment_intent);
  if (earlier !== null) return call.desk.get('payment_intent', earlier, call.account);
  const plan = planOf(call, session);
  const id = newId('pi');
  const intent: Stripe.PaymentIntent = {
    ...blankIntent(call, id),
    amount: session.amount_total ?? 0,
    currency: session.currency ?? '',
    allowed_payment_method_types: ['card'],
    capture_method: plan.captureMethod,
    customer: idOf(session.customer),
    description: plan.description,
    metadata: plan.metadata,
    setup_future_usage: plan.setupFutureUsage,
  };
  call.desk.insert('payment_intent', intent, call.account);
  call.desk.emit('payment_intent.created', intent, call.account);
  call.desk.store.save<'checkout.session'>({ ...session, payment_intent: id });
  return intent;
}

/** Time or the merchant closes the page; what was tried on it can no longer be paid. */
export function expireSession(work: Work, session: Session): Session {
  const { expired, intentId } = closeSession(work, session);
  const intent = intentId === null ? undefined : work.desk.store.find('payment_intent', intentId, work.account);
  if (intent && intent.status !== 'canceled') cancelIntent(work, intent, 'abandoned');
  return expired;
}

function expire(call: Call): Session {
  const session = sessionOf(call);
  call.input.done();
  if (session.status !== 'open') {
    throw refused(
      `Only Checkout Sessions with a status in ["open"] can be expired. This Checkout Session has a status of ${session.status}.`,
    );
  }
  return expireSession(call, session);
}

function retrieve(call: Call): Session {
  const session = sessionOf(call);
  call.input.done();
  return session;
}

function list(call: Call): object {
  const where = { customer: call.input.text('customer'), payment_intent: call.input.text('payment_intent') };
  return answerList(call, 'checkout.session', '/v1/checkout/sessions', { where });
}

function sessionOf(call: Call): Session {
  const id = param(call, 'id');
  const session = call.desk.store.find('checkout.session', id, call.account);
  if (!session) throw missing('checkout session', id, 'session');
  return session;
}

function blankSession(call: Call, id: string): Session {
  return {
    id,
    object: 'checkout.session',
    adaptive_pricing: null,
    after_expiration: null,
    allow_promotion_codes: null,
    allowed_payment_method_types: null,
    amount_subtotal: null,
    amount_total: null,
    automatic_tax: { enabled: false, liability: null, provider: null, status: null },
    billing_address_collection: null,
    cancel_url: null,
    client_reference_id: null,
    client_secret: null,
    collected_information: null,
    consent: null,
    consent_collection: null,
    created: call.desk.clock.nowS(),
    currency: null,
    currency_conversion: null,
    custom_fields: [],
    custom_text: { after_submit: null, shipping_address: null, submit: null, terms_of_service_acceptance: null },
    customer: null,
    customer_account: null,
    customer_creation: null,
    customer_details: null,
    customer_email: null,
    discounts: null,
    expires_at: 0,
    integration_identifier: null,
    invoice: null,
    invoice_creation: null,
    livemode: false,
    locale: null,
    managed_payments: null,
    metadata: {},
    mode: 'payment',
    origin_context: null,
    payment_intent: null,
    payment_link: null,
    payment_method_collection: 'if_required',
    payment_method_configuration_details: null,
    payment_method_options: {},
    payment_method_types: ['card'],
    payment_status: 'unpaid',
    permissions: null,
    recovered_from: null,
    saved_payment_method_options: null,
    setup_intent: null,
    shipping_address_collection: null,
    shipping_cost: null,
    shipping_options: [],
    status: 'open',
    submit_type: null,
    subscription: null,
    success_url: null,
    total_details: { amount_discount: 0, amount_shipping: 0, amount_tax: 0 },
    ui_mode: 'hosted_page',
    url: null,
    wallet_options: null,
  };
}

export const checkoutSessionRoutes: readonly Route[] = [
  { method: 'POST', path: '/v1/checkout/sessions', run: create },
  { method: 'GET', path: '/v1/checkout/sessions', run: list },
  { method: 'GET', path: '/v1/checkout/sessions/:id', run: retrieve },
  { method: 'POST', path: '/v1/checkout/sessions/:id/expire', run: expire },
];
