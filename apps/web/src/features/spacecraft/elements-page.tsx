import { Anchor, SegmentedControl } from '@mantine/core';
import { Link, useSearchParams } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { useCan } from '../../lib/session.js';
import { useTitle } from '../../lib/use-title.js';
import { EmptyState } from '../../ui/empty-state.js';
import { PageTitle } from '../../ui/page-title.js';
import { ElementDesk } from './element-desk.js';
import { ElementsSaved } from './elements-saved.js';
import { EphemerisDesk } from './ephemeris-desk.js';
import { useElementDesk } from './use-element-desk.js';

/** `/spacecraft/elements`; with `?craft=` a single set is attached to that spacecraft, with `?kind=ephemeris` an ephemeris is given. */
export function ElementsPage() {
  useTitle('Give elements');
  const mayWrite = useCan()('spacecraft.write');
  const [search, setSearch] = useSearchParams();
  const attachTo = search.get('craft');
  const desk = useElementDesk(attachTo);
  const isEphemeris = search.get('kind') === 'ephemeris';
  const go = (craft: string | null, ephemeris: boolean) =>
    setSearch({ ...(craft && { craft }), ...(ephemeris && { kind: 'ephemeris' }) }, { replace: true });
  const attach = (id: string | null) => go(id, false);
  if (!mayWrite)
    return (
      <EmptyState title="Your role reads elements, but does not change them">
        A manager or member of your organisation can.
      </EmptyState>
    );
  return (
    <>
      <PageTitle
        title="Give elements"
        actions={
          <Anchor component={Link} to={paths.spacecraft}>
            All spacecraft
          </Anchor>
        }
      >
        {isEphemeris
          ? 'Where you have computed the path yourself, give it as an orbit ephemeris message. Inside its span passes come from it, outside from the element set.'
          : 'Paste or upload them. They are read first; you see what is good and what is wrong before anything is saved.'}
      </PageTitle>
      <SegmentedControl
        mb="md"
        aria-label="What you give"
        data={[
          { value: 'elements', label: 'Element sets' },
          { value: 'ephemeris', label: 'Ephemeris' },
        ]}
        value={isEphemeris ? 'ephemeris' : 'elements'}
        onChange={(kind) => go(attachTo, kind === 'ephemeris')}
      />
      {isEphemeris ? (
        <EphemerisDesk craftId={attachTo} onCraft={(id) => go(id, true)} />
      ) : desk.saved ? (
        <ElementsSaved result={desk.saved} onAgain={desk.clear} />
      ) : (
        <ElementDesk desk={desk} attachTo={attachTo} onAttach={attach} />
      )}
    </>
  );
}
