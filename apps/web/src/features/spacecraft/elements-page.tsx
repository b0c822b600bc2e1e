import { Anchor } from '@mantine/core';
import { Link, useSearchParams } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { useCan } from '../../lib/session.js';
import { useTitle } from '../../lib/use-title.js';
import { EmptyState } from '../../ui/empty-state.js';
import { PageTitle } from '../../ui/page-title.js';
import { ElementDesk } from './element-desk.js';
import { ElementsSaved } from './elements-saved.js';
import { useElementDesk } from './use-element-desk.js';

/** `/spacecraft/elements`; with `?craft=` a single set is attached to that spacecraft. */
export function ElementsPage() {
  useTitle('Give elements');
  const mayWrite = useCan()('spacecraft.write');
  const [search, setSearch] = useSearchParams();
  const attachTo = search.get('craft');
  const desk = useElementDesk(attachTo);
  const attach = (id: string | null) => setSearch(id ? { craft: id } : {}, { replace: true });
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
        Paste or upload them. They are read first; you see what is good and what is wrong before anything is saved.
      </PageTitle>
      {desk.saved ? (
        <ElementsSaved result={desk.saved} onAgain={desk.clear} />
      ) : (
        <ElementDesk desk={desk} attachTo={attachTo} onAttach={attach} />
      )}
    </>
  );
}
