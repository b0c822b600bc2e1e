/** What the market sells: availability, offers, prices and refunds, computed from arguments alone. */
export * from './interval.js';
export * from './offers/offer-types.js';
export * from './price/price-types.js';
