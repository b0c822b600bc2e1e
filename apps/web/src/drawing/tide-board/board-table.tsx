import { memo } from 'react';
import { formatDayTime, formatDegrees, formatDuration } from '../../ui/format.js';
import { type HumpIndex, humpsBetween } from './hump-index.js';
import type { RowLayout } from './rows.js';
import type { BoardBlackout, BoardHump, Interval } from './tide-board-types.js';
import { stateWords } from './words.js';

/** More rows than this help nobody who listens, and slow every page down. */
const MOST_ROWS = 200;

interface BoardTableProps {
  readonly label: string;
  readonly layout: RowLayout;
  readonly index: HumpIndex;
  readonly blackouts: readonly BoardBlackout[];
  readonly view: Interval;
}

/** The same content as the drawing, for a screen reader: every pass in view by antenna and time, then the blackouts. */
export const BoardTable = memo(function BoardTable({ label, layout, index, blackouts, view }: BoardTableProps) {
  const humps = humpsInView(layout, index, view);
  const shown = humps.slice(0, MOST_ROWS);
  const closed = blackouts.filter((one) => one.toMs > view.fromMs && one.fromMs < view.toMs);
  const rowName = (id: string) => layout.rowById.get(id)?.row.name ?? '';
  return (
    <div className="sk-hidden">
      <table>
        <caption>
          {label}. {humps.length === 1 ? '1 pass' : `${humps.length} passes`} from {formatDayTime(view.fromMs)} to{' '}
          {formatDayTime(view.toMs)} UTC.
          {humps.length > MOST_ROWS && ` The first ${MOST_ROWS} are listed; narrow the time for the others.`}
        </caption>
        <thead>
          <tr>
            {['Antenna', 'Spacecraft', 'AOS', 'Length', 'Highest', 'State', 'Price'].map((head) => (
              <th key={head} scope="col">
                {head}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {shown.map((hump) => (
            <tr key={hump.id}>
              <th scope="row">{rowName(hump.rowId)}</th>
              <td>{hump.spacecraftName}</td>
              <td>{formatDayTime(hump.aosMs)}</td>
              <td>{formatDuration(hump.losMs - hump.aosMs)}</td>
              <td>{formatDegrees(hump.highestDeg)}</td>
              <td>{hump.reason ? `${stateWords(hump)}: ${hump.reason.sentence}` : stateWords(hump)}</td>
              <td>{hump.priceText ?? hump.priceLabel ?? ''}</td>
            </tr>
          ))}
        </tbody>
      </table>
      {closed.length > 0 && (
        <ul aria-label="Blackouts">
          {closed.map((one) => (
            <li key={one.id}>
              {rowName(one.rowId)}: {one.reason}, {formatDayTime(one.fromMs)} to {formatDayTime(one.toMs)}
            </li>
          ))}
        </ul>
      )}
    </div>
  );
});

/** Passes in view, row by row and in order of time. */
export function humpsInView(layout: RowLayout, index: HumpIndex, view: Interval): BoardHump[] {
  return layout.rows.flatMap(({ row }) => {
    const [first, end] = humpsBetween(index, row.id, view);
    const list = index.byRow.get(row.id) ?? [];
    return list.slice(first, end).filter((hump) => hump.losMs > view.fromMs && hump.aosMs < view.toMs);
  });
}
