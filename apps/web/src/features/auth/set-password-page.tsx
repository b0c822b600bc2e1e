import { Anchor, Button, PasswordInput, Stack, Text } from '@mantine/core';
import { schemaResolver, useForm } from '@mantine/form';
import { Password, routes } from '@skyberth/shared';
import { useMutation } from '@tanstack/react-query';
import { Link, useSearchParams } from 'react-router-dom';
import { z } from 'zod';
import { call } from '../../lib/api-client.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { AuthFrame } from './auth-frame.js';

/** Reached from a mail: a reset, or an invitation. */
export function SetPasswordPage() {
  const [search] = useSearchParams();
  const form = useForm({
    initialValues: { password: '' },
    validate: schemaResolver(z.object({ password: Password }), { sync: true }),
  });
  const save = useMutation({
    mutationFn: (values: { password: string }) =>
      call(routes.setPassword, { body: { token: search.get('token') ?? '', password: values.password } }),
  });
  return (
    <AuthFrame title="Set a password">
      {save.isSuccess ? (
        <Text role="status">
          The password is set and every earlier session has ended.{' '}
          <Anchor component={Link} to={paths.signIn}>
            Sign in
          </Anchor>
        </Text>
      ) : (
        <form onSubmit={form.onSubmit((values) => save.mutate(values))} noValidate>
          <Stack>
            {save.error && <ProblemNotice title="The password was not set">{sentenceOf(save.error)}</ProblemNotice>}
            <PasswordInput
              label="New password"
              description="At least 12 characters; a sentence works well."
              autoComplete="new-password"
              required
              {...form.getInputProps('password')}
            />
            <Button type="submit" loading={save.isPending} size="md">
              Set the password
            </Button>
          </Stack>
        </form>
      )}
    </AuthFrame>
  );
}
