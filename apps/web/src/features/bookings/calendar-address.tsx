/** Secret addresses by which a person's own calendar reads the contacts: made, shown once, revoked. */
import { Button, Select, Table, TextInput } from '@mantine/core';
import { routes } from '@skyberth/shared';
import { queryOptions, useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { call } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useCan } from '../../lib/session.js';
import { stationQueries } from '../../lib/station-queries.js';
import { DayTime } from '../../ui/day-time.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import classes from './bookings.module.css';

const feedsQuery = queryOptions({
  queryKey: ['calendar-feeds'],
  queryFn: ({ signal }) => call(routes.listCalendarFeeds, { signal }),
});
const ALL_CONTACTS = 'All contacts';

export function CalendarAddress() {
  const can = useCan();
  const client = useQueryClient();
  const [antennaId, setAntennaId] = useState<string | null>(null);
  const mayMake = can('calendar-feeds.make');
  const mayPick = can('stations.read') && mayMake;
  const feeds = useQuery({ ...feedsQuery, enabled: mayMake });
  const stations = useQuery({ ...stationQueries.list({ pageSize: 200 }), enabled: mayPick });
  const onSettled = () => client.invalidateQueries({ queryKey: feedsQuery.queryKey });
  const make = useMutation({ mutationFn: () => call(routes.makeCalendarFeed, { body: { antennaId } }), onSettled });
  const revoke = useMutation({
    mutationFn: (id: string) => call(routes.revokeCalendarFeed, { params: { id } }),
    onSuccess: (_done, id) => {
      if (make.data?.feed.id === id) make.reset();
    },
    onSettled,
  });
  if (!mayMake) return null;
  const error = feeds.error ?? make.error ?? revoke.error;
  const items = feeds.data?.items ?? [];
  const antennas = (stations.data?.items ?? []).flatMap((station) => station.antennas);
  return (
    <section aria-labelledby="calendar-address-title">
      <h2 id="calendar-address-title">Calendar address</h2>
      <p className={classes.note}>
        Your own calendar program can read the contacts from a secret address, and learns there when one moves or is
        cancelled. Whoever knows the address can read them too: revoke it if it gets about.
      </p>
      {error && <ProblemNotice title="The calendar addresses">{sentenceOf(error)}</ProblemNotice>}
      <div className={classes.filters}>
        {mayPick && (
          <Select
            aria-label="Which contacts"
            placeholder={ALL_CONTACTS}
            data={antennas.map((one) => ({ value: one.id, label: one.name }))}
            value={antennaId}
            onChange={setAntennaId}
            clearable
            w={220}
          />
        )}
        <Button variant="default" loading={make.isPending} onClick={() => make.mutate()}>
          Make an address
        </Button>
      </div>
      {make.data && (
        <TextInput
          label="Copy it now; it is not shown again"
          readOnly
          value={make.data.url}
          onFocus={(event) => event.currentTarget.select()}
          mb="md"
        />
      )}
      {items.length > 0 && (
        <div className={classes.scroll}>
          <Table>
            <Table.Thead>
              <Table.Tr>
                <Table.Th>Shows</Table.Th>
                <Table.Th>Made</Table.Th>
                <Table.Th>Revoke</Table.Th>
              </Table.Tr>
            </Table.Thead>
            <Table.Tbody>
              {items.map((feed) => (
                <Table.Tr key={feed.id}>
                  <Table.Td>{feed.antennaName ?? ALL_CONTACTS}</Table.Td>
                  <Table.Td>
                    <DayTime atMs={Date.parse(feed.createdUtc)} />
                  </Table.Td>
                  <Table.Td>
                    <Button
                      size="xs"
                      variant="outline"
                      color="buoy"
                      disabled={revoke.isPending}
                      onClick={() => revoke.mutate(feed.id)}
                    >
                      Revoke
                    </Button>
                  </Table.Td>
                </Table.Tr>
              ))}
            </Table.Tbody>
          </Table>
        </div>
      )}
    </section>
  );
}
