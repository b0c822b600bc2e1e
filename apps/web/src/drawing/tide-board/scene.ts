/**
 * The moving picture of the board: owns the two canvases and draws at most once per frame. It lives outside React, so
 * that panning costs a drawing and nothing else.
 */

import type { Tokens } from '../../theme/tokens.js';
import { formatNumber } from '../../ui/format.js';
import { statedPart } from './curve.js';
import { type HumpIndex, humpsBetween, sellableMinutesByDay } from './hump-index.js';
import type { Box } from './labels.js';
import { type Brush, FONT, forgetTextWidths, textWidth } from './paint/brush.js';
import { AXIS_PX, paintAxis } from './paint/paint-axis.js';
import { CLOSE_UP_FROM_PX, paintCloseUp } from './paint/paint-close-up.js';
import {
  othersTopPx,
  paintBlackout,
  paintBlackoutWords,
  paintHours,
  paintNights,
  paintNow,
  paintOthersBlock,
  paintRules,
  paintSunMarks,
} from './paint/paint-ground.js';
import { paintHump, paintLand, paintPosts } from './paint/paint-hump.js';
import { paintTick, TICK_BELOW_PX } from './paint/paint-tick.js';
import { type DrawnHump, paintWords } from './paint/paint-words.js';
import { makePatterns, type Patterns } from './paint/patterns.js';
import { baseLinePx, type PlacedRow, type PlacedStation, type RowLayout, rowsBetween } from './rows.js';
import type { BoardBlackout, BoardHump, Interval, OthersBlock } from './tide-board-types.js';
import { DAY_MS, multiplesInView, timeToX } from './view.js';

/** Rows drawn beyond the visible ones, so that scrolling shows no gap before the next drawing. */
const OVERSCAN_PX = 220;
const LEAST_DAY_PX = 54;

/** What the scene shows; replaced as a whole when the board's props change. */
export interface SceneInput {
  readonly layout: RowLayout;
  readonly index: HumpIndex;
  readonly blackoutsByRow: ReadonlyMap<string, readonly BoardBlackout[]>;
  readonly othersByRow: ReadonlyMap<string, readonly OthersBlock[]>;
  readonly pickedIds: ReadonlySet<string>;
  /** The pass that a bubble speaks for. */
  readonly bubbleId: string | null;
  readonly nowMs: number;
  readonly palette: Tokens;
}

/** Drawing state of one board. */
export class BoardScene {
  view: Interval;
  widthPx = 0;
  private viewportPx = 0;
  private scrollPx = 0;
  private canvasTopPx = 0;
  private canvasPx = 0;
  private input: SceneInput | null = null;
  private patterns: Patterns | null = null;
  private frame = 0;
  private minutesByStation = new Map<string, Map<number, number>>();
  private afterDraw: (() => void) | null = null;

  constructor(
    private readonly canvas: HTMLCanvasElement,
    private readonly axis: HTMLCanvasElement,
    view: Interval,
  ) {
    this.view = view;
  }

  /** Called after each drawing, for the DOM parts that move along. */
  onDrawn(callback: () => void): void {
    this.afterDraw = callback;
  }

  setInput(input: SceneInput): void {
    if (this.input?.index !== input.index || this.input.layout !== input.layout) this.minutesByStation.clear();
    if (this.input?.palette !== input.palette) {
      this.patterns = null;
      forgetTextWidths();
    }
    this.input = input;
    this.requestDraw();
  }

  setView(view: Interval): void {
    this.view = view;
    this.requestDraw();
  }

  setSize(widthPx: number, viewportPx: number): void {
    this.widthPx = widthPx;
    this.viewportPx = viewportPx;
    this.patterns = null;
    this.requestDraw();
  }

  /** Draws again only when the visible rows leave what is drawn. */
  setScroll(scrollPx: number): void {
    this.scrollPx = scrollPx;
    const isDrawn = scrollPx >= this.canvasTopPx && scrollPx + this.viewportPx <= this.canvasTopPx + this.canvasPx;
    if (!isDrawn) this.requestDraw();
  }

  requestDraw(): void {
    if (this.frame === 0) this.frame = requestAnimationFrame(() => this.draw());
  }

