/** The station's live reports, gathered. Pure. */
import type { ContactEvent } from '@skyberth/shared';
import type { ReportedSoFar } from '../../ui/live-report.js';

/** The newest of each kind. */
export function reportedOf(events: readonly ContactEvent[]): ReportedSoFar {
  const newest = (kind: ContactEvent['kind']) => events.findLast((event) => event.kind === kind);
  const bytes = newest('bytes');
  return {
    acquiredUtc: newest('acquired')?.happenedUtc ?? null,
    lostUtc: newest('lost')?.happenedUtc ?? null,
    bytes: bytes?.value ?? null,
    bytesUtc: bytes?.happenedUtc ?? null,
    ebN0Db: newest('eb/n0')?.value ?? null,
    note: newest('note')?.sentence ?? null,
  };
}
