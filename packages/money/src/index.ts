/** Money as arithmetic: amounts, ledger entries, tax, invoices and payouts. No clock, no file, no network. */
export * from './amount.js';
export * from './currencies.js';
export * from './format.js';
export * from './invoice/credit-note.js';
export * from './invoice/invoice.js';
export * from './invoice/required-fields.js';
export * from './ledger/accounts.js';
export * from './ledger/balances.js';
export * from './ledger/builders.js';
export * from './ledger/entry.js';
export * from './money-error.js';
export * from './payout/payout.js';
export * from './rounding.js';
export * from './tax/rates.js';
export * from './tax/treatment.js';
export * from './tax/vat-number.js';
