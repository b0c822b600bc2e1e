/**
 * The published test cards and tokens of the payment API (from memory of its testing documentation),
 * and one of our own for an answer that comes too late.
 */
export type Decline =
  | 'generic_decline'
  | 'insufficient_funds'
  | 'lost_card'
  | 'stolen_card'
  | 'expired_card'
  | 'incorrect_cvc'
  | 'processing_error';

export interface TestCard {
  /** The token is `pm_card_` plus this; `tok_` plus this works where a card token is asked for. */
  names: readonly string[];
  number: string;
  brand: 'visa' | 'mastercard' | 'amex' | 'discover' | 'diners' | 'jcb' | 'unionpay';
  funding?: 'debit';
  /** What the bank answers to every charge and every attempt to save the card. */
  decline?: Decline;
  /** Saving works, charging does not. */
  declineOnlyCharges?: Decline;
  /** When the bank wants its customer to confirm. */
  authentication?: 'always' | 'unless_set_up' | 'on_session';
  dispute?: 'fraudulent' | 'product_not_received';
  bypassPending?: true;
  refund?: 'fails';
  /** The charge goes through but the answer comes after the caller has given up. */
  slow?: true;
  /** For the one-click buttons of the card page. */
  label: string;
}

export const TEST_CARDS: readonly TestCard[] = [
  { names: ['visa'], number: '4242424242424242', brand: 'visa', label: 'Goes through' },
  { names: ['visa_debit'], number: '4000056655665556', brand: 'visa', funding: 'debit', label: 'Goes through (debit)' },
  { names: ['mastercard'], number: '5555555555554444', brand: 'mastercard', label: 'Goes through (Mastercard)' },
  {
    names: ['mastercard_debit'],
    number: '5200828282828210',
    brand: 'mastercard',
    funding: 'debit',
    label: 'Goes through (Mastercard debit)',
  },
  { names: ['amex'], number: '378282246310005', brand: 'amex', label: 'Goes through (Amex)' },
  { names: ['discover'], number: '6011111111111117', brand: 'discover', label: 'Goes through (Discover)' },
  { names: ['diners'], number: '3056930009020004', brand: 'diners', label: 'Goes through (Diners)' },
  { names: ['jcb'], number: '3566002020360505', brand: 'jcb', label: 'Goes through (JCB)' },
  { names: ['unionpay'], number: '6200000000000005', brand: 'unionpay', label: 'Goes through (UnionPay)' },
  {
    names: ['chargeDeclined', 'visa_chargeDeclined'],
    number: '4000000000000002',
    brand: 'visa',
    decline: 'generic_decline',
    label: 'Declined',
  },
  {
    names: ['chargeDeclinedInsufficientFunds', 'visa_chargeDeclinedInsufficientFunds'],
    number: '4000000000009995',
    brand: 'visa',
    decline: 'insufficient_funds',
    label: 'Not enough money',
  },
  {
    names: ['chargeDeclinedLostCard', 'visa_chargeDeclinedLostCard'],
    number: '4000000000009987',
    brand: 'visa',
    decline: 'lost_card',
    label: 'Lost card',
  },
  {
    names: ['chargeDeclinedStolenCard', 'visa_chargeDeclinedStolenCard'],
    number: '4000000000009979',
    brand: 'visa',
    decline: 'stolen_card',
    label: 'Stolen card',
  },
  {
    names: ['chargeDeclinedExpiredCard'],
    number: '4000000000000069',
    brand: 'visa',
    decline: 'expired_card',
    label: 'Expired card',
  },
  {
    names: ['chargeDeclinedIncorrectCvc'],
    number: '4000000000000127',
    brand: 'visa',
    decline: 'incorrect_cvc',
    label: 'Wrong security code',
  },
  {
    names: ['chargeDeclinedProcessingError'],
    number: '4000000000000119',
    brand: 'visa',
    decline: 'processing_error',
    label: 'Error at the bank',
  },
  {
    names: ['chargeCustomerFail'],
    number: '4000000000000341',
    brand: 'visa',
    declineOnlyCharges: 'generic_decline',
    label: 'Saves, then declines',
  },
  {
    names: ['authenticationRequired'],
    number: '4000002760003184',
    brand: 'visa',
    authentication: 'always',
    label: 'Must be confirmed every time',
  },
  {
    names: ['authenticationRequiredOnSetup'],
    number: '4000002500003155',
    brand: 'visa',
    authentication: 'unless_set_up',
    label: 'Must be confirmed unless saved before',
  },
  {
    names: ['authenticationRequiredSetupForOffSession'],
    number: '4000003800000446',
    brand: 'visa',
    authentication: 'on_session',
    label: 'Must be confirmed when the payer is present',
  },
  {
    names: ['authenticationRequiredChargeDeclinedInsufficientFunds'],
    number: '4000008260003178',
    brand: 'visa',
    authentication: 'always',
    declineOnlyCharges: 'insufficient_funds',
    label: 'Confirmed, then not enough money',
  },
  {
    names: ['createDispute'],
    number: '4000000000000259',
    brand: 'visa',
    dispute: 'fraudulent',
    label: 'Disputed as fraud',
  },
  {
    names: ['createDisputeProductNotReceived'],
    number: '4000000000002685',
    brand: 'visa',
    dispute: 'product_not_received',
    label: 'Disputed as not received',
  },
  {
    names: ['bypassPending'],
    number: '4000000000000077',
    brand: 'visa',
    bypassPending: true,
    label: 'Money available at once',
  },
  { names: ['refundFail'], number: '4000000000005126', brand: 'visa', refund: 'fails', label: 'Refund fails later' },
  {
    names: ['slowAnswer'],
    number: '4000000000073009',
    brand: 'visa',
    slow: true,
    label: 'Goes through, answer too late',
  },
];

/** The test card of a `pm_card_...` or `tok_...` token. */
export function cardByToken(token: string): TestCard | undefined {
  const name = /^(?:pm_card|tok)_(.+)$/.exec(token)?.[1];
  return name === undefined ? undefined : TEST_CARDS.find((card) => card.names.includes(name));
}

export function cardByNumber(number: string): TestCard | undefined {
  return TEST_CARDS.find((card) => card.number === number);
}

/** The check digit rule of ISO/IEC 7812-1, annex B. */
export function hasValidCheckDigit(number: string): boolean {
  let sum = 0;
  for (let index = 0; index < number.length; index += 1) {
    const digit = Number(number[number.length - 1 - index]);
    const doubled = index % 2 === 1 ? digit * 2 : digit;
    sum += doubled > 9 ? doubled - 9 : doubled;
  }
  return sum % 10 === 0;
}