  /** Draws at once: before printing there is no next frame. */
  draw(): void {
    cancelAnimationFrame(this.frame);
    this.frame = 0;
    const { input, widthPx } = this;
    if (!input || widthPx <= 0) return;
    const ctx = this.prepare(input);
    if (!ctx) return;
    this.patterns ??= makePatterns(ctx, input.palette, window.devicePixelRatio || 1);
    const brush = this.brush(ctx, input, this.patterns);
    this.paintRows(brush, input);
    const axisCtx = sized(this.axis, widthPx, AXIS_PX);
    if (axisCtx) paintAxis(this.brush(axisCtx, input, this.patterns), this.marks(input));
    this.afterDraw?.();
  }

  dispose(): void {
    cancelAnimationFrame(this.frame);
    this.afterDraw = null;
  }

  private brush(ctx: CanvasRenderingContext2D, input: SceneInput, patterns: Patterns): Brush {
    const { view, widthPx } = this;
    const { palette, layout, nowMs } = input;
    return { ctx, palette, patterns, layout, nowMs, view, widthPx, x: (atMs) => timeToX(view, widthPx, atMs) };
  }

  private prepare(input: SceneInput): CanvasRenderingContext2D | null {
    const { heightPx } = input.layout;
    this.canvasPx = Math.min(heightPx, this.viewportPx + 2 * OVERSCAN_PX);
    this.canvasTopPx = Math.max(0, Math.min(heightPx - this.canvasPx, Math.round(this.scrollPx) - OVERSCAN_PX));
    this.canvas.style.transform = `translateY(${this.canvasTopPx}px)`;
    const ctx = sized(this.canvas, this.widthPx, this.canvasPx);
    if (!ctx) return null;
    ctx.clearRect(0, 0, this.widthPx, this.canvasPx);
    ctx.translate(0, -this.canvasTopPx);
    ctx.textBaseline = 'middle';
    return ctx;
  }

  private paintRows(brush: Brush, input: SceneInput): void {
    const top = this.canvasTopPx;
    const bottom = top + this.canvasPx;
    const [first, end] = rowsBetween(input.layout, top, bottom);
    const rows = input.layout.rows.slice(first, end);
    const stations = input.layout.stations.filter((station) => station.bottomPx > top && station.topPx < bottom);
    for (const station of stations) paintNights(brush, station);
    paintHours(brush, top, bottom);
    paintRules(brush, stations, rows);
    for (const station of stations) {
      paintSunMarks(brush, station);
      this.paintDayMinutes(brush, input, station);
    }
    for (const row of rows) this.paintRow(brush, input, row);
    paintNow(brush, top, bottom);
  }

  private paintRow(brush: Brush, input: SceneInput, row: PlacedRow): void {
    const { view, nowMs } = brush;
    const inView = <T extends Interval>(list: readonly T[] = []) =>
      list.filter((one) => one.toMs > view.fromMs && one.fromMs < view.toMs);
    const blackouts = inView(input.blackoutsByRow.get(row.row.id));
    const others = inView(input.othersByRow.get(row.row.id));
    for (const blackout of blackouts) paintBlackout(brush, row, blackout);
    const { humps, ticks } = this.humpsOf(brush, input, row);
    for (const hump of humps) if (input.pickedIds.has(hump.id)) paintPosts(brush, row, hump);
    for (const hump of humps) paintLand(brush, row, hump);
    for (const block of others) paintOthersBlock(brush, row, block);
    const taken: Box[] = [];
    for (const block of others) {
      const y0 = othersTopPx(row, brush);
      taken.push({
        x0: brush.x(block.fromMs),
        x1: brush.x(block.toMs),
        y0,
        y1: baseLinePx(row, brush.layout.measures),
      });
    }
    if (nowMs > view.fromMs && nowMs < view.toMs) {
      const x = brush.x(nowMs);
      taken.push({ x0: x - 3, x1: x + 4, y0: row.topPx, y1: row.topPx + brush.layout.measures.rowPx });
    }
    const drawn: DrawnHump[] = humps.map((hump) => {
      const isPicked = input.pickedIds.has(hump.id);
      const isClosed = blackouts.some((one) => hump.aosMs < one.toMs && hump.losMs > one.fromMs);
      const isMute = hump.id === input.bubbleId || (hump.state === 'notForSale' && isClosed);
      return { hump, isPicked, isMute, points: paintHump(brush, row, hump, isPicked) };
    });
    taken.push(...blackouts.flatMap((blackout) => paintBlackoutWords(brush, row, blackout)));
    for (const hump of ticks) paintTick(brush, row, hump, input.pickedIds.has(hump.id));
    for (const { hump } of drawn) {
      if (brush.x(hump.losMs) - brush.x(hump.aosMs) >= CLOSE_UP_FROM_PX) taken.push(...paintCloseUp(brush, row, hump));
    }
    paintWords(brush, row, drawn, taken);
  }

