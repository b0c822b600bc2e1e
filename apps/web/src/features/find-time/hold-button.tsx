import { Button, Checkbox } from '@mantine/core';
import { type PassDetail, type Quote, routes } from '@skyberth/shared';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { call, newIdempotencyKey, ProblemError } from '../../lib/api-client.js';
import { bookingQueries } from '../../lib/booking-queries.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useCan } from '../../lib/session.js';
import { formatDuration, formatMoney } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import classes from './find-time.module.css';
import type { PassRequest } from './find-time-queries.js';

interface HoldButtonProps {
  readonly detail: PassDetail;
  readonly quote: Quote;
  readonly request: PassRequest;
  readonly onHeld: () => void;
}

const REFUSALS: Readonly<Partial<Record<string, string>>> = {
  'price-changed': 'The price has changed; the new one stands above',
  'berth-taken': 'Someone was quicker',
  'spacecraft-busy': 'This spacecraft is busy then',
};

/** The one filled button: holds antenna and price, and says what it does to money. */
export function HoldButton({ detail, quote, request, onHeld }: HoldButtonProps) {
  const mayBuy = useCan()('bookings.buy');
  const isStale = detail.elements.freshness === 'stale';
  const [accepts, setAccepts] = useState(false);
  const hold = useHold(request, quote.toPayMinor, accepts, onHeld);
  const price = formatMoney({ amountMinor: quote.toPayMinor, currency: quote.currency });
  if (!mayBuy)
    return <p className={classes.small}>Your role reads only; a member or manager of your side can hold it.</p>;
  const code = hold.error instanceof ProblemError ? hold.error.problem?.code : undefined;
  const receives = request.need === 'downlink';
  return (
    <div className={classes.act}>
      {hold.error && (
        <ProblemNotice title={REFUSALS[code ?? ''] ?? 'Nothing was held'}>{sentenceOf(hold.error)}</ProblemNotice>
      )}
      {isStale && (
        <Checkbox
          checked={accepts}
          onChange={(event) => setAccepts(event.currentTarget.checked)}
          label={`I accept elements ${formatDuration(detail.elements.ageH * 3_600_000)} old: AOS and LOS may be off by more than the set-up time.`}
        />
      )}
      <Button
        size="md"
        fullWidth
        className={classes.hold}
        disabled={isStale && !accepts}
        loading={hold.isPending}
        onClick={() => hold.mutate()}
      >
        <span>Hold for 10 minutes</span>
        <span>{price}</span>
      </Button>
      <p className={classes.small}>
        Holds the antenna and the price. Nothing is charged yet.
        {detail.acceptance === 'owner' && ' Once paid, the owner is asked; the sum is only reserved until they accept.'}
        {receives
          ? ' Receive only: no leave to transmit from here.'
          : ' Transmit only under your licence and clearance.'}
      </p>
    </div>
  );
}

function useHold(request: PassRequest, expectedToPayMinor: number, accepts: boolean, onHeld: () => void) {
  const client = useQueryClient();
  // Sent again after a broken line it is the same wish; after an answer it is a new one.
  const [key, setKey] = useState(newIdempotencyKey);
  const refresh = () => void client.invalidateQueries({ queryKey: ['passes'] });
  return useMutation({
    mutationFn: () =>
      call(routes.holdBerth, {
        body: { ...request, expectedToPayMinor, oldElementsAcknowledged: accepts },
        idempotencyKey: key,
      }),
    onSuccess: (booking) => {
      client.setQueryData(bookingQueries.one(booking.id).queryKey, booking);
      void client.invalidateQueries({ queryKey: bookingQueries.all });
      refresh();
      setKey(newIdempotencyKey());
      onHeld();
    },
    onError: (error) => {
      if (!(error instanceof ProblemError) || error.problem === null) return;
      setKey(newIdempotencyKey());
      refresh();
    },
  });
}
