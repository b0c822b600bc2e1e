import { Skeleton } from '@mantine/core';
import { notifications } from '@mantine/notifications';
import { routes, type Station } from '@skyberth/shared';
import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useNavigate, useParams } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { stationQueries } from '../../lib/station-queries.js';
import { useTitle } from '../../lib/use-title.js';
import { Caution } from '../../ui/caution.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { StationForm, type StationInputValues } from './station-form.js';
import { emptyStation, hasMoved, stationValues } from './station-values.js';

/** `/stations/new` */
export function NewStationPage() {
  useTitle('New station');
  const navigate = useNavigate();
  const client = useQueryClient();
  let made: Station | null = null;
  const save = async (input: StationInputValues) => {
    made = await call(routes.createStation, { body: input });
    void client.invalidateQueries({ queryKey: stationQueries.all });
  };
  return (
    <>
      <PageTitle title="A new station">
        Describe it once, truthfully. Then add antennas, and ask for approval; nothing is sold before that.
      </PageTitle>
      <StationForm
        initial={emptyStation(Intl.DateTimeFormat().resolvedOptions().timeZone)}
        submitLabel="Save and add an antenna"
        onSave={save}
        onSaved={() => navigate(made ? paths.station(made.id) : paths.stations)}
        onCancel={() => navigate(paths.stations)}
      />
    </>
  );
}

/** `/stations/:id/edit` */
export function EditStationPage() {
  useTitle('Change a station');
  const { id = '' } = useParams();
  const station = useQuery(stationQueries.one(id));
  if (station.error)
    return (
      <ProblemNotice title="The station could not be read" onRetry={() => void station.refetch()}>
        {sentenceOf(station.error)}
      </ProblemNotice>
    );
  if (!station.data) return <Skeleton height={480} />;
  return <EditOne key={id} station={station.data} />;
}

function EditOne({ station }: { readonly station: Station }) {
  const navigate = useNavigate();
  const client = useQueryClient();
  const save = async (input: StationInputValues) => {
    const next = await call(routes.updateStation, { params: { id: station.id }, body: input });
    client.setQueryData(stationQueries.one(station.id).queryKey, next);
    void client.invalidateQueries({ queryKey: stationQueries.all });
    notifications.show({ message: `${next.name} is saved.` });
  };
  const back = () => navigate(paths.station(station.id));
  return (
    <>
      <PageTitle title={`Change ${station.name}`} />
      <StationForm
        initial={stationValues(station)}
        submitLabel="Save the changes"
        onSave={save}
        onSaved={back}
        onCancel={back}
        note={(values) =>
          station.state === 'approved' &&
          hasMoved(station, values) && (
            <Caution title="The position changes">
              An approved station that moves goes back to approval and sells nothing until then. With sold contacts to
              come it cannot move.
            </Caution>
          )
        }
      />
    </>
  );
}
