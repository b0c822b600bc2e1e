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
const LEAST_SPREAD_PX = 12;
const SETTLE_AFTER_MS = 180;
const WHEEL_ZOOM_PER_PX = 0.0016;
const LINE_WHEEL_PX = 16;

interface Finger {
  x: number;
  y: number;
}

interface DragStart {
  readonly view: Interval;
  readonly x: number;
  readonly y: number;
  readonly spreadPx: number;
}

/** Listens on an element until the returned function is called. */
export function attachGestures(element: HTMLElement, target: GestureTarget): () => void {
  const gestures = new Gestures(element, target);
  const stop = new AbortController();
  const { signal } = stop;
  element.addEventListener('pointerdown', (event) => gestures.down(event), { signal });
  element.addEventListener('pointermove', (event) => gestures.move(event), { signal });
  element.addEventListener('pointerup', (event) => gestures.up(event), { signal });
  element.addEventListener('pointercancel', (event) => gestures.up(event), { signal });
  element.addEventListener('click', (event) => gestures.click(event), { signal, capture: true });
  element.addEventListener('wheel', (event) => gestures.wheel(event), { signal, passive: false });
  return () => {
    stop.abort();
    gestures.dispose();
  };
}

class Gestures {
  private readonly fingers = new Map<number, Finger>();
  private start: DragStart | null = null;
  private lastY = 0;
  private leftPx = 0;
  private isDragging = false;
  private settleTimer = 0;

  constructor(
    private readonly element: HTMLElement,
    private readonly target: GestureTarget,
  ) {}

  down(event: PointerEvent): void {
    if (event.button !== 0) return;
    this.locate();
    this.fingers.set(event.pointerId, { x: event.clientX - this.leftPx, y: event.clientY });
    this.begin();
  }

  move(event: PointerEvent): void {
    const finger = this.fingers.get(event.pointerId);
    const { start } = this;
    if (!finger || !start) return;
    finger.x = event.clientX - this.leftPx;
    finger.y = event.clientY;
    const at = this.middle();
    if (!this.isDragging) {
      const isStill = this.fingers.size === 1 && Math.hypot(at.x - start.x, at.y - start.y) < DRAG_FROM_PX;
      if (isStill) return;
      this.isDragging = true;
      this.element.setPointerCapture(event.pointerId);
      this.element.dataset['dragging'] = 'true';
    }
    this.target.show(draggedView(start, at.x, this.spread(), this.target));
    if (event.pointerType === 'mouse') this.target.scrollBy(this.lastY - at.y);
    this.lastY = at.y;
  }

  up(event: PointerEvent): void {
    if (!this.fingers.delete(event.pointerId)) return;
    if (this.fingers.size > 0) {
      this.begin();
      return;
    }
    this.start = null;
    if (!this.isDragging) return;
    delete this.element.dataset['dragging'];
    this.target.settle();
    // The click that ends a drag comes right after this event; it must not pick anything.
    window.setTimeout(() => {
      this.isDragging = false;
    }, 0);
  }

  click(event: MouseEvent): void {
    if (this.isDragging) event.stopPropagation();
  }

  wheel(event: WheelEvent): void {
    event.preventDefault();
    this.locate();
    const { target } = this;
    const unit = event.deltaMode === WheelEvent.DOM_DELTA_LINE ? LINE_WHEEL_PX : 1;
    const view = target.view();
    const widthPx = target.widthPx();
    if (event.shiftKey || Math.abs(event.deltaX) > Math.abs(event.deltaY)) {
      const byPx = (event.deltaX || event.deltaY) * unit;
      target.show(panView(view, (byPx / widthPx) * (view.toMs - view.fromMs), target.limits()));
    } else {
      const anchorMs = xToTime(view, widthPx, event.clientX - this.leftPx);
      target.show(zoomView(view, Math.exp(event.deltaY * unit * WHEEL_ZOOM_PER_PX), anchorMs, target.limits()));
    }
    window.clearTimeout(this.settleTimer);
    this.settleTimer = window.setTimeout(target.settle, SETTLE_AFTER_MS);
  }

  dispose(): void {
    window.clearTimeout(this.settleTimer);
  }

  private begin(): void {
    const { x, y } = this.middle();
    this.start = { view: this.target.view(), x, y, spreadPx: this.spread() };
    this.lastY = y;
  }

  /** Asked once for a gesture: asking for each move would lay out the page each time. */
  private locate(): void {
    this.leftPx = this.element.getBoundingClientRect().left;
  }

  private middle(): Finger {
    const all = [...this.fingers.values()];
    const mean = (axis: 'x' | 'y') => all.reduce((sum, finger) => sum + finger[axis], 0) / all.length;
    return { x: mean('x'), y: mean('y') };
  }

  private spread(): number {
    const [a, b] = [...this.fingers.values()];
    return a && b ? Math.max(LEAST_SPREAD_PX, Math.abs(a.x - b.x)) : 0;
  }
}

/** The view after dragging from a start to `atX`, with one finger or, when both spreads are known, with two. */
export function draggedView(
  start: Pick<DragStart, 'view' | 'x' | 'spreadPx'>,
  atX: number,
  spreadPx: number,
  target: Pick<GestureTarget, 'widthPx' | 'limits'>,
): Interval {
  const widthPx = target.widthPx();
  const span = start.view.toMs - start.view.fromMs;
  if (start.spreadPx === 0 || spreadPx === 0) {
    return panView(start.view, (-(atX - start.x) / widthPx) * span, target.limits());
  }
  // The instant that lay between the fingers stays between them.
  const anchorMs = xToTime(start.view, widthPx, start.x);
  const zoomed = zoomView(start.view, start.spreadPx / spreadPx, anchorMs, target.limits());
  const byMs = (-(atX - start.x) / widthPx) * (zoomed.toMs - zoomed.fromMs);
  return clampView({ fromMs: zoomed.fromMs + byMs, toMs: zoomed.toMs + byMs }, target.limits());
}
