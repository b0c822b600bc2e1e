import type Stripe from 'stripe';

/** Everything that is stored, by the `object` word of the API, typed with the SDK's own types. */
export interface Kinds {
  account: Stripe.Account;
  balance_transaction: Stripe.BalanceTransaction;
  charge: Stripe.Charge;
  'checkout.session': Stripe.Checkout.Session;
  customer: Stripe.Customer;
  dispute: Stripe.Dispute;
  event: StoredEvent;
  payment_intent: Stripe.PaymentIntent;
  payment_method: Stripe.PaymentMethod;
  payout: Stripe.Payout;
  refund: Stripe.Refund;
  setup_intent: Stripe.SetupIntent;
  transfer: Stripe.Transfer;
  transfer_reversal: Stripe.TransferReversal;
  webhook_endpoint: Stripe.WebhookEndpoint;
}

export type Kind = keyof Kinds;

/** An event as stored. The SDK's union of some 250 event types cannot be built from a variable type name. */
export interface StoredEvent {
  id: string;
  object: 'event';
  account?: string;
  api_version: string;
  created: number;
  data: { object: object; previous_attributes?: object };
  livemode: false;
  pending_webhooks: number;
  request: { id: string | null; idempotency_key: string | null };
  type: string;
}

/** The version whose shapes are answered; the one the SDK is pinned to. */
export const API_VERSION = '2026-10-28.endive';

const KIND_OF_PREFIX: Readonly<Record<string, Kind>> = {
  acct: 'account',
  txn: 'balance_transaction',
  ch: 'charge',
  py: 'charge',
  cs: 'checkout.session',
  cus: 'customer',
  dp: 'dispute',
  evt: 'event',
  pi: 'payment_intent',
  pm: 'payment_method',
  po: 'payout',
  re: 'refund',
  pyr: 'refund',
  seti: 'setup_intent',
  tr: 'transfer',
  trr: 'transfer_reversal',
  we: 'webhook_endpoint',
};

export function kindOfId(id: string): Kind | undefined {
  const prefix = id.split('_', 1)[0] ?? '';
  return Object.hasOwn(KIND_OF_PREFIX, prefix) ? KIND_OF_PREFIX[prefix] : undefined;
}
