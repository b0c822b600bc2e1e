/** The humps themselves. Every state has a shape or a pattern of its own; colour only comes on top. */
import { type CurveFrame, type CurvePoints, curveBetween, statedPart } from '../curve.js';
import { baseLinePx, type PlacedRow } from '../rows.js';
import type { BoardHump } from '../tide-board-types.js';
import { type Brush, STROKE } from './brush.js';
import { LAND_FADE_PX } from './patterns.js';

const BAR_GAP_PX = 5;
const BOLLARD = { width: 4.4, height: 7.5 } as const;

/** Frame of a row for `curveBetween`. */
export function frameOf(brush: Brush, row: PlacedRow): CurveFrame {
  return { x: brush.x, baseY: baseLinePx(row, brush.layout.measures), humpPx: brush.layout.measures.humpPx };
}

/** The antenna's horizon under a pass, as land that fades out at both ends. */
export function paintLand(brush: Brush, row: PlacedRow, hump: BoardHump): void {
  const { ctx, palette, patterns } = brush;
  const { profile } = hump;
  const frame = frameOf(brush, row);
  const points = curveBetween(profile, frame, profile.fromMs, profile.toMs);
  traceDown(ctx, points, points.lands, frame.baseY);
  ctx.fillStyle = palette.land;
  ctx.fill();
  ctx.fillStyle = patterns.landFade;
  for (const [x, y, turn] of [
    [points.xs[0], points.lands[0], 1],
    [points.xs.at(-1), points.lands.at(-1), -1],
  ] as [number, number, 1 | -1][]) {
    ctx.save();
    ctx.translate(x, 0);
    ctx.scale(turn, 1);
    ctx.fillRect(-LAND_FADE_PX, y, LAND_FADE_PX, frame.baseY - y);
    ctx.restore();
  }
}

/** Warm paper and two posts with pennants, under a picked pass. */
export function paintPosts(brush: Brush, row: PlacedRow, hump: BoardHump): void {
  const { ctx, palette, layout } = brush;
  const { fromMs, toMs } = statedPart(hump);
  const x0 = brush.x(fromMs);
  const x1 = brush.x(toMs);
  const top = row.topPx + 2;
  const bottom = row.topPx + layout.measures.rowPx - 1;
  ctx.fillStyle = palette.brassWash;
  ctx.fillRect(x0, top, x1 - x0, bottom - top);
  for (const [x, lean] of [[x0, 1] as const, [x1, -1] as const]) {
    ctx.strokeStyle = palette.ink;
    ctx.lineWidth = 1.5;
    ctx.beginPath();
    ctx.moveTo(x, top);
    ctx.lineTo(x, bottom);
    ctx.stroke();
    ctx.beginPath();
    ctx.moveTo(x, top);
    ctx.lineTo(x + lean * 8, top);
    ctx.lineTo(x + lean * 5.4, top + 3.5);
    ctx.lineTo(x + lean * 8, top + 7);
    ctx.lineTo(x, top + 7);
    ctx.closePath();
    ctx.fillStyle = palette.brass;
    ctx.fill();
    ctx.lineWidth = 1;
    ctx.stroke();
  }
}

/** A pass in its state. Gives back its points from AOS to LOS for the words. */
export function paintHump(brush: Brush, row: PlacedRow, hump: BoardHump, isPicked: boolean): CurvePoints {
  const { ctx, palette } = brush;
  const frame = frameOf(brush, row);
  const whole = curveBetween(hump.profile, frame, hump.aosMs, hump.losMs);
  const part = statedPart(hump);
  const isPart = hump.part !== undefined;
  const points = isPart ? curveBetween(hump.profile, frame, part.fromMs, part.toMs) : whole;
  if (isPart) paintOpenWater(brush, whole, palette.shoalWash, STROKE.curve);
  if (hump.state === 'forSale') {
    const [fill, width] = isPicked ? [palette.sheet, STROKE.picked] : [palette.shoalWash, STROKE.curve];
    paintOpenWater(brush, points, fill, width);
  } else if (hump.state === 'held') paintHeld(brush, points);
  else if (hump.state === 'asked') paintAsked(brush, points, frame.baseY);
  else if (hump.state === 'berth' || hump.state === 'underWay') paintBerth(brush, points, frame.baseY);
  else if (hump.state === 'done') paintDone(brush, points, frame.baseY);
  else paintDotted(brush, points);
  if (hump.reason?.refused) paintRefusedRing(ctx, palette.buoy, palette.paper, middleX(points), frame.baseY - 9);
  return whole;
}

function middleX(points: CurvePoints): number {
  return ((points.xs[0] ?? 0) + (points.xs.at(-1) ?? 0)) / 2;
}

function paintOpenWater(brush: Brush, points: CurvePoints, fill: string, widthPx: number): void {
  const { ctx, palette } = brush;
  traceWater(ctx, points);
  ctx.fillStyle = fill;
  ctx.fill();
  strokeCurve(ctx, points, palette.deep, widthPx);
}

function paintHeld(brush: Brush, points: CurvePoints): void {
  const { ctx, palette } = brush;
  traceWater(ctx, points);
  ctx.fillStyle = palette.brassWash;
  ctx.fill();
  ctx.setLineDash([4.5, 3]);
  ctx.strokeStyle = palette.brassInk;
  ctx.lineWidth = STROKE.curve;
  ctx.stroke();
  ctx.setLineDash([]);
}

