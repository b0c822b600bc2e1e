/** Joins the scene to React: gives it sizes, data and gestures, and tells React only when the view has come to rest. */
import {
  type RefObject,
  startTransition,
  useCallback,
  useEffect,
  useLayoutEffect,
  useMemo,
  useRef,
  useState,
} from 'react';
import { readPalette, useRepaintCount } from '../common/palette.js';
import { attachGestures } from './gestures.js';
import { indexHumps } from './hump-index.js';
import { layOutRows, MEASURES, rowsBetween } from './rows.js';
import { BoardScene, type SceneInput } from './scene.js';
import type { Interval, TideBoardProps } from './tide-board-types.js';
import { clampView, timeToX, zoomView } from './view.js';

/** Rows kept in the page above and below the visible ones. */
const ROWS_BEYOND = 8;

/** Elements that the scene needs. */
export interface BoardElements {
  readonly scroller: RefObject<HTMLDivElement | null>;
  readonly field: RefObject<HTMLDivElement | null>;
  readonly moving: RefObject<HTMLDivElement | null>;
  readonly canvas: RefObject<HTMLCanvasElement | null>;
  readonly axis: RefObject<HTMLCanvasElement | null>;
}

/** Everything the board's parts need from the scene. */
export function useBoardScene(props: TideBoardProps, elements: BoardElements) {
  const data = useBoardData(props);
  const { layout, index, pickedIds } = data;
  const repaints = useRepaintCount();
  const [scene, setScene] = useState<BoardScene | null>(null);
  const [settled, setSettled] = useState<Interval>(() => clampView(props.view, props.limits));
  const [widthPx, setWidthPx] = useState(0);
  const [range, setRange] = useState<readonly [number, number]>([0, 30]);
  const latest = useRef(props);
  latest.current = props;

  useLayoutEffect(() => {
    const { canvas, axis } = elements;
    if (!canvas.current || !axis.current) return;
    const made = new BoardScene(canvas.current, axis.current, clampView(latest.current.view, latest.current.limits));
    setScene(made);
    const before = () => made.draw();
    window.addEventListener('beforeprint', before);
    return () => {
      window.removeEventListener('beforeprint', before);
      made.dispose();
    };
  }, [elements]);

  const settle = useCallback(() => {
    if (!scene) return;
    // The picture is there already; buttons and table may follow a little later, without holding up a frame.
    const { view } = scene;
    startTransition(() => setSettled(view));
    startTransition(() => latest.current.onViewChange(view));
  }, [scene]);

  const show = useCallback((view: Interval) => scene?.setView(view), [scene]);

  useEffect(() => {
    if (!scene) return;
    const asked = clampView({ fromMs: props.view.fromMs, toMs: props.view.toMs }, latest.current.limits);
    if (asked.fromMs === scene.view.fromMs && asked.toMs === scene.view.toMs) return;
    scene.setView(asked);
    setSettled(asked);
  }, [scene, props.view.fromMs, props.view.toMs]);

  // biome-ignore lint/correctness/useExhaustiveDependencies: the palette is read again on each repaint of the scheme
  const palette = useMemo(() => {
    const element = elements.field.current ?? document.documentElement;
    return readPalette(element);
  }, [scene, repaints, elements]);

  const { nowMs } = props;
  useLayoutEffect(() => scene?.setInput({ ...data, nowMs, palette }), [scene, data, nowMs, palette]);

  useSizes(scene, elements, setWidthPx, layout, setRange);
  useGestures(scene, elements, show, settle, latest);

  useEffect(() => {
    if (!scene) return;
    scene.onDrawn(() => carryAlong(elements.moving.current, scene, settled));
    carryAlong(elements.moving.current, scene, settled);
  }, [scene, settled, elements]);

  const zoomBy = useCallback(
    (factor: number) => {
      if (!scene) return;
      scene.setView(zoomView(scene.view, factor, zoomAnchor(scene.view, latest.current), latest.current.limits));
      settle();
    },
    [scene, settle],
  );
  return { scene, layout, index, pickedIds, settled, widthPx, range, show, settle, zoomBy };
}

