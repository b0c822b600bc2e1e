/** Opening a dispute: what was wrong, when there were no data, and what one's own log has. */
import { Anchor, Button, Select, Skeleton, Textarea, TextInput } from '@mantine/core';
import { type AttachedFile, DISPUTE_REASONS, type DisputeReason, type Observation, routes } from '@skyberth/shared';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { Link, useNavigate, useParams } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { bookingQueries } from '../../lib/booking-queries.js';
import { paths } from '../../lib/paths.js';
import { fieldErrors, sentenceOf } from '../../lib/problem-fields.js';
import { useLeaveGuard } from '../../lib/use-leave-guard.js';
import { useTitle } from '../../lib/use-title.js';
import { FileDrop } from '../../ui/file-drop.js';
import { formatDay, formatTime } from '../../ui/format.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { clockOf, utcOfClock } from './clock-text.js';
import { REASON_WORDS } from './dispute-words.js';
import classes from './disputes.module.css';
import { ObservationRows } from './observation-rows.js';

export function OpenDisputePage() {
  useTitle('Dispute a contact');
  const { id = '' } = useParams();
  const { data: booking, error } = useQuery(bookingQueries.one(id));
  if (error) return <ProblemNotice title="The contact could not be read">{sentenceOf(error)}</ProblemNotice>;
  if (!booking) return <Skeleton height={400} aria-label="Loading the contact" />;
  return (
    <>
      <PageTitle title={`Dispute berth ${booking.number}`}>
        {booking.spacecraftName} at {booking.antennaName}, {formatDay(Date.parse(booking.aosUtc))},{' '}
        {formatTime(Date.parse(booking.aosUtc))} to {formatTime(Date.parse(booking.losUtc))} UTC.{' '}
        <Anchor component={Link} to={paths.booking(booking.id)}>
          Back to the contact
        </Anchor>
      </PageTitle>
      <Form bookingId={booking.id} aosUtc={booking.aosUtc} losUtc={booking.losUtc} />
    </>
  );
}

function Form({
  bookingId,
  aosUtc,
  losUtc,
}: {
  readonly bookingId: string;
  readonly aosUtc: string;
  readonly losUtc: string;
}) {
  const navigate = useNavigate();
  const client = useQueryClient();
  const [reason, setReason] = useState<DisputeReason | null>(null);
  const [text, setText] = useState('');
  const [gap, setGap] = useState({ from: '', to: '' });
  const [observations, setObservations] = useState<readonly Observation[]>([]);
  const [files, setFiles] = useState<readonly AttachedFile[]>([]);
  const [openedId, setOpenedId] = useState<string | null>(null);
  useLeaveGuard(text.trim() !== '' && openedId === null, 'the dispute');
  // Behind the guard's own effect, so that it has seen that nothing is lost.
  useEffect(() => {
    if (openedId !== null) navigate(paths.dispute(openedId));
  }, [openedId, navigate]);
  const gapFromUtc = utcOfClock(gap.from, aosUtc);
  const gapToUtc = utcOfClock(gap.to, aosUtc);
  const badGap =
    (gap.from !== '' && !gapFromUtc) || (gap.to !== '' && !gapToUtc)
      ? `Write hours, minutes and seconds, such as ${clockOf(aosUtc)}.`
      : (gapFromUtc === null) !== (gapToUtc === null)
        ? 'Give both ends, or neither.'
        : gapFromUtc && gapToUtc && gapToUtc <= gapFromUtc
          ? 'It must end after it begins.'
          : null;
  const open = useMutation({
    mutationFn: () =>
      call(routes.openDispute, {
        params: { id: bookingId },
        body: {
          reason: reason ?? 'other',
          text: text.trim(),
          observations: [...observations],
          gapFromUtc,
          gapToUtc,
          fileIds: files.map(({ id }) => id),
        },
      }),
    onSuccess: (dispute) => {
      setOpenedId(dispute.id);
      void client.invalidateQueries({ queryKey: bookingQueries.all });
      void client.invalidateQueries({ queryKey: ['disputes'] });
    },
  });
  const errors = fieldErrors(open.error);
  return (
    <form
      className={classes.form}
      onSubmit={(event) => {
        event.preventDefault();
        open.mutate();
      }}
    >
      {open.error && <ProblemNotice title="The dispute was not opened">{sentenceOf(open.error)}</ProblemNotice>}
      <Select
        label="What was wrong"
        required
        data={DISPUTE_REASONS.map((value) => ({ value, label: REASON_WORDS[value] }))}
        value={reason}
        onChange={(value) => setReason(value as DisputeReason | null)}
      />
      <Textarea
        label="What happened, in your words; the station and the marketplace read them"
        required
        autosize
        minRows={4}
        maxLength={4_000}
        value={text}
        onChange={(event) => setText(event.currentTarget.value)}
      />
      <div className={classes.pair}>
        <TextInput
          label="No data from, UTC"
          placeholder={clockOf(aosUtc)}
          value={gap.from}
          error={badGap ?? errors['gapFromUtc']}
          onChange={(event) => setGap({ ...gap, from: event.currentTarget.value })}
        />
        <TextInput
          label="to, UTC"
          placeholder={clockOf(losUtc)}
          value={gap.to}
          error={badGap ? ' ' : errors['gapToUtc']}
          onChange={(event) => setGap({ ...gap, to: event.currentTarget.value })}
        />
      </div>
      <ObservationRows aosUtc={aosUtc} value={observations} onChange={setObservations} />
      <FileDrop label="Files: logs, plots, counters" files={files} onChange={setFiles} />
      <p className={classes.quiet}>
        The station's earnings of this contact are set aside at once. The system assembles the evidence: geometry, mask,
        link, live reports and money. The station has three days to answer; a decision is due within seven.
      </p>
      <div>
        <Button
          type="submit"
          disabled={reason === null || text.trim() === '' || badGap !== null}
          loading={open.isPending}
        >
          Open the dispute
        </Button>
      </div>
    </form>
  );
}
