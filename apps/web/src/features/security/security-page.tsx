/** The second factor of a person: made here, asked for when money is let go. */
import { Button, Code, Paper, PasswordInput, Skeleton, Stack, TextInput } from '@mantine/core';
import { routes } from '@skyberth/shared';
import { queryOptions, useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { call } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useTitle } from '../../lib/use-title.js';
import { DayTime } from '../../ui/day-time.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';

const factorQuery = () =>
  queryOptions({
    queryKey: ['second-factor'],
    queryFn: ({ signal }) => call(routes.secondFactor, { signal }),
  });

export function SecurityPage() {
  useTitle('Security');
  const factor = useQuery(factorQuery());
  return (
    <>
      <PageTitle title="Security">
        Who reviews or approves payouts shows with a code of an authenticator that it is really them.
      </PageTitle>
      {factor.error && (
        <ProblemNotice title="Your second factor could not be read" onRetry={() => void factor.refetch()}>
          {sentenceOf(factor.error)}
        </ProblemNotice>
      )}
      {factor.isPending && <Skeleton height={160} />}
      {factor.data && (
        <Paper withBorder p="md" maw={480}>
          {factor.data.sinceUtc ? (
            <p>
              Your second factor is set up since <DayTime atMs={Date.parse(factor.data.sinceUtc)} />.
            </p>
          ) : (
            <SetUp />
          )}
        </Paper>
      )}
    </>
  );
}

function SetUp() {
  const client = useQueryClient();
  const [password, setPassword] = useState('');
  const [code, setCode] = useState('');
  const begin = useMutation({ mutationFn: () => call(routes.beginSecondFactor, { body: { password } }) });
  const confirm = useMutation({
    mutationFn: () => call(routes.confirmSecondFactor, { body: { code } }),
    onSuccess: () => client.invalidateQueries({ queryKey: factorQuery().queryKey }),
  });
  const error = begin.error ?? confirm.error;
  return (
    <Stack>
      {error && <ProblemNotice title="That did not work">{sentenceOf(error)}</ProblemNotice>}
      {begin.data ? (
        <form
          onSubmit={(event) => {
            event.preventDefault();
            confirm.mutate();
          }}
        >
          <Stack>
            <div>
              Enter this secret in your authenticator. It is shown only now: <Code block>{begin.data.secret}</Code>
            </div>
            <TextInput
              label="Six digits that it shows"
              inputMode="numeric"
              autoComplete="one-time-code"
              value={code}
              onChange={(event) => setCode(event.currentTarget.value)}
            />
            <Button type="submit" loading={confirm.isPending}>
              Confirm the second factor
            </Button>
          </Stack>
        </form>
      ) : (
        <form
          onSubmit={(event) => {
            event.preventDefault();
            begin.mutate();
          }}
        >
          <Stack>
            <PasswordInput
              label="Password"
              autoComplete="current-password"
              value={password}
              onChange={(event) => setPassword(event.currentTarget.value)}
            />
            <Button type="submit" loading={begin.isPending}>
              Set up a second factor
            </Button>
          </Stack>
        </form>
      )}
    </Stack>
  );
}
