/** Invoices by month: a table with the sums of each month, and cards where a table would be too wide. */
import { Anchor, Paper, Table } from '@mantine/core';
import type { InvoiceSummary } from '@skyberth/shared';
import { Fragment } from 'react';
import { Link } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { DayTime } from '../../ui/day-time.js';
import { StateBadge } from '../../ui/state-badge.js';
import { MoneyText } from '../../ui/values.js';
import { byMonth, type SumOfInvoices, sumsOf } from './invoice-words.js';
import classes from './invoices.module.css';

interface ListProps {
  readonly items: readonly InvoiceSummary[];
  /** Whether to name the customer, which is the reader itself for an operator. */
  readonly withCustomer: boolean;
}

export function InvoiceTable({ items, withCustomer }: ListProps) {
  return (
    <div className={classes.scroll}>
      <Table>
        <Table.Thead>
          <Table.Tr>
            <Table.Th>Number</Table.Th>
            <Table.Th>Issued</Table.Th>
            {withCustomer && <Table.Th>Customer</Table.Th>}
            <Table.Th>Contact</Table.Th>
            <Table.Th ta="right">Before VAT</Table.Th>
            <Table.Th ta="right">VAT</Table.Th>
            <Table.Th ta="right">Total</Table.Th>
          </Table.Tr>
        </Table.Thead>
        {byMonth(items).map((month) => (
          <Table.Tbody key={month.title}>
            <Table.Tr className={classes.month}>
              <Table.Th scope="rowgroup" colSpan={withCustomer ? 4 : 3}>
                {month.title}
                <span className={classes.sumNote}>
                  {month.items.length === 1 ? 'sum of 1' : `sums of ${month.items.length}`}
                </span>
              </Table.Th>
              <SumCells sums={sumsOf(month.items)} />
            </Table.Tr>
            {month.items.map((item) => (
              <Row key={item.id} item={item} withCustomer={withCustomer} />
            ))}
          </Table.Tbody>
        ))}
      </Table>
    </div>
  );
}

function SumCells({ sums }: { readonly sums: readonly SumOfInvoices[] }) {
  return (['netMinor', 'vatMinor', 'grossMinor'] as const).map((part) => (
    <Table.Td key={part} ta="right">
      {sums.map((sum) => (
        <div key={sum.currency}>
          <MoneyText amountMinor={sum[part]} currency={sum.currency} />
        </div>
      ))}
    </Table.Td>
  ));
}

function Row({ item, withCustomer }: { readonly item: InvoiceSummary; readonly withCustomer: boolean }) {
  return (
    <Table.Tr>
      <Table.Td>
        <NumberCell item={item} />
      </Table.Td>
      <Table.Td>
        <DayTime atMs={Date.parse(item.issuedUtc)} />
      </Table.Td>
      {withCustomer && <Table.Td>{item.customerName}</Table.Td>}
      <Table.Td>
        <ContactLink item={item} />
      </Table.Td>
      <Table.Td ta="right">
        <MoneyText amountMinor={item.netMinor} currency={item.currency} />
      </Table.Td>
      <Table.Td ta="right">
        <MoneyText amountMinor={item.vatMinor} currency={item.currency} quietZero />
      </Table.Td>
      <Table.Td ta="right">
        <strong>
          <MoneyText amountMinor={item.grossMinor} currency={item.currency} />
        </strong>
      </Table.Td>
    </Table.Tr>
  );
}

export function InvoiceCards({ items, withCustomer }: ListProps) {
  return byMonth(items).map((month) => (
    <Fragment key={month.title}>
      <h2 className={classes.heading}>{month.title}</h2>
      <ul className={classes.cards}>
        {month.items.map((item) => (
          <Paper component="li" withBorder key={item.id} className={classes.card}>
            <div className={classes.cardLine}>
              <NumberCell item={item} />
              <strong>
                <MoneyText amountMinor={item.grossMinor} currency={item.currency} />
              </strong>
            </div>
            {withCustomer && <div>{item.customerName}</div>}
            <div className={classes.cardLine}>
              <span>
                <DayTime atMs={Date.parse(item.issuedUtc)} show="day" />, <ContactLink item={item} />
              </span>
              <span className={classes.quiet}>
                of it VAT <MoneyText amountMinor={item.vatMinor} currency={item.currency} />
              </span>
            </div>
          </Paper>
        ))}
      </ul>
    </Fragment>
  ));
}

function NumberCell({ item }: { readonly item: InvoiceSummary }) {
  return (
    <span className={classes.number}>
      <Anchor component={Link} to={paths.invoice(item.id)} fw={700}>
        {item.number}
      </Anchor>
      {item.kind === 'credit note' && <StateBadge tone="quiet">Credit note</StateBadge>}
    </span>
  );
}

function ContactLink({ item }: { readonly item: InvoiceSummary }) {
  return (
    <Anchor component={Link} to={paths.booking(item.bookingId)}>
      Berth {item.bookingNumber}
    </Anchor>
  );
}
