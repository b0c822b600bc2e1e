import { describe, expect, it } from 'vitest';
import { type Box, type LabelWish, LINE_PX, overlaps, placeLabels } from './labels.js';

const BOUNDS: Box = { x0: 0, y0: 0, x1: 900, y1: 68 };

function wish(id: string, x: number, topY: number, extra: Partial<LabelWish> = {}): LabelWish {
  return {
    id,
    rank: 50,
    body: { x0: x - 20, y0: topY, x1: x + 20, y1: 58 },
    apexX: x,
    inside: null,
    lines: [
      { text: `${id} name`, widthPx: 30 },
      { text: `${id} price`, widthPx: 34, keep: true },
    ],
    flankX: (_lines, side) => x + side * 14,
    ...extra,
  };
}

function boxesOf(placed: ReturnType<typeof placeLabels>, widthPx: number): Box[] {
  return placed.map(({ x, y }) => ({ x0: x, x1: x + widthPx, y0: y - LINE_PX / 2, y1: y + LINE_PX / 2 }));
}

describe('words on the board', () => {
  it('stand above a low hump, in the middle', () => {
    const placed = placeLabels([wish('a', 100, 40)], BOUNDS, []);
    expect(placed.map((line) => line.text)).toEqual(['a name', 'a price']);
    expect(placed[0]?.x).toBe(85);
    expect(placed[1]?.y).toBeLessThan(40);
  });

  it('stand beside a high hump, at the right, or at the left when the right is taken', () => {
    expect(placeLabels([wish('a', 100, 10)], BOUNDS, [])[0]?.x).toBeGreaterThan(114);
    const block = { x0: 110, y0: 0, x1: 300, y1: 68 };
    expect(placeLabels([wish('a', 100, 10)], BOUNDS, [block])[0]?.x).toBeLessThan(80);
  });

  it('fall back to the line that matters most, then to none', () => {
    const walls = [
      { x0: 0, y0: 0, x1: 900, y1: 20 },
      { x0: 0, y0: 25, x1: 80, y1: 68 },
      { x0: 120, y0: 25, x1: 300, y1: 68 },
    ];
    expect(placeLabels([wish('a', 100, 36)], BOUNDS, walls).map((line) => line.text)).toEqual(['a price']);
    expect(placeLabels([wish('a', 100, 40)], BOUNDS, [BOUNDS])).toEqual([]);
  });

  it('never lie over each other, nor leave the row, however crowded it is', () => {
    for (let seed = 1; seed < 60; seed += 1) {
      const wishes = Array.from({ length: 14 }, (_, at) =>
        wish(`${at}`, 30 + ((at * 61 * seed) % 840), 8 + ((at * 17 * seed) % 45), { rank: (at * 7) % 50 }),
      );
      const boxes = boxesOf(placeLabels(wishes, BOUNDS, []), 30);
      boxes.forEach((a, index) => {
        expect(a.x0 >= BOUNDS.x0 && a.y0 >= BOUNDS.y0 && a.y1 <= BOUNDS.y1).toBe(true);
        for (const b of boxes.slice(index + 1)) expect(overlaps(a, b)).toBe(false);
      });
    }
  });

  it('let the picked pass speak first', () => {
    const [first] = placeLabels([wish('low', 100, 40), wish('picked', 104, 40, { rank: 100 })], BOUNDS, []);
    expect(first?.humpId).toBe('picked');
  });

  it('move a line out of the hump when its place inside is taken', () => {
    const inside = { line: { text: '€82', widthPx: 26 }, box: { x0: 87, y0: 40, x1: 113, y1: 53 } };
    const one = wish('a', 100, 30, { inside, lines: [] });
    expect(placeLabels([one], BOUNDS, [])[0]).toMatchObject({ text: '€82', isInside: true });
    expect(placeLabels([one], BOUNDS, [inside.box])[0]).toMatchObject({ text: '€82', isInside: false });
  });
});
