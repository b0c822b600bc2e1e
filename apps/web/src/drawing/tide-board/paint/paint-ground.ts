/** Everything that lies under the humps: night, hours, base lines, blackouts and other people's contacts. */
import { formatHourMinute } from '../../../ui/format.js';
import { baseLinePx, type PlacedRow, type PlacedStation } from '../rows.js';
import type { BoardBlackout, OthersBlock } from '../tide-board-types.js';
import { axisStep, multiplesInView } from '../view.js';
import { type Brush, FONT, plate, STROKE, textWidth } from './brush.js';

const OTHERS_PX = 15;

/** Night paper over a station's strip and rows, with the time of its sunset. */
export function paintNights(brush: Brush, placed: PlacedStation): void {
  const { ctx, palette } = brush;
  ctx.fillStyle = palette.night;
  for (const night of placed.station.nights) {
    if (night.toMs <= brush.view.fromMs || night.fromMs >= brush.view.toMs) continue;
    const x0 = Math.max(0, brush.x(night.fromMs));
    const x1 = Math.min(brush.widthPx, brush.x(night.toMs));
    ctx.fillRect(x0, placed.topPx, x1 - x0, placed.bottomPx - placed.topPx);
  }
}

/** `sunset 15:51` and `sunrise 06:12` on the strip, where they fall into the view. */
export function paintSunMarks(brush: Brush, placed: PlacedStation): void {
  const { ctx, palette, layout, view } = brush;
  const hasRoom = view.toMs - view.fromMs < 2 * 86_400_000 && layout.measures.stripPx > 0;
  if (!hasRoom) return;
  ctx.font = FONT.axis;
  for (const night of placed.station.nights) {
    for (const [atMs, word] of [[night.fromMs, 'sunset'] as const, [night.toMs, 'sunrise'] as const]) {
      if (atMs <= view.fromMs || atMs >= view.toMs) continue;
      const text = `${word} ${formatHourMinute(atMs)}`;
      const x = brush.x(atMs);
      const fits = x + 8 + textWidth(ctx, FONT.axis, text) < brush.widthPx;
      stroke(ctx, palette.ink3, 1, x, placed.topPx, x, placed.topPx + layout.measures.stripPx);
      if (!fits) continue;
      ctx.fillStyle = palette.ink2;
      ctx.textAlign = 'left';
      ctx.fillText(text, x + 6, placed.topPx + layout.measures.stripPx / 2 + 1);
    }
  }
}

/** Upright lines at the labels of the axis: solid on the full hour or day, dotted between. */
export function paintHours(brush: Brush, topPx: number, bottomPx: number): void {
  const { ctx, palette, view, widthPx } = brush;
  const { labelMs } = axisStep(view, widthPx);
  const strongMs = labelMs >= 86_400_000 ? labelMs : labelMs >= 3_600_000 ? 86_400_000 : 3_600_000;
  for (const atMs of multiplesInView(view, labelMs)) {
    const x = Math.round(brush.x(atMs)) + 0.5;
    ctx.setLineDash(atMs % strongMs === 0 ? [] : [2, 4]);
    stroke(ctx, palette.line, 1, x, topPx, x, bottomPx);
  }
  ctx.setLineDash([]);
}

/** Rule above a station, base line under a row. */
export function paintRules(brush: Brush, stations: readonly PlacedStation[], rows: readonly PlacedRow[]): void {
  const { ctx, palette, layout } = brush;
  for (const row of rows) {
    const y = Math.round(baseLinePx(row, layout.measures)) + 0.5;
    stroke(ctx, palette.line, 1, 0, y, brush.widthPx, y);
  }
  for (const station of stations) {
    const y = Math.round(station.topPx) + 0.5;
    stroke(ctx, palette.ink3, 1, 0, y, brush.widthPx, y);
  }
}

/** A flat block of slanted lines: taken, by somebody whose curve is nobody's business. */
export function paintOthersBlock(brush: Brush, row: PlacedRow, block: OthersBlock): void {
  const { ctx, palette, layout } = brush;
  const x0 = brush.x(block.fromMs);
  const width = Math.max(2, brush.x(block.toMs) - x0);
  const y = baseLinePx(row, layout.measures) - OTHERS_PX;
  fillPattern(ctx, brush.patterns.slant, x0, y, width, OTHERS_PX);
  ctx.strokeStyle = palette.ink3;
  ctx.lineWidth = 1;
  ctx.strokeRect(x0 + 0.5, y + 0.5, Math.max(1, width - 1), OTHERS_PX - 1);
}

