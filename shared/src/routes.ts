/** Every route of the API, by name. */
import { accountRoutes } from './contracts/accounts.js';
import { apiKeyRoutes } from './contracts/api-keys.js';
import { availabilityRoutes } from './contracts/availability.js';
import { bookingRoutes } from './contracts/bookings.js';
import { clearanceRoutes } from './contracts/clearances.js';
import { creditRoutes } from './contracts/credit.js';
import { disputeRoutes } from './contracts/disputes.js';
import { driftRoutes } from './contracts/drift.js';
import { ephemerisRoutes } from './contracts/ephemerides.js';
import { feedRoutes } from './contracts/feeds.js';
import { fileRoutes } from './contracts/files.js';
import { groupRoutes } from './contracts/groups.js';
import { invoiceRoutes } from './contracts/invoices.js';
import { ledgerRoutes } from './contracts/ledger.js';
import { liveRoutes } from './contracts/live.js';
import { marketRoutes } from './contracts/market.js';
import { maskHistoryRoutes } from './contracts/mask-history.js';
import { messageRoutes } from './contracts/messages.js';
import { oversightRoutes } from './contracts/oversight.js';
import { payoutRoutes } from './contracts/payouts.js';
import { planningRoutes } from './contracts/planning.js';
import { reconciliationRoutes } from './contracts/reconciliation.js';
import { runSheetRoutes } from './contracts/run-sheet.js';
import { secondFactorRoutes } from './contracts/second-factor.js';
import { spacecraftRoutes } from './contracts/spacecraft.js';
import { standbyRoutes } from './contracts/standby.js';
import { stationRoutes } from './contracts/stations.js';
import { systemRoutes } from './contracts/system.js';
import { taxRoutes } from './contracts/tax.js';

export const routes = {
  ...accountRoutes,
  ...spacecraftRoutes,
  ...ephemerisRoutes,
  ...stationRoutes,
  ...maskHistoryRoutes,
  ...availabilityRoutes,
  ...marketRoutes,
  ...planningRoutes,
  ...bookingRoutes,
  ...groupRoutes,
  ...standbyRoutes,
  ...liveRoutes,
  ...runSheetRoutes,
  ...driftRoutes,
  ...disputeRoutes,
  ...fileRoutes,
  ...clearanceRoutes,
  ...invoiceRoutes,
  ...ledgerRoutes,
  ...creditRoutes,
  ...taxRoutes,
  ...reconciliationRoutes,
  ...payoutRoutes,
  ...secondFactorRoutes,
  ...messageRoutes,
  ...oversightRoutes,
  ...systemRoutes,
  ...apiKeyRoutes,
  ...feedRoutes,
} as const;
export type RouteName = keyof typeof routes;
