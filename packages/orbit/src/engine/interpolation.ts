/** Eight-point interpolation as polynomials: each interval between two samples gets its own, found once, used by every station. */

export const POINTS = 8;
const HALF = POINTS / 2;
/** Numbers of one interval: eight powers, three axes. */
export const INTERVAL_NUMBERS = 3 * POINTS;
/** Samples wanted before and after an interval's own two. */
export const SAMPLES_AROUND = 3;

/**
 * For a window that begins `behind` samples before the interval: row by row, what each sample contributes to each power of
 * the distance from the interval's middle. Built from Lagrange's basis by multiplying out its factors.
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
      const root = other - behind - 0.5;
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

/** The outer half of each row of the table for the window in the middle: even powers are mirrored, odd ones mirrored with a minus. */
const MIDDLE = Float64Array.from({ length: POINTS * HALF }, (_, at) => {
  const power = Math.floor(at / HALF);
  return TABLES[SAMPLES_AROUND]![power * POINTS + (at % HALF)]!;
});

/**
 * Writes the polynomial of the interval after sample `interval`: lowest power first, three axes side by side, in the distance
 * from the interval's middle (-0.5 to 0.5). Near the ends of the samples the window stays inside them.
 */
export function writeIntervalPowers(samples: Float64Array, interval: number, out: Float64Array): void {
  const count = samples.length / 3;
  const first = Math.max(0, Math.min(interval - SAMPLES_AROUND, count - POINTS));
  const at = INTERVAL_NUMBERS * interval;
  if (interval - first === SAMPLES_AROUND) writeMiddle(samples, 3 * first, out, at);
  else writeAny(samples, 3 * first, { table: TABLES[interval - first]!, out, at });
}

/** The usual case at half the work: pairs of samples as far before as behind the middle are added, and subtracted. */
function writeMiddle(samples: Float64Array, from: number, out: Float64Array, at: number): void {
  for (let axis = 0; axis < 3; axis += 1) {
    const place = from + axis;
    const a = samples[place]!;
    const b = samples[place + 3]!;
    const c = samples[place + 6]!;
    const d = samples[place + 9]!;
    const e = samples[place + 12]!;
    const f = samples[place + 15]!;
    const g = samples[place + 18]!;
    const h = samples[place + 21]!;
    const a1 = a + h;
    const b1 = b + g;
    const c1 = c + f;
    const d1 = d + e;
    const a2 = a - h;
    const b2 = b - g;
    const c2 = c - f;
    const d2 = d - e;
    for (let row = 0; row < POINTS * HALF; row += POINTS) {
      const target = at + axis + 3 * (row / HALF);
      out[target] = MIDDLE[row]! * a1 + MIDDLE[row + 1]! * b1 + MIDDLE[row + 2]! * c1 + MIDDLE[row + 3]! * d1;
      out[target + 3] = MIDDLE[row + 4]! * a2 + MIDDLE[row + 5]! * b2 + MIDDLE[row + 6]! * c2 + MIDDLE[row + 7]! * d2;
    }
  }
}

function writeAny(
  samples: Float64Array,
  from: number,
  to: { table: Float64Array; out: Float64Array; at: number },
): void {
  const { table, out, at } = to;
  for (let power = 0; power < POINTS; power += 1) {
    for (let axis = 0; axis < 3; axis += 1) {
      let sum = 0;
      for (let sample = 0; sample < POINTS; sample += 1) {
        sum += table[power * POINTS + sample]! * samples[from + 3 * sample + axis]!;
      }
      out[at + 3 * power + axis] = sum;
    }
  }
}
