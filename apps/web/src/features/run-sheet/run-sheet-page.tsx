/** What the station does now, next and later, who is at its dishes, and what one watch tells the next. */
import { Anchor, Button, Select, Skeleton } from '@mantine/core';
import type { RunSheet } from '@skyberth/shared';
import { useQueryClient } from '@tanstack/react-query';
import { useCallback } from 'react';
import { Link, useSearchParams } from 'react-router-dom';
import { stationStream, useLive } from '../../lib/live.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useNow } from '../../lib/use-now.js';
import { useTitle } from '../../lib/use-title.js';
import { DayTime } from '../../ui/day-time.js';
import { EmptyState } from '../../ui/empty-state.js';
import { formatDuration, formatLocalTime } from '../../ui/format.js';
import { LiveLineNotice } from '../../ui/live-line.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { DishCard } from './dish-card.js';
import { HandOver } from './hand-over.js';
import classes from './run-sheet.module.css';
import { useRunSheet } from './run-sheet-queries.js';
import { LaterTable, NextTable } from './sheet-tables.js';
import { sheetView } from './sheet-view.js';
import { ToSettle, Transmitting } from './to-settle.js';

export function RunSheetPage() {
  useTitle('Run sheet');
  const [search, setSearch] = useSearchParams();
  const stationId = search.get('station');
  const { sheet, isOld, error, retry } = useRunSheet(stationId);
  if (!sheet && error) return <NoSheet error={error} onRetry={retry} />;
  if (!sheet) return <Skeleton height={600} aria-label="Loading the run sheet" />;
  return (
    <Sheet sheet={sheet} isOld={isOld} onStation={(id) => setSearch(id ? { station: id } : {}, { replace: true })} />
  );
}

function NoSheet({ error, onRetry }: { readonly error: Error; readonly onRetry: () => void }) {
  return (
    <>
      <PageTitle title="Run sheet" />
      <ProblemNotice title="The run sheet could not be read" onRetry={onRetry}>
        {sentenceOf(error)}
      </ProblemNotice>
    </>
  );
}

interface SheetProps {
  readonly sheet: RunSheet;
  /** The line is gone and this is the last sheet known. */
  readonly isOld: boolean;
  readonly onStation: (id: string | null) => void;
}

function Sheet({ sheet, isOld, onStation }: SheetProps) {
  const nowMs = useNow();
  const client = useQueryClient();
  const refresh = useCallback(() => void client.invalidateQueries({ queryKey: ['run-sheet'] }), [client]);
  const line = useLive(stationStream(sheet.station.id), refresh);
  const view = sheetView(sheet, nowMs);
  const underWay = view.dishes.reduce((sum, dish) => sum + dish.now.length, 0);
  return (
    <>
      <PageTitle
        title={`${sheet.station.name}, run sheet`}
        actions={
          <div className={classes.tools}>
            {sheet.stations.length > 1 && (
              <Select
                aria-label="Station"
                data={sheet.stations.map(({ id, name }) => ({ value: id, label: name }))}
                value={sheet.station.id}
                allowDeselect={false}
                onChange={onStation}
              />
            )}
            <Button variant="default" component={Link} to={`${paths.runSheetWall}?station=${sheet.station.id}`}>
              Wall view
            </Button>
            <Button variant="default" onClick={() => window.print()}>
              Print for hand-over
            </Button>
          </div>
        }
      >
        {formatLocalTime(nowMs, sheet.station.timeZone)} there. {sheet.contacts.length}{' '}
        {sheet.contacts.length === 1 ? 'contact' : 'contacts'} in the next 24 hours, {underWay} now, {view.asked.length}{' '}
        asked.
      </PageTitle>
      {isOld ? <OldNotice asOfMs={Date.parse(sheet.asOfUtc)} nowMs={nowMs} /> : <LiveLineNotice line={line} />}
      <p className={classes.printed}>
        As of <DayTime atMs={Date.parse(sheet.asOfUtc)} /> UTC. Times may have moved since; the page has the last word.
      </p>
      <div className={classes.columns}>
        <div className={classes.main}>
          <h2 className={classes.heading}>Now</h2>
          {view.dishes.length === 0 && (
            <EmptyState title="No dish at this station">Add an antenna, then its contacts stand here.</EmptyState>
          )}
          <div className={classes.dishes}>
            {view.dishes.map((dish) => (
              <DishCard key={dish.antenna.id} dish={dish} nowMs={nowMs} />
            ))}
          </div>
          <NextTable sheet={sheet} contacts={view.next} nowMs={nowMs} />
          <LaterTable sheet={sheet} contacts={view.later} />
          {view.next.length === 0 && (
            <p className={classes.quiet}>
              Nothing else is booked for the next 24 hours.{' '}
              <Anchor component={Link} to={paths.availability}>
                Open more time
              </Anchor>{' '}
              to sell.
            </p>
          )}
        </div>
        <aside className={classes.side} aria-label="What to settle and hand over">
          <ToSettle conflicts={sheet.conflicts} asked={view.asked} antennas={sheet.antennas} />
          <Transmitting contacts={view.transmitting} antennas={sheet.antennas} />
          <HandOver stationId={sheet.station.id} notes={sheet.notes} />
        </aside>
      </div>
    </>
  );
}

function OldNotice({ asOfMs, nowMs }: { readonly asOfMs: number; readonly nowMs: number }) {
  return (
    <p className={classes.old} role="alert">
      <strong>
        This is the list of <DayTime atMs={asOfMs} />, {formatDuration(nowMs - asOfMs)} old.
      </strong>{' '}
      Skyberth cannot be reached, so sales, re-times and people at the dishes since then are missing. It comes up to
      date by itself.
    </p>
  );
}
