/** Room the `More` button takes, with the longest page name it may show. */
const MORE_PX = 132;

/**
 * How many of the items, in order, stand in a line of `roomPx`. Where not all do, room is kept for the button with the rest;
 * one item alone behind that button would be silly only if it fitted, which is the first case.
 */
export function howManyFit(widthsPx: readonly number[], gapPx: number, roomPx: number): number {
  const whole = widthsPx.reduce((sum, width) => sum + width + gapPx, -gapPx);
  if (whole <= roomPx + 0.5) return widthsPx.length;
  let used = MORE_PX;
  let count = 0;
  for (const width of widthsPx) {
    used += width + gapPx;
    if (used > roomPx) break;
    count += 1;
  }
  return count;
}
