/**
 * Geometry of the rose shared by sky plot and mask editor: north up, east right as on a chart seen from above, zenith in
 * the middle. Elevation runs evenly from the rim (0°) to the middle (90°).
 */

/** A point of a drawing, in px; y grows downwards. */
export interface Point {
  readonly x: number;
  readonly y: number;
}

/** Where the rose stands. */
export interface Rose {
  readonly centreX: number;
  readonly centreY: number;
  readonly radiusPx: number;
}

/** A direction in the sky. */
export interface Direction {
  readonly azimuthDeg: number;
  readonly elevationDeg: number;
}

const RADIAN = Math.PI / 180;

/** Place of a direction on the rose; below the horizon it lies outside the rim. */
export function toPoint(rose: Rose, azimuthDeg: number, elevationDeg: number): Point {
  return atDistance(rose, azimuthDeg, rose.radiusPx * (1 - elevationDeg / 90));
}

/** Place at a distance from the middle, in px. */
export function atDistance(rose: Rose, azimuthDeg: number, distancePx: number): Point {
  const angle = azimuthDeg * RADIAN;
  return { x: rose.centreX + distancePx * Math.sin(angle), y: rose.centreY - distancePx * Math.cos(angle) };
}

/** The direction at a place: azimuth from 0 up to 360, elevation at most 90. */
export function toDirection(rose: Rose, point: Point): Direction {
  const dx = point.x - rose.centreX;
  const dy = rose.centreY - point.y;
  const azimuthDeg = (Math.atan2(dx, dy) / RADIAN + 360) % 360;
  return { azimuthDeg, elevationDeg: 90 * (1 - Math.hypot(dx, dy) / rose.radiusPx) };
}

/** An SVG path through points. */
export function pathThrough(points: readonly Point[], isClosed = false): string {
  const text = points.map(({ x, y }, index) => `${index === 0 ? 'M' : 'L'}${x.toFixed(2)} ${y.toFixed(2)}`).join(' ');
  return isClosed ? `${text} Z` : text;
}

/** Mask elevation at an azimuth: straight between neighbours, joined across north; 0 without points. */
export function maskElevationAt(mask: readonly Direction[], azimuthDeg: number): number {
  const sorted = [...mask].sort((a, b) => a.azimuthDeg - b.azimuthDeg);
  const first = sorted[0];
  const last = sorted.at(-1);
  if (!first || !last) return 0;
  const after = sorted.find((point) => point.azimuthDeg >= azimuthDeg);
  const before = sorted.findLast((point) => point.azimuthDeg < azimuthDeg);
  const from = before ?? { ...last, azimuthDeg: last.azimuthDeg - 360 };
  const to = after ?? { ...first, azimuthDeg: first.azimuthDeg + 360 };
  const width = to.azimuthDeg - from.azimuthDeg;
  if (width <= 0) return to.elevationDeg;
  return from.elevationDeg + ((azimuthDeg - from.azimuthDeg) / width) * (to.elevationDeg - from.elevationDeg);
}

/** Outline of a mask, a point each degree, so that its straight lines in azimuth curve as they do in the sky. */
export function maskOutline(rose: Rose, mask: readonly Direction[], raisedDeg = 0): Point[] {
  const azimuths = new Set(Array.from({ length: 360 }, (_, azimuthDeg) => azimuthDeg));
  for (const point of mask) azimuths.add(point.azimuthDeg % 360);
  return [...azimuths]
    .sort((a, b) => a - b)
    .map((azimuthDeg) => toPoint(rose, azimuthDeg, Math.max(0, maskElevationAt(mask, azimuthDeg)) + raisedDeg));
}

/** A ring sector between two distances and two azimuths, as an SVG path: pieces of the rim, bars outside it. */
export function sectorPath(rose: Rose, fromDeg: number, toDeg: number, innerPx: number, outerPx: number): string {
  const large = toDeg - fromDeg > 180 ? 1 : 0;
  const [a, b] = [atDistance(rose, fromDeg, outerPx), atDistance(rose, toDeg, outerPx)];
  const [c, d] = [atDistance(rose, toDeg, innerPx), atDistance(rose, fromDeg, innerPx)];
  const arc = (radius: number, sweep: 0 | 1, to: Point) =>
    `A${radius.toFixed(2)} ${radius.toFixed(2)} 0 ${large} ${sweep} ${to.x.toFixed(2)} ${to.y.toFixed(2)}`;
  return `M${a.x.toFixed(2)} ${a.y.toFixed(2)} ${arc(outerPx, 1, b)} L${c.x.toFixed(2)} ${c.y.toFixed(2)} ${arc(innerPx, 0, d)} Z`;
}
