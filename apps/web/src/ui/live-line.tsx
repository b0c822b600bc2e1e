import type { LiveLine } from '../lib/live.js';
import { DayTime } from './day-time.js';
import classes from './live-line.module.css';

/** Whether what stands here is of this moment: said in words, and aloud when the line is lost. */
export function LiveLineNotice({ line, isWanted = true }: { readonly line: LiveLine; readonly isWanted?: boolean }) {
  if (!isWanted) return null;
  return (
    <p className={classes.line} data-open={line.isOpen || undefined} role="status">
      {line.isOpen && 'Live: reports come as they are made.'}
      {!line.isOpen && line.lostMs !== null && (
        <>
          The line is lost since <DayTime atMs={line.lostMs} show="time" />. The clock and the position go on; reports
          come again, none left out, once it is back.
        </>
      )}
      {!line.isOpen && line.lostMs === null && 'Opening the live line.'}
    </p>
  );
}
