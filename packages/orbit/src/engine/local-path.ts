/**
 * One interval of a path as one station sees it: the innermost loop of the search. `x` runs from 0 to 1 between two samples;
 * every derivative is by `x`. Results lie in fields, because an object for each of hundreds of millions would cost more than
 * the sums themselves.
 */
import type { Ephemeris } from './ephemeris.js';
import type { SiteView } from './site-view.js';

/** In intervals. Newton's error after a step is about the step's square, so this leaves nanoseconds. */
const ENOUGH = 1e-6;
const MOST_ROUNDS = 60;
/** Horizontal distance (km2) below which an azimuth is no longer asked for. */
const AT_ZENITH_KM2 = 1e-12;

export class LocalPath {
  /** Height above the station's plane and its derivative, km. */
  height = 0.5;
  heightRate = 0.5;
  /** Square of the slant range, and half its derivative. */
  range2 = 0.5;
  rangeRangeRate = 0.5;
  /** Filled by `evaluateBearing` only. Radians; azimuth -pi to pi. */
  azimuth = 0.5;
  azimuthRate = 0.5;
  elevation = 0.5;
  elevationRate = 0.5;

  private readonly powers: Float64Array;
  private at = 0;
  private readonly siteX: number;
  private readonly siteY: number;
  private readonly siteZ: number;
  private readonly upX: number;
  private readonly upY: number;
  private readonly upZ: number;

  constructor(
    private readonly ephemeris: Ephemeris,
    private readonly view: SiteView,
  ) {
    this.powers = ephemeris.powers;
    const { positionKm, up } = view.frame;
    [this.siteX, this.siteY, this.siteZ] = positionKm;
    [this.upX, this.upY, this.upZ] = up;
  }

  /** Chooses the interval that follows. */
  enter(interval: number): void {
    this.at = this.ephemeris.interval(interval);
  }

  evaluate(place01: number): void {
    const c = this.powers;
    const x = place01 - 0.5;
    let place = this.at + 21;
    let px = c[place]!;
    let py = c[place + 1]!;
    let pz = c[place + 2]!;
    let vx = 0;
    let vy = 0;
    let vz = 0;
    for (let power = 6; power >= 0; power -= 1) {
      place -= 3;
      vx = vx * x + px;
      vy = vy * x + py;
      vz = vz * x + pz;
      px = px * x + c[place]!;
      py = py * x + c[place + 1]!;
      pz = pz * x + c[place + 2]!;
    }
    px -= this.siteX;
    py -= this.siteY;
    pz -= this.siteZ;
    this.height = this.upX * px + this.upY * py + this.upZ * pz;
    this.heightRate = this.upX * vx + this.upY * vy + this.upZ * vz;
    this.range2 = px * px + py * py + pz * pz;
    this.rangeRangeRate = px * vx + py * vy + pz * vz;
  }

  /** Height over the cone of elevation whose sine is given: positive above it. */
  over(sinElevation: number): number {
    return this.height - sinElevation * Math.sqrt(this.range2);
  }

  /** Has the sign of the elevation's derivative. */
  climb(): number {
    return this.heightRate * this.range2 - this.height * this.rangeRangeRate;
  }

  sinElevation(): number {
    return this.height / Math.sqrt(this.range2);
  }

  /** Where the path crosses a cone of elevation between two places with different signs of `over`. */
  crossing(sinElevation: number, bracket: { x0: number; x1: number; over0: number; over1: number }): number {
    let { x0, x1 } = bracket;
    const rising = bracket.over1 > 0;
    let x = x0 + ((x1 - x0) * bracket.over0) / (bracket.over0 - bracket.over1);
    for (let round = 0; round < MOST_ROUNDS; round += 1) {
      this.evaluate(x);
      const range = Math.sqrt(this.range2);
      const over = this.height - sinElevation * range;
      if (over > 0 === rising) x1 = x;
      else x0 = x;
      let next = x - over / (this.heightRate - (sinElevation * this.rangeRangeRate) / range);
      if (!(next > x0 && next < x1)) next = Math.abs(next - x) < ENOUGH ? x : 0.5 * (x0 + x1);
      const step = Math.abs(next - x);
      x = next;
      if (step < ENOUGH) break;
    }
    return x;
  }

