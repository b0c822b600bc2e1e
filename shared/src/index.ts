/** What crosses the wire between the API and the page, and the tables both sides read. */

export * from './booking-states.js';
export * from './contracts/accounts.js';
export * from './contracts/availability.js';
export * from './contracts/bookings.js';
export * from './contracts/credit.js';
export * from './contracts/disputes.js';
export * from './contracts/drift.js';
export * from './contracts/ephemerides.js';
export * from './contracts/files.js';
export * from './contracts/invoices.js';
export * from './contracts/ledger.js';
export * from './contracts/live.js';
export * from './contracts/market.js';
export * from './contracts/mask-history.js';
export * from './contracts/oversight.js';
export * from './contracts/reconciliation.js';
export * from './contracts/run-sheet.js';
export * from './contracts/spacecraft.js';
export * from './contracts/stations.js';
export * from './contracts/system.js';
export * from './errors.js';
export * from './openapi.js';
export * from './permissions.js';
export * from './primitives.js';
export * from './route.js';
export * from './routes.js';
