import { Anchor, Button, Stack, Text } from '@mantine/core';
import { routes } from '@skyberth/shared';
import { useMutation } from '@tanstack/react-query';
import { Link, useSearchParams } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { AuthFrame } from './auth-frame.js';

/** Reached from a mail. A button confirms, because mail programs open links by themselves. */
export function VerifyEmailPage() {
  const [search] = useSearchParams();
  const confirm = useMutation({
    mutationFn: () => call(routes.verifyEmail, { body: { token: search.get('token') ?? '' } }),
  });
  return (
    <AuthFrame title="Confirm your e-mail">
      {confirm.isSuccess ? (
        <Text role="status">
          Confirmed.{' '}
          <Anchor component={Link} to={paths.home}>
            Go on to Skyberth
          </Anchor>
        </Text>
      ) : (
        <Stack>
          {confirm.error && (
            <ProblemNotice title="The address was not confirmed">{sentenceOf(confirm.error)}</ProblemNotice>
          )}
          <Button onClick={() => confirm.mutate()} loading={confirm.isPending} size="md">
            Confirm this address
          </Button>
        </Stack>
      )}
    </AuthFrame>
  );
}
