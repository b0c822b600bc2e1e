/** Invoices and credit notes; for owners what their contacts earned, for finance all of them. */
import { Anchor, Pagination, Skeleton, Table } from '@mantine/core';
import { type InvoiceSummary, type OrganisationKind, routes } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { Link, useSearchParams } from 'react-router-dom';
import { addressOf } from '../../lib/api-client.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useSession } from '../../lib/session.js';
import { useTitle } from '../../lib/use-title.js';
import { DayTime } from '../../ui/day-time.js';
import { EmptyState } from '../../ui/empty-state.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { MoneyText } from '../../ui/values.js';
import { invoiceQueries, PAGE_SIZE } from './invoice-queries.js';
import classes from './invoices.module.css';

const WORDS: Readonly<Record<OrganisationKind, { title: string; lead: string; empty: string }>> = {
  operator: {
    title: 'Invoices',
    lead: 'One for each settled contact, and a credit note where money came back.',
    empty: 'The first one comes with the first contact that is reported good and charged.',
  },
  owner: {
    title: 'Earnings',
    lead: 'What your contacts were invoiced at. The marketplace’s fee and payouts are settled apart.',
    empty: 'The first entry comes with the first contact that you report and that is charged.',
  },
  staff: {
    title: 'Invoices',
    lead: 'Of every organisation, newest first, in one gap-free series.',
    empty: 'The first one comes with the first settled contact.',
  },
};

export function InvoicesPage() {
  const { organisationKind } = useSession().active;
  const words = WORDS[organisationKind];
  useTitle(words.title);
  const [search, setSearch] = useSearchParams();
  const page = Math.max(1, Math.trunc(Number(search.get('page')) || 1));
  const { data, error, refetch } = useQuery(invoiceQueries.list(page));
  return (
    <>
      <PageTitle title={words.title}>{words.lead}</PageTitle>
      {error && (
        <ProblemNotice title="The invoices could not be read" onRetry={() => void refetch()}>
          {sentenceOf(error)}
        </ProblemNotice>
      )}
      {!data && !error && <Skeleton height={360} aria-label="Loading invoices" />}
      {data?.total === 0 && <EmptyState title="No invoice yet">{words.empty}</EmptyState>}
      {data && data.total > 0 && (
        <>
          <InvoiceTable items={data.items} withCustomer={organisationKind !== 'operator'} />
          {data.total > PAGE_SIZE && (
            <Pagination
              mt="md"
              size="sm"
              withEdges
              total={Math.ceil(data.total / PAGE_SIZE)}
              value={page}
              onChange={(next) => setSearch(next > 1 ? { page: String(next) } : {})}
            />
          )}
        </>
      )}
    </>
  );
}

function InvoiceTable({ items, withCustomer }: { items: readonly InvoiceSummary[]; withCustomer: boolean }) {
  return (
    <div className={classes.scroll}>
      <Table>
        <Table.Thead>
          <Table.Tr>
            <Table.Th>Number</Table.Th>
            <Table.Th>Issued</Table.Th>
            {withCustomer && <Table.Th>Customer</Table.Th>}
            <Table.Th>Berth</Table.Th>
            <Table.Th ta="right">Net</Table.Th>
            <Table.Th ta="right">VAT</Table.Th>
            <Table.Th ta="right">Gross</Table.Th>
            <Table.Th>File</Table.Th>
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {items.map((one) => (
            <Table.Tr key={one.id}>
              <Table.Td>
                <Anchor component={Link} to={paths.invoice(one.id)}>
                  {one.number}
                </Anchor>
                {one.kind === 'credit note' && <span className={classes.kind}>credit note</span>}
              </Table.Td>
              <Table.Td>
                <DayTime atMs={Date.parse(one.issuedUtc)} show="day" />
              </Table.Td>
              {withCustomer && <Table.Td>{one.customerName}</Table.Td>}
              <Table.Td>
                <Anchor component={Link} to={paths.booking(one.bookingId)}>
                  {one.bookingNumber}
                </Anchor>
              </Table.Td>
              <Amount minor={one.netMinor} currency={one.currency} />
              <Amount minor={one.vatMinor} currency={one.currency} />
              <Amount minor={one.grossMinor} currency={one.currency} />
              <Table.Td>
                <Anchor
                  href={addressOf(routes.invoicePdf, { params: { id: one.id } })}
                  aria-label={`PDF of ${one.number}`}
                >
                  PDF
                </Anchor>
              </Table.Td>
            </Table.Tr>
          ))}
        </Table.Tbody>
      </Table>
    </div>
  );
}

const Amount = ({ minor, currency }: { readonly minor: number; readonly currency: string }) => (
  <Table.Td ta="right">
    <MoneyText amountMinor={minor} currency={currency} quietZero />
  </Table.Td>
);
