import { Anchor, Button, Paper, Skeleton } from '@mantine/core';
import type { Station } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useCan } from '../../lib/session.js';
import { stationQueries } from '../../lib/station-queries.js';
import { useTitle } from '../../lib/use-title.js';
import { EmptyState } from '../../ui/empty-state.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { StationBadge } from '../../ui/station-badges.js';
import { AntennaTable } from './antenna-table.js';
import { countryName, nextStep, positionText } from './station-words.js';
import classes from './stations.module.css';

export function StationsPage() {
  useTitle('Stations');
  const mayWrite = useCan()('stations.write');
  const stations = useQuery(stationQueries.list({ pageSize: 200 }));
  const add = (
    <Button component={Link} to={paths.newStation}>
      Add a station
    </Button>
  );
  const items = stations.data?.items ?? [];
  const onSale = items.flatMap((station) => station.antennas).filter((antenna) => antenna.state === 'on sale').length;
  return (
    <>
      <PageTitle title="Stations" actions={mayWrite && items.length > 0 && add}>
        {items.length > 0 &&
          `${items.length} ${items.length === 1 ? 'station' : 'stations'}, ${onSale} ${onSale === 1 ? 'antenna' : 'antennas'} on sale.`}
      </PageTitle>
      {stations.error && (
        <ProblemNotice title="The stations could not be read" onRetry={() => void stations.refetch()}>
          {sentenceOf(stations.error)}
        </ProblemNotice>
      )}
      {stations.isPending && <Skeleton height={220} />}
      {stations.data && items.length === 0 && (
        <EmptyState title="No station yet" action={mayWrite && add}>
          A station is a place with a clock and a currency; its antennas are what operators book.
        </EmptyState>
      )}
      <div className={classes.list}>
        {items.map((station) => (
          <StationCard key={station.id} station={station} mayWrite={mayWrite} />
        ))}
      </div>
    </>
  );
}

function StationCard({ station, mayWrite }: { readonly station: Station; readonly mayWrite: boolean }) {
  const next = nextStep(station);
  return (
    <Paper component="article" withBorder className={classes.card} aria-labelledby={`station-${station.id}`}>
      <header className={classes.cardHead}>
        <h2 id={`station-${station.id}`}>
          <Anchor component={Link} to={paths.station(station.id)}>
            {station.name}
          </Anchor>
        </h2>
        <StationBadge state={station.state} />
        <span className={classes.quiet}>
          {positionText(station)}, {countryName(station.country)}
        </span>
      </header>
      {(next || station.stateNote) && (
        <p className={classes.next}>
          {station.stateNote && <q>{station.stateNote}</q>} {next}
        </p>
      )}
      <AntennaTable station={station} mayWrite={mayWrite} />
    </Paper>
  );
}
