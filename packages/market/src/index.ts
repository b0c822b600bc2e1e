/** What the market sells: availability, offers, prices and refunds, computed from arguments alone. */
export * from './availability/availability.js';
export * from './availability/rules.js';
export * from './availability/validate-rules.js';
export * from './interval.js';
export * from './market-error.js';
export * from './offers/offer-types.js';
export * from './offers/offers.js';
export { azimuthDistanceDeg } from './offers/turn.js';
export * from './price/price-types.js';
export * from './price/quote.js';
export * from './price/refund.js';
export * from './price/validate-price-card.js';
export * from './time/local-time.js';
export { lengthText, type MoneyWriter } from './words/words.js';
