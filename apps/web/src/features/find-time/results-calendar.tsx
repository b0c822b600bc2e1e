import { useMemo } from 'react';
import { StateGlyph } from '../../drawing/tide-board/state-glyph.js';
import { EmptyState } from '../../ui/empty-state.js';
import { formatCalendarDay, formatDay, formatDuration, formatHourMinute } from '../../ui/format.js';
import { MoneyText } from '../../ui/values.js';
import classes from './calendar.module.css';
import { type PassRow, passRows, rowsByDay } from './pass-rows.js';
import type { ResultsProps } from './search-results.js';

/** What can be had, and what is already ours, day by day in UTC; default export so that it loads only when asked for. */
export default function ResultsCalendar({ result, filter, onChange }: ResultsProps) {
  const days = useMemo(() => {
    const rows = passRows(result).filter((row) => row.priceMinor !== null || row.pass.bookingId !== null);
    return rowsByDay(rows);
  }, [result]);
  if (days.length === 0)
    return (
      <EmptyState level={3} title="Nothing for sale in this period">
        The table and the board show what passes there are, and why each is not for sale.
      </EmptyState>
    );
  return (
    <div className={classes.days}>
      {days.map((day) => (
        <section key={day.dayMs} className={classes.day} aria-label={formatCalendarDay(day.dayMs)}>
          <h3>
            {formatDay(day.dayMs)} <span>{formatCalendarDay(day.dayMs)}</span>
          </h3>
          <ul>
            {day.rows.map((row) => (
              <li key={row.key}>
                <button
                  type="button"
                  aria-pressed={row.key === filter.passKey}
                  onClick={() => onChange({ passKey: row.key, part: null })}
                >
                  <DayEntry row={row} />
                </button>
              </li>
            ))}
          </ul>
        </section>
      ))}
    </div>
  );
}

function DayEntry({ row }: { readonly row: PassRow }) {
  const { pass } = row;
  const isOwn = pass.bookingId !== null;
  return (
    <>
      <strong>{formatHourMinute(row.aosMs)}</strong>
      <span className={classes.who}>
        {row.spacecraftName}
        <small>
          {row.antennaName}, {formatDuration(row.lengthMs)}
        </small>
      </span>
      {isOwn ? (
        <span className={classes.own}>
          <StateGlyph glyph={pass.state === 'held' ? 'held' : pass.state === 'asked' ? 'asked' : 'berth'} /> yours
        </span>
      ) : (
        row.priceMinor !== null &&
        pass.currency && (
          <span>
            {pass.state === 'part for sale' && 'part, '}
            <MoneyText amountMinor={row.priceMinor} currency={pass.currency} whole />
          </span>
        )
      )}
    </>
  );
}
