/** Opens an antenna beyond its weekly hours, once or again and again; shows before what it would do. */
import { Button, Group, Stack, TextInput } from '@mantine/core';
import { DateTimePicker } from '@mantine/dates';
import { useForm } from '@mantine/form';
import { notifications } from '@mantine/notifications';
import { OpeningInput, routes } from '@skyberth/shared';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';
import { formRules } from '../../lib/form-rules.js';
import { fieldErrors, sentenceOf } from '../../lib/problem-fields.js';
import { serverNowMs } from '../../lib/server-clock.js';
import { stationQueries } from '../../lib/station-queries.js';
import { instantOfText, wallText, wallTimeOf } from '../../lib/zone-time.js';
import { ChangeEffect } from '../../ui/change-effect.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { asRrule, type Repeats, RepeatsField } from '../../ui/repeats-field.js';
import type { TabProps } from './tab-props.js';

const HOUR_MS = 3_600_000;

interface OpeningValues {
  from: string;
  to: string;
  repeats: Repeats;
  note: string;
}

const check = formRules(OpeningInput);

/** The API's fields by those of the form. */
function named(errors: Record<string, string>): Record<string, string> {
  const { startLocal, durationMin, rrule, note } = errors;
  return {
    ...(startLocal ? { from: startLocal } : {}),
    ...(durationMin ? { to: durationMin } : {}),
    ...(rrule ? { repeats: rrule } : {}),
    ...(note ? { note } : {}),
  };
}

export function OpeningForm({
  antenna,
  station,
  onDone,
}: Omit<TabProps, 'mayWrite'> & { readonly onDone: () => void }) {
  const { timeZone } = station;
  const client = useQueryClient();
  const nextHour = Math.ceil(wallTimeOf(serverNowMs(), timeZone) / HOUR_MS) * HOUR_MS;
  const bodyOf = ({ from, to, repeats, note }: OpeningValues) => ({
    startLocal: from.slice(0, 16).replace(' ', 'T'),
    durationMin: Math.round((instantOfText(to, timeZone) - instantOfText(from, timeZone)) / 60_000),
    endLocal: null,
    timeZone,
    rrule: asRrule(repeats),
    note,
  });
  const form = useForm<OpeningValues>({
    initialValues: {
      from: wallText(nextHour),
      to: wallText(nextHour + 2 * HOUR_MS),
      repeats: { kind: 'once', text: '' },
      note: '',
    },
    validate: (values) => named(check(bodyOf(values))),
  });
  const save = useMutation({
    mutationFn: (values: OpeningValues) =>
      call(routes.addOpening, { params: { id: antenna.id }, body: OpeningInput.parse(bodyOf(values)) }),
    onSuccess: () => {
      void client.invalidateQueries({ queryKey: stationQueries.all });
      notifications.show({ message: 'That time is open, and can be booked from now on.' });
      onDone();
    },
    onError: (error) => form.setErrors(named(fieldErrors(error))),
  });
  const tried = OpeningInput.safeParse(bodyOf(form.values));
  return (
    <form onSubmit={form.onSubmit((values) => save.mutate(values))} noValidate>
      <Stack>
        {save.error && <ProblemNotice title="The time stays shut">{sentenceOf(save.error)}</ProblemNotice>}
        <Group grow align="start">
          <DateTimePicker
            label="From, on the station's clock"
            valueFormat="ddd D MMM YYYY HH:mm"
            {...form.getInputProps('from')}
          />
          <DateTimePicker label="To" valueFormat="ddd D MMM YYYY HH:mm" {...form.getInputProps('to')} />
        </Group>
        <RepeatsField
          value={form.values.repeats}
          onChange={(repeats) => form.setFieldValue('repeats', repeats)}
          error={form.errors['repeats']}
        />
        <TextInput
          label="Note"
          description="Only your own people read it."
          maxLength={120}
          {...form.getInputProps('note')}
        />
        <ChangeEffect antennaId={antenna.id} change={tried.success ? { addOpenings: [tried.data] } : null} />
        <Group>
          <Button type="submit" loading={save.isPending}>
            Open this time
          </Button>
          <Button variant="default" onClick={onDone}>
            Cancel
          </Button>
        </Group>
      </Stack>
    </form>
  );
}
