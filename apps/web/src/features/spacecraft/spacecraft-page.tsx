import { Button, SegmentedControl, Skeleton, TextInput } from '@mantine/core';
import type { Spacecraft } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { Link, useSearchParams } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useCan } from '../../lib/session.js';
import { spacecraftQueries } from '../../lib/spacecraft-queries.js';
import { useIsPhone } from '../../lib/use-phone.js';
import { useTitle } from '../../lib/use-title.js';
import { EmptyState } from '../../ui/empty-state.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { findCraft, fleetWords } from './craft-words.js';
import classes from './spacecraft.module.css';
import { SpacecraftCards, SpacecraftTable } from './spacecraft-list.js';

type Shown = 'active' | 'retired' | 'all';

const readShown = (text: string | null): Shown => (text === 'retired' || text === 'all' ? text : 'active');
const MANY = 8;

/** `/spacecraft` */
export function SpacecraftPage() {
  useTitle('Spacecraft');
  const mayWrite = useCan()('spacecraft.write');
  const [search, setSearch] = useSearchParams();
  const shown = readShown(search.get('state'));
  const text = search.get('find') ?? '';
  const craft = useQuery(spacecraftQueries.list(shown));
  const put = (name: string, value: string) =>
    setSearch(
      (now) => {
        const next = new URLSearchParams(now);
        if (value) next.set(name, value);
        else next.delete(name);
        return next;
      },
      { replace: true },
    );
  const items = craft.data?.items ?? [];
  const isFleetEmpty = shown === 'active' && craft.data?.total === 0;
  return (
    <>
      <PageTitle title="Spacecraft" actions={mayWrite && !isFleetEmpty && <BeginActs />}>
        {items.length > 0 && fleetWords(items)}
      </PageTitle>
      <div className={classes.filters}>
        <SegmentedControl
          aria-label="Which spacecraft"
          value={shown}
          onChange={(value) => put('state', value === 'active' ? '' : value)}
          data={[
            { value: 'active', label: 'In use' },
            { value: 'retired', label: 'Out of use' },
            { value: 'all', label: 'All' },
          ]}
        />
        {(items.length > MANY || text) && (
          <TextInput
            type="search"
            aria-label="Find a spacecraft"
            placeholder="Name or number"
            value={text}
            onChange={(event) => put('find', event.currentTarget.value)}
          />
        )}
      </div>
      {craft.error && (
        <ProblemNotice title="The spacecraft could not be read" onRetry={() => void craft.refetch()}>
          {sentenceOf(craft.error)}
        </ProblemNotice>
      )}
      {craft.isPending && <Skeleton height={240} />}
      {craft.data && <Listed items={findCraft(items, text)} all={items} shown={shown} mayWrite={mayWrite} />}
    </>
  );
}

function BeginActs() {
  return (
    <>
      <Button component={Link} to={paths.newSpacecraft} variant="default">
        Add by hand
      </Button>
      <Button component={Link} to={paths.addElements}>
        Give elements
      </Button>
    </>
  );
}

interface ListedProps {
  readonly items: readonly Spacecraft[];
  readonly all: readonly Spacecraft[];
  readonly shown: Shown;
  readonly mayWrite: boolean;
}

function Listed({ items, all, shown, mayWrite }: ListedProps) {
  const isPhone = useIsPhone();
  if (items.length === 0 && all.length > 0)
    return <EmptyState title="No spacecraft of that name or number">Shorten what you look for.</EmptyState>;
  if (items.length === 0 && shown === 'retired')
    return (
      <EmptyState title="None is out of use">A spacecraft that is taken out of use keeps its history here.</EmptyState>
    );
  if (items.length === 0)
    return (
      <EmptyState title="No spacecraft yet" action={mayWrite && <BeginRow />}>
        Paste its elements (TLE or OMM): spacecraft that you do not have yet are added with them. Then add its radios,
        and passes can be found.
      </EmptyState>
    );
  const List = isPhone ? SpacecraftCards : SpacecraftTable;
  return <List items={items} mayWrite={mayWrite} />;
}

function BeginRow() {
  return (
    <div className={classes.acts}>
      <BeginActs />
    </div>
  );
}
