import { Anchor, Button, Stack, Text, TextInput } from '@mantine/core';
import { useForm } from '@mantine/form';
import { routes } from '@skyberth/shared';
import { useMutation } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { AuthFrame } from './auth-frame.js';

export function ForgottenPage() {
  const form = useForm({ initialValues: { email: '' } });
  const ask = useMutation({
    mutationFn: (values: { email: string }) => call(routes.requestPasswordReset, { body: values }),
  });
  return (
    <AuthFrame
      title="Forgotten password"
      foot={
        <Anchor component={Link} to={paths.signIn}>
          Back to sign-in
        </Anchor>
      }
    >
      {ask.isSuccess ? (
        <Text role="status">If that address has an account, a link is on its way. It works once, for one hour.</Text>
      ) : (
        <form onSubmit={form.onSubmit((values) => ask.mutate(values))} noValidate>
          <Stack>
            {ask.error && <ProblemNotice title="No link was sent">{sentenceOf(ask.error)}</ProblemNotice>}
            <TextInput label="E-mail" type="email" autoComplete="username" required {...form.getInputProps('email')} />
            <Button type="submit" loading={ask.isPending} size="md">
              Send me a link
            </Button>
          </Stack>
        </form>
      )}
    </AuthFrame>
  );
}
