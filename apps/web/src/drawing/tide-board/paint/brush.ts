/** What every painter of the board is handed: the canvas, the colours, and where time and rows lie on it. */
import type { Tokens } from '../../../theme/tokens.js';
import { canvasFont } from '../../common/palette.js';
import type { RowLayout } from '../rows.js';
import type { Interval } from '../tide-board-types.js';
import type { Patterns } from './patterns.js';

/** A canvas ready to be painted on; its y is the field's own y, whatever part of the field it shows. */
export interface Brush {
  readonly ctx: CanvasRenderingContext2D;
  readonly palette: Tokens;
  readonly patterns: Patterns;
  readonly view: Interval;
  readonly widthPx: number;
  readonly layout: RowLayout;
  readonly nowMs: number;
  /** Horizontal place of an instant. */
  readonly x: (atMs: number) => number;
}

/** Strokes in px. */
export const STROKE = { hair: 1, curve: 1.7, picked: 2.6, now: 2.4, quay: 3.4, thinQuay: 1.6 } as const;

/** Fonts of the board: nothing below 12 px, so that it reads across a control room. */
export const FONT = {
  short: canvasFont(12, 600),
  word: canvasFont(12, 600),
  price: canvasFont(13, 800),
  axis: canvasFont(12, 500),
  axisStrong: canvasFont(13, 800),
  plate: canvasFont(12.5, 800),
} as const;

const widths = new Map<string, number>();
const MOST_WIDTHS = 4000;

/** Width of a text, remembered: measuring is the slowest part of a frame. */
export function textWidth(ctx: CanvasRenderingContext2D, font: string, text: string): number {
  const key = `${font}|${text}`;
  const known = widths.get(key);
  if (known !== undefined) return known;
  if (widths.size > MOST_WIDTHS) widths.clear();
  ctx.font = font;
  const width = ctx.measureText(text).width;
  widths.set(key, width);
  return width;
}

/** Forget measured widths: the font has just arrived. */
export function forgetTextWidths(): void {
  widths.clear();
}

/** A rectangle with round corners and text in its middle: plates on the axis and on blackouts. */
export function plate(
  ctx: CanvasRenderingContext2D,
  at: { x: number; y: number; width: number; height: number; fill: string; edge: string; edgeWidth?: number },
): void {
  ctx.beginPath();
  ctx.roundRect(at.x, at.y, at.width, at.height, 3);
  ctx.fillStyle = at.fill;
  ctx.fill();
  ctx.lineWidth = at.edgeWidth ?? 1.3;
  ctx.strokeStyle = at.edge;
  ctx.stroke();
}
