export * from './accounts.js';
export * from './bookings.js';
export * from './money.js';
export * from './oversight.js';
export * from './reconciliation.js';
export * from './spacecraft.js';
export * from './stations.js';
