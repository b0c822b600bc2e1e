/** Every route of the API, by name. */
import { accountRoutes } from './contracts/accounts.js';
import { availabilityRoutes } from './contracts/availability.js';
import { bookingRoutes } from './contracts/bookings.js';
import { creditRoutes } from './contracts/credit.js';
import { clearanceRoutes } from './contracts/clearances.js';
import { disputeRoutes } from './contracts/disputes.js';
import { driftRoutes } from './contracts/drift.js';
import { ephemerisRoutes } from './contracts/ephemerides.js';
import { fileRoutes } from './contracts/files.js';
import { invoiceRoutes } from './contracts/invoices.js';
import { ledgerRoutes } from './contracts/ledger.js';
import { liveRoutes } from './contracts/live.js';
import { marketRoutes } from './contracts/market.js';
import { maskHistoryRoutes } from './contracts/mask-history.js';
import { oversightRoutes } from './contracts/oversight.js';
import { reconciliationRoutes } from './contracts/reconciliation.js';
import { runSheetRoutes } from './contracts/run-sheet.js';
import { spacecraftRoutes } from './contracts/spacecraft.js';
import { stationRoutes } from './contracts/stations.js';
import { systemRoutes } from './contracts/system.js';

export const routes = {
  ...accountRoutes,
  ...spacecraftRoutes,
  ...ephemerisRoutes,
  ...stationRoutes,
  ...maskHistoryRoutes,
  ...availabilityRoutes,
  ...marketRoutes,
  ...bookingRoutes,
  ...liveRoutes,
  ...runSheetRoutes,
  ...driftRoutes,
  ...disputeRoutes,
  ...fileRoutes,
  ...clearanceRoutes,
  ...invoiceRoutes,
  ...ledgerRoutes,
  ...creditRoutes,
  ...reconciliationRoutes,
  ...oversightRoutes,
  ...systemRoutes,
} as const;
export type RouteName = keyof typeof routes;
