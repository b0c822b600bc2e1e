/**
 * Where the words of a row stand so that none lies over another: inside the hump, above it, at its right, at its left,
 * else shortened, else left to the pointer card.
 */

/** A rectangle in px. */
export interface Box {
  readonly x0: number;
  readonly y0: number;
  readonly x1: number;
  readonly y1: number;
}

/** A line of text with its measured width. */
export interface LabelLine {
  readonly text: string;
  readonly widthPx: number;
  /** The line that stays when there is no room for all. */
  readonly keep?: boolean;
}

/** What one hump would like to say. */
export interface LabelWish {
  readonly id: string;
  /** Higher goes first. */
  readonly rank: number;
  /** The hump itself; its own words may lie over it. */
  readonly body: Box;
  readonly apexX: number;
  /** Place for one line inside the hump, as far as it has one. */
  readonly inside: { readonly line: LabelLine; readonly box: Box } | null;
  readonly lines: readonly LabelLine[];
  /** Where words of so many lines beside the hump may begin: its flank at that depth, right (1) or left (-1). */
  readonly flankX: (lines: number, side: 1 | -1) => number;
}

/** One line put in its place; `x` is its left edge, `y` the middle of its height. */
export interface PlacedLine {
  readonly humpId: string;
  readonly text: string;
  readonly x: number;
  readonly y: number;
  readonly isInside: boolean;
}

export const LINE_PX = 13;
const GAP_PX = 3;
const SIDE_GAP_PX = 5;

/** Places the words of one row. `taken` are plates and blocks that no word may cover. */
export function placeLabels(wishes: readonly LabelWish[], bounds: Box, taken: readonly Box[]): PlacedLine[] {
  const placed: PlacedLine[] = [];
  const words: Box[] = [...taken];
  const order = [...wishes].sort((a, b) => b.rank - a.rank);
  // What lies inside a hump has no other place, so it is settled for all before anything beside a hump.
  const isIn = new Set<string>();
  for (const wish of order) {
    if (!wish.inside || words.some((box) => overlaps(box, wish.inside?.box as Box))) continue;
    words.push(wish.inside.box);
    isIn.add(wish.id);
    placed.push(lineAt(wish.id, wish.inside.line.text, wish.inside.box, true));
  }
  for (const wish of order) {
    const others = wishes.filter((other) => other.id !== wish.id).map((other) => other.body);
    const lines = isIn.has(wish.id) || !wish.inside ? wish.lines : [...wish.lines, { ...wish.inside.line, keep: true }];
    const stack = firstFit(wish, lines, bounds, [...words, ...others]) ?? firstFit(wish, lines, bounds, words);
    for (const { line, box } of stack ?? []) {
      words.push(box);
      placed.push(lineAt(wish.id, line.text, box, false));
    }
  }
  return placed;
}

interface Stacked {
  readonly line: LabelLine;
  readonly box: Box;
}

function firstFit(wish: LabelWish, all: readonly LabelLine[], bounds: Box, taken: readonly Box[]): Stacked[] | null {
  if (all.length === 0) return [];
  const kept = all.filter((line) => line.keep);
  for (const lines of kept.length > 0 && kept.length < all.length ? [all, kept] : [all]) {
    for (const stack of candidates(wish, lines)) {
      if (stack.every(({ box }) => within(box, bounds) && !taken.some((other) => overlaps(box, other)))) return stack;
    }
  }
  return null;
}

function candidates(wish: LabelWish, lines: readonly LabelLine[]): Stacked[][] {
  const heightPx = lines.length * LINE_PX;
  const aboveTop = wish.body.y0 - GAP_PX - heightPx;
  const sideTop = Math.min(wish.body.y0 - 1, wish.body.y1 - heightPx);
  return [
    stackLines(lines, aboveTop, (widthPx) => wish.apexX - widthPx / 2),
    stackLines(lines, sideTop, () => wish.flankX(lines.length, 1) + SIDE_GAP_PX),
    stackLines(lines, sideTop, (widthPx) => wish.flankX(lines.length, -1) - SIDE_GAP_PX - widthPx),
  ];
}

function stackLines(lines: readonly LabelLine[], topPx: number, leftOf: (widthPx: number) => number): Stacked[] {
  return lines.map((line, at) => {
    const x0 = leftOf(line.widthPx);
    const y0 = topPx + at * LINE_PX;
    return { line, box: { x0, y0, x1: x0 + line.widthPx, y1: y0 + LINE_PX } };
  });
}

function lineAt(humpId: string, text: string, box: Box, isInside: boolean): PlacedLine {
  return { humpId, text, x: box.x0, y: (box.y0 + box.y1) / 2, isInside };
}

/** Whether two boxes share any area. */
export function overlaps(a: Box, b: Box): boolean {
  return a.x0 < b.x1 && b.x0 < a.x1 && a.y0 < b.y1 && b.y0 < a.y1;
}

function within(box: Box, bounds: Box): boolean {
  return box.x0 >= bounds.x0 && box.x1 <= bounds.x1 && box.y0 >= bounds.y0 && box.y1 <= bounds.y1;
}
