import { Pagination, Skeleton } from '@mantine/core';
import type { Membership } from '@skyberth/shared';
import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useSession } from '../../lib/session.js';
import { usePageNumber } from '../../lib/use-page-number.js';
import { useIsPhone } from '../../lib/use-phone.js';
import { useTitle } from '../../lib/use-title.js';
import { EmptyState } from '../../ui/empty-state.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { EarningsPage } from './earnings-page.js';
import { InvoiceCards, InvoiceTable } from './invoice-list.js';
import { invoiceQueries } from './invoice-queries.js';

/** `/invoices`: an operator's own, everybody's for finance; an owner's page of earnings, who is not a party to invoices. */
export function InvoicesPage() {
  const { active } = useSession();
  return active.organisationKind === 'owner' ? <EarningsPage /> : <Invoices kind={active.organisationKind} />;
}

function Invoices({ kind }: { readonly kind: Membership['organisationKind'] }) {
  useTitle('Invoices');
  const isPhone = useIsPhone();
  const [page, setPage] = usePageNumber();
  const invoices = useQuery({ ...invoiceQueries.list(page), placeholderData: keepPreviousData });
  const total = invoices.data?.total ?? 0;
  const pages = invoices.data ? Math.ceil(total / invoices.data.pageSize) : 0;
  const isStaff = kind === 'staff';
  const List = isPhone ? InvoiceCards : InvoiceTable;
  return (
    <>
      <PageTitle title="Invoices">
        {total > 0 &&
          `${total} ${total === 1 ? 'document' : 'documents'}, the newest first. ${isStaff ? 'Every operator’s' : 'Each was mailed when it was issued'}; an issued one never changes, and is corrected by a credit note.`}
      </PageTitle>
      {invoices.error && (
        <ProblemNotice title="The invoices could not be read" onRetry={() => void invoices.refetch()}>
          {sentenceOf(invoices.error)}
        </ProblemNotice>
      )}
      {invoices.isPending && <Skeleton height={280} />}
      {invoices.data && total === 0 && (
        <EmptyState title="No invoice yet">
          One is issued by itself when a contact is settled and its payment is taken. Nothing is invoiced for a hold
          that was let go.
        </EmptyState>
      )}
      {invoices.data && invoices.data.items.length > 0 && <List items={invoices.data.items} withCustomer={isStaff} />}
      {pages > 1 && <Pagination total={pages} value={page} onChange={setPage} mt="md" size="sm" withEdges />}
    </>
  );
}
