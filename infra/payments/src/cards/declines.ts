import { ApiError, declined } from '../core/errors.js';
import type { Decline } from './test-cards.js';

interface Refusal {
  code: string;
  declineCode?: string;
  message: string;
}

const REFUSALS: Readonly<Record<Decline, Refusal>> = {
  generic_decline: { code: 'card_declined', declineCode: 'generic_decline', message: 'Your card was declined.' },
  insufficient_funds: {
    code: 'card_declined',
    declineCode: 'insufficient_funds',
    message: 'Your card has insufficient funds.',
  },
  lost_card: { code: 'card_declined', declineCode: 'lost_card', message: 'Your card was declined.' },
  stolen_card: { code: 'card_declined', declineCode: 'stolen_card', message: 'Your card was declined.' },
  expired_card: { code: 'expired_card', declineCode: 'expired_card', message: 'Your card has expired.' },
  incorrect_cvc: {
    code: 'incorrect_cvc',
    declineCode: 'incorrect_cvc',
    message: "Your card's security code is incorrect.",
  },
  processing_error: {
    code: 'processing_error',
    declineCode: 'processing_error',
    message: 'An error occurred while processing your card. Try again in a little bit.',
  },
};

export const AUTHENTICATION_REQUIRED: Refusal = {
  code: 'authentication_required',
  declineCode: 'authentication_required',
  message: 'Your card was declined. This transaction requires authentication.',
};

export const AUTHENTICATION_FAILED: Refusal = {
  code: 'payment_intent_authentication_failure',
  message: 'The payer did not confirm this payment. Choose another payment method, or try again.',
};

export type { Refusal };

export function refusalOf(decline: Decline): Refusal {
  return REFUSALS[decline];
}

export function refusalError(refusal: Refusal): ApiError {
  return declined(refusal.message, {
    code: refusal.code,
    ...(refusal.declineCode ? { decline_code: refusal.declineCode } : {}),
  });
}
