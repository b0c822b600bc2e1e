/** What tests and the demo loader use of the server. */
export { createApp } from './app.js';
export { JobsService } from './jobs/jobs.service.js';
export { LedgerRepository } from './ledger/ledger.repository.js';
export { LedgerService } from './ledger/ledger.service.js';
export { LedgerReading } from './ledger/ledger-reading.service.js';
export { OutboxRepository } from './outbox/outbox.repository.js';
export { OutboxRunner } from './outbox/outbox.runner.js';
export { PaymentRepository } from './payments/payments.repository.js';
export { AdjustableClock, type ClockPort, systemClock } from './platform/clock.js';
export { type Config, readConfig } from './platform/config.js';
export { DATABASE } from './platform/database.module.js';
