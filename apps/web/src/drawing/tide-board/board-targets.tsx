import { memo } from 'react';
import { targetColumn } from './hit-test.js';
import type { RowLayout } from './rows.js';
import classes from './tide-board.module.css';
import type { BoardHump, Interval } from './tide-board-types.js';
import { humpSentence } from './words.js';

interface BoardTargetsProps {
  readonly humps: readonly BoardHump[];
  readonly layout: RowLayout;
  readonly view: Interval;
  readonly widthPx: number;
  readonly pickedIds: ReadonlySet<string>;
  /** The one that Tab reaches. */
  readonly tabId: string | null;
}

/** Real buttons over the drawn humps, for keyboard, screen reader and speech. Only one takes Tab; arrows move on. */
export const BoardTargets = memo(function BoardTargets({
  humps,
  layout,
  view,
  widthPx,
  pickedIds,
  tabId,
}: BoardTargetsProps) {
  const { measures } = layout;
  return humps.map((hump) => {
    const row = layout.rowById.get(hump.rowId);
    if (!row) return null;
    const [x0, x1] = targetColumn(hump, view, widthPx, measures.targetPx);
    const isPicked = pickedIds.has(hump.id);
    return (
      <button
        key={hump.id}
        type="button"
        className={classes.target}
        data-hump={hump.id}
        tabIndex={hump.id === tabId ? 0 : -1}
        aria-pressed={isPicked}
        aria-label={humpSentence(hump, row.row.name, isPicked)}
        style={{ left: x0, width: x1 - x0, top: row.topPx + 3, height: measures.rowPx - 5 }}
      />
    );
  });
});
