import type { SystemView } from '@skyberth/shared';
import { describe, expect, it } from 'vitest';
import { faultsOf, servicesAndJobs } from './system-words.js';

const view: SystemView = {
  version: '1',
  startedUtc: '2026-12-01T00:00:00Z',
  database: { sizeBytes: 1, migrations: 2, integrity: 'ok' },
  outbox: { pending: 0, failed: 0, oldestPendingUtc: null, recent: [] },
  providerEvents: { received: 3, processed: 3 },
  services: [
    { name: '127.0.0.1:1', ok: true, detail: 'answered 200' },
    { name: 'job: bookings', ok: true, detail: 'last done 2026-12-01T14:12:39.741Z' },
  ],
};

describe('the state of the system', () => {
  it('parts services from jobs', () => {
    const { services, jobs } = servicesAndJobs(view.services);
    expect(services.map((one) => one.name)).toEqual(['127.0.0.1:1']);
    expect(jobs).toEqual([{ name: 'bookings', ok: true, detail: 'last done 2026-335 14:12:39' }]);
  });

  it('names what is not fine', () => {
    expect(faultsOf(view)).toEqual([]);
    const bad = { ...view, outbox: { ...view.outbox, failed: 2 }, database: { ...view.database, integrity: 'page 3' } };
    expect(faultsOf(bad)).toEqual(['The database says: page 3.', '2 things to send failed for good.']);
  });
});