/** What the scene draws, made anew only when its part of the props changes. */
function useBoardData(props: TideBoardProps): Omit<SceneInput, 'nowMs' | 'palette'> {
  const { stations, humps, blackouts, othersBlocks, variant = 'wide' } = props;
  const layout = useMemo(() => layOutRows(stations, MEASURES[variant]), [stations, variant]);
  const index = useMemo(() => indexHumps(humps), [humps]);
  const blackoutsByRow = useMemo(() => byRow(blackouts ?? []), [blackouts]);
  const othersByRow = useMemo(() => byRow(othersBlocks ?? []), [othersBlocks]);
  const pickedKey = (props.pickedIds ?? []).join('\n');
  const pickedIds = useMemo(() => new Set(pickedKey === '' ? [] : pickedKey.split('\n')), [pickedKey]);
  const bubbleId = props.bubble?.humpId ?? null;
  return useMemo(
    () => ({ layout, index, blackoutsByRow, othersByRow, pickedIds, bubbleId }),
    [layout, index, blackoutsByRow, othersByRow, pickedIds, bubbleId],
  );
}

/** Buttons zoom about what is picked, else about now when it is in view, else about the middle. */
function zoomAnchor(view: Interval, props: TideBoardProps): number {
  const picked = props.humps.find((hump) => hump.id === props.pickedIds?.[0]);
  const wished = picked ? (picked.aosMs + picked.losMs) / 2 : props.nowMs;
  return wished > view.fromMs && wished < view.toMs ? wished : (view.fromMs + view.toMs) / 2;
}

/** While dragging, the DOM parts follow the drawing by one transform; while zooming they step aside. */
function carryAlong(moving: HTMLElement | null, scene: BoardScene, settled: Interval): void {
  if (!moving) return;
  const sameSpan = Math.abs(scene.view.toMs - scene.view.fromMs - (settled.toMs - settled.fromMs)) < 1;
  const shiftPx = sameSpan ? timeToX(scene.view, scene.widthPx, settled.fromMs) : 0;
  moving.style.transform = shiftPx === 0 ? '' : `translateX(${shiftPx}px)`;
  // Not hidden: that would take the focus away from the pass that zooms by keys.
  moving.style.opacity = sameSpan ? '' : '0';
}

function useSizes(
  scene: BoardScene | null,
  elements: BoardElements,
  setWidthPx: (px: number) => void,
  layout: ReturnType<typeof layOutRows>,
  setRange: (update: (old: readonly [number, number]) => readonly [number, number]) => void,
): void {
  useLayoutEffect(() => {
    const field = elements.field.current;
    const scroller = elements.scroller.current;
    if (!scene || !field || !scroller) return;
    const findRange = () => {
      const [first, end] = rowsBetween(layout, scroller.scrollTop, scroller.scrollTop + scroller.clientHeight);
      const wanted = [Math.max(0, first - ROWS_BEYOND), Math.min(layout.rows.length, end + ROWS_BEYOND)] as const;
      // Changes in steps, so that scrolling doesn't render for each row passed.
      setRange((old) =>
        old[0] <= first && old[1] >= Math.min(end, layout.rows.length) && old[1] <= layout.rows.length ? old : wanted,
      );
    };
    const measure = () => {
      scene.setSize(field.clientWidth, scroller.clientHeight);
      scene.setScroll(scroller.scrollTop);
      setWidthPx(field.clientWidth);
      findRange();
    };
    const scrolled = () => {
      scene.setScroll(scroller.scrollTop);
      findRange();
    };
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(field);
    observer.observe(scroller);
    scroller.addEventListener('scroll', scrolled, { passive: true });
    return () => {
      observer.disconnect();
      scroller.removeEventListener('scroll', scrolled);
    };
  }, [scene, elements, layout, setWidthPx, setRange]);
}

function useGestures(
  scene: BoardScene | null,
  elements: BoardElements,
  show: (view: Interval) => void,
  settle: () => void,
  latest: RefObject<TideBoardProps>,
): void {
  useEffect(() => {
    const field = elements.field.current;
    if (!scene || !field) return;
    return attachGestures(field, {
      view: () => scene.view,
      widthPx: () => scene.widthPx,
      limits: () => latest.current.limits,
      show,
      settle,
      scrollBy: (px) => elements.scroller.current?.scrollBy(0, px),
    });
  }, [scene, elements, show, settle, latest]);
}

function byRow<T extends { readonly rowId: string }>(list: readonly T[]): Map<string, T[]> {
  const map = new Map<string, T[]>();
  for (const one of list) {
    const known = map.get(one.rowId);
    if (known) known.push(one);
    else map.set(one.rowId, [one]);
  }
  return map;
}
