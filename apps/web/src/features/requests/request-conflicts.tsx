/** What stands in the way of a request on the owner's own side: blackouts over it, and hours that no longer reach it. */
import type { BookingSummary } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { availabilityQueries } from '../../lib/availability-queries.js';
import { DayTime } from '../../ui/day-time.js';
import { conflictsOf } from './conflicts.js';
import classes from './requests.module.css';

export function RequestConflicts({ summary }: { readonly summary: BookingSummary }) {
  const calendar = useQuery(availabilityQueries.calendar(summary.antennaId, summary.aosUtc, summary.losUtc));
  if (calendar.isPending) return null;
  if (!calendar.data)
    return <p className={classes.plain}>Whether anything of yours stands in its way could not be read.</p>;
  const { blackouts, isOutsideHours } = conflictsOf(calendar.data, summary);
  if (blackouts.length === 0 && !isOutsideHours)
    return <p className={classes.plain}>Nothing in your calendar stands in its way.</p>;
  return (
    <ul className={classes.conflicts} aria-label="Conflicts">
      {isOutsideHours && <li>It lies outside the opening hours as they are now.</li>}
      {blackouts.map((blackout) => (
        <li key={`${blackout.id} ${blackout.fromUtc}`}>
          Your blackout ({blackout.note ? `${blackout.reason}: ${blackout.note}` : blackout.reason}) lies over it, from{' '}
          <DayTime atMs={Date.parse(blackout.fromUtc)} placeTimeZone={summary.stationTimeZone} /> to{' '}
          <DayTime atMs={Date.parse(blackout.toUtc)} placeTimeZone={summary.stationTimeZone} />.
        </li>
      ))}
    </ul>
  );
}
