/** The provider's own SDK, connected as configured, and its errors as ours. */
import Stripe from 'stripe';
import type { Config } from '../../platform/config.js';
import { DomainError } from '../../platform/domain-error.js';
import { refusalSentence } from './stripe-facts.js';

/** A person waits for most of these calls; what takes longer is found again by its idempotency key. */
const TIMEOUT_MS = 12_000;
const NETWORK_RETRIES = 2;

export function stripeClient(config: Pick<Config, 'paymentsUrl' | 'stripeSecretKey'>): Stripe {
  const url = new URL(config.paymentsUrl);
  const protocol = url.protocol === 'http:' ? 'http' : 'https';
  return new Stripe(config.stripeSecretKey, {
    host: url.hostname,
    port: url.port || (protocol === 'http' ? 80 : 443),
    protocol,
    timeout: TIMEOUT_MS,
    maxNetworkRetries: NETWORK_RETRIES,
    telemetry: false,
  });
}

/**
 * The provider's errors as ours. `whenElsewhere` answers where the provider says that the object is past this step:
 * a repeat after a crash, or the buyer was faster.
 */
export async function ask<T>(answer: Promise<T>, whenElsewhere?: () => Promise<T>): Promise<T> {
  try {
    return await answer;
  } catch (error) {
    if (error instanceof Stripe.errors.StripeCardError) throw new DomainError('card-declined', refusalSentence(error));
    if (error instanceof Stripe.errors.StripeInvalidRequestError) {
      const elsewhere = error.code === 'payment_intent_unexpected_state' || error.statusCode === 400;
      if (whenElsewhere && elsewhere) return await whenElsewhere();
      throw error;
    }
    if (
      error instanceof Stripe.errors.StripeConnectionError ||
      error instanceof Stripe.errors.StripeAPIError ||
      error instanceof Stripe.errors.StripeRateLimitError ||
      error instanceof Stripe.errors.StripeIdempotencyError
    ) {
      throw new DomainError(
        'payment-unavailable',
        'The payment service does not answer just now. Nothing is charged twice if you try again in a moment.',
      );
    }
    throw error;
  }
}
