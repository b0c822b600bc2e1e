/** The tide board: passes as humps standing on each antenna's real horizon, in time from left to right. */
import { type KeyboardEvent, type MouseEvent, type PointerEvent, useEffect, useMemo, useRef, useState } from 'react';
import { dayOfYear, formatCalendarDay } from '../../ui/format.js';
import { elevationShare } from '../common/elevation-scale.js';
import { BoardBubble, BoardCard, type CardPlace } from './board-card.js';
import { BoardLegend, BoardZoom } from './board-legend.js';
import { BoardNames } from './board-names.js';
import { BoardTable, humpsInView } from './board-table.js';
import { BoardTargets } from './board-targets.js';
import { humpAt } from './hit-test.js';
import { entryHump, isMoveKey, neighbour } from './keyboard.js';
import { baseLinePx, type RowLayout } from './rows.js';
import classes from './tide-board.module.css';
import type { BoardHump, Interval, TideBoardProps } from './tide-board-types.js';
import { type BoardElements, useBoardScene } from './use-board-scene.js';
import { panView, timeToX } from './view.js';

/** More buttons than this are of no use to anyone; seen from so far, only the picked and the focused one stay. */
const MOST_TARGETS = 150;
const DEFAULT_MAX_HEIGHT_PX = 620;

/** Draws the board. See `TideBoardProps` for what it needs and tells. */
export function TideBoard(props: TideBoardProps) {
  const { variant = 'wide', maxHeightPx = DEFAULT_MAX_HEIGHT_PX, nowMs } = props;
  const elements = useElements();
  const board = useBoardScene(props, elements);
  const { scene, layout, index, pickedIds, settled, widthPx, range } = board;
  const [focusId, setFocusId] = useState<string | null>(null);
  const [hoverId, setHoverId] = useState<string | null>(null);
  const wantsFocus = useRef(false);
  const entry = useMemo(
    () => index.byId.get(focusId ?? '') ?? entryHump(index, layout, settled, props.pickedIds ?? [], nowMs),
    [index, layout, settled, props.pickedIds, focusId, nowMs],
  );
  const targets = useTargets(board, entry);
  useEffect(() => {
    if (!wantsFocus.current || !focusId) return;
    const button = elements.moving.current?.querySelector<HTMLElement>(`[data-hump="${CSS.escape(focusId)}"]`);
    if (!button) return;
    wantsFocus.current = false;
    button.focus({ preventScroll: true });
  });

  const humpUnder = (event: MouseEvent | PointerEvent): BoardHump | null => {
    if (!scene) return null;
    const box = elements.field.current?.getBoundingClientRect();
    const place = { xPx: event.clientX - (box?.left ?? 0), yPx: event.clientY - (box?.top ?? 0) };
    return humpAt(index, layout, scene.view, widthPx, place);
  };
  const choose = (hump: BoardHump, additive: boolean) => {
    if (pickedIds.has(hump.id) && !additive) props.onOpen(hump.id);
    else props.onPick(hump.id, additive);
  };
  const click = (event: MouseEvent) => {
    const named = (event.target as HTMLElement).closest<HTMLElement>('[data-hump]')?.dataset['hump'];
    // A click without a place comes from a screen reader or from speech: its button says which pass is meant.
    const hump = event.detail === 0 ? (index.byId.get(named ?? '') ?? null) : humpUnder(event);
    if (!hump) return;
    setFocusId(hump.id);
    choose(hump, event.shiftKey || event.ctrlKey || event.metaKey);
  };
  const moveTo = (hump: BoardHump) => {
    wantsFocus.current = true;
    setFocusId(hump.id);
    if (scene) reveal(hump, scene.view, props.limits, board.show, board.settle);
    scrollToRow(elements, layout, hump.rowId);
  };
  const key = (event: KeyboardEvent) => {
    const id = (event.target as HTMLElement).dataset['hump'];
    if (event.key === 'Escape') props.onClear?.();
    else if (event.key === '+' || event.key === '=') board.zoomBy(1 / 1.6);
    else if (event.key === '-') board.zoomBy(1.6);
    else if (event.key === 'PageUp' || event.key === 'PageDown') {
      const span = (settled.toMs - settled.fromMs) * (event.key === 'PageUp' ? -0.9 : 0.9);
      board.show(panView(settled, span, props.limits));
      board.settle();
    } else if (id && isMoveKey(event.key)) {
      const next = neighbour(index, layout, id, event.key);
      if (next) moveTo(next);
    } else if (id && event.key === 'Enter') props.onOpen(id);
    else if (id && event.key === ' ') props.onPick(id, event.shiftKey || event.ctrlKey || event.metaKey);
    else return;
    event.preventDefault();
  };

  const hovered = hoverId ? index.byId.get(hoverId) : undefined;
  const bubbled = props.bubble ? index.byId.get(props.bubble.humpId) : undefined;
  const placeOf = (hump: BoardHump) => cardPlace(hump, layout, settled, widthPx);
  const isEmpty = layout.rows.length === 0;
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
          <BoardNames layout={layout} range={range} nowMs={nowMs} variant={variant} />
          {/* biome-ignore lint/a11y/useSemanticElements: a group of buttons over a drawing, not a form's fieldset */}
          <div
            ref={elements.field}
            className={classes.field}
            role="group"
            aria-label="Passes. Arrow keys move from pass to pass, Enter opens, Space picks, plus and minus zoom."
            onClick={click}
            onKeyDown={key}
            onPointerMove={(event) => setHoverId(event.pointerType === 'mouse' ? (humpUnder(event)?.id ?? null) : null)}
            onPointerLeave={() => setHoverId(null)}
            data-over={hovered ? true : undefined}
          >
            <canvas ref={elements.canvas} className={classes.canvas} />
            <div ref={elements.moving} className={classes.moving}>
              <BoardTargets
                {...{ layout, widthPx, pickedIds }}
                humps={targets}
                view={settled}
                tabId={entry?.id ?? null}
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
        </div>
      </div>
      {isEmpty && props.empty}
      <div className={classes.foot}>
        {!props.bare && <BoardLegend />}
        <BoardZoom view={settled} onZoom={board.zoomBy} />
      </div>
      <BoardTable label={props.label} layout={layout} index={index} blackouts={props.blackouts ?? []} view={settled} />
    </section>
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

/** Brings a pass into view, with some time around it, when it isn't wholly there. */
function reveal(
  hump: BoardHump,
  view: Interval,
  limits: Interval | undefined,
  show: (view: Interval) => void,
  settle: () => void,
): void {
  if (hump.aosMs >= view.fromMs && hump.losMs <= view.toMs) return;
  const middle = (hump.aosMs + hump.losMs) / 2;
  show(panView(view, middle - (view.fromMs + view.toMs) / 2, limits));
  settle();
}

function scrollToRow(elements: BoardElements, layout: RowLayout, rowId: string): void {
  const scroller = elements.scroller.current;
  const row = layout.rowById.get(rowId);
  if (!scroller || !row) return;
  const { rowPx, stripPx } = layout.measures;
  if (row.topPx - stripPx < scroller.scrollTop) scroller.scrollTop = row.topPx - stripPx;
  else if (row.topPx + rowPx > scroller.scrollTop + scroller.clientHeight) {
    scroller.scrollTop = row.topPx + rowPx - scroller.clientHeight;
  }
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