/** Top of the block above, for words that must not cover it. */
export function othersTopPx(row: PlacedRow, brush: Brush): number {
  return baseLinePx(row, brush.layout.measures) - OTHERS_PX;
}

/** Woven ground over a row. */
export function paintBlackout(brush: Brush, row: PlacedRow, blackout: BoardBlackout): void {
  const { ctx, palette, layout } = brush;
  const x0 = Math.max(-2, brush.x(blackout.fromMs));
  const x1 = Math.min(brush.widthPx + 2, brush.x(blackout.toMs));
  const y = row.topPx + layout.measures.headroomPx + 6;
  const height = baseLinePx(row, layout.measures) - y;
  // The weave is fixed to the row and to the blackout's own start, so that it moves along when panned.
  fillPattern(ctx, brush.patterns.weave, x0, y, x1 - x0, height, brush.x(blackout.fromMs) % 12);
  ctx.strokeStyle = palette.weave;
  ctx.lineWidth = 1;
  ctx.strokeRect(x0 + 0.5, y + 0.5, Math.max(1, x1 - x0 - 1), height - 1);
}

/** Reason and end of a blackout on plates; gives back the boxes that they cover. */
export function paintBlackoutWords(brush: Brush, row: PlacedRow, blackout: BoardBlackout) {
  const { ctx, palette, layout, view } = brush;
  const left = Math.max(4, brush.x(blackout.fromMs) + 8);
  const right = Math.min(brush.widthPx - 4, brush.x(blackout.toMs) - 6);
  const middleY = (row.topPx + layout.measures.headroomPx + 6 + baseLinePx(row, layout.measures)) / 2;
  const covered: { x0: number; y0: number; x1: number; y1: number }[] = [];
  const reasonWidth = textWidth(ctx, FONT.word, blackout.reason) + 18;
  ctx.font = FONT.word;
  ctx.textAlign = 'left';
  if (right - left < reasonWidth) return covered;
  const x = Math.min(right - reasonWidth, left + Math.max(0, (right - left) * 0.18));
  plate(ctx, { x, y: middleY - 11, width: reasonWidth, height: 22, fill: palette.sheet, edge: palette.weave });
  ctx.fillStyle = palette.ink;
  ctx.fillText(blackout.reason, x + 9, middleY + 0.5);
  covered.push({ x0: x - 2, y0: middleY - 12, x1: x + reasonWidth + 2, y1: middleY + 12 });
  const till = `till ${formatHourMinute(blackout.toMs)}`;
  const tillWidth = textWidth(ctx, FONT.word, till) + 8;
  const endsInView = blackout.toMs < view.toMs;
  if (endsInView && right - tillWidth > x + reasonWidth + 8) {
    ctx.fillStyle = palette.paper;
    ctx.fillRect(right - tillWidth, middleY - 9, tillWidth, 18);
    ctx.fillStyle = palette.ink;
    ctx.fillText(till, right - tillWidth + 4, middleY + 0.5);
    covered.push({ x0: right - tillWidth, y0: middleY - 9, x1: right, y1: middleY + 9 });
  }
  return covered;
}

/** The brass line of now, with a hairline of ink beside it for the eye that doesn't see brass on paper. */
export function paintNow(brush: Brush, topPx: number, bottomPx: number): void {
  const { ctx, palette, view, nowMs } = brush;
  if (nowMs < view.fromMs || nowMs > view.toMs) return;
  const x = Math.round(brush.x(nowMs));
  stroke(ctx, palette.ink, 0.7, x + 1.6, topPx, x + 1.6, bottomPx);
  stroke(ctx, palette.brass, STROKE.now, x, topPx, x, bottomPx);
}

function fillPattern(
  ctx: CanvasRenderingContext2D,
  pattern: CanvasPattern,
  x: number,
  y: number,
  width: number,
  height: number,
  shiftX = x,
): void {
  ctx.save();
  ctx.beginPath();
  ctx.rect(x, y, width, height);
  ctx.clip();
  ctx.translate(shiftX, y);
  ctx.fillStyle = pattern;
  ctx.fillRect(x - shiftX, 0, width, height);
  ctx.restore();
}

function stroke(
  ctx: CanvasRenderingContext2D,
  colour: string,
  widthPx: number,
  x0: number,
  y0: number,
  x1: number,
  y1: number,
): void {
  ctx.strokeStyle = colour;
  ctx.lineWidth = widthPx;
  ctx.beginPath();
  ctx.moveTo(x0, y0);
  ctx.lineTo(x1, y1);
  ctx.stroke();
}
