/** Buying a hold on the monthly account, where there is one that bears it. */
import { Button } from '@mantine/core';
import { type Booking, routes } from '@skyberth/shared';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';
import { bookingQueries } from '../../lib/booking-queries.js';
import { creditQueries } from '../../lib/credit-queries.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { formatMoney } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import classes from './contact.module.css';

export function AccountChoice({ booking }: { readonly booking: Booking }) {
  const client = useQueryClient();
  const { data } = useQuery(creditQueries.mine());
  const buy = useMutation({
    mutationFn: () => call(routes.buyOnAccount, { params: { id: booking.id } }),
    onSuccess: () => {
      void client.invalidateQueries({ queryKey: bookingQueries.all });
      void client.invalidateQueries({ queryKey: creditQueries.all });
    },
  });
  const account = data?.items.find((one) => one.currency === booking.currency && one.state === 'open');
  if (!account) return null;
  const free = formatMoney({ amountMinor: Math.max(0, account.freeMinor), currency: account.currency });
  const bears = !account.isBlocked && account.freeMinor >= booking.toPayMinor;
  return (
    <>
      {buy.error && <ProblemNotice title="Nothing was bought">{sentenceOf(buy.error)}</ProblemNotice>}
      <Button variant="default" fullWidth disabled={!bears} loading={buy.isPending} onClick={() => buy.mutate()}>
        Buy on the monthly account
      </Button>
      <p className={classes.small}>
        {account.isBlocked
          ? 'A monthly bill is overdue; until it is paid the account cannot be used.'
          : `It bears ${free} more. Nothing is charged to a card; the month’s bill collects it.`}
      </p>
    </>
  );
}
