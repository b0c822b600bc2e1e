/** How far the Earth has turned. UTC is taken as UT1: the two differ by under 0.9 s, 0.0038 degrees of turn. */

const DAY_MS = 86_400_000;
const TURN_RAD = 2 * Math.PI;
/** 2000-01-01T12:00:00, the instant that the polynomial counts from. */
const J2000_MS = 946_728_000_000;
const DAYS_PER_CENTURY = 36_525;
const SECONDS_PER_DAY = 86_400;

/**
 * Rate of change of the sidereal time below, rad/s: one turn a day and what the polynomial's linear term adds. It belongs
 * to TEME, whose x axis moves with the mean equinox; WGS84's 7.292115e-5 is the turn against the stars.
 */
export const EARTH_TURN_RAD_PER_S =
  (TURN_RAD * (1 + 8_640_184.812866 / (SECONDS_PER_DAY * DAYS_PER_CENTURY))) / SECONDS_PER_DAY;

/**
 * Greenwich mean sidereal time, IAU 1982, in radians, 0 to 2 pi: the angle from TEME to Earth axes. Whole turns are taken
 * off before the small terms are added, so that a date far from 2000 loses no digits. Source: AIAA 2006-6753, appendix C;
 * Aoki and others 1982.
 */
export function gmstRad(timeMs: number): number {
  const days = (timeMs - J2000_MS) / DAY_MS;
  const centuries = days / DAYS_PER_CENTURY;
  const secondsBeyondTurns =
    67_310.54841 + (8_640_184.812866 + (0.093104 - 6.2e-6 * centuries) * centuries) * centuries;
  const turns = days - Math.floor(days) + secondsBeyondTurns / SECONDS_PER_DAY;
  return (turns - Math.floor(turns)) * TURN_RAD;
}
