import { Skeleton } from '@mantine/core';
import { useQuery } from '@tanstack/react-query';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useCan, useSession } from '../../lib/session.js';
import { useTitle } from '../../lib/use-title.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { DetailsForm } from './details-form.js';
import { MembersTable } from './members-table.js';
import classes from './organisation.module.css';
import { organisationQueries } from './organisation-queries.js';

export function OrganisationPage() {
  useTitle('Organisation');
  const session = useSession();
  const may = useCan();
  const mayManage = may('organisation.manage');
  const details = useQuery(organisationQueries.details());
  return (
    <>
      <PageTitle title={session.active.organisationName}>
        {mayManage
          ? 'Name, address and VAT number stand on invoices from the next one on.'
          : 'Only a manager changes these.'}
      </PageTitle>
      <div className={classes.columns}>
        <section aria-labelledby="details-title">
          <h2 id="details-title" className={classes.heading}>
            On invoices
          </h2>
          {details.error && (
            <ProblemNotice title="The details could not be read" onRetry={() => void details.refetch()}>
              {sentenceOf(details.error)}
            </ProblemNotice>
          )}
          {details.isPending && <Skeleton height={320} />}
          {details.data && <DetailsForm key={details.data.id} organisation={details.data} readOnly={!mayManage} />}
        </section>
        <section aria-labelledby="members-title">
          <h2 id="members-title" className={classes.heading}>
            Members
          </h2>
          <MembersTable mayManage={may('members.manage')} />
        </section>
      </div>
    </>
  );
}
