import { describe, expect, it } from 'vitest';
import { contactReport, EMPTY_REPORT, instantNear, reportFaults } from './report-form.js';

const booking = { aosUtc: '2026-12-01T23:58:05.000Z', losUtc: '2026-12-02T00:06:30.000Z' };

describe('the report', () => {
  it('reads a time of day as the instant nearest to the predicted one', () => {
    expect(instantNear('23:58:09', booking.aosUtc)).toBe('2026-12-01T23:58:09.000Z');
    expect(instantNear('00:00:01', booking.aosUtc)).toBe('2026-12-02T00:00:01.000Z');
    expect(instantNear('23:59', booking.losUtc)).toBe('2026-12-01T23:59:00.000Z');
    expect(instantNear('24:00:00', booking.aosUtc)).toBeNull();
    expect(instantNear('soon', booking.aosUtc)).toBeNull();
  });

  it('leaves out what was not filled in and counts bytes in decimal units', () => {
    const report = contactReport({ ...EMPTY_REPORT, received: 21.4, receivedUnit: 'GB', note: ' clean ' }, booking);
    expect(report).toMatchObject({ receivedBytes: 21_400_000_000, acquiredUtc: null, ebN0Db: null, note: 'clean' });
  });

  it('wants a cause for a failure and none for a good contact', () => {
    expect(reportFaults({ ...EMPTY_REPORT, outcome: 'failed' })).toHaveProperty('cause');
    expect(reportFaults({ ...EMPTY_REPORT, outcome: 'failed', cause: 'station' })).toEqual({});
    expect(reportFaults({ ...EMPTY_REPORT, cause: 'weather' })).toHaveProperty('cause');
    expect(reportFaults({ ...EMPTY_REPORT, acquired: '14.02' })).toHaveProperty('acquired');
  });
});
