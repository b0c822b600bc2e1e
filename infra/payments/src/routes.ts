import type { Route } from './http/call.js';
import { accountRoutes } from './objects/accounts.js';
import { balanceRoutes } from './objects/balances.js';
import { chargeRoutes } from './objects/charges.js';
import { checkoutSessionRoutes } from './objects/checkout-sessions.js';
import { customerRoutes } from './objects/customers.js';
import { disputeRoutes } from './objects/disputes.js';
import { eventRoutes } from './objects/events.js';
import { paymentIntentRoutes } from './objects/payment-intents.js';
import { paymentMethodRoutes } from './objects/payment-methods.js';
import { payoutRoutes } from './objects/payouts.js';
import { refundRoutes } from './objects/refunds.js';
import { setupIntentRoutes } from './objects/setup-intents.js';
import { transferRoutes } from './objects/transfers.js';
import { webhookEndpointRoutes } from './objects/webhook-endpoints.js';

/** Every call of the payment API that is served. */
export const ROUTES: readonly Route[] = [
  ...customerRoutes,
  ...paymentMethodRoutes,
  ...paymentIntentRoutes,
  ...setupIntentRoutes,
  ...checkoutSessionRoutes,
  ...chargeRoutes,
  ...refundRoutes,
  ...disputeRoutes,
  ...accountRoutes,
  ...transferRoutes,
  ...payoutRoutes,
  ...balanceRoutes,
  ...eventRoutes,
  ...webhookEndpointRoutes,
];
