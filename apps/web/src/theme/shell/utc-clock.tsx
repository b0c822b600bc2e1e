import { useEffect, useState } from 'react';
import { dayOfYear, formatCalendarDay, formatDay, formatTime } from '../../ui/format.js';
import classes from './shell.module.css';

/** The clock of the head line: day of year and UTC, the calendar date below. Ticks on the whole second. */
export function UtcClock({ clock }: { readonly clock: () => number }) {
  const [nowMs, setNowMs] = useState(clock);
  useEffect(() => {
    let timer = 0;
    const tick = () => {
      const now = clock();
      setNowMs(now);
      timer = window.setTimeout(tick, 1000 - (now % 1000) + 5);
    };
    tick();
    return () => window.clearTimeout(timer);
  }, [clock]);
  const [weekday = '', day = '', month = ''] = formatCalendarDay(nowMs).split(' ');
  return (
    <div className={classes.clock} role="timer" aria-label="UTC clock" aria-live="off">
      <time className={classes.clockTime} dateTime={new Date(nowMs).toISOString()}>
        <span className={classes.wideOnly}>{formatDay(nowMs)}</span>
        <span className={classes.phoneOnly}>{dayOfYear(nowMs)}</span> {formatTime(nowMs)}
      </time>
      <div className={classes.clockDay}>
        UTC, {weekday} {day} {month}
      </div>
    </div>
  );
}
