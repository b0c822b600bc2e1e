/** Drag, wheel and pinch on the board, turned into views. Knows nothing of humps. */
import type { Interval } from './tide-board-types.js';
import { clampView, panView, xToTime, zoomView } from './view.js';

/** What the gestures act on. */
export interface GestureTarget {
  readonly view: () => Interval;
  readonly widthPx: () => number;
  readonly limits: () => Interval | undefined;
  /** Shows a view at once, without telling anyone. */
  readonly show: (view: Interval) => void;
  /** The view has come to rest. */
  readonly settle: () => void;
  /** Scrolls the rows by px; a mouse drags in both directions. */
  readonly scrollBy: (px: number) => void;
}

const DRAG_FROM_PX = 4;
const SETTLE_AFTER_MS = 180;
const WHEEL_ZOOM_PER_PX = 0.0016;
const LINE_WHEEL_PX = 16;

interface Finger {
  x: number;
  y: number;
}

/** Listens on an element until the returned function is called. */
export function attachGestures(element: HTMLElement, target: GestureTarget): () => void {
  const fingers = new Map<number, Finger>();
  let start: { view: Interval; x: number; y: number; spreadPx: number } | null = null;
  let lastY = 0;
  let isDragging = false;
  let settleTimer = 0;

  let leftPx = 0;
  const localX = (clientX: number) => clientX - leftPx;
  const locate = () => {
    leftPx = element.getBoundingClientRect().left;
  };
  const middle = () => {
    const all = [...fingers.values()];
    return {
      x: all.reduce((sum, f) => sum + f.x, 0) / all.length,
      y: all.reduce((sum, f) => sum + f.y, 0) / all.length,
    };
  };
  const spread = () => {
    const [a, b] = [...fingers.values()];
    return a && b ? Math.max(12, Math.abs(a.x - b.x)) : 0;
  };
  const begin = () => {
    const { x, y } = middle();
    start = { view: target.view(), x, y, spreadPx: spread() };
    lastY = y;
  };
  const settleSoon = () => {
    window.clearTimeout(settleTimer);
    settleTimer = window.setTimeout(target.settle, SETTLE_AFTER_MS);
  };

  const down = (event: PointerEvent) => {
    if (event.button !== 0) return;
    locate();
    fingers.set(event.pointerId, { x: localX(event.clientX), y: event.clientY });
    begin();
  };
  const move = (event: PointerEvent) => {
    const finger = fingers.get(event.pointerId);
    if (!finger || !start) return;
    finger.x = localX(event.clientX);
    finger.y = event.clientY;
    const at = middle();
    if (!isDragging && fingers.size === 1 && Math.hypot(at.x - start.x, at.y - start.y) < DRAG_FROM_PX) return;
    if (!isDragging) {
      isDragging = true;
      element.setPointerCapture(event.pointerId);
      element.dataset['dragging'] = 'true';
    }
    target.show(moved(start, at, spread(), target));
    if (event.pointerType === 'mouse') target.scrollBy(lastY - at.y);
    lastY = at.y;
  };
  const up = (event: PointerEvent) => {
    if (!fingers.delete(event.pointerId)) return;
    if (fingers.size > 0) {
      begin();
      return;
    }
    start = null;
    if (!isDragging) return;
    delete element.dataset['dragging'];
    target.settle();
    // The click that ends a drag comes right after this event; it must not pick anything.
    window.setTimeout(() => {
      isDragging = false;
    }, 0);
  };
  const click = (event: MouseEvent) => {
    if (isDragging) event.stopPropagation();
  };
  const wheel = (event: WheelEvent) => {
    event.preventDefault();
    locate();
    const unit = event.deltaMode === WheelEvent.DOM_DELTA_LINE ? LINE_WHEEL_PX : 1;
    const isSideways = event.shiftKey || Math.abs(event.deltaX) > Math.abs(event.deltaY);
    const view = target.view();
    const width = target.widthPx();
    if (isSideways) {
      const byPx = (event.deltaX || event.deltaY) * unit;
      target.show(panView(view, (byPx / width) * (view.toMs - view.fromMs), target.limits()));
    } else {
      const anchor = xToTime(view, width, localX(event.clientX));
      target.show(zoomView(view, Math.exp(event.deltaY * unit * WHEEL_ZOOM_PER_PX), anchor, target.limits()));
    }
    settleSoon();
  };

  element.addEventListener('pointerdown', down);
  element.addEventListener('pointermove', move);
  element.addEventListener('pointerup', up);
  element.addEventListener('pointercancel', up);
  element.addEventListener('click', click, true);
  element.addEventListener('wheel', wheel, { passive: false });
  return () => {
    window.clearTimeout(settleTimer);
    element.removeEventListener('pointerdown', down);
    element.removeEventListener('pointermove', move);
    element.removeEventListener('pointerup', up);
    element.removeEventListener('pointercancel', up);
    element.removeEventListener('click', click, true);
    element.removeEventListener('wheel', wheel);
  };
}

function moved(
  start: { view: Interval; x: number; spreadPx: number },
  at: Finger,
  spreadPx: number,
  target: GestureTarget,
): Interval {
  const width = target.widthPx();
  const span = start.view.toMs - start.view.fromMs;
  if (start.spreadPx === 0 || spreadPx === 0) {
    return panView(start.view, (-(at.x - start.x) / width) * span, target.limits());
  }
  // The instant that lay between the fingers stays between them.
  const anchor = xToTime(start.view, width, start.x);
  const zoomed = zoomView(start.view, start.spreadPx / spreadPx, anchor, target.limits());
  const byMs = (-(at.x - start.x) / width) * (zoomed.toMs - zoomed.fromMs);
  return clampView({ fromMs: zoomed.fromMs + byMs, toMs: zoomed.toMs + byMs }, target.limits());
}
