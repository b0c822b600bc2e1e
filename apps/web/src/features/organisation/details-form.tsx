import { Button, Paper, Stack, TextInput } from '@mantine/core';
import { useForm } from '@mantine/form';
import { notifications } from '@mantine/notifications';
import { type Organisation, routes } from '@skyberth/shared';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';
import { fieldErrors, sentenceOf } from '../../lib/problem-fields.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import classes from './organisation.module.css';
import { organisationQueries } from './organisation-queries.js';

interface DetailsFormProps {
  readonly organisation: Organisation;
  readonly readOnly: boolean;
}

export function DetailsForm({ organisation, readOnly }: DetailsFormProps) {
  const client = useQueryClient();
  const form = useForm({
    initialValues: {
      name: organisation.name,
      address: organisation.address,
      vatNumber: organisation.vatNumber ?? '',
      billingEmail: organisation.billingEmail,
    },
  });
  const save = useMutation({
    mutationFn: (values: typeof form.values) =>
      call(routes.updateOrganisation, { body: { ...values, vatNumber: values.vatNumber.trim() || null } }),
    onSuccess: (next) => {
      client.setQueryData(organisationQueries.details().queryKey, next);
      form.resetDirty();
      notifications.show({ message: 'Saved. Later invoices carry it.' });
    },
    onError: (error) => form.setErrors(fieldErrors(error)),
  });
  const field = (path: string) => ({ ...form.getInputProps(path), readOnly });
  return (
    <Paper className={classes.form}>
      <form onSubmit={form.onSubmit((values) => save.mutate(values))} noValidate>
        <Stack>
          {save.error && <ProblemNotice title="Nothing was changed">{sentenceOf(save.error)}</ProblemNotice>}
          <TextInput label="Name" {...field('name')} />
          <TextInput label="Street and number" {...field('address.line1')} />
          <TextInput label="Second line" {...field('address.line2')} />
          <TextInput label="Postal code" {...field('address.postalCode')} />
          <TextInput label="Town" {...field('address.city')} />
          <TextInput label="Country" description="Two letters, ISO 3166" maxLength={2} {...field('address.country')} />
          <TextInput label="VAT number" {...field('vatNumber')} />
          <TextInput label="Invoices go to" type="email" {...field('billingEmail')} />
          {!readOnly && (
            <Button type="submit" loading={save.isPending} disabled={!form.isDirty()}>
              Save
            </Button>
          )}
        </Stack>
      </form>
    </Paper>
  );
}
