export * from './accounts.js';
export * from './bookings.js';
export * from './money.js';
export * from './spacecraft.js';
export * from './stations.js';
