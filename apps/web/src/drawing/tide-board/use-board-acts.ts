/** What pointer and keys do on the board: hover, pick, open, and the focus that moves from pass to pass. */
import {
  type FocusEvent,
  type KeyboardEvent,
  type MouseEvent,
  type PointerEvent,
  useEffect,
  useMemo,
  useRef,
  useState,
} from 'react';
import { humpAt } from './hit-test.js';
import { afterPaging, entryHump, isMoveKey, neighbour } from './keyboard.js';
import type { RowLayout } from './rows.js';
import type { BoardHump, TideBoardProps } from './tide-board-types.js';
import type { BoardElements, useBoardScene } from './use-board-scene.js';
import { panView } from './view.js';

/** Zoom of one press of a button or key. */
export const ZOOM_STEP = 1.6;
const PAGE_SHARE = 0.9;

type Board = ReturnType<typeof useBoardScene>;

/** Handlers for the field, the pass under the pointer, and the pass that Tab reaches. */
export function useBoardActs(props: TideBoardProps, elements: BoardElements, board: Board) {
  const { scene, layout, index, pickedIds, widthPx } = board;
  const [hoverId, setHoverId] = useState<string | null>(null);
  const { entry, setFocusId, moveTo } = useRovingFocus(props, elements, board);

  const humpUnder = (event: MouseEvent): BoardHump | null => {
    if (!scene) return null;
    const box = elements.field.current?.getBoundingClientRect();
    const place = { xPx: event.clientX - (box?.left ?? 0), yPx: event.clientY - (box?.top ?? 0) };
    return humpAt(index, layout, scene.view, widthPx, place);
  };
  const hover = (event: PointerEvent) => {
    // Nothing is rendered while the board is being dragged.
    const isLooking = event.pointerType === 'mouse' && event.buttons === 0;
    setHoverId(isLooking ? (humpUnder(event)?.id ?? null) : null);
  };
  const click = (event: MouseEvent) => {
    const named = humpIdOf(event.target);
    // A click without a place comes from a screen reader or from speech: its button says which pass is meant.
    const hump = event.detail === 0 ? index.byId.get(named ?? '') : humpUnder(event);
    if (!hump) return;
    setFocusId(hump.id);
    if (pickedIds.has(hump.id) && !isAdditive(event)) props.onOpen(hump.id);
    else props.onPick(hump.id, isAdditive(event));
  };
  const turnPage = (way: 1 | -1, fromId: string | undefined) => {
    const { settled } = board;
    const byMs = way * PAGE_SHARE * (settled.toMs - settled.fromMs);
    const next = fromId ? afterPaging(index, fromId, byMs) : null;
    board.show(panView(settled, byMs, props.limits));
    board.settle();
    if (next) moveTo(next);
  };
  const key = (event: KeyboardEvent) => {
    const id = humpIdOf(event.target);
    const next = id && isMoveKey(event.key) ? neighbour(index, layout, id, event.key) : null;
    if (next) moveTo(next);
    else if (id && event.key === 'Enter') props.onOpen(id);
    else if (id && event.key === ' ') props.onPick(id, isAdditive(event));
    else if (event.key === 'Escape') props.onClear?.();
    else if (event.key === 'PageUp' || event.key === 'PageDown') turnPage(event.key === 'PageUp' ? -1 : 1, id);
    else if (!zoomByKey(event.key, board) && !isMoveKey(event.key)) return;
    event.preventDefault();
  };
  // Some browsers click a button when Space is let go, though the key itself has been dealt with.
  const keyUp = (event: KeyboardEvent) => {
    if (event.key === ' ' && humpIdOf(event.target)) event.preventDefault();
  };
  const focus = (event: FocusEvent) => {
    const id = humpIdOf(event.target);
    if (id) setFocusId(id);
  };
  return { entry, hoverId, focus, keyUp, hover, leave: () => setHoverId(null), click, key };
}

function useRovingFocus(props: TideBoardProps, elements: BoardElements, board: Board) {
  const { scene, layout, index, settled } = board;
  const { pickedIds = NOTHING, nowMs, limits } = props;
  const [focusId, setFocusId] = useState<string | null>(null);
  const wantsFocus = useRef(false);
  const entry = useMemo(
    () => index.byId.get(focusId ?? '') ?? entryHump(index, layout, settled, pickedIds, nowMs),
    [index, layout, settled, pickedIds, focusId, nowMs],
  );
  // After each render: the button of a pass that was out of sight appears only once its row and time are shown.
  useEffect(() => {
    if (!wantsFocus.current || !focusId) return;
    const button = elements.moving.current?.querySelector<HTMLElement>(`[data-hump="${CSS.escape(focusId)}"]`);
    if (!button) return;
    wantsFocus.current = false;
    button.focus({ preventScroll: true });
  });
  const moveTo = (hump: BoardHump) => {
    wantsFocus.current = true;
    setFocusId(hump.id);
    scrollToRow(elements.scroller.current, layout, hump.rowId);
    if (!scene || (hump.aosMs >= scene.view.fromMs && hump.losMs <= scene.view.toMs)) return;
    const middleMs = (hump.aosMs + hump.losMs) / 2;
    board.show(panView(scene.view, middleMs - (scene.view.fromMs + scene.view.toMs) / 2, limits));
    board.settle();
  };
  return { entry, setFocusId, moveTo };
}

const NOTHING: readonly string[] = [];

/** Plus and minus; false when the key is another. */
function zoomByKey(key: string, board: Board): boolean {
  if (key === '+' || key === '=') board.zoomBy(1 / ZOOM_STEP);
  else if (key === '-') board.zoomBy(ZOOM_STEP);
  else return false;
  return true;
}

function humpIdOf(target: EventTarget): string | undefined {
  return (target as HTMLElement).closest<HTMLElement>('[data-hump]')?.dataset['hump'];
}

function isAdditive(event: { shiftKey: boolean; ctrlKey: boolean; metaKey: boolean }): boolean {
  return event.shiftKey || event.ctrlKey || event.metaKey;
}

function scrollToRow(scroller: HTMLElement | null, layout: RowLayout, rowId: string): void {
  const row = layout.rowById.get(rowId);
  if (!scroller || !row) return;
  const { rowPx, stripPx } = layout.measures;
  if (row.topPx - stripPx < scroller.scrollTop) scroller.scrollTop = row.topPx - stripPx;
  else if (row.topPx + rowPx > scroller.scrollTop + scroller.clientHeight) {
    scroller.scrollTop = row.topPx + rowPx - scroller.clientHeight;
  }
}
