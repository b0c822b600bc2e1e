/** Finding and holding contact time: the operator's main page. */
import { Anchor, Button, Drawer, SegmentedControl, Skeleton } from '@mantine/core';
import { useDebouncedValue } from '@mantine/hooks';
import type { BookingSummary, SearchResult, Spacecraft } from '@skyberth/shared';
import { useQuery, useQueryClient } from '@tanstack/react-query';
import { type ReactNode, useMemo, useState } from 'react';
import { Link } from 'react-router-dom';
import { bookingQueries } from '../../lib/booking-queries.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { serverNowMs } from '../../lib/server-clock.js';
import { useCan } from '../../lib/session.js';
import { spacecraftQueries } from '../../lib/spacecraft-queries.js';
import { useIsPhone } from '../../lib/use-phone.js';
import { useTitle } from '../../lib/use-title.js';
import { EmptyState } from '../../ui/empty-state.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { soleCurrency } from './board-model.js';
import { CraftWarnings } from './craft-warnings.js';
import classes from './find-time.module.css';
import { findTimeQueries } from './find-time-queries.js';
import { NothingPicked } from './nothing-picked.js';
import { PassCard } from './pass-card.js';
import { type SearchFilter, searchInput, type View } from './search-filter.js';
import { SearchProgress } from './search-progress.js';
import { SearchResults } from './search-results.js';
import { SearchSentence } from './search-sentence.js';
import { type FilterInAddress, useSearchFilter } from './use-search-filter.js';

export function FindTimePage() {
  useTitle('Find time');
  const spacecraft = useQuery(spacecraftQueries.list());
  if (spacecraft.error)
    return (
      <ProblemNotice title="Your spacecraft could not be read" onRetry={() => void spacecraft.refetch()}>
        {sentenceOf(spacecraft.error)}
      </ProblemNotice>
    );
  if (!spacecraft.data) return <PageSkeleton />;
  return spacecraft.data.items.length === 0 ? <NoSpacecraft /> : <Search spacecraft={spacecraft.data.items} />;
}

/** A rolling search moves on in steps: each step is another question to the market. */
const STEP_MS = 10 * 60_000;
const SETTLE_MS = 350;

function Search({ spacecraft }: { readonly spacecraft: readonly Spacecraft[] }) {
  const address = useSearchFilter();
  const { filter, change } = address;
  const [beganMs, setBeganMs] = useState(() => Math.floor(serverNowMs() / 60_000) * 60_000);
  const wished = useWishedInput(filter, spacecraft, beganMs);
  const [input] = useDebouncedValue(wished, SETTLE_MS);
  const client = useQueryClient();
  const [searchId] = useState(() => crypto.randomUUID());
  const query = findTimeQueries.search(input, searchId);
  const search = useQuery({ ...query, refetchInterval: STEP_MS });
  const result = search.data;
  const { data: bookings } = useQuery(
    bookingQueries.list({ fromUtc: input.fromUtc, toUtc: input.toUtc, pageSize: 200 }),
  );
  const again = () => {
    setBeganMs(Math.floor(serverNowMs() / 60_000) * 60_000);
    void search.refetch();
  };
  return (
    <>
      <header className={classes.head}>
        <SearchSentence
          filter={filter}
          spacecraft={spacecraft}
          currency={result ? soleCurrency(result.stations) : null}
          onChange={(part) => change({ ...part, passKey: null, part: null })}
        />
        <div className={classes.headSide}>
          <ViewSwitch view={filter.view} onChange={(view) => change({ view })} />
          {result && <Counts result={result} onAgain={again} />}
        </div>
      </header>
      <SearchProgress
        isFetching={search.isFetching}
        wasStopped={!search.isFetching && !result && !search.error}
        spacecraftCount={input.spacecraftIds.length}
        searchId={searchId}
        onStop={() => void client.cancelQueries({ queryKey: query.queryKey })}
        onAgain={again}
      />
      {search.error && (
        <ProblemNotice title="The search came to no answer" onRetry={again}>
          {sentenceOf(search.error)}
        </ProblemNotice>
      )}
      {result && <CraftWarnings spacecraft={result.spacecraft} />}
      {!result && search.isFetching && <Skeleton height={520} />}
      {result && (
        <Found {...{ result, address, bookings: bookings?.items ?? [] }} from={input.fromUtc} to={input.toUtc} />
      )}
    </>
  );
}

