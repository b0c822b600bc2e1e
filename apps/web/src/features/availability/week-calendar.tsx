/** Mantine's week, fed with the station's wall times: open hours behind, blackouts and contacts in front. */
import { Box, UnstyledButton } from '@mantine/core';
import { modals } from '@mantine/modals';
import { notifications } from '@mantine/notifications';
import { type ScheduleEventData, WeekView } from '@mantine/schedule';
import { type AntennaCalendar, type BookingSummary, routes } from '@skyberth/shared';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { type ComponentPropsWithoutRef, useEffect, useMemo, useRef } from 'react';
import { useNavigate } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { serverNowMs } from '../../lib/server-clock.js';
import { stationQueries } from '../../lib/station-queries.js';
import { readWallText, wallText, wallTimeOf } from '../../lib/zone-time.js';
import classes from './availability.module.css';
import type { WallSpan } from './blackout-form.js';
import { blackoutSpans, type CalendarSpan, contactSpans, openingSpans } from './calendar-events.js';

interface WeekCalendarProps {
  readonly calendar: AntennaCalendar;
  readonly bookings: readonly BookingSummary[];
  readonly weekStartMs: number;
  readonly mayWrite: boolean;
  readonly onSelect: (span: WallSpan) => void;
}

/** A pass of eight minutes must still be a thing one can hit. */
const SLOT_PX = 96;
/** Where the day begins to be looked at when it is not today. */
const MORNING_HOUR = 7;
const HOUR_MS = 3_600_000;

/** A part that ends at midnight ends a minute before it: a whole day would move into a row of its own. */
const lastMomentOf = (span: CalendarSpan): number =>
  span.toWallMs % (24 * HOUR_MS) === 0 ? span.toWallMs - 60_000 : span.toWallMs;

const eventOf = (span: CalendarSpan): ScheduleEventData => ({
  id: span.id,
  title: span.title,
  start: wallText(span.fromWallMs),
  end: wallText(lastMomentOf(span)),
  color: 'deep',
  ...(span.kind === 'open' ? { display: 'background' as const } : {}),
  payload: { span },
});

const spanOf = (event: ScheduleEventData): CalendarSpan | undefined =>
  event.payload?.['span'] as CalendarSpan | undefined;

export function WeekCalendar(props: WeekCalendarProps) {
  const { calendar, bookings, weekStartMs, mayWrite, onSelect } = props;
  const { timeZone } = calendar;
  const navigate = useNavigate();
  const askOpen = useOpenAgain();
  const viewport = useScrollToHour(weekStartMs, timeZone);
  const events = useMemo(
    () =>
      [
        ...openingSpans(calendar, weekStartMs),
        ...blackoutSpans(calendar, weekStartMs),
        ...contactSpans(bookings, timeZone, weekStartMs),
      ].map(eventOf),
    [calendar, bookings, timeZone, weekStartMs],
  );
  const open = (event: ScheduleEventData) => {
    const span = spanOf(event);
    const id = span?.id.split(' ')[0] ?? '';
    if (span?.kind === 'blackout') {
      if (mayWrite) askOpen(id, span.title);
    } else if (span) navigate(paths.booking(id));
  };
  return (
    <div className={classes.week}>
      <div className={classes.wide}>
        <WeekView
          date={wallText(weekStartMs)}
          events={events}
          withHeader={false}
          withAllDaySlots={false}
          withWeekNumber={false}
          slotLabelFormat="HH:mm"
          slotHeight={SLOT_PX}
          getCurrentTime={() => wallText(wallTimeOf(serverNowMs(), timeZone))}
          withDragSlotSelect={mayWrite}
          onSlotDragEnd={(from, to) => onSelect({ fromWallMs: readWallText(from), toWallMs: endOf(to) })}
          onTimeSlotClick={({ slotStart, slotEnd }) =>
            mayWrite && onSelect({ fromWallMs: readWallText(slotStart), toWallMs: endOf(slotEnd) })
          }
          onEventClick={open}
          renderEvent={(event, parts) => <EventFrame event={event} parts={parts} />}
          renderEventBody={(event) => <EventBody event={event} />}
          scrollAreaProps={{ mah: 620, viewportRef: viewport }}
          highlightToday
          classNames={{
            weekView: classes.grid ?? '',
            weekViewBackgroundEvent: classes.open ?? '',
            weekViewDaySlot: classes.slot ?? '',
            currentTimeIndicatorTimeBubble: classes.nowPlate ?? '',
          }}
        />
      </div>
      <Legend />
    </div>
  );
}

