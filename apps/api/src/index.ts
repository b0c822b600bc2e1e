/** What tests and the demo loader use of the server. */
export { createApp } from './app.js';
export { JobsService } from './jobs/jobs.service.js';
export { OutboxRunner } from './outbox/outbox.runner.js';
export { AdjustableClock, type ClockPort, systemClock } from './platform/clock.js';
export { type Config, readConfig } from './platform/config.js';
