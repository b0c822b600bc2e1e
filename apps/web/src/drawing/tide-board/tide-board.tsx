/** The tide board: passes as humps standing on each antenna's real horizon, in time from left to right. */
import { useDeferredValue, useMemo, useRef } from 'react';
import { dayOfYear, formatCalendarDay } from '../../ui/format.js';
import { elevationShare } from '../common/elevation-scale.js';
import { BoardBubble, BoardCard, type CardPlace } from './board-card.js';
import { BoardLegend, BoardZoom } from './board-legend.js';
import { BoardNames } from './board-names.js';
import { BoardTable, humpsInView } from './board-table.js';
import { BoardTargets } from './board-targets.js';
import { baseLinePx, type RowLayout } from './rows.js';
import classes from './tide-board.module.css';
import type { BoardBlackout, BoardHump, Interval, TideBoardProps } from './tide-board-types.js';
import { useBoardActs } from './use-board-acts.js';
import { type BoardElements, useBoardScene } from './use-board-scene.js';
import { timeToX } from './view.js';

/** More buttons than this are of no use to anyone; seen from so far, only the picked and the focused one stay. */
const MOST_TARGETS = 150;
const DEFAULT_MAX_HEIGHT_PX = 620;
const NO_BLACKOUTS: readonly BoardBlackout[] = [];

/** Draws the board. See `TideBoardProps` for what it needs and tells. */
export function TideBoard(props: TideBoardProps) {
  const { variant = 'wide', maxHeightPx = DEFAULT_MAX_HEIGHT_PX } = props;
  const elements = useElements();
  const board = useBoardScene(props, elements);
  const { layout, index, settled } = board;
  const tableView = useDeferredValue(settled);
  // Clocks of the stations show minutes: their names need not be rendered each second.
  const minuteMs = Math.floor(props.nowMs / 60_000) * 60_000;
  return (
    <section className={classes.board} data-variant={variant} aria-label={props.label}>
      <div className={classes.head}>
        <div className={classes.corner}>
          <strong>Day {dayOfYear(settled.fromMs)}</strong>
          <span>{formatCalendarDay(settled.fromMs)}, UTC</span>
        </div>
        <canvas ref={elements.axis} className={classes.axis} />
      </div>
      <div ref={elements.scroller} className={classes.scroller} style={{ maxHeight: maxHeightPx }}>
        <div className={classes.content} style={{ height: layout.heightPx }}>
          <BoardNames layout={layout} range={board.range} nowMs={minuteMs} variant={variant} />
          <BoardField board={board} elements={elements} props={props} />
        </div>
      </div>
      {layout.rows.length === 0 && props.empty}
      <div className={classes.foot}>
        {!props.bare && <BoardLegend />}
        <BoardZoom view={settled} onZoom={board.zoomBy} />
      </div>
      <BoardTable
        label={props.label}
        layout={layout}
        index={index}
        blackouts={props.blackouts ?? NO_BLACKOUTS}
        view={tableView}
      />
    </section>
  );
}

interface BoardFieldProps {
  readonly props: TideBoardProps;
  readonly elements: BoardElements;
  readonly board: ReturnType<typeof useBoardScene>;
}

/** The drawn part with the real buttons over it. */
function BoardField({ props, elements, board }: BoardFieldProps) {
  const { layout, index, settled, widthPx, pickedIds } = board;
  const acts = useBoardActs(props, elements, board);
  const targets = useTargets(board, acts.entry);
  const hovered = index.byId.get(acts.hoverId ?? '');
  const bubbled = index.byId.get(props.bubble?.humpId ?? '');
  const placeOf = (hump: BoardHump) => cardPlace(hump, layout, settled, widthPx);
  return (
    // biome-ignore lint/a11y/useSemanticElements: a group of buttons over a drawing, not a form's fieldset
    <div
      ref={elements.field}
      className={classes.field}
      role="group"
      aria-label="Passes. Arrow keys move from pass to pass, Enter opens, Space picks, plus and minus zoom."
      onClick={acts.click}
      onKeyDown={acts.key}
      onKeyUp={acts.keyUp}
      onFocus={acts.focus}
      onPointerMove={acts.hover}
      onPointerLeave={acts.leave}
      data-over={hovered ? true : undefined}
    >
      <canvas ref={elements.canvas} className={classes.canvas} />
      <div ref={elements.moving} className={classes.moving}>
        <BoardTargets
          humps={targets}
          layout={layout}
          view={settled}
          widthPx={widthPx}
          pickedIds={pickedIds}
          tabId={acts.entry?.id ?? null}
        />
        {hovered && !bubbled && (
          <BoardCard
            hump={hovered}
            rowName={layout.rowById.get(hovered.rowId)?.row.name ?? ''}
            place={placeOf(hovered)}
            widthPx={widthPx}
          />
        )}
        {bubbled && (
          <BoardBubble place={placeOf(bubbled)} widthPx={widthPx}>
            {props.bubble?.content}
          </BoardBubble>
        )}
      </div>
    </div>
  );
}

function useElements(): BoardElements {
  const scroller = useRef<HTMLDivElement>(null);
  const field = useRef<HTMLDivElement>(null);
  const moving = useRef<HTMLDivElement>(null);
  const canvas = useRef<HTMLCanvasElement>(null);
  const axis = useRef<HTMLCanvasElement>(null);
  return useMemo(() => ({ scroller, field, moving, canvas, axis }), []);
}

function useTargets(board: ReturnType<typeof useBoardScene>, entry: BoardHump | null): BoardHump[] {
  const { layout, index, settled, range, pickedIds } = board;
  return useMemo(() => {
    const inSight = { ...layout, rows: layout.rows.slice(range[0], range[1]) };
    const all = humpsInView(inSight, index, settled);
    const kept = all.length <= MOST_TARGETS ? all : all.filter((hump) => pickedIds.has(hump.id));
    return entry && !kept.includes(entry) ? [...kept, entry] : kept;
  }, [layout, index, settled, range, pickedIds, entry]);
}

function cardPlace(hump: BoardHump, layout: RowLayout, view: Interval, widthPx: number): CardPlace {
  const row = layout.rowById.get(hump.rowId);
  const baseY = row ? baseLinePx(row, layout.measures) : 0;
  return {
    xPx: timeToX(view, widthPx, (hump.aosMs + hump.losMs) / 2),
    topPx: baseY - elevationShare(hump.highestDeg) * layout.measures.humpPx,
    bottomPx: baseY + layout.measures.quayPx,
  };
}
