import { createHmac } from 'node:crypto';
import type Stripe from 'stripe';
import { refusalError, refusalOf } from '../cards/declines.js';
import { cardByNumber, cardByToken, hasValidCheckDigit, type TestCard } from '../cards/test-cards.js';
import { badParameter, declined, missing } from '../core/errors.js';
import { newId } from '../core/ids.js';
import type { Input } from '../core/input.js';
import type { Call, Work } from '../http/call.js';
import { readAddress } from './common.js';

/** What the service remembers of a card besides what it shows. No card number is ever stored. */
export interface CardMemory {
  cardName: string;
  /** Saved through a confirmed SetupIntent or payment, so that later charges need no confirmation. */
  setUp?: boolean;
  /** Used once or detached; it cannot be used again. */
  usedUp?: boolean;
}

export function cardMemory(call: Work, methodId: string): CardMemory {
  const hidden = call.desk.store.hidden(methodId);
  return { cardName: String(hidden.cardName), setUp: hidden.setUp === true, usedUp: hidden.usedUp === true };
}

export function testCardOf(memory: CardMemory): TestCard {
  const card = cardByToken(`pm_card_${memory.cardName}`);
  if (!card) throw new Error(`the stored card ${memory.cardName} is not a test card`);
  return card;
}

interface Expiry {
  month: number;
  year: number;
}

/** Makes the payment method of a request's `card` group: a raw test number, or a `tok_...` token. */
export function createMethod(call: Call, input: Input): Stripe.PaymentMethod {
  const type = input.choice('type', ['card'] as const);
  if (type === undefined) throw badParameter(input.name('type'), 'Missing required param: type.', 'parameter_missing');
  const card = input.group('card');
  if (!card) throw badParameter(input.name('card'), 'Missing required param: card.', 'parameter_missing');
  const billing = readBilling(input.group('billing_details'));
  const metadata = input.metadata();
  input.choice('allow_redisplay', ['always', 'limited', 'unspecified'] as const);
  const token = card.text('token');
  if (token !== undefined)
    return insertMethod(call, cardOfToken(token, card.name('token')), defaultExpiry(call), {
      billing,
      metadata,
      checked: false,
    });
  const number = card.requiredText('number').replace(/[\s-]/g, '');
  const expiry = { month: card.requiredInteger('exp_month'), year: card.requiredInteger('exp_year') };
  const cvc = card.text('cvc');
  const testCard = checkNumber(number);
  checkExpiry(call, expiry);
  if (cvc !== undefined && !new RegExp(`^\\d{${testCard.brand === 'amex' ? '3,4' : '3'}}$`).test(cvc)) {
    throw declined("Your card's security code is invalid.", { code: 'invalid_cvc', param: 'cvc' });
  }
  return insertMethod(call, testCard, expiry, { billing, metadata, checked: cvc !== undefined });
}

/**
 * The payment method that a request names: a stored one, or a fresh copy for a `pm_card_...` token.
 * @throws ApiError 404 when there is none.
 */
export function usableMethod(call: Call, id: string, parameter = 'payment_method'): Stripe.PaymentMethod {
  const stored = call.desk.store.find('payment_method', id, call.account);
  if (stored) return stored;
  const card = id.startsWith('pm_card_') ? cardByToken(id) : undefined;
  if (!card) throw missing('PaymentMethod', id, parameter);
  return insertMethod(call, card, defaultExpiry(call), {
    billing: readBilling(undefined),
    metadata: {},
    checked: true,
  });
}

function cardOfToken(token: string, parameter: string): TestCard {
  const card = token.startsWith('tok_') ? cardByToken(token) : undefined;
  if (!card) throw missing('token', token, parameter);
  return card;
}

function checkNumber(number: string): TestCard {
  if (!/^\d{12,19}$/.test(number) || !hasValidCheckDigit(number)) {
    throw declined('Your card number is incorrect.', { code: 'incorrect_number', param: 'number' });
  }
  const card = cardByNumber(number);
  if (card) return card;
  throw declined(
    'Your card was declined. Only the published test numbers work here; never enter the number of a real card.',
    {
      code: 'card_declined',
      decline_code: 'test_mode_live_card',
      param: 'number',
    },
  );
}

function checkExpiry(call: Call, expiry: Expiry): void {
  const now = new Date(call.desk.clock.nowMs());
  if (expiry.month < 1 || expiry.month > 12) {
    throw declined("Your card's expiration month is invalid.", { code: 'invalid_expiry_month', param: 'exp_month' });
  }
  const monthsLeft = (expiry.year - now.getUTCFullYear()) * 12 + expiry.month - (now.getUTCMonth() + 1);
  if (monthsLeft < 0 || monthsLeft > 12 * 50) {
    throw declined("Your card's expiration year is invalid.", { code: 'invalid_expiry_year', param: 'exp_year' });
  }
}

function defaultExpiry(call: Call): Expiry {
  const now = new Date(call.desk.clock.nowMs());
  return { month: now.getUTCMonth() + 1, year: now.getUTCFullYear() + 1 };
}

interface Details {
  billing: Stripe.PaymentMethod.BillingDetails;
  metadata: Stripe.Metadata;
  checked: boolean;
}

function insertMethod(call: Call, card: TestCard, expiry: Expiry, details: Details): Stripe.PaymentMethod {
  const cardName = card.names[0] ?? '';
  const method: Stripe.PaymentMethod = {
    id: newId('pm'),
    object: 'payment_method',
    allow_redisplay: 'unspecified',
    billing_details: details.billing,
    card: {
      brand: card.brand,
      checks: {
        address_line1_check: null,
        address_postal_code_check: null,
        cvc_check: details.checked ? 'unchecked' : null,
      },
      country: 'US',
      display_brand: card.brand,
      exp_month: expiry.month,
      exp_year: expiry.year,
      fingerprint: createHmac('sha256', 'card fingerprint').update(card.number).digest('base64url').slice(0, 16),
      funding: card.funding ?? 'credit',
      generated_from: null,
      last4: card.number.slice(-4),
      networks: { available: [card.brand], preferred: null },
      regulated_status: 'unregulated',
      three_d_secure_usage: { supported: true },
      wallet: null,
    },
    created: call.desk.clock.nowS(),
    customer: null,
    customer_account: null,
    livemode: false,
    metadata: details.metadata,
    type: 'card',
  };
  return call.desk.insert('payment_method', method, call.account, { cardName } satisfies CardMemory);
}

export function readBilling(input: Input | undefined): Stripe.PaymentMethod.BillingDetails {
  if (!input) return { address: null, email: null, name: null, phone: null, tax_id: null };
  const address = input.group('address');
  return {
    address: address ? readAddress(address) : null,
    email: input.textOrNull('email') ?? null,
    name: input.textOrNull('name') ?? null,
    phone: input.textOrNull('phone') ?? null,
    tax_id: null,
  };
}

/** Throws the bank's refusal for a card that cannot even be saved. */
export function refuseUnsavable(card: TestCard): void {
  if (card.decline) throw refusalError(refusalOf(card.decline));
}
