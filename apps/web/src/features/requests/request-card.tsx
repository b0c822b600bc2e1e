/** One request: who asks for what, what it earns, until when, and the two answers. */
import { Anchor, Button, Group, Modal, Paper, Skeleton, Stack, Textarea } from '@mantine/core';
import { modals } from '@mantine/modals';
import { notifications } from '@mantine/notifications';
import { type Booking, type BookingSummary, routes } from '@skyberth/shared';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { bookingQueries } from '../../lib/booking-queries.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { Caution } from '../../ui/caution.js';
import { DayTime } from '../../ui/day-time.js';
import { formatCountdown, formatDegrees, formatDuration, formatLocalTime, formatMoney } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { Figure, Figures } from '../../ui/values.js';
import { deadlineMs, pressureOf } from './deadline.js';
import { RequestConflicts } from './request-conflicts.js';
import classes from './requests.module.css';
import { useNow } from './use-now.js';

interface RequestCardProps {
  readonly summary: BookingSummary;
  readonly mayDecide: boolean;
}

export function RequestCard({ summary, mayDecide }: RequestCardProps) {
  const nowMs = useNow();
  const booking = useQuery(bookingQueries.one(summary.id));
  const [aosMs, losMs] = [Date.parse(summary.aosUtc), Date.parse(summary.losUtc)];
  const pressure = pressureOf(summary, nowMs);
  const needsTransmit = summary.need !== 'downlink';
  return (
    <Paper
      component="article"
      withBorder
      className={classes.card}
      data-pressure={pressure}
      aria-labelledby={`request-${summary.id}`}
    >
      <div className={classes.what}>
        <h2 id={`request-${summary.id}`}>
          <Anchor component={Link} to={paths.booking(summary.id)}>
            {summary.spacecraftName} over {summary.antennaName}
          </Anchor>
        </h2>
        <p>
          {summary.operatorName} asks for {summary.need === 'both' ? 'downlink and uplink' : summary.need}, berth{' '}
          {summary.number}.
        </p>
        <Figures columns={3}>
          <Figure
            label="AOS"
            value={<DayTime atMs={aosMs} placeTimeZone={summary.stationTimeZone} />}
            note={`${formatLocalTime(aosMs, summary.stationTimeZone)} at the station`}
          />
          <Figure label="Length" value={formatDuration(losMs - aosMs)} />
          <Figure label="Highest" value={formatDegrees(summary.maxElevationDeg)} />
        </Figures>
        <RequestConflicts summary={summary} />
      </div>
      <Earns booking={booking.data} failed={booking.isError} />
      <div className={classes.answer}>
        <div className={classes.clock} role="timer" aria-label="Time left to answer">
          <span>{pressure === 'over' ? 'Time to answer is over' : 'Answer within'}</span>
          {pressure !== 'over' && <strong>{leftText(deadlineMs(summary) - nowMs)}</strong>}
          <span>
            until <DayTime atMs={deadlineMs(summary)} placeTimeZone={summary.stationTimeZone} />
          </span>
        </div>
        {mayDecide && pressure !== 'over' && <Answers summary={summary} booking={booking.data} />}
      </div>
      {needsTransmit && (
        <div className={classes.caution}>
          <Caution title="This contact transmits">
            Accept only within your licence and the clearance of this spacecraft. People near the beam and the moving
            dish stay your responsibility; Skyberth replaces no interlock.
          </Caution>
        </div>
      )}
    </Paper>
  );
}

/** A clock in the last day, days and hours before. */
const leftText = (leftMs: number): string => (leftMs > 86_400_000 ? formatDuration(leftMs) : formatCountdown(leftMs));

function Earns({ booking, failed }: { readonly booking: Booking | undefined; readonly failed: boolean }) {
  if (failed) return <p className={classes.earns}>The price could not be read; it stands on the booking's page.</p>;
  if (!booking) return <Skeleton height={70} />;
  const { currency, lines, totalMinor } = booking.quote;
  return (
    <div className={classes.earns}>
      <span>It is sold for, before VAT and Skyberth's fee</span>
      <strong>{formatMoney({ amountMinor: totalMinor, currency })}</strong>
      <ul>
        {lines.map((line) => (
          <li key={`${line.label} ${line.detail}`}>
            {line.label}, {line.detail}: {formatMoney({ amountMinor: line.amountMinor, currency })}
          </li>
        ))}
      </ul>
    </div>
  );
}

