import { Button, Skeleton } from '@mantine/core';
import type { Spacecraft } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useCan } from '../../lib/session.js';
import { spacecraftQueries } from '../../lib/spacecraft-queries.js';
import { useTitle } from '../../lib/use-title.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { StateBadge } from '../../ui/state-badge.js';
import { identityWords } from './craft-words.js';
import { ElementHistory } from './element-history.js';
import { ElementsInForce } from './elements-in-force.js';
import { EphemerisList } from './ephemeris-list.js';
import { FreshnessBadge } from './freshness.js';
import { RadioList } from './radio-list.js';
import { RetireSection } from './retire-section.js';
import classes from './spacecraft.module.css';

/** `/spacecraft/:id` */
export function OneSpacecraftPage() {
  const { id = '' } = useParams();
  const craft = useQuery(spacecraftQueries.one(id));
  useTitle(craft.data?.name ?? 'Spacecraft');
  if (craft.error)
    return (
      <ProblemNotice title="The spacecraft could not be read" onRetry={() => void craft.refetch()}>
        {sentenceOf(craft.error)}
      </ProblemNotice>
    );
  if (!craft.data) return <Skeleton height={480} />;
  return <OneCraft craft={craft.data} />;
}

function OneCraft({ craft }: { readonly craft: Spacecraft }) {
  const mayWrite = useCan()('spacecraft.write');
  const isActive = craft.state === 'active';
  return (
    <>
      <PageTitle
        title={craft.name}
        badge={
          <>
            <FreshnessBadge freshness={craft.freshness} />
            {!isActive && <StateBadge tone="quiet">Out of use</StateBadge>}
          </>
        }
        actions={isActive && <PageActs craft={craft} mayWrite={mayWrite} />}
      >
        {identityWords(craft)}
      </PageTitle>
      <div className={classes.sections}>
        <ElementsInForce craft={craft} mayWrite={mayWrite && isActive} />
        <EphemerisList craft={craft} mayWrite={mayWrite && isActive} />
        <RadioList craft={craft} mayWrite={mayWrite && isActive} />
        <ElementHistory craft={craft} />
        {mayWrite && isActive && <RetireSection craft={craft} />}
      </div>
    </>
  );
}

function PageActs({ craft, mayWrite }: { readonly craft: Spacecraft; readonly mayWrite: boolean }) {
  const canFind = craft.elements !== null && craft.radios.length > 0;
  return (
    <>
      {mayWrite && (
        <>
          <Button component={Link} to={paths.editSpacecraft(craft.id)} variant="default">
            Change
          </Button>
          <Button
            component={Link}
            to={`${paths.addElements}?craft=${craft.id}`}
            variant={canFind ? 'default' : 'filled'}
          >
            New elements
          </Button>
        </>
      )}
      {canFind && (
        <Button component={Link} to={`${paths.findTime}?craft=${craft.id}`}>
          Find time
        </Button>
      )}
    </>
  );
}
