import { Anchor, Button, PasswordInput, SegmentedControl, Stack, Text, TextInput } from '@mantine/core';
import { schemaResolver, useForm } from '@mantine/form';
import { routes, SignUp } from '@skyberth/shared';
import { useMutation } from '@tanstack/react-query';
import { Link, useNavigate } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { paths } from '../../lib/paths.js';
import { fieldErrors, sentenceOf } from '../../lib/problem-fields.js';
import { useEnterSession } from '../../lib/session.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import classes from './auth.module.css';
import { AuthFrame } from './auth-frame.js';

const EMPTY = {
  name: '',
  email: '',
  password: '',
  organisation: {
    name: '',
    kind: 'operator' as 'operator' | 'owner',
    address: { line1: '', line2: '', postalCode: '', city: '', country: '' },
    vatNumber: '',
  },
};

const KINDS = [
  { value: 'operator', label: 'We fly spacecraft' },
  { value: 'owner', label: 'We own antennas' },
];

export function SignUpPage() {
  const navigate = useNavigate();
  const enter = useEnterSession();
  const form = useForm({
    initialValues: EMPTY,
    validate: schemaResolver(SignUp, { sync: true }),
    validateInputOnBlur: true,
  });
  const signUp = useMutation({
    mutationFn: (values: typeof EMPTY) =>
      call(routes.signUp, {
        body: {
          ...values,
          organisation: { ...values.organisation, vatNumber: values.organisation.vatNumber.trim() || null },
        },
      }),
    onSuccess: (session) => {
      enter(session);
      navigate(paths.home, { replace: true });
    },
    onError: (error) => form.setErrors(fieldErrors(error)),
  });
  return (
    <AuthFrame
      title="Open an account"
      wide
      lead="For the organisation that buys or sells contact time, and for you as its first manager."
      foot={
        <Anchor component={Link} to={paths.signIn}>
          Already have one? Sign in
        </Anchor>
      }
    >
      <form onSubmit={form.onSubmit((values) => signUp.mutate(values))} noValidate>
        <Stack>
          {signUp.error && <ProblemNotice title="The account was not opened">{sentenceOf(signUp.error)}</ProblemNotice>}
          <SegmentedControl
            aria-label="What your organisation does"
            data={KINDS}
            {...form.getInputProps('organisation.kind')}
          />
          <div className={classes.columns}>
            <TextInput label="Your name" autoComplete="name" required {...form.getInputProps('name')} />
            <TextInput
              label="Your e-mail"
              type="email"
              autoComplete="email"
              required
              {...form.getInputProps('email')}
            />
            <PasswordInput
              className={classes.wide}
              label="Password"
              description="At least 12 characters; a sentence works well."
              autoComplete="new-password"
              required
              {...form.getInputProps('password')}
            />
            <TextInput
              label="Organisation"
              autoComplete="organization"
              required
              {...form.getInputProps('organisation.name')}
            />
            <TextInput
              label="VAT number"
              description="Decides the VAT on invoices; leave empty if you have none."
              {...form.getInputProps('organisation.vatNumber')}
            />
            <TextInput
              className={classes.wide}
              label="Street and number"
              autoComplete="address-line1"
              required
              {...form.getInputProps('organisation.address.line1')}
            />
            <TextInput
              label="Postal code"
              autoComplete="postal-code"
              {...form.getInputProps('organisation.address.postalCode')}
            />
            <TextInput
              label="Town"
              autoComplete="address-level2"
              required
              {...form.getInputProps('organisation.address.city')}
            />
            <TextInput
              label="Country"
              description="Two letters, ISO 3166, such as NO"
              maxLength={2}
              autoComplete="country"
              required
              {...form.getInputProps('organisation.address.country')}
              onChange={(event) =>
                form.setFieldValue('organisation.address.country', event.currentTarget.value.toUpperCase())
              }
            />
          </div>
          <Text size="sm" c="dimmed">
            Skyberth computes and books. It grants no spectrum right: transmitting needs your own licence and the
            station's.
          </Text>
          <Button type="submit" loading={signUp.isPending} size="md">
            Open the account
          </Button>
        </Stack>
      </form>
    </AuthFrame>
  );
}
