/**
 * From the celestial axes (GCRF, taken as ICRF) to the axes that SGP4 and this package count in (TEME).
 *
 * The reduction: frame bias and precession IAU 2006 as Fukushima-Williams angles, nutation IAU 2000B, and Greenwich
 * apparent sidereal time of the same models. TEME is defined through the Earth: it is what the sidereal time of 1982
 * turns into Earth axes, so going over the apparent sidereal time keeps the ground under the spacecraft right whatever
 * the small print of TEME says. UT1 is taken as UTC and the pole as standing still, as everywhere in this package.
 */

import { gmstRad } from '../frames/sidereal.js';
import { ttCenturies } from './leap-seconds.js';
import { NUTATION_TERMS } from './nutation-terms.js';

const ARCSECOND_RAD = Math.PI / (180 * 3600);
const TURN_RAD = 2 * Math.PI;

/** Rows of a rotation, nine numbers. */
export type Rotation = Float64Array;

/** The five Delaunay arguments in radians: Moon's and Sun's anomaly, F, elongation, node (Simon et al. 1994, linear). */
function delaunayRad(t: number): readonly number[] {
  const angles = [
    485_868.249036 + 1_717_915_923.2178 * t,
    1_287_104.79305 + 129_596_581.0481 * t,
    335_779.526232 + 1_739_527_262.8478 * t,
    1_072_260.70369 + 1_602_961_601.209 * t,
    450_160.398036 - 6_962_890.5431 * t,
  ];
  return angles.map((arcseconds) => (arcseconds % 1_296_000) * ARCSECOND_RAD);
}

/** Nutation in longitude and obliquity, radians: IAU 2000B, good to a thousandth of an arc second from 1995 to 2050. */
export function nutationRad(t: number): { longitudeRad: number; obliquityRad: number } {
  const [moon = 0, sun = 0, latitude = 0, elongation = 0, node = 0] = delaunayRad(t);
  let longitude = 0;
  let obliquity = 0;
  for (let row = NUTATION_TERMS.length - 1; row >= 0; row -= 1) {
    const [l = 0, lp = 0, f = 0, d = 0, om = 0, ps = 0, pst = 0, pc = 0, ec = 0, ect = 0, es = 0] =
      NUTATION_TERMS[row]!;
    const argument = l * moon + lp * sun + f * latitude + d * elongation + om * node;
    const sine = Math.sin(argument);
    const cosine = Math.cos(argument);
    longitude += (ps + pst * t) * sine + pc * cosine;
    obliquity += (ec + ect * t) * cosine + es * sine;
  }
  // The model's fixed offsets stand in for the terms of the planets.
  return {
    longitudeRad: longitude * 1e-7 * ARCSECOND_RAD - 0.135e-3 * ARCSECOND_RAD,
    obliquityRad: obliquity * 1e-7 * ARCSECOND_RAD + 0.388e-3 * ARCSECOND_RAD,
  };
}

/** Mean obliquity of the ecliptic in radians, IAU 2006. */
export function meanObliquityRad(t: number): number {
  return (84_381.406 + (-46.836769 + (-0.0001831 + (0.0020034 - 0.000000576 * t) * t) * t) * t) * ARCSECOND_RAD;
}

/** GCRF to the true equator and equinox of date: bias, precession (IAU 2006), nutation (IAU 2000B). */
export function gcrfToTrueOfDate(t: number): Rotation {
  const nutation = nutationRad(t);
  const gamma = (-0.052928 + (10.556378 + (0.4932044 + (-0.00031238 - 0.000002788 * t) * t) * t) * t) * ARCSECOND_RAD;
  const phi = (84_381.412819 + (-46.811016 + (0.0511268 + (0.00053289 - 0.00000044 * t) * t) * t) * t) * ARCSECOND_RAD;
  const psi = (-0.041775 + (5038.481484 + (1.5584175 + (-0.00018522 - 0.000026452 * t) * t) * t) * t) * ARCSECOND_RAD;
  const epsilon = meanObliquityRad(t) + nutation.obliquityRad;
  return multiply(
    aboutX(-epsilon),
    multiply(aboutZ(-(psi + nutation.longitudeRad)), multiply(aboutX(phi), aboutZ(gamma))),
  );
}

/**
 * Greenwich apparent sidereal time in radians, IAU 2006 with the two largest complementary terms of the equation of the
 * equinoxes; `ut1Ms` is UT1 written as milliseconds since 1970.
 */
export function apparentSiderealRad(ut1Ms: number, t: number): number {
  const days = (ut1Ms - 946_728_000_000) / 86_400_000;
  const fractionOfDay = (ut1Ms / 86_400_000) % 1;
  // The whole turns of a day are taken away before adding, so that nothing is lost to the size of the number.
  const rotation = TURN_RAD * ((0.779057273264 + 0.00273781191135448 * days + fractionOfDay + 0.5) % 1);
  const precession =
    (0.014506 + (4612.156534 + (1.3915817 + (-0.00000044 - 0.000029956 * t) * t) * t) * t) * ARCSECOND_RAD;
  const node = delaunayRad(t)[4]!;
  const complementary = (2640.96e-6 * Math.sin(node) + 63.52e-6 * Math.sin(2 * node)) * ARCSECOND_RAD;
  const equinoxes = nutationRad(t).longitudeRad * Math.cos(meanObliquityRad(t)) + complementary;
  return (rotation + precession + equinoxes) % TURN_RAD;
}

/** GCRF to TEME at a UTC instant: to Earth axes by the apparent sidereal time, and back by that of 1982. */
export function gcrfToTeme(utcMs: number): Rotation {
  const t = ttCenturies(utcMs);
  return multiply(aboutZ(apparentSiderealRad(utcMs, t) - gmstRad(utcMs)), gcrfToTrueOfDate(t));
}

/** Axes turned by an angle about one of them, as in the Explanatory Supplement: R1 and R3. */
export function aboutX(angleRad: number): Rotation {
  const [s, c] = [Math.sin(angleRad), Math.cos(angleRad)];
  return Float64Array.of(1, 0, 0, 0, c, s, 0, -s, c);
}
export function aboutZ(angleRad: number): Rotation {
  const [s, c] = [Math.sin(angleRad), Math.cos(angleRad)];
  return Float64Array.of(c, s, 0, -s, c, 0, 0, 0, 1);
}

/** The rotation that does `second` first and then `first`, as matrices are written. */
export function multiply(first: Rotation, second: Rotation): Rotation {
  const product = new Float64Array(9);
  for (let row = 0; row < 3; row += 1) {
    for (let column = 0; column < 3; column += 1) {
      for (let k = 0; k < 3; k += 1) product[3 * row + column]! += first[3 * row + k]! * second[3 * k + column]!;
    }
  }
  return product;
}

export function transpose(rotation: Rotation): Rotation {
  return Float64Array.from({ length: 9 }, (_, i) => rotation[3 * (i % 3) + Math.floor(i / 3)]!);
}

/** Turns the three numbers at `at` in place. */
export function rotateInPlace(rotation: Rotation, vector: Float64Array, at: number): void {
  const [x, y, z] = [vector[at]!, vector[at + 1]!, vector[at + 2]!];
  for (let row = 0; row < 3; row += 1) {
    vector[at + row] = rotation[3 * row]! * x + rotation[3 * row + 1]! * y + rotation[3 * row + 2]! * z;
  }
}
