/** Blocks out time; shows before and after what is sold inside it. */
import { Anchor, Button, Group, Select, Stack, TextInput } from '@mantine/core';
import { DateTimePicker } from '@mantine/dates';
import { useForm } from '@mantine/form';
import { notifications } from '@mantine/notifications';
import { type Antenna, BlackoutInput, type BookingSummary, routes } from '@skyberth/shared';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { bookingQueries } from '../../lib/booking-queries.js';
import { formRules } from '../../lib/form-rules.js';
import { paths } from '../../lib/paths.js';
import { fieldErrors, sentenceOf } from '../../lib/problem-fields.js';
import { stationQueries } from '../../lib/station-queries.js';
import { instantOf, readWallText, wallText } from '../../lib/zone-time.js';
import { formatDayTime } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import classes from './availability.module.css';
import { touchedBy } from './calendar-events.js';

export interface WallSpan {
  readonly fromWallMs: number;
  readonly toWallMs: number;
}

interface BlackoutFormProps {
  readonly antenna: Antenna;
  readonly timeZone: string;
  readonly initial: WallSpan;
  readonly onDone: () => void;
}

const REASONS = ['maintenance', 'own use', 'weather', 'other'] as const;
const REACH_MS = 86_400_000;
/** Two days of contacts around a blackout are more than one antenna can serve in a page of this size. */
const MOST = 200;

interface Values {
  from: string;
  to: string;
  reason: (typeof REASONS)[number];
  note: string;
}

const utcOf = (wall: string, timeZone: string): string => {
  const wallMs = readWallText(wall);
  return Number.isNaN(wallMs) ? '' : new Date(instantOf(wallMs, timeZone)).toISOString();
};

const check = formRules(BlackoutInput);

export function BlackoutForm({ antenna, timeZone, initial, onDone }: BlackoutFormProps) {
  const client = useQueryClient();
  const bodyOf = ({ from, to, reason, note }: Values) => ({
    fromUtc: utcOf(from, timeZone),
    toUtc: utcOf(to, timeZone),
    reason,
    note,
  });
  const form = useForm<Values>({
    initialValues: {
      from: wallText(initial.fromWallMs),
      to: wallText(initial.toWallMs),
      reason: 'maintenance',
      note: '',
    },
    validate: (values) => wallErrors(check(bodyOf(values))),
  });
  const save = useMutation({
    mutationFn: (values: Values) =>
      call(routes.addBlackout, { params: { id: antenna.id }, body: BlackoutInput.parse(bodyOf(values)) }),
    onSuccess: ({ touches }) => {
      void client.invalidateQueries({ queryKey: stationQueries.all });
      const left = touches.length === 0 ? '' : ` ${touches.length} sold inside it stay yours to serve.`;
      notifications.show({ message: `The time is blocked out.${left}` });
      onDone();
    },
    onError: (error) => form.setErrors(wallErrors(fieldErrors(error))),
  });
  const { fromUtc, toUtc } = bodyOf(form.values);
  return (
    <form onSubmit={form.onSubmit((values) => save.mutate(values))} noValidate>
      <Stack>
        {save.error && <ProblemNotice title="The time stays open">{sentenceOf(save.error)}</ProblemNotice>}
        <Group grow align="start">
          <DateTimePicker
            label="From, on the station's clock"
            valueFormat="ddd D MMM YYYY HH:mm"
            {...form.getInputProps('from')}
          />
          <DateTimePicker label="To" valueFormat="ddd D MMM YYYY HH:mm" {...form.getInputProps('to')} />
        </Group>
        {fromUtc && toUtc && (
          <p className={classes.quiet}>
            In UTC: {formatDayTime(Date.parse(fromUtc))} to {formatDayTime(Date.parse(toUtc))}.
          </p>
        )}
        <Select label="Reason" data={[...REASONS]} allowDeselect={false} {...form.getInputProps('reason')} />
        <TextInput
          label="Note"
          description="Only your own people read it."
          maxLength={120}
          {...form.getInputProps('note')}
        />
        {fromUtc && toUtc && toUtc > fromUtc && (
          <SoldInside antennaId={antenna.id} fromMs={Date.parse(fromUtc)} toMs={Date.parse(toUtc)} />
        )}
        <Group>
          <Button type="submit" loading={save.isPending}>
            Block out this time
          </Button>
          <Button variant="default" onClick={onDone}>
            Cancel
          </Button>
        </Group>
      </Stack>
    </form>
  );
}

/** The API's fields are in UTC; the form's are on the station's clock. */
function wallErrors(errors: Record<string, string>): Record<string, string> {
  const named: Record<string, string> = {};
  for (const [path, message] of Object.entries(errors)) {
    if (path === 'fromUtc') named['from'] = message.startsWith('Invalid') ? 'Choose when it begins.' : message;
    else if (path === 'toUtc') named['to'] = message.startsWith('Invalid') ? 'Choose when it ends.' : message;
    else named[path] = message;
  }
  return named;
}

interface SoldInsideProps {
  readonly antennaId: string;
  readonly fromMs: number;
  readonly toMs: number;
}

function SoldInside({ antennaId, fromMs, toMs }: SoldInsideProps) {
  const bookings = useQuery(
    bookingQueries.list({
      antennaId,
      fromUtc: new Date(fromMs - REACH_MS).toISOString(),
      toUtc: new Date(toMs + REACH_MS).toISOString(),
      sort: 'aos',
      pageSize: MOST,
    }),
  );
  if (!bookings.data) return <p className={classes.quiet}>Looking for sold contacts ...</p>;
  const touched = touchedBy(bookings.data.items, fromMs, toMs);
  if (touched.length === 0) return <p className={classes.quiet}>No sold contact lies inside it.</p>;
  return (
    <div className={classes.touched} role="status">
      <strong>
        {touched.length} sold {touched.length === 1 ? 'contact lies' : 'contacts lie'} inside it, and{' '}
        {touched.length === 1 ? 'stays' : 'stay'} sold.
      </strong>
      <ul>
        {touched.map((booking) => (
          <TouchedContact key={booking.id} booking={booking} />
        ))}
      </ul>
      Serve them all the same, or cancel each on its page; the buyer then gets all of it back.
    </div>
  );
}

function TouchedContact({ booking }: { readonly booking: BookingSummary }) {
  return (
    <li>
      <Anchor component={Link} to={paths.booking(booking.id)}>
        {booking.spacecraftName}, {formatDayTime(Date.parse(booking.aosUtc))}
      </Anchor>{' '}
      for {booking.operatorName}
    </li>
  );
}