  private humpsOf(brush: Brush, input: SceneInput, row: PlacedRow): { humps: BoardHump[]; ticks: BoardHump[] } {
    const list = input.index.byRow.get(row.row.id) ?? [];
    const [first, end] = humpsBetween(input.index, row.row.id, brush.view);
    const humps: BoardHump[] = [];
    const ticks: BoardHump[] = [];
    const msPerPx = (brush.view.toMs - brush.view.fromMs) / brush.widthPx;
    for (let at = first; at < end; at += 1) {
      const hump = list[at];
      if (!hump || hump.profile.toMs < brush.view.fromMs) continue;
      ((hump.losMs - hump.aosMs) / msPerPx < TICK_BELOW_PX ? ticks : humps).push(hump);
    }
    return { humps, ticks };
  }

  /** Seen from far away, a station's strip counts its sellable minutes for each day. */
  private paintDayMinutes(brush: Brush, input: SceneInput, placed: PlacedStation): void {
    const { ctx, palette, view, layout } = brush;
    const dayPx = brush.x(view.fromMs + DAY_MS) - brush.x(view.fromMs);
    const isFar = view.toMs - view.fromMs >= 2 * DAY_MS;
    if (!isFar || dayPx < LEAST_DAY_PX || layout.measures.stripPx === 0) return;
    const minutes = this.minutesOf(input, placed);
    ctx.font = FONT.short;
    ctx.textAlign = 'center';
    ctx.fillStyle = palette.ink2;
    for (const day of multiplesInView(view, DAY_MS)) {
      const count = Math.round(minutes.get(day) ?? 0);
      const text = dayPx > 90 ? `${formatNumber(count)} min for sale` : `${formatNumber(count)} min`;
      const x = brush.x(day + DAY_MS / 2);
      const half = textWidth(ctx, FONT.short, text) / 2;
      if (x - half < 2 || x + half > brush.widthPx - 2) continue;
      ctx.fillText(text, x, placed.topPx + layout.measures.stripPx / 2 + 1);
    }
  }

  private minutesOf(input: SceneInput, placed: PlacedStation): Map<number, number> {
    const known = this.minutesByStation.get(placed.station.id);
    if (known) return known;
    const rowIds = placed.station.rows.map((row) => row.id);
    const minutes = sellableMinutesByDay(input.index, rowIds);
    this.minutesByStation.set(placed.station.id, minutes);
    return minutes;
  }

  private marks(input: SceneInput): Interval[] {
    const picked = [...input.pickedIds].map((id) => input.index.byId.get(id)).filter((hump) => hump !== undefined);
    return picked.map(statedPart);
  }
}

/** Sizes a canvas for the screen's density, only when that changed: setting a canvas's size empties it. */
function sized(canvas: HTMLCanvasElement, widthPx: number, heightPx: number): CanvasRenderingContext2D | null {
  const density = window.devicePixelRatio || 1;
  const width = Math.round(widthPx * density);
  const height = Math.round(heightPx * density);
  if (canvas.width !== width || canvas.height !== height) {
    canvas.width = width;
    canvas.height = height;
    canvas.style.width = `${widthPx}px`;
    canvas.style.height = `${heightPx}px`;
  }
  const ctx = canvas.getContext('2d');
  ctx?.setTransform(density, 0, 0, density, 0, 0);
  return ctx;
}
