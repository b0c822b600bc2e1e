/** Every mask that the antenna has had: when, by whom, why, and a way to look at an old one again. */
import { Button, Skeleton } from '@mantine/core';
import type { PublishedMask } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { sentenceOf } from '../../lib/problem-fields.js';
import { stationQueries } from '../../lib/station-queries.js';
import { DayTime } from '../../ui/day-time.js';
import { formatDegrees, formatNumber } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { pointsOf, skyAbovePercent } from './mask-draft.js';
import classes from './mask-history.module.css';

interface MaskHistoryProps {
  readonly antennaId: string;
  readonly mayWrite: boolean;
  /** Puts the points of an old mask on the rose; nothing is published by that. */
  readonly onTake: (mask: PublishedMask) => void;
}

export function MaskHistory({ antennaId, mayWrite, onTake }: MaskHistoryProps) {
  const masks = useQuery(stationQueries.masks(antennaId));
  if (masks.error)
    return (
      <ProblemNotice title="The earlier masks could not be read" onRetry={() => void masks.refetch()}>
        {sentenceOf(masks.error)}
      </ProblemNotice>
    );
  if (!masks.data) return <Skeleton height={60} />;
  if (masks.data.items.length === 0) return null;
  return (
    <section className={classes.history} aria-labelledby="mask-history">
      <h2 id="mask-history" className={classes.title}>
        Every mask published, {formatNumber(masks.data.items.length)}
      </h2>
      <ol className={classes.list}>
        {masks.data.items.map((mask, index) => (
          <li key={mask.version}>
            <div>
              <strong>
                <DayTime atMs={Date.parse(mask.publishedUtc)} />
              </strong>
              {index === 0 && ', in force'}. {maskWords(mask)}
              <div className={classes.quiet}>
                {mask.reason || 'No reason given'}
                {mask.publishedByName && `, by ${mask.publishedByName}`}
              </div>
            </div>
            {mayWrite && index > 0 && (
              <Button
                variant="default"
                size="compact-sm"
                aria-label={`Put mask ${mask.version} on the rose`}
                onClick={() => onTake(mask)}
              >
                Put on the rose
              </Button>
            )}
          </li>
        ))}
      </ol>
    </section>
  );
}

function maskWords({ points }: PublishedMask): string {
  const elevations = points.map(([, elevationDeg]) => elevationDeg);
  const [low, high] = [Math.min(...elevations), Math.max(...elevations)];
  const corners = points.length === 1 ? 'one corner' : `${formatNumber(points.length)} corners`;
  const span = low === high ? formatDegrees(low) : `${formatDegrees(low)} to ${formatDegrees(high)}`;
  return `${corners}, ${span}, ${formatNumber(skyAbovePercent(pointsOf(points)), 1)} % of the sky open.`;
}
