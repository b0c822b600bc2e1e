/** What tests and the demo loader use of the server. */

export { chargebackFacts, eventFacts } from './adapters/payment/stripe-facts.js';
export { createApp } from './app.js';
export { BookingMoney } from './bookings/booking-money.js';
export { BookingRepository } from './bookings/bookings.repository.js';
export { InvoiceRepository } from './invoices/invoices.repository.js';
export { InvoiceService } from './invoices/invoices.service.js';
export { JobsService } from './jobs/jobs.service.js';
export { LedgerRepository } from './ledger/ledger.repository.js';
export { LedgerService } from './ledger/ledger.service.js';
export { LedgerCheckRepository } from './ledger/ledger-check.repository.js';
export { LedgerReading } from './ledger/ledger-reading.service.js';
export { OutboxRepository } from './outbox/outbox.repository.js';
export { OutboxRunner } from './outbox/outbox.runner.js';
export { PAYMENT_PORT } from './payments/payment.port.js';
export { PaymentEvents } from './payments/payment-events.service.js';
export { PaymentRepository } from './payments/payments.repository.js';
export { PROVIDER_BOOKS } from './payments/provider-books.port.js';
export { PAYOUT_PORT } from './payouts/payout.port.js';
export { PayoutRepository } from './payouts/payouts.repository.js';
export { AuditService } from './platform/audit.service.js';
export { AdjustableClock, type ClockPort, systemClock } from './platform/clock.js';
export { type Config, readConfig } from './platform/config.js';
export { DATABASE } from './platform/database.module.js';
export { newId } from './platform/ids.js';
export { write } from './platform/transaction.js';
export { LedgerCheckService } from './reconciliation/ledger-check.service.js';
export { ReconciliationService } from './reconciliation/reconciliation.service.js';
