import type { Route } from './http/call.js';
import { balanceRoutes } from './objects/balances.js';
import { chargeRoutes } from './objects/charges.js';
import { customerRoutes } from './objects/customers.js';
import { eventRoutes } from './objects/events.js';
import { paymentIntentRoutes } from './objects/payment-intents.js';
import { paymentMethodRoutes } from './objects/payment-methods.js';
import { refundRoutes } from './objects/refunds.js';
import { setupIntentRoutes } from './objects/setup-intents.js';
import { webhookEndpointRoutes } from './objects/webhook-endpoints.js';

/** Every call of the payment API that is served. */
export const ROUTES: readonly Route[] = [
  ...customerRoutes,
  ...paymentMethodRoutes,
  ...paymentIntentRoutes,
  ...setupIntentRoutes,
  ...chargeRoutes,
  ...refundRoutes,
  ...balanceRoutes,
  ...eventRoutes,
  ...webhookEndpointRoutes,
];
