/** Names, prices, words and countdowns of one row, placed so that none lies over another. */
import { formatCountdown } from '../../../ui/format.js';
import { apexOf, type CurvePoints, openWater } from '../curve.js';
import { type Box, type LabelLine, type LabelWish, LINE_PX, placeLabels } from '../labels.js';
import { baseLinePx, type PlacedRow } from '../rows.js';
import type { BoardHump, HumpState } from '../tide-board-types.js';
import { type Brush, FONT, textWidth } from './brush.js';

/** A hump with its drawn points. */
export interface DrawnHump {
  readonly hump: BoardHump;
  readonly points: CurvePoints;
  readonly isPicked: boolean;
  /** Says nothing: the plate of a blackout speaks for it. */
  readonly isMute: boolean;
}

const RANKS: Readonly<Record<HumpState, number>> = {
  underWay: 90,
  held: 80,
  asked: 70,
  berth: 60,
  forSale: 50,
  done: 40,
  taken: 20,
  notForSale: 10,
};
const PICKED_RANK = 100;
const STATE_WORDS: Partial<Record<HumpState, string>> = {
  berth: 'yours',
  done: 'done',
  asked: 'asked',
  underWay: 'live',
};
/** Prices and countdowns may lean over the flanks a little: a halo keeps them readable there. */
const LEAN_PX = 3;

/** Places and writes the words of a row. */
export function paintWords(brush: Brush, row: PlacedRow, drawn: readonly DrawnHump[], taken: readonly Box[]): void {
  const { ctx, layout, widthPx } = brush;
  const bounds = {
    x0: 2,
    y0: row.topPx + layout.measures.headroomPx + 1,
    x1: widthPx - 2,
    y1: row.topPx + layout.measures.rowPx,
  };
  const wishes = drawn.map((one) => wishOf(brush, row, { ...one, points: seenPoints(one.points, widthPx) }));
  const byId = new Map(drawn.map((one) => [one.hump.id, one]));
  ctx.textAlign = 'left';
  for (const line of placeLabels(wishes, bounds, taken)) {
    const one = byId.get(line.humpId);
    if (!one) continue;
    const isName = line.text === one.hump.spacecraftShort;
    ctx.font = isName || isQuiet(one.hump) ? FONT.short : FONT.price;
    if (line.isInside && !isSolid(one.hump)) {
      ctx.lineJoin = 'round';
      ctx.lineWidth = 3;
      ctx.strokeStyle = groundOf(brush, one);
      ctx.strokeText(line.text, line.x, line.y + 0.5);
    }
    ctx.fillStyle = colourOf(brush, one, line.isInside, isName);
    ctx.fillText(line.text, line.x, line.y + 0.5);
  }
}

/** The points in view, so that a pass wider than the view still has its words where they can be read. */
function seenPoints(points: CurvePoints, widthPx: number): CurvePoints {
  const { xs } = points;
  if ((xs[0] as number) >= 0 && (xs.at(-1) as number) <= widthPx) return points;
  const first = xs.findIndex((x) => x >= 0);
  const last = xs.findLastIndex((x) => x <= widthPx);
  if (first < 0 || last <= first) return points;
  const cut = (values: readonly number[]) => values.slice(first, last + 1);
  return { xs: cut(xs), tops: cut(points.tops), lands: cut(points.lands) };
}

function isSolid({ state }: BoardHump): boolean {
  return state === 'berth' || state === 'underWay' || state === 'done';
}

function isQuiet(hump: BoardHump): boolean {
  return hump.state === 'notForSale' || hump.state === 'taken';
}

function groundOf({ palette }: Brush, one: DrawnHump): string {
  if (one.hump.state === 'held') return palette.brassWash;
  return one.isPicked ? palette.sheet : palette.shoalWash;
}

function colourOf(brush: Brush, one: DrawnHump, isInside: boolean, isName: boolean): string {
  const { palette } = brush;
  const { state } = one.hump;
  if (isInside && isSolid(one.hump)) return palette.berthInk;
  if (state === 'held') return isInside ? palette.ink : palette.brassInk;
  if (state === 'underWay' && !isName) return palette.deep;
  if (isName) return one.isPicked ? palette.ink : palette.ink2;
  return isQuiet(one.hump) ? palette.ink2 : palette.ink;
}

/** The strong line of a hump: its countdown, price or word. */
function strongText(brush: Brush, hump: BoardHump): string | null {
  if (hump.state === 'held' && hump.holdEndsMs !== undefined) return formatCountdown(hump.holdEndsMs - brush.nowMs);
  if (hump.state === 'forSale') return hump.priceLabel ?? null;
  return STATE_WORDS[hump.state] ?? hump.reason?.word ?? null;
}

function wishOf(brush: Brush, row: PlacedRow, one: DrawnHump): LabelWish {
  const { ctx, layout } = brush;
  const { hump, points } = one;
  const apex = apexOf(points);
  const baseY = baseLinePx(row, layout.measures);
  const strong = one.isMute ? null : strongText(brush, hump);
  const strongLine = strong
    ? { text: strong, widthPx: textWidth(ctx, isQuiet(hump) ? FONT.short : FONT.price, strong), keep: true }
    : null;
  const name = { text: hump.spacecraftShort, widthPx: textWidth(ctx, FONT.short, hump.spacecraftShort) };
  const inside =
    strongLine && !isQuiet(hump) && hump.state !== 'asked' ? insideOf(points, apex.y, strongLine, isSolid(hump)) : null;
  const lines: LabelLine[] = isQuiet(hump) ? [] : [name];
  if (strongLine && !inside) lines.push(strongLine);
  return {
    id: hump.id,
    rank: one.isPicked ? PICKED_RANK : RANKS[hump.state],
    body: { x0: points.xs[0] as number, y0: apex.y, x1: points.xs.at(-1) as number, y1: baseY },
    apexX: apex.x,
    inside,
    lines,
    flankX: (count, side) => {
      if (one.isPicked) return (side === 1 ? points.xs.at(-1) : points.xs[0]) as number;
      return flankX(points, Math.min(apex.y + count * LINE_PX, baseY - 1), apex.x, side);
    },
  };
}

/** The lowest place inside the hump where the line fits between the curve's flanks and above the land. */
function insideOf(points: CurvePoints, apexY: number, line: LabelLine, isStrict: boolean): LabelWish['inside'] {
  const lowestLand = Math.max(...points.lands);
  const leanPx = isStrict ? -4 : LEAN_PX;
  for (const lift of [0, 4, 8]) {
    const bottom = lowestLand - lift + 1;
    const top = bottom - LINE_PX;
    if (top - 1 < apexY) return null;
    const water = openWater(points, isStrict ? top + 1 : top + LINE_PX / 2, bottom - 5);
    if (!water || water[1] - water[0] < line.widthPx - leanPx) continue;
    const x0 = (water[0] + water[1] - line.widthPx) / 2;
    return { line, box: { x0, y0: top, x1: x0 + line.widthPx, y1: bottom } };
  }
  return null;
}

/** Where the curve's flank crosses a height, seen from the top outwards. */
function flankX(points: CurvePoints, y: number, apexX: number, side: 1 | -1): number {
  let reach = apexX;
  for (let at = 0; at < points.xs.length; at += 1) {
    const x = points.xs[at] as number;
    if ((points.tops[at] as number) <= y && (x - apexX) * side > (reach - apexX) * side) reach = x;
  }
  return reach;
}
