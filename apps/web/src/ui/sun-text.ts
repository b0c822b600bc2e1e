import { formatDegrees } from './format.js';

/** The antenna's axis never comes near a Sun that is down; the angle given for it is the whole half circle. */
const SUN_DOWN_DEG = 180;

/** How near the pass comes to the Sun, or that the Sun is down there. */
export const sunText = ({ closestDeg }: { readonly closestDeg: number }): string =>
  closestDeg >= SUN_DOWN_DEG ? 'Sun is down' : formatDegrees(closestDeg);