function useWishedInput(filter: SearchFilter, spacecraft: readonly Spacecraft[], beganMs: number) {
  const ids = useMemo(() => spacecraft.map((one) => one.id), [spacecraft]);
  // The picked pass and the view stand in the same address, but ask the market nothing new.
  const key = JSON.stringify(searchInput(filter, ids, beganMs));
  return useMemo(() => JSON.parse(key) as ReturnType<typeof searchInput>, [key]);
}

interface FoundProps {
  readonly result: SearchResult;
  readonly bookings: readonly BookingSummary[];
  readonly address: FilterInAddress;
  readonly from: string;
  readonly to: string;
}

function Found({ result, bookings, address, from, to }: FoundProps) {
  const { filter, change } = address;
  const isPhone = useIsPhone();
  const limits = useMemo(() => ({ fromMs: Date.parse(from), toMs: Date.parse(to) }), [from, to]);
  const pass = result.passes.find((one) => one.key === filter.passKey);
  const close = () => change({ passKey: null, part: null });
  const card = pass && (
    <PassCard
      key={`${pass.key} ${filter.part}`}
      {...{ result, pass, filter }}
      booking={bookings.find((one) => one.id === pass.bookingId)}
      onChange={change}
      onHeld={() => (isPhone ? close() : change({ part: null }))}
    />
  );
  const results = <SearchResults {...{ result, bookings, limits, filter }} onChange={change} />;
  if (isPhone)
    return (
      <>
        {results}
        <PassSheet isOpen={pass !== undefined} onClose={close}>
          {card}
        </PassSheet>
      </>
    );
  return (
    <div className={classes.columns}>
      <div className={classes.main}>{results}</div>
      <aside className={classes.card} aria-label="The picked pass">
        {card ?? <NothingPicked result={result} onPick={(passKey) => change({ passKey, part: null })} />}
      </aside>
    </div>
  );
}

function PassSheet({ isOpen, onClose, children }: { isOpen: boolean; onClose: () => void; children: ReactNode }) {
  return (
    <Drawer
      opened={isOpen}
      onClose={onClose}
      position="bottom"
      size="auto"
      radius="xl"
      overlayProps={{ backgroundOpacity: 0.15 }}
      closeButtonProps={{ 'aria-label': 'Close the pass' }}
      classNames={{ content: classes.sheet ?? '', body: classes.sheetBody ?? '', header: classes.sheetHead ?? '' }}
    >
      {children}
    </Drawer>
  );
}

const VIEW_LABELS: readonly { value: View; label: string }[] = [
  { value: 'board', label: 'Board' },
  { value: 'calendar', label: 'Calendar' },
  { value: 'table', label: 'Table' },
  { value: 'map', label: 'Map' },
];

function ViewSwitch({ view, onChange }: { readonly view: View; readonly onChange: (view: View) => void }) {
  return (
    <SegmentedControl
      aria-label="View"
      data={[...VIEW_LABELS]}
      value={view}
      onChange={(value) => onChange(value as View)}
    />
  );
}

function Counts({ result, onAgain }: { readonly result: SearchResult; readonly onAgain: () => void }) {
  const { forSale, passes } = result.counts;
  return (
    <p className={classes.counts} role="status">
      <strong>{forSale} for sale</strong> of {passes} {passes === 1 ? 'pass' : 'passes'}.{' '}
      <button type="button" className={classes.link} onClick={onAgain}>
        Search again from now
      </button>
    </p>
  );
}

function NoSpacecraft() {
  const mayWrite = useCan()('spacecraft.write');
  return (
    <EmptyState
      title="No spacecraft yet"
      action={
        mayWrite && (
          <>
            <Button component={Link} to={paths.addElements}>
              Paste element sets
            </Button>
            <Anchor component={Link} to={paths.newSpacecraft}>
              Add one by hand
            </Anchor>
          </>
        )
      }
    >
      {mayWrite
        ? 'Paste or upload an element set: Skyberth adds the spacecraft it names, finds their passes and shows what is for sale.'
        : 'Someone of your side with the right to change spacecraft must add one first; then its passes stand here.'}
    </EmptyState>
  );
}

function PageSkeleton() {
  return (
    <div role="status" aria-label="Loading">
      <Skeleton height={60} mb="lg" maw={800} />
      <Skeleton height={520} />
    </div>
  );
}
