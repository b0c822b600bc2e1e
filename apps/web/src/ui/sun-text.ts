import { formatDegrees } from './format.js';

/** How near the pass comes to the Sun, or that the Sun is down all along. */
export const sunText = ({ closestDeg }: { readonly closestDeg: number | null }): string =>
  closestDeg === null ? 'Sun is down' : formatDegrees(closestDeg);

/** Whether the dish would look into the Sun. */
export const isNearSun = (sun: { readonly closestDeg: number | null; readonly keepOffDeg: number }): boolean =>
  sun.closestDeg !== null && sun.closestDeg < sun.keepOffDeg;