interface AnswersProps {
  readonly summary: BookingSummary;
  readonly booking: Booking | undefined;
}

function Answers({ summary, booking }: AnswersProps) {
  const [isDeclining, setDeclining] = useState(false);
  const answered = useAnswered();
  const accept = useMutation({
    mutationFn: () => call(routes.acceptBooking, { params: { id: summary.id } }),
    onSuccess: () => answered(`Berth ${summary.number} is confirmed. The buyer knows.`),
    onError: (error) => notifications.show({ title: 'It was not accepted', message: sentenceOf(error), color: 'buoy' }),
  });
  const price = booking && formatMoney({ amountMinor: booking.quote.totalMinor, currency: booking.quote.currency });
  const ask = () =>
    modals.openConfirmModal({
      title: `Accept ${summary.spacecraftName} over ${summary.antennaName}?`,
      children:
        'The contact is then sold: you serve it, and the buyer is charged once it has taken place. If you cancel later, the buyer gets all of it back.',
      labels: { confirm: price ? `Accept for ${price}` : 'Accept', cancel: 'Not yet' },
      onConfirm: () => accept.mutate(),
    });
  return (
    <>
      <Button size="md" onClick={ask} loading={accept.isPending}>
        {price ? `Accept for ${price}` : 'Accept'}
      </Button>
      <Button variant="outline" color="buoy" onClick={() => setDeclining(true)}>
        Decline
      </Button>
      <Modal
        opened={isDeclining}
        onClose={() => setDeclining(false)}
        title={`Decline berth ${summary.number}?`}
        closeButtonProps={{ 'aria-label': 'Close' }}
      >
        <DeclineForm summary={summary} onDone={() => setDeclining(false)} />
      </Modal>
    </>
  );
}

function DeclineForm({ summary, onDone }: { readonly summary: BookingSummary; readonly onDone: () => void }) {
  const [reason, setReason] = useState('');
  const answered = useAnswered();
  const decline = useMutation({
    mutationFn: () => call(routes.declineBooking, { params: { id: summary.id }, body: { reason: reason.trim() } }),
    onSuccess: () => {
      onDone();
      answered(`Berth ${summary.number} is declined. The buyer's funds are released.`);
    },
  });
  return (
    <form
      onSubmit={(event) => {
        event.preventDefault();
        decline.mutate();
      }}
    >
      <Stack>
        <p className={classes.plain}>
          {summary.operatorName} reads your reason, and the funds of{' '}
          {formatMoney({ amountMinor: summary.toPayMinor, currency: summary.currency })} are released. It cannot be
          undone.
        </p>
        {decline.error && <ProblemNotice title="It was not declined">{sentenceOf(decline.error)}</ProblemNotice>}
        <Textarea
          label="Reason"
          required
          maxLength={300}
          autosize
          minRows={2}
          value={reason}
          onChange={(event) => setReason(event.currentTarget.value)}
          data-autofocus
        />
        <Group>
          <Button
            type="submit"
            variant="outline"
            color="buoy"
            loading={decline.isPending}
            disabled={reason.trim() === ''}
          >
            {reason.trim() === '' ? 'Declining waits for a reason' : 'Decline it'}
          </Button>
          <Button variant="default" onClick={onDone}>
            Keep the request
          </Button>
        </Group>
      </Stack>
    </form>
  );
}

/** After an answer: lists and counts are read again, and it is said what happened. */
function useAnswered(): (sentence: string) => void {
  const client = useQueryClient();
  return (sentence) => {
    void client.invalidateQueries({ queryKey: bookingQueries.all });
    void client.invalidateQueries({ queryKey: ['home'] });
    notifications.show({ message: sentence });
  };
}
