import type Stripe from 'stripe';
import { refused } from '../core/errors.js';
import type { Call } from '../http/call.js';
import { idOf } from './common.js';
import { cardMemory, refuseUnsavable, testCardOf } from './payment-method-source.js';

/** Ties a payment method to a customer. A method belongs to one customer for good, until it is detached for good. */
export function attachMethod(call: Call, method: Stripe.PaymentMethod, customerId: string): Stripe.PaymentMethod {
  const customer = call.desk.get('customer', customerId, call.account, 'customer');
  const owner = idOf(method.customer);
  if (owner === customer.id) return method;
  const memory = cardMemory(call, method.id);
  if (owner !== null || memory.usedUp) {
    throw refused('This PaymentMethod was used or attached before and cannot be attached again. Make a new one.', {
      code: 'payment_method_unexpected_state',
    });
  }
  refuseUnsavable(testCardOf(memory));
  const attached: Stripe.PaymentMethod = { ...method, customer: customer.id };
  call.desk.store.save<'payment_method'>(attached);
  call.desk.emit('payment_method.attached', attached, call.account);
  return attached;
}