  /** Where the elevation turns between two places with different signs of `climb`. Leaves the state there. */
  turning(x0: number, x1: number, climb0: number, climb1: number): number {
    const peak = climb0 > 0;
    let x = x0 + ((x1 - x0) * climb0) / (climb0 - climb1);
    for (let round = 0; round < MOST_ROUNDS; round += 1) {
      const climbRate = this.evaluateCurvature(x);
      const climb = this.climb();
      if (climb > 0 === peak) x0 = x;
      else x1 = x;
      let next = x - climb / climbRate;
      if (!(next > x0 && next < x1)) next = Math.abs(next - x) < ENOUGH ? x : 0.5 * (x0 + x1);
      const step = Math.abs(next - x);
      x = next;
      if (step < ENOUGH) break;
    }
    this.evaluate(x);
    return x;
  }

  /** `evaluate`, and the derivative of `climb`. */
  private evaluateCurvature(place01: number): number {
    const c = this.powers;
    const x = place01 - 0.5;
    let bx = 0;
    let by = 0;
    let bz = 0;
    let vx = 0;
    let vy = 0;
    let vz = 0;
    let place = this.at + 21;
    let px = c[place]!;
    let py = c[place + 1]!;
    let pz = c[place + 2]!;
    for (let power = 6; power >= 0; power -= 1) {
      place -= 3;
      bx = bx * x + vx;
      by = by * x + vy;
      bz = bz * x + vz;
      vx = vx * x + px;
      vy = vy * x + py;
      vz = vz * x + pz;
      px = px * x + c[place]!;
      py = py * x + c[place + 1]!;
      pz = pz * x + c[place + 2]!;
    }
    px -= this.siteX;
    py -= this.siteY;
    pz -= this.siteZ;
    const height = this.upX * px + this.upY * py + this.upZ * pz;
    const heightRate = this.upX * vx + this.upY * vy + this.upZ * vz;
    const range2 = px * px + py * py + pz * pz;
    const rangeRangeRate = px * vx + py * vy + pz * vz;
    this.height = height;
    this.heightRate = heightRate;
    this.range2 = range2;
    this.rangeRangeRate = rangeRangeRate;
    const heightBend = 2 * (this.upX * bx + this.upY * by + this.upZ * bz);
    const rangeBend = vx * vx + vy * vy + vz * vz + 2 * (px * bx + py * by + pz * bz);
    return heightBend * range2 + heightRate * rangeRangeRate - height * rangeBend;
  }

  /** Elevation and azimuth with their derivatives. */
  evaluateBearing(place01: number): void {
    const c = this.powers;
    const x = place01 - 0.5;
    let px = 0;
    let py = 0;
    let pz = 0;
    let vx = 0;
    let vy = 0;
    let vz = 0;
    for (let place = this.at + 21; place >= this.at; place -= 3) {
      vx = vx * x + px;
      vy = vy * x + py;
      vz = vz * x + pz;
      px = px * x + c[place]!;
      py = py * x + c[place + 1]!;
      pz = pz * x + c[place + 2]!;
    }
    px -= this.siteX;
    py -= this.siteY;
    pz -= this.siteZ;
    const { east, north } = this.view.frame;
    const height = this.upX * px + this.upY * py + this.upZ * pz;
    const heightRate = this.upX * vx + this.upY * vy + this.upZ * vz;
    const e = east[0] * px + east[1] * py + east[2] * pz;
    const n = north[0] * px + north[1] * py + north[2] * pz;
    const eRate = east[0] * vx + east[1] * vy + east[2] * vz;
    const nRate = north[0] * vx + north[1] * vy + north[2] * vz;
    const level2 = Math.max(e * e + n * n, AT_ZENITH_KM2);
    const level = Math.sqrt(level2);
    this.elevation = Math.atan2(height, level);
    this.elevationRate =
      (heightRate * level2 - height * (e * eRate + n * nRate)) / (level * (level2 + height * height));
    this.azimuth = Math.atan2(e, n);
    this.azimuthRate = (eRate * n - e * nRate) / level2;
  }
}