/** The last slot of a day ends at 23:59:59. */
const endOf = (text: string): number => Math.ceil(readWallText(text) / 60_000) * 60_000;

const clock = (wallMs: number): string => wallText(wallMs).slice(11, 16);

function labelOf(event: ScheduleEventData): string {
  const span = spanOf(event);
  if (!span) return event.title;
  const kind = { open: 'Open', blackout: 'Blackout', contact: 'Contact', asked: 'Request' }[span.kind];
  return `${kind} ${span.title}, ${wallText(span.fromWallMs).slice(0, 16)} to ${clock(span.toWallMs)}`;
}

type EventParts = ComponentPropsWithoutRef<'button'>;

/** Opening hours are ground and take no click; the rest are buttons with the whole of it in their name. */
function EventFrame({ event, parts }: { readonly event: ScheduleEventData; readonly parts: EventParts }) {
  const kind = spanOf(event)?.kind;
  if (kind === 'open') return <Box {...(parts as object)} data-kind="open" aria-hidden="true" />;
  return <UnstyledButton {...parts} data-kind={kind} aria-label={labelOf(event)} />;
}

function EventBody({ event }: { readonly event: ScheduleEventData }) {
  const span = spanOf(event);
  if (!span || span.kind === 'open') return null;
  return (
    <span className={classes.eventBody}>
      <strong>{span.title}</strong> {clock(span.fromWallMs)}
    </span>
  );
}

function Legend() {
  const items = [
    ['open', 'Open hours'],
    ['contact', 'Sold contact'],
    ['asked', 'Waits for your answer'],
    ['blackout', 'Blackout'],
  ] as const;
  return (
    <ul className={classes.legend} aria-label="What the calendar shows">
      {items.map(([kind, words]) => (
        <li key={kind}>
          <span data-kind={kind} aria-hidden="true" /> {words}
        </li>
      ))}
    </ul>
  );
}

/** Asks, then opens a blackout again. */
function useOpenAgain(): (id: string, title: string) => void {
  const client = useQueryClient();
  const remove = useMutation({
    mutationFn: (id: string) => call(routes.removeCalendarEntries, { body: { ids: [id] } }),
    onSuccess: () => {
      void client.invalidateQueries({ queryKey: stationQueries.all });
      notifications.show({ message: 'That time is open again, within the opening hours.' });
    },
    onError: (error) => notifications.show({ title: 'It stays closed', message: sentenceOf(error), color: 'buoy' }),
  });
  return (id, title) =>
    modals.openConfirmModal({
      title: `Open this time again? (${title})`,
      children:
        'The whole blackout goes, every time that it comes, and operators can book the time at once, within the opening hours.',
      labels: { confirm: 'Open it again', cancel: 'Leave it closed' },
      onConfirm: () => remove.mutate(id),
    });
}

/** Opens the calendar near the present hour, or in the morning of another week. */
function useScrollToHour(weekStartMs: number, timeZone: string) {
  const viewport = useRef<HTMLDivElement>(null);
  useEffect(() => {
    const nowWallMs = wallTimeOf(serverNowMs(), timeZone);
    const isThisWeek = nowWallMs >= weekStartMs && nowWallMs < weekStartMs + 7 * 24 * HOUR_MS;
    const hour = isThisWeek ? new Date(nowWallMs).getUTCHours() - 1 : MORNING_HOUR;
    // The scroll area learns its height one frame after it is drawn.
    const frame = requestAnimationFrame(() => viewport.current?.scrollTo({ top: Math.max(0, hour) * SLOT_PX }));
    return () => cancelAnimationFrame(frame);
  }, [weekStartMs, timeZone]);
  return viewport;
}
