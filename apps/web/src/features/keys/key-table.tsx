import { Button, Table } from '@mantine/core';
import { modals } from '@mantine/modals';
import { notifications } from '@mantine/notifications';
import { type ApiKey, routes } from '@skyberth/shared';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { DayTime } from '../../ui/day-time.js';
import { keysQuery } from './key-queries.js';

const STATE_WORDS: Readonly<Record<ApiKey['state'], string>> = {
  'in force': 'in force',
  ended: 'ended',
  revoked: 'revoked',
  'maker left': 'ended: its maker left',
};

export function KeyTable({ keys }: { readonly keys: readonly ApiKey[] }) {
  return (
    <Table.ScrollContainer minWidth={720}>
      <Table>
        <Table.Thead>
          <Table.Tr>
            <Table.Th>Key</Table.Th>
            <Table.Th>Scopes</Table.Th>
            <Table.Th>State</Table.Th>
            <Table.Th>Ends</Table.Th>
            <Table.Th>Last used</Table.Th>
            <Table.Th>Change</Table.Th>
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {keys.map((apiKey) => (
            <KeyRow key={apiKey.id} apiKey={apiKey} />
          ))}
        </Table.Tbody>
      </Table>
    </Table.ScrollContainer>
  );
}

function KeyRow({ apiKey }: { readonly apiKey: ApiKey }) {
  const client = useQueryClient();
  const revoke = useMutation({
    mutationFn: () => call(routes.revokeApiKey, { params: { id: apiKey.id } }),
    onSettled: () => client.invalidateQueries({ queryKey: keysQuery().queryKey }),
    onError: (error) =>
      notifications.show({ title: `${apiKey.name} was not revoked`, message: sentenceOf(error), color: 'buoy' }),
  });
  const askRevoke = () =>
    modals.openConfirmModal({
      title: `Revoke ${apiKey.name}?`,
      children: 'The program that uses it is refused from the next call on, also in the middle of a contact.',
      labels: { confirm: 'Revoke', cancel: 'Keep' },
      onConfirm: () => revoke.mutate(),
    });
  return (
    <Table.Tr>
      <Table.Td>
        <strong>{apiKey.name}</strong>
        <div>
          … {apiKey.tail}, made by {apiKey.madeByName}, <DayTime atMs={Date.parse(apiKey.createdUtc)} show="day" />
        </div>
      </Table.Td>
      <Table.Td>{apiKey.scopes.join(', ')}</Table.Td>
      <Table.Td>{STATE_WORDS[apiKey.state]}</Table.Td>
      <Table.Td>{apiKey.endsUtc ? <DayTime atMs={Date.parse(apiKey.endsUtc)} show="day" /> : 'no end'}</Table.Td>
      <Table.Td>{apiKey.lastUsedUtc ? <DayTime atMs={Date.parse(apiKey.lastUsedUtc)} /> : 'not yet'}</Table.Td>
      <Table.Td>
        {apiKey.state !== 'revoked' && (
          <Button
            variant="default"
            size="xs"
            onClick={askRevoke}
            loading={revoke.isPending}
            aria-label={`Revoke ${apiKey.name}`}
          >
            Revoke
          </Button>
        )}
      </Table.Td>
    </Table.Tr>
  );
}
