/** Home: what needs this person now, the next contacts, money at a glance; how to begin where there is nothing yet. */
import { Skeleton } from '@mantine/core';
import { useQuery } from '@tanstack/react-query';
import { homeQuery } from '../../lib/home-query.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useSession } from '../../lib/session.js';
import { useTitle } from '../../lib/use-title.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { FirstSteps } from './first-steps.js';
import classes from './home.module.css';
import { MoneyGlance } from './money-glance.js';
import { NextContacts } from './next-contacts.js';
import { WaitingList } from './waiting-list.js';

export function HomePage() {
  useTitle('Home');
  const { active, person } = useSession();
  const { data, error, refetch } = useQuery(homeQuery);
  const hasContacts = active.organisationKind !== 'staff';
  return (
    <>
      <PageTitle title={`Good to see you, ${person.name.split(' ')[0] ?? person.name}`}>
        {active.organisationName}
      </PageTitle>
      {error && !data && (
        <ProblemNotice title="What waits for you could not be read" onRetry={() => void refetch()}>
          {sentenceOf(error)}
        </ProblemNotice>
      )}
      {!data && !error && <Skeleton height={360} aria-label="Loading what waits for you" />}
      {data && (
        <div className={classes.columns}>
          <div className={classes.main}>
            {data.firstSteps.length > 0 && <FirstSteps steps={data.firstSteps} />}
            <WaitingList waiting={data.waiting} />
          </div>
          <div className={classes.side}>
            {hasContacts && <NextContacts />}
            {data.money.length > 0 && <MoneyGlance money={data.money} />}
          </div>
        </div>
      )}
    </>
  );
}
