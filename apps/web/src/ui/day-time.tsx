import { Tooltip } from '@mantine/core';
import { formatCalendarDay, formatDay, formatDayTime, formatLocalTime, formatTime } from './format.js';
import { useTimeDisplay } from './time-display.js';

/** Props of `DayTime`. */
export interface DayTimeProps {
  /** UTC milliseconds. */
  readonly atMs: number;
  /** `both` writes `2026-335 14:05:09`. Default `both`. */
  readonly show?: 'both' | 'day' | 'time';
  /** The station's own zone, added on hover when given. */
  readonly placeTimeZone?: string;
}

/** An instant: UTC with the day of year, or local by the person's choice; the other readings on hover and focus. */
export function DayTime({ atMs, show = 'both', placeTimeZone }: DayTimeProps) {
  const { mode, timeZone } = useTimeDisplay();
  const utc = { both: formatDayTime(atMs), day: formatDay(atMs), time: formatTime(atMs) }[show];
  const localDay = formatCalendarDay(atMs, timeZone);
  const localTime = formatLocalTime(atMs, timeZone, true);
  const local = { both: `${localDay} ${localTime}`, day: localDay, time: localTime }[show];
  const readings = [
    mode === 'utc' ? `${formatCalendarDay(atMs)}, ${formatTime(atMs)} UTC` : `${formatDayTime(atMs)} UTC`,
    ...(timeZone === 'UTC' ? [] : [`${localTime} on your clock (${timeZone}), ${localDay}`]),
    ...(placeTimeZone ? [`${formatLocalTime(atMs, placeTimeZone, true)} there (${placeTimeZone})`] : []),
  ];
  return (
    <Tooltip
      label={readings.map((reading) => <div key={reading}>{reading}</div>)}
      events={{ hover: true, focus: true, touch: true }}
    >
      <time dateTime={new Date(atMs).toISOString()} style={{ whiteSpace: 'nowrap' }}>
        {mode === 'utc' ? utc : local}
      </time>
    </Tooltip>
  );
}
