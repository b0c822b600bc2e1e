/** The station's report as its form holds it, and as the contract takes it. Pure. */
import type { Booking, ContactReport } from '@skyberth/shared';

type Report = NonNullable<Booking['report']>;

export interface ReportValues {
  readonly outcome: Report['outcome'];
  readonly cause: Report['cause'];
  /** `HH:MM:SS` in UTC on the day of AOS; empty where nothing was acquired. */
  readonly acquired: string;
  readonly lost: string;
  readonly received: number | '';
  readonly receivedUnit: keyof typeof UNIT_BYTES;
  readonly ebN0Db: number | '';
  readonly note: string;
}

export const UNIT_BYTES = { kB: 1e3, MB: 1e6, GB: 1e9 } as const;
const DAY_MS = 86_400_000;

export const EMPTY_REPORT: ReportValues = {
  outcome: 'good',
  cause: 'none',
  acquired: '',
  lost: '',
  received: '',
  receivedUnit: 'MB',
  ebN0Db: '',
  note: '',
};

/** A time of day becomes the instant nearest to the predicted one, so that a contact may cross midnight. */
export function instantNear(timeOfDay: string, predictedUtc: string): string | null {
  const match = /^([01]?\d|2[0-3]):([0-5]\d)(?::([0-5]\d))?$/.exec(timeOfDay.trim());
  if (!match) return null;
  const predictedMs = Date.parse(predictedUtc);
  const midnightMs = Math.floor(predictedMs / DAY_MS) * DAY_MS;
  const intoDayMs = (Number(match[1]) * 3600 + Number(match[2]) * 60 + Number(match[3] ?? 0)) * 1000;
  const nearest = [-DAY_MS, 0, DAY_MS]
    .map((shift) => midnightMs + shift + intoDayMs)
    .reduce((a, b) => (Math.abs(a - predictedMs) <= Math.abs(b - predictedMs) ? a : b));
  return new Date(nearest).toISOString();
}

/** Field errors by name; empty where the report can be sent. */
export function reportFaults(values: ReportValues): Record<string, string> {
  const faults: Record<string, string> = {};
  for (const name of ['acquired', 'lost'] as const)
    if (values[name].trim() !== '' && instantNear(values[name], '2026-01-01T00:00:00Z') === null)
      faults[name] = 'Use hours, minutes and seconds in UTC, such as 14:02:09.';
  if (values.outcome === 'failed' && values.cause === 'none')
    faults['cause'] = 'Name the cause; money follows from it.';
  if (values.outcome === 'good' && values.cause !== 'none')
    faults['cause'] = 'A good contact has no cause of trouble; choose degraded if there was one.';
  return faults;
}

export function contactReport(values: ReportValues, booking: Pick<Booking, 'aosUtc' | 'losUtc'>): ContactReportInput {
  return {
    outcome: values.outcome,
    cause: values.cause,
    acquiredUtc: instantNear(values.acquired, booking.aosUtc),
    lostUtc: instantNear(values.lost, booking.losUtc),
    receivedBytes: values.received === '' ? null : Math.round(values.received * UNIT_BYTES[values.receivedUnit]),
    ebN0Db: values.ebN0Db === '' ? null : values.ebN0Db,
    note: values.note.trim(),
  };
}

type ContactReportInput = ReturnType<typeof ContactReport.parse>;
