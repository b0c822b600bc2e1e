import type { WeeklyRule } from '@skyberth/shared';
import classes from './antenna.module.css';
import { DAY_MINUTES, DAYS, openSpans } from './hours-words.js';

const clockText = (minute: number): string =>
  `${String(Math.floor(minute / 60)).padStart(2, '0')}:${String(minute % 60).padStart(2, '0')}`;

/** Seven days from 0 to 24 h; what is open is water, what is shut is night. */
export function WeekDrawing({ rules }: { readonly rules: readonly WeeklyRule[] }) {
  const spans = openSpans(rules);
  return (
    <div className={classes.week}>
      {DAYS.map((name, index) => {
        const dayStart = index * DAY_MINUTES;
        const parts = spans
          .map((span) => ({
            fromMin: Math.max(0, span.fromMin - dayStart),
            toMin: Math.min(DAY_MINUTES, span.toMin - dayStart),
          }))
          .filter((part) => part.toMin > part.fromMin);
        const words = parts.map((part) => `${clockText(part.fromMin)} to ${clockText(part.toMin)}`).join(', ');
        return [
          <span key={name}>{name}</span>,
          <div key={`${name} open`} className={classes.day} role="img" aria-label={`${name}: ${words || 'shut'}`}>
            {parts.map((part) => (
              <span
                key={part.fromMin}
                style={{
                  left: `${(part.fromMin / DAY_MINUTES) * 100}%`,
                  width: `${((part.toMin - part.fromMin) / DAY_MINUTES) * 100}%`,
                }}
              />
            ))}
          </div>,
        ];
      })}
      <div className={classes.hours} aria-hidden="true">
        {['0', '6', '12', '18', '24'].map((hour) => (
          <span key={hour}>{hour}</span>
        ))}
      </div>
    </div>
  );
}
