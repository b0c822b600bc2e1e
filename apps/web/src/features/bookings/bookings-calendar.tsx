/** Bookings by month, week and day; default export so that the calendar's code and styles load only when asked for. */
import '@mantine/schedule/styles.css';
import { Schedule, type ScheduleEventData, type ScheduleViewLevel } from '@mantine/schedule';
import type { BookingSummary } from '@skyberth/shared';
import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { bookingQueries } from '../../lib/booking-queries.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { wallText, wallTimeOf } from '../../lib/zone-time.js';
import { formatHourMinute } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { BOOKING_STATE_BADGES } from '../../ui/state-badge.js';
import { useTimeDisplay } from '../../ui/time-display.js';
import classes from './bookings.module.css';
import type { BookingsViewProps } from './bookings-list.js';
import { calendarQuery } from './list-filter.js';

const COLOURS: Readonly<Record<BookingSummary['state'], string>> = {
  held: 'brass',
  'awaiting owner': 'brass',
  confirmed: 'kelp',
  'under way': 'deep',
  reporting: 'brass',
  settled: 'deep',
  lapsed: 'gray',
  declined: 'buoy',
  cancelled: 'gray',
  failed: 'buoy',
  'in dispute': 'brass',
};

/** No year: the bookings fetched are those around one month. */
const VIEWS = { views: ['day', 'week', 'month'] } as const satisfies { views: readonly ScheduleViewLevel[] };

export default function BookingsCalendar({ filter, nowMs, onChange }: BookingsViewProps) {
  const navigate = useNavigate();
  const { mode, timeZone } = useTimeDisplay();
  const zone = mode === 'utc' ? 'UTC' : timeZone;
  const [view, setView] = useState<ScheduleViewLevel>('month');
  const day = filter.day ?? wallText(wallTimeOf(nowMs, zone)).slice(0, 10);
  const [pickedDay, pickDay] = useState<string | null>(day);
  const { data, error, refetch } = useQuery({
    ...bookingQueries.list(calendarQuery(filter, nowMs)),
    placeholderData: keepPreviousData,
  });
  const events = useMemo(() => (data?.items ?? []).map((one) => eventOf(one, zone)), [data, zone]);
  return (
    <>
      {error && (
        <ProblemNotice title="The bookings could not be read" onRetry={() => void refetch()}>
          {sentenceOf(error)}
        </ProblemNotice>
      )}
      <p className={classes.note}>
        Times in {zone}.
        {data && data.total > data.items.length && ` The first ${data.items.length} of ${data.total} are shown.`}
      </p>
      <Schedule
        date={day}
        onDateChange={(next) => onChange({ day: next })}
        view={view}
        onViewChange={(next) => setView(next === 'year' ? 'month' : next)}
        events={events}
        onEventClick={(event) => navigate(paths.booking(String(event.id)))}
        layout="responsive"
        className={classes.calendar ?? ''}
        dayViewProps={{ viewSelectProps: VIEWS }}
        weekViewProps={{ firstDayOfWeek: 1, weekendDays: [], viewSelectProps: VIEWS }}
        monthViewProps={{ maxEventsPerDay: 3, firstDayOfWeek: 1, weekendDays: [], viewSelectProps: VIEWS }}
        mobileMonthViewProps={{
          firstDayOfWeek: 1,
          weekendDays: [],
          selectedDate: pickedDay,
          onSelectedDateChange: pickDay,
          // The days are buttons, which are pressed; the component calls them selected, which a button cannot be.
          getDayProps: (each) => ({ 'aria-selected': undefined, 'aria-pressed': each === pickedDay }),
        }}
      />
    </>
  );
}

function eventOf(booking: BookingSummary, zone: string): ScheduleEventData {
  const wall = (utc: string) => wallTimeOf(Date.parse(utc), zone);
  return {
    id: booking.id,
    title: `${formatHourMinute(wall(booking.aosUtc))} ${booking.spacecraftShortName} ${booking.antennaName}, ${BOOKING_STATE_BADGES[booking.state].text}`,
    start: wallText(wall(booking.aosUtc)),
    end: wallText(wall(booking.losUtc)),
    color: COLOURS[booking.state],
  };
}
