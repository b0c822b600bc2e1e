/** One invoice with everything that stands on it. */
import { Anchor, Button, Skeleton, Table } from '@mantine/core';
import { type Invoice, routes } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import { addressOf } from '../../lib/api-client.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useTitle } from '../../lib/use-title.js';
import { DayTime } from '../../ui/day-time.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { Figure, Figures, MoneyText } from '../../ui/values.js';
import { invoiceQueries } from './invoice-queries.js';
import classes from './invoices.module.css';

export function InvoicePage() {
  const { id = '' } = useParams();
  const { data, error, refetch } = useQuery(invoiceQueries.one(id));
  useTitle(data ? `${kindWord(data)} ${data.number}` : 'Invoice');
  if (error)
    return (
      <ProblemNotice title="This invoice could not be opened" onRetry={() => void refetch()}>
        {sentenceOf(error)}
      </ProblemNotice>
    );
  return data ? <OneInvoice invoice={data} /> : <Skeleton height={480} aria-label="Loading the invoice" />;
}

const kindWord = (invoice: Invoice): string => (invoice.kind === 'credit note' ? 'Credit note' : 'Invoice');

function OneInvoice({ invoice }: { readonly invoice: Invoice }) {
  return (
    <article className={classes.sheet}>
      <PageTitle
        title={`${kindWord(invoice)} ${invoice.number}`}
        actions={
          <Button component="a" variant="default" href={addressOf(routes.invoicePdf, { params: { id: invoice.id } })}>
            Open the PDF
          </Button>
        }
      >
        {invoice.subject}
        {invoice.creditsNumber && <> It corrects invoice {invoice.creditsNumber}.</>}
      </PageTitle>
      <Figures columns={3} ruled>
        <Figure label="Issued" value={<DayTime atMs={Date.parse(invoice.issuedUtc)} show="day" />} />
        <Figure label="Supplied on" value={<DayTime atMs={Date.parse(invoice.suppliedOnUtc)} show="day" />} />
        <Figure
          label="Berth"
          value={
            <Anchor component={Link} to={paths.booking(invoice.bookingId)}>
              {invoice.bookingNumber}
            </Anchor>
          }
        />
      </Figures>
      <div className={classes.parties}>
        <Party title="Supplier" party={invoice.supplier} />
        <Party title="Customer" party={invoice.customer} />
      </div>
      <Lines invoice={invoice} />
    </article>
  );
}

function Party({ title, party }: { readonly title: string; readonly party: Invoice['supplier'] }) {
  const { line1, line2, postalCode, city, country } = party.address;
  return (
    <section>
      <h2 className={classes.heading}>{title}</h2>
      <address className={classes.address}>
        <strong>{party.name}</strong>
        <br />
        {line1}
        {line2 && (
          <>
            <br />
            {line2}
          </>
        )}
        <br />
        {postalCode} {city}, {country}
        <br />
        {party.vatNumber ? `VAT number ${party.vatNumber}` : 'No VAT number'}
      </address>
    </section>
  );
}

function Lines({ invoice }: { readonly invoice: Invoice }) {
  const { currency } = invoice;
  const money = (amountMinor: number) => <MoneyText amountMinor={amountMinor} currency={currency} />;
  return (
    <div className={classes.scroll}>
      <Table>
        <Table.Thead>
          <Table.Tr>
            <Table.Th>What</Table.Th>
            <Table.Th ta="right">Quantity</Table.Th>
            <Table.Th ta="right">Each</Table.Th>
            <Table.Th ta="right">Discount</Table.Th>
            <Table.Th ta="right">Amount</Table.Th>
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {invoice.lines.map((line) => (
            <Table.Tr key={line.description}>
              <Table.Td>{line.description}</Table.Td>
              <Table.Td ta="right">{line.quantity}</Table.Td>
              <Table.Td ta="right">{line.unitMinor === null ? '' : money(line.unitMinor)}</Table.Td>
              <Table.Td ta="right">{line.discountMinor === 0 ? '' : money(-line.discountMinor)}</Table.Td>
              <Table.Td ta="right">{money(line.amountMinor)}</Table.Td>
            </Table.Tr>
          ))}
        </Table.Tbody>
        <Table.Tfoot className={classes.totals}>
          <Total label="Net" value={money(invoice.netMinor)} />
          <Total label={`VAT ${invoice.vatRatePercent} %`} value={money(invoice.vatMinor)} />
          <Total label="Total" value={money(invoice.grossMinor)} isLast />
        </Table.Tfoot>
      </Table>
      {invoice.vatNote && <p className={classes.note}>{invoice.vatNote}</p>}
    </div>
  );
}

function Total({ label, value, isLast }: { label: string; value: React.ReactNode; isLast?: boolean }) {
  return (
    <Table.Tr data-last={isLast || undefined}>
      <Table.Th scope="row" colSpan={4} ta="right">
        {label}
      </Table.Th>
      <Table.Td ta="right">{value}</Table.Td>
    </Table.Tr>
  );
}
