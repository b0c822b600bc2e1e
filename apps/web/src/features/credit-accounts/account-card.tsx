/** One monthly account: how much of its limit is used, and its bills. */
import { Anchor, Button, Paper, Table } from '@mantine/core';
import { type CreditAccount, type CreditBill, routes } from '@skyberth/shared';
import { useMutation } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { DayTime } from '../../ui/day-time.js';
import { formatMoney } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { type BadgeTone, StateBadge } from '../../ui/state-badge.js';
import { Figure, Figures } from '../../ui/values.js';
import classes from './credit-accounts.module.css';

const ACCOUNT_TONES: Record<CreditAccount['state'], BadgeTone> = {
  asked: 'waiting',
  open: 'good',
  refused: 'bad',
  closed: 'quiet',
};
const BILL_TONES: Record<CreditBill['state'], BadgeTone> = { open: 'waiting', overdue: 'bad', paid: 'good' };

interface AccountCardProps {
  readonly account: CreditAccount;
  /** Whether the reader is the one who pays its bills. */
  readonly isOwn: boolean;
  readonly children?: ReactNode;
}

export function AccountCard({ account, isOwn, children }: AccountCardProps) {
  const money = (amountMinor: number) => formatMoney({ amountMinor, currency: account.currency });
  return (
    <Paper
      component="section"
      withBorder
      className={classes.card}
      aria-label={`${account.operatorName}, ${account.currency}`}
    >
      <h2>
        {isOwn ? account.currency : `${account.operatorName}, ${account.currency}`}{' '}
        <StateBadge tone={ACCOUNT_TONES[account.state]}>{account.state}</StateBadge>
        {account.isBlocked && <StateBadge tone="bad">a bill is overdue</StateBadge>}
      </h2>
      <Figures columns={4}>
        <Figure label="Limit" value={money(account.limitMinor)} />
        <Figure label="Delivered, to be paid" value={money(account.owedMinor)} />
        <Figure label="Booked" value={money(account.bookedMinor)} />
        <Figure label="Still free" value={money(Math.max(0, account.freeMinor))} />
      </Figures>
      {account.note && !isOwn && <p className={classes.small}>They say: {account.note}</p>}
      {account.reason && <p className={classes.small}>Finance says: {account.reason}</p>}
      {children}
      {account.bills.map((bill) => (
        <Bill key={bill.id} bill={bill} isOwn={isOwn} />
      ))}
    </Paper>
  );
}

function Bill({ bill, isOwn }: { readonly bill: CreditBill; readonly isOwn: boolean }) {
  return (
    <details className={classes.bill} open={bill.state !== 'paid'}>
      <summary>
        <strong>{bill.number}</strong> {bill.month},{' '}
        {formatMoney({ amountMinor: bill.totalMinor, currency: bill.currency })}{' '}
        <StateBadge tone={BILL_TONES[bill.state]}>{bill.state}</StateBadge>{' '}
        {bill.state !== 'paid' && (
          <>
            due <DayTime atMs={Date.parse(bill.dueUtc)} show="day" />
            {bill.reminders > 0 && `, ${bill.reminders} of 3 reminders sent`}
          </>
        )}
      </summary>
      {isOwn && bill.state !== 'paid' && <PayBill bill={bill} />}
      <div className={classes.scroll}>
        <Table>
          <Table.Tbody>
            {bill.lines.map((line) => (
              <Table.Tr key={`${line.bookingId} ${line.cause}`}>
                <Table.Td>
                  <DayTime atMs={Date.parse(line.atUtc)} show="day" />
                </Table.Td>
                <Table.Td>
                  <Anchor component={Link} to={paths.booking(line.bookingId)}>
                    Berth {line.bookingNumber}
                  </Anchor>
                  {line.invoiceNumber && <span className={classes.small}> invoice {line.invoiceNumber}</span>}
                </Table.Td>
                <Table.Td ta="right">
                  {formatMoney({ amountMinor: line.amountMinor, currency: bill.currency })}
                </Table.Td>
              </Table.Tr>
            ))}
          </Table.Tbody>
        </Table>
      </div>
    </details>
  );
}

function PayBill({ bill }: { readonly bill: CreditBill }) {
  const pay = useMutation({
    mutationFn: () => call(routes.payBill, { params: { id: bill.id } }),
    onSuccess: ({ url }) => window.location.assign(url ?? paths.monthlyAccount),
  });
  return (
    <>
      {pay.error && <ProblemNotice title="Nothing was paid">{sentenceOf(pay.error)}</ProblemNotice>}
      <Button mt="xs" size="sm" loading={pay.isPending} onClick={() => pay.mutate()}>
        Pay {formatMoney({ amountMinor: bill.totalMinor, currency: bill.currency })} by card
      </Button>
    </>
  );
}
