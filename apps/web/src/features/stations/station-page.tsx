import { Button, Group, Paper, Skeleton } from '@mantine/core';
import { modals } from '@mantine/modals';
import { notifications } from '@mantine/notifications';
import { routes, type Station } from '@skyberth/shared';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { serverNowMs } from '../../lib/server-clock.js';
import { useCan } from '../../lib/session.js';
import { stationQueries } from '../../lib/station-queries.js';
import { useTitle } from '../../lib/use-title.js';
import { EmptyState } from '../../ui/empty-state.js';
import { formatLocalTime } from '../../ui/format.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { StationBadge } from '../../ui/station-badges.js';
import { Figure, Figures } from '../../ui/values.js';
import { AntennaTable } from './antenna-table.js';
import { countryName, nextStep, positionText } from './station-words.js';
import classes from './stations.module.css';

export function StationPage() {
  const { id = '' } = useParams();
  const station = useQuery(stationQueries.one(id));
  useTitle(station.data?.name ?? 'Station');
  if (station.error)
    return (
      <ProblemNotice title="The station could not be read" onRetry={() => void station.refetch()}>
        {sentenceOf(station.error)}
      </ProblemNotice>
    );
  if (!station.data) return <Skeleton height={320} />;
  return <OneStation station={station.data} />;
}

function OneStation({ station }: { readonly station: Station }) {
  const mayWrite = useCan()('stations.write');
  const next = nextStep(station);
  return (
    <>
      <PageTitle
        title={station.name}
        badge={<StationBadge state={station.state} />}
        actions={mayWrite && <StationActs station={station} />}
      >
        {positionText(station)}, {countryName(station.country)}. {next}
      </PageTitle>
      {station.stateNote && <StateNote station={station} />}
      <div className={classes.columns}>
        <section aria-labelledby="antennas-title">
          <Group justify="space-between" mb={8}>
            <h2 id="antennas-title" className={classes.heading}>
              Antennas
            </h2>
            {mayWrite && station.antennas.length > 0 && (
              <Button variant="default" component={Link} to={paths.newAntenna(station.id)}>
                Add an antenna
              </Button>
            )}
          </Group>
          {station.antennas.length === 0 ? (
            <EmptyState
              level={3}
              title="No antenna yet"
              action={
                mayWrite && (
                  <Button component={Link} to={paths.newAntenna(station.id)}>
                    Add an antenna
                  </Button>
                )
              }
            >
              Size, mount and limits first; bands, horizon mask, hours and prices follow.
            </EmptyState>
          ) : (
            <AntennaTable station={station} mayWrite={mayWrite} />
          )}
        </section>
        <StationFacts station={station} />
      </div>
    </>
  );
}

function StateNote({ station }: { readonly station: Station }) {
  const bad = station.state === 'refused' || station.state === 'suspended';
  return (
    <p className={classes.note} data-bad={bad || undefined}>
      <strong>{bad ? 'Why: ' : 'Note: '}</strong>
      {station.stateNote}
    </p>
  );
}

function StationFacts({ station }: { readonly station: Station }) {
  return (
    <Paper component="section" withBorder className={classes.facts} aria-label={`About ${station.name}`}>
      <Figures columns={2}>
        <Figure
          label="Clock there"
          value={formatLocalTime(serverNowMs(), station.timeZone)}
          note={station.timeZone.replaceAll('_', ' ')}
        />
        <Figure label="Currency" value={station.currency} />
        <Figure label="Contact person" value={station.contactName || 'nobody named'} note={station.contactPhone} />
        <Figure label="Owner" value={station.ownerName} />
      </Figures>
      {station.description && <p className={classes.description}>{station.description}</p>}
    </Paper>
  );
}

/** Change it, or ask for approval; what is asked for is said before it is sent. */
function StationActs({ station }: { readonly station: Station }) {
  const client = useQueryClient();
  const submit = useMutation({
    mutationFn: () => call(routes.submitStation, { params: { id: station.id } }),
    onSuccess: (next) => {
      client.setQueryData(stationQueries.one(station.id).queryKey, next);
      void client.invalidateQueries({ queryKey: stationQueries.all });
      notifications.show({ message: `${next.name} waits for approval. You hear by mail.` });
    },
    onError: (error) =>
      notifications.show({ title: 'Approval was not asked for', message: sentenceOf(error), color: 'buoy' }),
  });
  const ask = () =>
    modals.openConfirmModal({
      title: `Ask for approval of ${station.name}?`,
      children:
        'Skyberth checks position, antennas and transmit bands. Say only what is true and licensed: buyers transmit and pay by it. You can go on describing it meanwhile.',
      labels: { confirm: 'Ask for approval', cancel: 'Not yet' },
      onConfirm: () => submit.mutate(),
    });
  const canAsk = station.state === 'draft' || station.state === 'refused';
  return (
    <>
      {station.state !== 'suspended' && (
        <Button variant="default" component={Link} to={paths.editStation(station.id)}>
          Change the station
        </Button>
      )}
      {canAsk && (
        <Button onClick={ask} loading={submit.isPending} disabled={station.antennas.length === 0}>
          {station.antennas.length === 0 ? 'Approval waits for an antenna' : 'Ask for approval'}
        </Button>
      )}
    </>
  );
}
