import type Stripe from 'stripe';
import { badParameter } from '../core/errors.js';
import { randomText } from '../core/ids.js';
import type { Input } from '../core/input.js';
import type { Call } from '../http/call.js';
import { createMethod, usableMethod } from './payment-method-source.js';

/** The payment method that a request names or describes, if it does either. */
export function readMethod(call: Call): Stripe.PaymentMethod | undefined {
  const id = call.input.text('payment_method');
  const data = call.input.group('payment_method_data');
  if (id !== undefined && data)
    throw badParameter(
      'payment_method',
      'Give payment_method or payment_method_data, not both.',
      'parameters_exclusive',
    );
  if (data) return createMethod(call, data);
  return id === undefined ? undefined : usableMethod(call, id);
}

type MethodTypes = Pick<Stripe.PaymentIntent, 'automatic_payment_methods' | 'payment_method_types'> & {
  allowed_payment_method_types: 'card'[] | null;
};

/** How the intent may be paid. Without a word about it, whatever is switched on: that is the API's own default. */
export function readMethodTypes(input: Input): MethodTypes {
  const types = input.texts('allowed_payment_method_types');
  const automatic = input.group('automatic_payment_methods');
  const enabled = automatic?.flag('enabled') ?? types === undefined;
  const redirects = automatic?.choice('allow_redirects', ['always', 'never'] as const) ?? 'always';
  if (types?.some((type) => type !== 'card')) {
    throw badParameter('allowed_payment_method_types', 'Only "card" is held by this local service.');
  }
  if (types && enabled) {
    throw badParameter(
      'allowed_payment_method_types',
      'Give allowed_payment_method_types or automatic_payment_methods, not both.',
      'parameters_exclusive',
    );
  }
  return {
    allowed_payment_method_types: types ? ['card'] : null,
    automatic_payment_methods: enabled ? { enabled: true, allow_redirects: redirects } : null,
    payment_method_types: ['card'],
  };
}

/** An intent with nothing decided yet. */
export function blankIntent(call: Call, id: string): Stripe.PaymentIntent {
  return {
    id,
    object: 'payment_intent',
    allowed_payment_method_types: null,
    amount: 0,
    amount_capturable: 0,
    amount_received: 0,
    application: null,
    application_fee_amount: null,
    automatic_payment_methods: null,
    canceled_at: null,
    cancellation_reason: null,
    capture_method: 'automatic_async',
    client_secret: `${id}_secret_${randomText(24)}`,
    confirmation_method: 'automatic',
    created: call.desk.clock.nowS(),
    currency: '',
    customer: null,
    customer_account: null,
    description: null,
    excluded_payment_method_types: null,
    last_payment_error: null,
    latest_charge: null,
    livemode: false,
    managed_payments: null,
    metadata: {},
    next_action: null,
    on_behalf_of: null,
    payment_method: null,
    payment_method_configuration_details: null,
    payment_method_options: null,
    payment_method_types: ['card'],
    payment_record: null,
    processing: null,
    receipt_email: null,
    review: null,
    setup_future_usage: null,
    shipping: null,
    source: null,
    statement_descriptor: null,
    statement_descriptor_suffix: null,
    status: 'requires_payment_method',
    transfer_group: null,
  };
}
