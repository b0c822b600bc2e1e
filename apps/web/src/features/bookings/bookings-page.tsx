/** Every booking of the organisation, as buyer or as station owner; for staff all of them. */
import { Button, MultiSelect, SegmentedControl, Select, Skeleton } from '@mantine/core';
import { BOOKING_STATES, type BookingState } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { lazy, Suspense, useMemo, useState } from 'react';
import { useSearchParams } from 'react-router-dom';
import { serverNowMs } from '../../lib/server-clock.js';
import { useCan, useSession } from '../../lib/session.js';
import { spacecraftQueries } from '../../lib/spacecraft-queries.js';
import { useTitle } from '../../lib/use-title.js';
import { PageTitle } from '../../ui/page-title.js';
import { BOOKING_STATE_BADGES } from '../../ui/state-badge.js';
import classes from './bookings.module.css';
import { BookingsList } from './bookings-list.js';
import { CalendarAddress } from './calendar-address.js';
import { DEFAULT_LIST_FILTER, type ListFilter, readListFilter, type When, writeListFilter } from './list-filter.js';

const BookingsCalendar = lazy(() => import('./bookings-calendar.js'));

const LEADS = {
  operator: 'Contacts that you hold, have bought and have flown.',
  owner: 'Contacts sold on your antennas.',
  staff: 'Contacts of every organisation.',
} as const;

export function BookingsPage() {
  useTitle('Bookings');
  const { organisationKind } = useSession().active;
  const [search, setSearch] = useSearchParams();
  const filter = useMemo(() => readListFilter(search), [search]);
  const [nowMs] = useState(() => Math.floor(serverNowMs() / 60_000) * 60_000);
  const change = (part: Partial<ListFilter>) =>
    setSearch(writeListFilter({ ...filter, page: 1, ...part }), { replace: true });
  return (
    <>
      <PageTitle
        title="Bookings"
        actions={
          <SegmentedControl
            aria-label="View"
            data={[
              { value: 'list', label: 'List' },
              { value: 'calendar', label: 'Calendar' },
            ]}
            value={filter.view}
            onChange={(view) => change({ view: view as ListFilter['view'] })}
          />
        }
      >
        {LEADS[organisationKind]}
      </PageTitle>
      <Filters filter={filter} onChange={change} />
      {filter.view === 'list' ? (
        <BookingsList filter={filter} nowMs={nowMs} onChange={change} />
      ) : (
        <Suspense fallback={<Skeleton height={560} />}>
          <BookingsCalendar filter={filter} nowMs={nowMs} onChange={change} />
        </Suspense>
      )}
      <CalendarAddress />
    </>
  );
}

const WHEN_LABELS: readonly { value: When; label: string }[] = [
  { value: 'coming', label: 'To come' },
  { value: 'past', label: 'Past' },
  { value: 'all', label: 'All' },
];

const STATE_ITEMS = BOOKING_STATES.map((value) => ({ value, label: BOOKING_STATE_BADGES[value].text }));

function Filters({ filter, onChange }: { filter: ListFilter; onChange: (part: Partial<ListFilter>) => void }) {
  const mayReadCraft = useCan()('spacecraft.read');
  const spacecraft = useQuery({ ...spacecraftQueries.list('all'), enabled: mayReadCraft });
  const isFiltered = filter.states.length > 0 || filter.spacecraftId !== null;
  return (
    <div className={classes.filters}>
      {filter.view === 'list' && (
        <SegmentedControl
          aria-label="Time"
          data={[...WHEN_LABELS]}
          value={filter.when}
          onChange={(when) => onChange({ when: when as When })}
        />
      )}
      <MultiSelect
        aria-label="States"
        placeholder={filter.states.length === 0 ? 'Any state' : ''}
        data={STATE_ITEMS}
        value={[...filter.states]}
        onChange={(states) => onChange({ states: states as BookingState[] })}
        clearable
        w={filter.states.length > 1 ? 340 : 220}
      />
      {mayReadCraft && (
        <Select
          aria-label="Spacecraft"
          placeholder="Any spacecraft"
          data={(spacecraft.data?.items ?? []).map((one) => ({ value: one.id, label: one.name }))}
          value={filter.spacecraftId}
          onChange={(spacecraftId) => onChange({ spacecraftId })}
          clearable
          searchable
          w={200}
        />
      )}
      {isFiltered && (
        <Button
          variant="subtle"
          onClick={() =>
            onChange({ states: DEFAULT_LIST_FILTER.states, spacecraftId: DEFAULT_LIST_FILTER.spacecraftId })
          }
        >
          Clear the filter
        </Button>
      )}
    </div>
  );
}
