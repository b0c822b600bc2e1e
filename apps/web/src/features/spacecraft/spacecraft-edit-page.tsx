import { Skeleton } from '@mantine/core';
import { notifications } from '@mantine/notifications';
import { routes, type Spacecraft } from '@skyberth/shared';
import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useNavigate, useParams } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useCan } from '../../lib/session.js';
import { spacecraftQueries } from '../../lib/spacecraft-queries.js';
import { useTitle } from '../../lib/use-title.js';
import { EmptyState } from '../../ui/empty-state.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { spacecraftChanged } from './spacecraft-changed.js';
import { SpacecraftForm } from './spacecraft-form.js';
import { emptySpacecraft, type SpacecraftInputValues, spacecraftValues } from './spacecraft-values.js';

/** `/spacecraft/new` */
export function NewSpacecraftPage() {
  useTitle('New spacecraft');
  const navigate = useNavigate();
  const client = useQueryClient();
  const mayWrite = useCan()('spacecraft.write');
  if (!mayWrite) return <ReadOnly />;
  let made: Spacecraft | null = null;
  const save = async (input: SpacecraftInputValues) => {
    made = await call(routes.createSpacecraft, { body: input });
    spacecraftChanged(client, made);
  };
  return (
    <>
      <PageTitle title="A new spacecraft">
        Elements can follow: those that carry its number, designator or name join it by themselves.
      </PageTitle>
      <SpacecraftForm
        initial={emptySpacecraft()}
        submitLabel="Add the spacecraft"
        onSave={save}
        onSaved={() => navigate(made ? paths.oneSpacecraft(made.id) : paths.spacecraft)}
        onCancel={() => navigate(paths.spacecraft)}
      />
    </>
  );
}

/** `/spacecraft/:id/edit` */
export function EditSpacecraftPage() {
  useTitle('Change a spacecraft');
  const { id = '' } = useParams();
  const mayWrite = useCan()('spacecraft.write');
  const craft = useQuery(spacecraftQueries.one(id));
  if (!mayWrite) return <ReadOnly />;
  if (craft.error)
    return (
      <ProblemNotice title="The spacecraft could not be read" onRetry={() => void craft.refetch()}>
        {sentenceOf(craft.error)}
      </ProblemNotice>
    );
  if (!craft.data) return <Skeleton height={480} />;
  return <EditOne key={id} craft={craft.data} />;
}

function EditOne({ craft }: { readonly craft: Spacecraft }) {
  const navigate = useNavigate();
  const client = useQueryClient();
  const save = async (input: SpacecraftInputValues) => {
    const next = await call(routes.updateSpacecraft, { params: { id: craft.id }, body: input });
    spacecraftChanged(client, next);
    notifications.show({ message: `${next.name} is saved. Passes are matched to its radios as they are now.` });
  };
  const back = () => navigate(paths.oneSpacecraft(craft.id));
  return (
    <>
      <PageTitle title={`Change ${craft.name}`} />
      <SpacecraftForm
        initial={spacecraftValues(craft)}
        submitLabel="Save the changes"
        onSave={save}
        onSaved={back}
        onCancel={back}
      />
    </>
  );
}

function ReadOnly() {
  return (
    <EmptyState title="Your role reads spacecraft, but does not change them">
      A manager or member of your organisation can.
    </EmptyState>
  );
}