function paintAsked(brush: Brush, points: CurvePoints, baseY: number): void {
  const { ctx, palette } = brush;
  const left = points.xs[0] as number;
  const right = points.xs.at(-1) as number;
  ctx.save();
  traceWater(ctx, points);
  ctx.fillStyle = palette.sheet;
  ctx.fill();
  ctx.clip();
  ctx.strokeStyle = palette.deep;
  ctx.lineWidth = 1.1;
  ctx.beginPath();
  for (let x = left + BAR_GAP_PX / 2; x < right; x += BAR_GAP_PX) {
    ctx.moveTo(x, baseY - brush.layout.measures.humpPx);
    ctx.lineTo(x, baseY);
  }
  ctx.stroke();
  ctx.restore();
  traceWater(ctx, points);
  ctx.strokeStyle = palette.deep;
  ctx.lineWidth = STROKE.curve;
  ctx.stroke();
  ctx.setLineDash([7, 4]);
  quay(brush, left - 2, right + 2, baseY, STROKE.quay);
  ctx.setLineDash([]);
}

function paintBerth(brush: Brush, points: CurvePoints, baseY: number): void {
  const { ctx, palette } = brush;
  const left = points.xs[0] as number;
  const right = points.xs.at(-1) as number;
  traceDown(ctx, points, points.lands, baseY);
  ctx.fillStyle = palette.foot;
  ctx.fill();
  traceWater(ctx, points);
  ctx.fillStyle = palette.deep;
  ctx.fill();
  quay(brush, left - 2, right + 2, baseY, STROKE.quay);
  ctx.fillStyle = palette.ink;
  for (const x of [left - 2, right + 2 - BOLLARD.width]) {
    ctx.fillRect(x, baseY + 5.2 - BOLLARD.height, BOLLARD.width, BOLLARD.height);
  }
}

function paintDone(brush: Brush, points: CurvePoints, baseY: number): void {
  const { ctx, palette } = brush;
  traceDown(ctx, points, points.lands, baseY);
  ctx.fillStyle = palette.slateFoot;
  ctx.fill();
  traceWater(ctx, points);
  ctx.fillStyle = palette.slate;
  ctx.fill();
  quay(brush, (points.xs[0] as number) - 2, (points.xs.at(-1) as number) + 2, baseY, STROKE.thinQuay);
}

function paintDotted(brush: Brush, points: CurvePoints): void {
  const { ctx, palette } = brush;
  ctx.lineCap = 'round';
  ctx.setLineDash([0.1, 3.4]);
  strokeCurve(ctx, points, palette.ink3, 1.8);
  ctx.setLineDash([]);
  ctx.lineCap = 'butt';
}

function quay(brush: Brush, left: number, right: number, baseY: number, widthPx: number): void {
  const { ctx, palette } = brush;
  ctx.strokeStyle = palette.ink;
  ctx.lineWidth = widthPx;
  ctx.beginPath();
  ctx.moveTo(left, baseY + 3.5);
  ctx.lineTo(right, baseY + 3.5);
  ctx.stroke();
}

function paintRefusedRing(ctx: CanvasRenderingContext2D, colour: string, ground: string, x: number, y: number): void {
  ctx.beginPath();
  ctx.arc(x, y, 6.6, 0, 2 * Math.PI);
  ctx.fillStyle = ground;
  ctx.fill();
  ctx.strokeStyle = colour;
  ctx.lineWidth = 1.8;
  ctx.moveTo(x - 4.4, y + 4.4);
  ctx.lineTo(x + 4.4, y - 4.4);
  ctx.stroke();
}

/** The water between curve and land: where the land is higher, it has no height. */
function traceWater(ctx: CanvasRenderingContext2D, points: CurvePoints): void {
  const { xs, tops, lands } = points;
  ctx.beginPath();
  for (let at = 0; at < xs.length; at += 1) {
    const y = Math.min(tops[at] as number, lands[at] as number);
    if (at === 0) ctx.moveTo(xs[at] as number, y);
    else ctx.lineTo(xs[at] as number, y);
  }
  for (let at = xs.length - 1; at >= 0; at -= 1) ctx.lineTo(xs[at] as number, lands[at] as number);
  ctx.closePath();
}

function traceDown(ctx: CanvasRenderingContext2D, points: CurvePoints, tops: readonly number[], baseY: number): void {
  ctx.beginPath();
  ctx.moveTo(points.xs[0] as number, baseY);
  for (let at = 0; at < points.xs.length; at += 1) ctx.lineTo(points.xs[at] as number, tops[at] as number);
  ctx.lineTo(points.xs.at(-1) as number, baseY);
  ctx.closePath();
}

/** The curve where it stands above the land. */
function strokeCurve(ctx: CanvasRenderingContext2D, points: CurvePoints, colour: string, widthPx: number): void {
  ctx.beginPath();
  let isDown = false;
  for (let at = 0; at < points.xs.length; at += 1) {
    const isSeen = (points.tops[at] as number) <= (points.lands[at] as number) + 0.3;
    if (isSeen && isDown) ctx.lineTo(points.xs[at] as number, points.tops[at] as number);
    else if (isSeen) ctx.moveTo(points.xs[at] as number, points.tops[at] as number);
    isDown = isSeen;
  }
  ctx.strokeStyle = colour;
  ctx.lineWidth = widthPx;
  ctx.lineJoin = 'round';
  ctx.stroke();
}
