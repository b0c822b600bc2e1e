/** Atomic time and UTC. TAI - UTC in whole seconds since 1972, from the IERS list; TT and GPS time hang on TAI. */

/** First UTC second of each step (seconds since 1970) and TAI - UTC from then on. IERS list, valid to 2026-06-28. */
const STEPS: readonly (readonly [fromUtcS: number, taiMinusUtcS: number])[] = [
  [63_072_000, 10],
  [78_796_800, 11],
  [94_694_400, 12],
  [126_230_400, 13],
  [157_766_400, 14],
  [189_302_400, 15],
  [220_924_800, 16],
  [252_460_800, 17],
  [283_996_800, 18],
  [315_532_800, 19],
  [362_793_600, 20],
  [394_329_600, 21],
  [425_865_600, 22],
  [489_024_000, 23],
  [567_993_600, 24],
  [631_152_000, 25],
  [662_688_000, 26],
  [709_948_800, 27],
  [741_484_800, 28],
  [773_020_800, 29],
  [820_454_400, 30],
  [867_715_200, 31],
  [915_148_800, 32],
  [1_136_073_600, 33],
  [1_230_768_000, 34],
  [1_341_100_800, 35],
  [1_435_708_800, 36],
  [1_483_228_800, 37],
];

/** TT - TAI in seconds, by definition (IAU 1991). */
const TT_MINUS_TAI_S = 32.184;
/** TAI - GPS time in seconds, by definition of GPS time. */
const TAI_MINUS_GPS_S = 19;

export type TimeSystem = 'UTC' | 'TAI' | 'TT' | 'GPS';
export const TIME_SYSTEMS: readonly TimeSystem[] = ['UTC', 'TAI', 'TT', 'GPS'];

/** TAI - UTC in seconds at a UTC instant; 10 before 1972, where steps were not whole seconds. */
export function taiMinusUtcS(utcMs: number): number {
  return STEPS.findLast(([fromUtcS]) => utcMs >= fromUtcS * 1000)?.[1] ?? 10;
}

/** Reads a clock of the given system, written as if it were UTC milliseconds, into UTC milliseconds. */
export function toUtcMs(clockMs: number, system: TimeSystem): number {
  if (system === 'UTC') return clockMs;
  const taiMs = clockMs + taiAheadS(system) * 1000;
  const step = STEPS.findLast(([fromUtcS, offsetS]) => taiMs >= (fromUtcS + offsetS) * 1000);
  return taiMs - (step?.[1] ?? 10) * 1000;
}

/** What the clock of a system shows at a UTC instant, written as if it were UTC milliseconds. */
export function fromUtcMs(utcMs: number, system: TimeSystem): number {
  return system === 'UTC' ? utcMs : utcMs + (taiMinusUtcS(utcMs) - taiAheadS(system)) * 1000;
}

function taiAheadS(system: Exclude<TimeSystem, 'UTC'>): number {
  if (system === 'TT') return -TT_MINUS_TAI_S;
  return system === 'GPS' ? TAI_MINUS_GPS_S : 0;
}

/** Terrestrial Time in Julian centuries since J2000.0 at a UTC instant: the argument of precession and nutation. */
export function ttCenturies(utcMs: number): number {
  return (utcMs / 1000 + taiMinusUtcS(utcMs) + TT_MINUS_TAI_S - 946_728_000) / (86_400 * 36_525);
}
