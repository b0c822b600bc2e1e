/** What newer elements did to the contact, and the operator's answer where they moved it too far. */
import { Anchor, Button } from '@mantine/core';
import { modals } from '@mantine/modals';
import { type Booking, type Drift, routes } from '@skyberth/shared';
import { queryOptions, useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { bookingQueries } from '../../lib/booking-queries.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useCan, useSession } from '../../lib/session.js';
import { DayTime } from '../../ui/day-time.js';
import { formatMoney, formatNumber } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import classes from './contact.module.css';

const LOOK_AGAIN_MS = 60_000;
const DAY_MS = 86_400_000;

const driftQuery = (bookingId: string) =>
  queryOptions({
    queryKey: ['drift', bookingId],
    queryFn: ({ signal }) => call(routes.bookingDrift, { params: { id: bookingId }, signal }),
    refetchInterval: LOOK_AGAIN_MS,
  });

interface DriftSectionProps {
  readonly booking: Booking;
  readonly spacecraftId: string | undefined;
}

export function DriftSection({ booking, spacecraftId }: DriftSectionProps) {
  const { data } = useQuery(driftQuery(booking.id));
  const isOperator = useSession().active.organisationKind === 'operator';
  const isLost = booking.events.some((event) => event.kind === 'pass lost');
  if (!data) return null;
  const [last] = data.retimes;
  if (!data.question && !last && !isLost) return null;
  return (
    <section className={classes.box} aria-labelledby="drift-title">
      <h2 id="drift-title" className={classes.heading}>
        {data.question ? 'The pass has moved' : isLost ? 'The pass is lost' : 'Re-timed'}
      </h2>
      {data.question && <Question booking={booking} question={data.question} />}
      {isLost && <p>All of the price goes back. Other passes of that day may still be for sale.</p>}
      {last && !data.question && !isLost && <Retimed retime={last} count={data.retimes.length} />}
      {(data.question || isLost) && isOperator && spacecraftId && (
        <Anchor component={Link} to={alternatives(booking, spacecraftId)}>
          See other passes of that day
        </Anchor>
      )}
    </section>
  );
}

const shiftText = (shiftS: number): string => `${shiftS > 0 ? '+' : ''}${formatNumber(shiftS, 1)} s`;

function Retimed({ retime, count }: { readonly retime: Drift['retimes'][number]; readonly count: number }) {
  return (
    <p>
      <DayTime atMs={Date.parse(retime.atUtc)} />: AOS by {shiftText(retime.aosShiftS)}, LOS by{' '}
      {shiftText(retime.losShiftS)}
      {retime.cause === 'accepted' ? ', accepted by the operator' : ', by newer elements, inside the set-up time'}. Both
      sides were told{count > 1 ? `; it is the ${ordinal(count)} time` : ''}. Load pointing and frequency tables anew.
    </p>
  );
}

const ordinal = (count: number): string => ['', 'first', 'second', 'third'][count] ?? `${count}th`;

function Question({ booking, question }: { booking: Booking; question: NonNullable<Drift['question']> }) {
  const mayAnswer = useCan()('bookings.buy');
  const accept = useAnswer(booking.id, routes.acceptDrift);
  const refuse = useAnswer(booking.id, routes.refuseDrift);
  const error = accept.error ?? refuse.error;
  const price = formatMoney({ amountMinor: booking.toPayMinor, currency: booking.currency });
  const [toAosMs, toLosMs] = [Date.parse(question.to.aosUtc), Date.parse(question.to.losUtc)];
  return (
    <>
      <p>{question.sentence}</p>
      <p>
        New times: <DayTime atMs={toAosMs} /> to <DayTime atMs={toLosMs} show="time" /> (AOS{' '}
        {shiftText(question.aosShiftS)}, LOS {shiftText(question.losShiftS)}). Until it is answered the old times stand.
      </p>
      {error && <ProblemNotice title="The answer was not taken">{sentenceOf(error)}</ProblemNotice>}
      {mayAnswer && (
        <div className={classes.buttons}>
          <Button loading={accept.isPending} onClick={() => accept.mutate(question.id)}>
            Accept the new times, still {price}
          </Button>
          <Button
            variant="outline"
            color="buoy"
            loading={refuse.isPending}
            onClick={() =>
              modals.openConfirmModal({
                title: 'Cancel this contact?',
                children: `Because the pass moved, all of the ${price} goes back. The time is then for sale to others.`,
                labels: { confirm: `Cancel and get ${price} back`, cancel: 'Keep it' },
                confirmProps: { color: 'buoy' },
                onConfirm: () => refuse.mutate(question.id),
              })
            }
          >
            Cancel, {price} back
          </Button>
        </div>
      )}
    </>
  );
}

function useAnswer(id: string, route: typeof routes.acceptDrift | typeof routes.refuseDrift) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (questionId: string) => call(route, { params: { id }, body: { questionId } }),
    onSuccess: (booking) => client.setQueryData(bookingQueries.one(id).queryKey, booking),
    onSettled: () =>
      client.invalidateQueries({
        predicate: ({ queryKey }) => ['bookings', 'passes', 'home', 'invoices', 'drift'].includes(String(queryKey[0])),
      }),
  });
}

/** The board, with this spacecraft and a day about the contact. */
function alternatives(booking: Booking, spacecraftId: string): string {
  const aosMs = Date.parse(booking.aosUtc);
  const minute = (atMs: number) => new Date(atMs).toISOString().slice(0, 16);
  const search = new URLSearchParams({
    craft: spacecraftId,
    from: `${minute(aosMs - DAY_MS / 8)}Z`,
    to: `${minute(aosMs + DAY_MS)}Z`,
  });
  return `${paths.findTime}?${search}`;
}
