import { Button } from '@mantine/core';
import { type Antenna, routes } from '@skyberth/shared';
import { useQuery, useQueryClient } from '@tanstack/react-query';
import { Link, useNavigate, useParams } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { paths } from '../../lib/paths.js';
import { antennaChanged, stationQueries } from '../../lib/station-queries.js';
import { useTitle } from '../../lib/use-title.js';
import { PageTitle } from '../../ui/page-title.js';
import { AntennaForm, type AntennaInputValues } from './antenna-form.js';
import { EMPTY_ANTENNA } from './antenna-values.js';

/** `/stations/:id/new-antenna` */
export function NewAntennaPage() {
  useTitle('New antenna');
  const { id = '' } = useParams();
  const navigate = useNavigate();
  const client = useQueryClient();
  const station = useQuery(stationQueries.one(id));
  let made: Antenna | null = null;
  const save = async (input: AntennaInputValues) => {
    made = await call(routes.createAntenna, { params: { id }, body: input });
    antennaChanged(client, made);
  };
  return (
    <>
      <PageTitle title={station.data ? `A new antenna at ${station.data.name}` : 'A new antenna'}>
        Size, mount and limits first. Its page then says what it still needs before it can be sold.
      </PageTitle>
      <AntennaForm
        initial={EMPTY_ANTENNA}
        submitLabel="Save and describe its horizon"
        onSave={save}
        onSaved={() => navigate(made ? paths.antennaTab(made.id, 'mask') : paths.station(id))}
        beside={
          <Button variant="default" component={Link} to={paths.station(id)}>
            Cancel
          </Button>
        }
      />
    </>
  );
}
