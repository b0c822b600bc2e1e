/** Eight-point interpolation as polynomials: each interval between two samples gets its own, found once, used by every station. */

export const POINTS = 8;
/** Numbers of one interval: eight powers, three axes. */
export const INTERVAL_NUMBERS = 3 * POINTS;
/** Samples wanted before and after an interval's own two. */
export const SAMPLES_AROUND = 3;

/**
 * For a window that begins `behind` samples before the interval: row by row, what each sample contributes to each power of
 * the place inside the interval (0 to 1). Built from Lagrange's basis by multiplying out its factors.
 */
function powersOfWindow(behind: number): Float64Array {
  const table = new Float64Array(POINTS * POINTS);
  for (let sample = 0; sample < POINTS; sample += 1) {
    const basis = new Float64Array(POINTS);
    basis[0] = 1;
    let degree = 0;
    let scale = 1;
    for (let other = 0; other < POINTS; other += 1) {
      if (other === sample) continue;
      const root = other - behind;
      for (let power = degree + 1; power > 0; power -= 1) basis[power] = basis[power - 1]! - root * basis[power]!;
      basis[0] = -root * basis[0]!;
      degree += 1;
      scale *= sample - other;
    }
    for (let power = 0; power < POINTS; power += 1) table[power * POINTS + sample] = basis[power]! / scale;
  }
  return table;
}

const TABLES: readonly Float64Array[] = Array.from({ length: POINTS }, (_, behind) => powersOfWindow(behind));

/**
 * Writes the polynomial of the interval after sample `interval`: lowest power first, three axes side by side. Near the ends
 * of the samples the window stays inside them.
 */
export function writeIntervalPowers(samples: Float64Array, interval: number, out: Float64Array): void {
  const count = samples.length / 3;
  const first = Math.max(0, Math.min(interval - SAMPLES_AROUND, count - POINTS));
  const table = TABLES[interval - first]!;
  const from = 3 * first;
  const at = INTERVAL_NUMBERS * interval;
  for (let power = 0; power < POINTS; power += 1) {
    let x = 0;
    let y = 0;
    let z = 0;
    for (let sample = 0; sample < POINTS; sample += 1) {
      const weight = table[power * POINTS + sample]!;
      const place = from + 3 * sample;
      x += weight * samples[place]!;
      y += weight * samples[place + 1]!;
      z += weight * samples[place + 2]!;
    }
    out[at + 3 * power] = x;
    out[at + 3 * power + 1] = y;
    out[at + 3 * power + 2] = z;
  }
}
