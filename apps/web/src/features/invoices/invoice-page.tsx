import { Anchor, Button, Paper, Skeleton, Table } from '@mantine/core';
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
import { MoneyText } from '../../ui/values.js';
import { invoiceQueries } from './invoice-queries.js';
import { addressLines, subjectWords, titleOf, vatWords } from './invoice-words.js';
import classes from './invoices.module.css';

/** `/invoices/:id` */
export function InvoicePage() {
  const { id = '' } = useParams();
  const invoice = useQuery(invoiceQueries.one(id));
  useTitle(invoice.data ? titleOf(invoice.data) : 'Invoice');
  if (invoice.error)
    return (
      <ProblemNotice title="The invoice could not be read" onRetry={() => void invoice.refetch()}>
        {sentenceOf(invoice.error)}
      </ProblemNotice>
    );
  if (!invoice.data) return <Skeleton height={560} />;
  return <OneInvoice invoice={invoice.data} />;
}

function OneInvoice({ invoice }: { readonly invoice: Invoice }) {
  return (
    <>
      <PageTitle
        title={titleOf(invoice)}
        actions={
          <div className="sk-no-print">
            <Button component="a" href={addressOf(routes.invoicePdf, { params: { id: invoice.id } })} target="_blank">
              Open as PDF
            </Button>
          </div>
        }
      >
        <Anchor component={Link} to={paths.invoices} className="sk-no-print">
          All invoices
        </Anchor>
      </PageTitle>
      <Paper withBorder className={classes.sheet}>
        <Head invoice={invoice} />
        <h2 className={classes.subject}>{subjectWords(invoice.subject)}</h2>
        <div className={classes.scroll}>
          <Lines invoice={invoice} />
        </div>
        <p className={classes.vatNote}>{invoice.vatNote}</p>
      </Paper>
    </>
  );
}

function Head({ invoice }: { readonly invoice: Invoice }) {
  return (
    <div className={classes.head}>
      <PartyBlock label="From" party={invoice.supplier} />
      <PartyBlock label="To" party={invoice.customer} />
      <dl className={classes.facts}>
        <dt>Number</dt>
        <dd>{invoice.number}</dd>
        <dt>Issued</dt>
        <dd>
          <DayTime atMs={Date.parse(invoice.issuedUtc)} />
        </dd>
        <dt>Supply</dt>
        <dd>
          <DayTime atMs={Date.parse(invoice.suppliedOnUtc)} />
        </dd>
        <dt>Contact</dt>
        <dd>
          <Anchor component={Link} to={paths.booking(invoice.bookingId)}>
            Berth {invoice.bookingNumber}
          </Anchor>
        </dd>
        {invoice.creditsNumber && (
          <>
            <dt>Credits</dt>
            <dd>{invoice.creditsNumber}</dd>
          </>
        )}
      </dl>
    </div>
  );
}

function PartyBlock({ label, party }: { readonly label: string; readonly party: Invoice['customer'] }) {
  return (
    <section aria-label={label}>
      <div className={classes.quiet}>{label}</div>
      <address className={classes.address}>
        <strong>{party.name}</strong>
        {addressLines(party.address).map((line) => (
          <span key={line}>{line}</span>
        ))}
        {party.vatNumber && <span>VAT {party.vatNumber}</span>}
      </address>
    </section>
  );
}

function Lines({ invoice }: { readonly invoice: Invoice }) {
  const { currency, lines } = invoice;
  const hasUnits = lines.some((line) => line.unitMinor !== null);
  const hasDiscounts = lines.some((line) => line.discountMinor !== 0);
  const before = 2 + Number(hasUnits) + Number(hasDiscounts);
  return (
    <Table className={classes.lines}>
      <Table.Thead>
        <Table.Tr>
          <Table.Th>What</Table.Th>
          <Table.Th ta="right">Quantity</Table.Th>
          {hasUnits && <Table.Th ta="right">Each</Table.Th>}
          {hasDiscounts && <Table.Th ta="right">Discount, taken off</Table.Th>}
          <Table.Th ta="right">Amount</Table.Th>
        </Table.Tr>
      </Table.Thead>
      <Table.Tbody>
        {lines.map((line) => (
          <Table.Tr key={`${line.description} ${line.quantity} ${line.amountMinor}`}>
            <Table.Td>{line.description}</Table.Td>
            <Table.Td ta="right">{line.quantity}</Table.Td>
            {hasUnits && (
              <Table.Td ta="right">
                {line.unitMinor !== null && <MoneyText amountMinor={line.unitMinor} currency={currency} />}
              </Table.Td>
            )}
            {hasDiscounts && (
              <Table.Td ta="right">
                <MoneyText amountMinor={line.discountMinor} currency={currency} quietZero />
              </Table.Td>
            )}
            <Table.Td ta="right">
              <MoneyText amountMinor={line.amountMinor} currency={currency} />
            </Table.Td>
          </Table.Tr>
        ))}
      </Table.Tbody>
      <Table.Tfoot>
        <SumRow label="Before VAT" span={before} amountMinor={invoice.netMinor} currency={currency} />
        <SumRow
          label={vatWords(invoice.vatRatePercent)}
          span={before}
          amountMinor={invoice.vatMinor}
          currency={currency}
        />
        <SumRow
          label={invoice.kind === 'invoice' ? 'Total' : 'Total given back'}
          span={before}
          amountMinor={invoice.grossMinor}
          currency={currency}
          isTotal
        />
      </Table.Tfoot>
    </Table>
  );
}

interface SumRowProps {
  readonly label: string;
  readonly span: number;
  readonly amountMinor: number;
  readonly currency: string;
  readonly isTotal?: boolean;
}

function SumRow({ label, span, amountMinor, currency, isTotal }: SumRowProps) {
  return (
    <Table.Tr className={classes.sum} data-total={isTotal || undefined}>
      <Table.Th scope="row" colSpan={span} ta="right">
        {label}
      </Table.Th>
      <Table.Td ta="right">
        <MoneyText amountMinor={amountMinor} currency={currency} />
      </Table.Td>
    </Table.Tr>
  );
}
