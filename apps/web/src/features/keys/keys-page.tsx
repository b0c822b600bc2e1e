/** API keys: made, shown once, listed with their last use, revoked. */
import { Skeleton, Stack } from '@mantine/core';
import { useQuery } from '@tanstack/react-query';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useCan } from '../../lib/session.js';
import { useTitle } from '../../lib/use-title.js';
import { EmptyState } from '../../ui/empty-state.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { keysQuery } from './key-queries.js';
import { KeyTable } from './key-table.js';
import { NewKeyForm } from './new-key-form.js';

export function KeysPage() {
  useTitle('API keys');
  const mayMake = useCan()('api-keys.make');
  return (
    <>
      <PageTitle title="API keys">
        With a key a program acts for your organisation, in the name of who made it and only as far as its scopes go. It
        never lets a stopped dish move again and never makes another key.
      </PageTitle>
      {mayMake ? <Keys /> : <EmptyState title="Only managers see API keys">Ask one of yours for a key.</EmptyState>}
    </>
  );
}

function Keys() {
  const keys = useQuery(keysQuery());
  return (
    <Stack gap="xl">
      <NewKeyForm />
      {keys.error && (
        <ProblemNotice title="The keys could not be read" onRetry={() => void keys.refetch()}>
          {sentenceOf(keys.error)}
        </ProblemNotice>
      )}
      {keys.isPending && <Skeleton height={160} />}
      {keys.data?.items.length === 0 && (
        <EmptyState title="No keys yet">Make one for the program that is to report or to read.</EmptyState>
      )}
      {keys.data && keys.data.items.length > 0 && <KeyTable keys={keys.data.items} />}
    </Stack>
  );
}
