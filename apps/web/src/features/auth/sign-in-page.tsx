import { Anchor, Button, PasswordInput, Stack, TextInput } from '@mantine/core';
import { useForm } from '@mantine/form';
import { routes } from '@skyberth/shared';
import { useMutation } from '@tanstack/react-query';
import { Link, useNavigate, useSearchParams } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useEnterSession } from '../../lib/session.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { afterSignIn } from './after-sign-in.js';
import { AuthFrame } from './auth-frame.js';

export function SignInPage() {
  const navigate = useNavigate();
  const [search] = useSearchParams();
  const enter = useEnterSession();
  const form = useForm({ mode: 'uncontrolled', initialValues: { email: '', password: '' } });
  const signIn = useMutation({
    mutationFn: (values: typeof form.values) => call(routes.signIn, { body: values }),
    onSuccess: (session) => {
      enter(session);
      navigate(afterSignIn(search.get('then')), { replace: true });
    },
  });
  return (
    <AuthFrame
      title="Sign in"
      lead="Contact time on other people's antennas: found, bought, flown and settled."
      foot={
        <>
          <Anchor component={Link} to={paths.signUp}>
            New here? Open an account
          </Anchor>
          <Anchor component={Link} to={paths.forgot}>
            Forgotten password
          </Anchor>
        </>
      }
    >
      <form onSubmit={form.onSubmit((values) => signIn.mutate(values))} noValidate>
        <Stack>
          {signIn.error && <ProblemNotice title="You are not signed in">{sentenceOf(signIn.error)}</ProblemNotice>}
          <TextInput
            label="E-mail"
            type="email"
            autoComplete="username"
            required
            key={form.key('email')}
            {...form.getInputProps('email')}
          />
          <PasswordInput
            label="Password"
            autoComplete="current-password"
            required
            key={form.key('password')}
            {...form.getInputProps('password')}
          />
          <Button type="submit" loading={signIn.isPending} size="md">
            Sign in
          </Button>
        </Stack>
      </form>
    </AuthFrame>
  );
}
