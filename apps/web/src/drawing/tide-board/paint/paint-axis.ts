/** The time axis: labels, the scale bar of a chart, the plate of now and the plate of what is picked. */
import { dayOfYear, formatCalendarDay, formatHourMinute, formatTime } from '../../../ui/format.js';
import { axisStep, DAY_MS, multiplesInView } from '../view.js';
import { type Brush, FONT, plate, textWidth } from './brush.js';

/** Height of the axis in px. */
export const AXIS_PX = 46;
const BAR_TOP_PX = 36;
const BAR_PX = 6;
const LABEL_Y_PX = 23;
const PLATE = { top: 8, height: 22 } as const;

/** A picked stretch to bracket on the axis. */
export interface AxisMark {
  readonly fromMs: number;
  readonly toMs: number;
}

interface Taken {
  readonly x0: number;
  readonly x1: number;
}

/** Draws the whole axis. */
export function paintAxis(brush: Brush, marks: readonly AxisMark[]): void {
  const { ctx, widthPx } = brush;
  ctx.clearRect(0, 0, widthPx, AXIS_PX);
  ctx.textBaseline = 'middle';
  paintBar(brush);
  const taken: Taken[] = [nowSpan(brush)].filter((span) => span !== null);
  const visible = marks.filter((mark) => mark.toMs > brush.view.fromMs && mark.fromMs < brush.view.toMs);
  for (const mark of visible) paintMark(brush, mark, taken);
  paintLabels(brush, taken);
  paintNowPlate(brush);
}

function paintBar(brush: Brush): void {
  const { ctx, palette, view, widthPx } = brush;
  const { barMs } = axisStep(view, widthPx);
  ctx.fillStyle = palette.sheet;
  ctx.fillRect(0.5, BAR_TOP_PX + 0.5, widthPx - 1, BAR_PX - 1);
  ctx.fillStyle = palette.ink;
  for (const atMs of multiplesInView(view, barMs)) {
    if (Math.round(atMs / barMs) % 2 !== 0) continue;
    const x0 = Math.max(0, brush.x(atMs));
    const x1 = Math.min(widthPx, brush.x(atMs + barMs));
    if (x1 > x0) ctx.fillRect(x0, BAR_TOP_PX, x1 - x0, BAR_PX);
  }
  ctx.strokeStyle = palette.ink;
  ctx.lineWidth = 1;
  ctx.strokeRect(0.5, BAR_TOP_PX + 0.5, widthPx - 1, BAR_PX - 1);
}

function paintLabels(brush: Brush, taken: Taken[]): void {
  const { ctx, palette, view, widthPx } = brush;
  const { labelMs } = axisStep(view, widthPx);
  ctx.textAlign = 'center';
  // Strong labels first: where room is short the full hour or the day stays.
  const marks = multiplesInView(view, labelMs).map((atMs) => ({ atMs, isStrong: isStrong(atMs, labelMs) }));
  for (const { atMs, isStrong: strong } of marks.sort((a, b) => Number(b.isStrong) - Number(a.isStrong))) {
    const text = labelText(atMs, labelMs);
    const font = strong ? FONT.axisStrong : FONT.axis;
    const half = textWidth(ctx, font, text) / 2;
    const x = brush.x(atMs);
    const isInside = x - half >= 0 && x + half <= widthPx;
    if (!isInside || taken.some((span) => x + half + 6 > span.x0 && x - half - 6 < span.x1)) continue;
    taken.push({ x0: x - half, x1: x + half });
    ctx.font = font;
    ctx.fillStyle = strong ? palette.ink : palette.ink2;
    ctx.fillText(text, x, LABEL_Y_PX);
  }
}

function isStrong(atMs: number, labelMs: number): boolean {
  if (labelMs >= DAY_MS) return false;
  if (labelMs >= 3_600_000) return atMs % DAY_MS === 0;
  return labelMs < 60_000 ? atMs % 60_000 === 0 : atMs % 3_600_000 === 0;
}

function labelText(atMs: number, labelMs: number): string {
  const [weekday = '', day = ''] = formatCalendarDay(atMs).split(' ');
  if (labelMs >= DAY_MS) return `${dayOfYear(atMs)}, ${weekday} ${day}`;
  if (atMs % DAY_MS === 0) return `Day ${dayOfYear(atMs)}`;
  return labelMs < 60_000 ? formatTime(atMs) : formatHourMinute(atMs);
}

function nowSpan(brush: Brush): (Taken & { x: number; width: number }) | null {
  const { ctx, view, nowMs, widthPx } = brush;
  if (nowMs < view.fromMs || nowMs > view.toMs) return null;
  const width = textWidth(ctx, FONT.plate, formatTime(nowMs)) + 18;
  const x = Math.min(Math.max(brush.x(nowMs) - width / 2, 1), widthPx - width - 1);
  return { x0: x, x1: x + width, x, width };
}

function paintNowPlate(brush: Brush): void {
  const { ctx, palette, nowMs } = brush;
  const span = nowSpan(brush);
  if (!span) return;
  const tip = brush.x(nowMs);
  plate(ctx, {
    x: span.x,
    y: PLATE.top,
    width: span.width,
    height: PLATE.height,
    fill: palette.brass,
    edge: palette.ink,
  });
  ctx.beginPath();
  ctx.moveTo(tip - 6, PLATE.top + PLATE.height - 0.5);
  ctx.lineTo(tip + 6, PLATE.top + PLATE.height - 0.5);
  ctx.lineTo(tip, BAR_TOP_PX + 1);
  ctx.closePath();
  ctx.fillStyle = palette.brass;
  ctx.fill();
  ctx.fillRect(tip - 1.2, BAR_TOP_PX, 2.4, AXIS_PX - BAR_TOP_PX);
  ctx.font = FONT.plate;
  ctx.textAlign = 'left';
  ctx.fillStyle = palette.plateInk;
  ctx.fillText(formatTime(nowMs), span.x + 9, PLATE.top + PLATE.height / 2 + 0.5);
}

/** A bracket over the scale bar from AOS to LOS, and its times on a plate above. */
function paintMark(brush: Brush, mark: AxisMark, taken: Taken[]): void {
  const { ctx, palette, widthPx } = brush;
  const x0 = brush.x(mark.fromMs);
  const x1 = brush.x(mark.toMs);
  ctx.strokeStyle = palette.ink;
  ctx.lineWidth = 1.5;
  ctx.beginPath();
  ctx.moveTo(x0, AXIS_PX);
  ctx.lineTo(x0, BAR_TOP_PX - 4);
  ctx.lineTo(x1, BAR_TOP_PX - 4);
  ctx.lineTo(x1, AXIS_PX);
  ctx.stroke();
  const text = `${formatTime(mark.fromMs)} to ${formatTime(mark.toMs)}`;
  const width = textWidth(ctx, FONT.plate, text) + 18;
  const x = Math.min(Math.max((x0 + x1) / 2 - width / 2, 1), widthPx - width - 1);
  if (taken.some((span) => x + width + 4 > span.x0 && x - 4 < span.x1)) return;
  taken.push({ x0: x, x1: x + width });
  plate(ctx, { x, y: PLATE.top, width, height: PLATE.height, fill: palette.brassWash, edge: palette.ink });
  ctx.font = FONT.plate;
  ctx.textAlign = 'left';
  ctx.fillStyle = palette.ink;
  ctx.fillText(text, x + 9, PLATE.top + PLATE.height / 2 + 0.5);
}
