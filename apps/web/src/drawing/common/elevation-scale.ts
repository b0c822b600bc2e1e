/** Stretch of elevations near the horizon, where masks matter. The exponent is a choice of drawing, not of physics. */
const STRETCH = 0.58;

/** Share of the full height, 0 to 1, at which an elevation in degrees is drawn; below the horizon it is 0. */
export function elevationShare(elevationDeg: number): number {
  if (!(elevationDeg > 0)) return 0;
  return Math.min(1, elevationDeg / 90) ** STRETCH;
}
