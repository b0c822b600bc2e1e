import { Button } from '@mantine/core';
import { modals } from '@mantine/modals';
import { notifications } from '@mantine/notifications';
import { routes, type Spacecraft } from '@skyberth/shared';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import classes from './spacecraft.module.css';
import { spacecraftChanged } from './spacecraft-changed.js';

/** Takes a spacecraft out of use, which cannot be undone here: the dialog says so. */
export function RetireSection({ craft }: { readonly craft: Spacecraft }) {
  const client = useQueryClient();
  const retire = useMutation({
    mutationFn: () => call(routes.retireSpacecraft, { params: { id: craft.id } }),
    onSuccess: (next) => {
      spacecraftChanged(client, next);
      notifications.show({ message: `${next.name} is out of use. Its history stays.` });
    },
  });
  const ask = () =>
    modals.openConfirmModal({
      title: `Take ${craft.name} out of use?`,
      children:
        'It leaves the search and no longer takes elements from the feed. Its bookings, invoices and elements stay. It cannot be put back into use from here.',
      labels: { confirm: 'Take it out of use', cancel: 'Keep it' },
      confirmProps: { color: 'buoy', variant: 'outline' },
      onConfirm: () => retire.mutate(),
    });
  return (
    <section aria-labelledby="retire" className={classes.retire}>
      <h2 id="retire" className={classes.heading}>
        Out of use
      </h2>
      {retire.error && <ProblemNotice title={`${craft.name} stays in use`}>{sentenceOf(retire.error)}</ProblemNotice>}
      <div className={classes.acts}>
        <Button color="buoy" variant="outline" onClick={ask} loading={retire.isPending}>
          Take {craft.name} out of use
        </Button>
        <span className={classes.quiet}>Only once it has no contacts to come.</span>
      </div>
    </section>
  );
}
