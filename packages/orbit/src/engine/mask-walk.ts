/**
 * The part of a path that lies between the lowest and the highest point of an uneven horizon. Elevation only rises or only
 * falls along a piece; the piece is cut where the azimuth turns back and where it passes a corner of the mask, so that each
 * part meets one straight line of the horizon, and a cliff is a step between two parts.
 */
import { DEG } from '../frames/ellipsoid.js';
import type { LocalPath } from './local-path.js';
import { type CompiledMask, maskLineAt } from './mask.js';

const TURN = 2 * Math.PI;
const ENOUGH = 1e-8;
const MOST_ROUNDS = 80;
/** A 64th of a piece is passed corner by corner, whatever the mask. */
const MOST_HALVINGS = 6;
/** The second of two corners at a cliff. */
const ON_CORNER = 1e-12;
/** A sweep this close to a whole turn is none at all, seen through rounding. */
const NEARLY_TURN = TURN - 1e-6;

/** What the walk reports to: the sky is open or closed from a place on. Telling it what it knows already is harmless. */
export interface Gate {
  open(x: number): void;
  close(x: number): void;
}

/** Where the path stands in the sky at one place, radians. */
interface Bearing {
  readonly x: number;
  readonly azimuth: number;
  readonly elevation: number;
}

export class MaskWalk {
  private readonly azimuths: Float64Array;
  private readonly elevations: Float64Array;
  private readonly slopes: Float64Array;
  private line = 0;

  constructor(
    private readonly path: LocalPath,
    private readonly mask: CompiledMask,
    private readonly gate: Gate,
  ) {
    this.azimuths = mask.azimuthDeg.map((azimuthDeg) => azimuthDeg * DEG);
    this.elevations = mask.elevationDeg.map((elevationDeg) => elevationDeg * DEG);
    this.slopes = mask.slope;
  }

  /** Whether the path stands above the horizon at one place. */
  visibleAt(x: number): boolean {
    this.path.evaluateBearing(x);
    this.line = maskLineAt(this.mask, ahead(0, this.path.azimuth, 1) / DEG);
    return this.overLine() > 0;
  }

  /** Walks from x0 to x1. */
  walk(x0: number, x1: number): void {
    const { path } = this;
    const start = this.bearingAt(x0);
    const rate0 = path.azimuthRate;
    const end = this.bearingAt(x1);
    const rate1 = path.azimuthRate;
    if (rate0 * rate1 >= 0) {
      this.narrow(start, end, rate0 + rate1 >= 0 ? 1 : -1, 0);
      return;
    }
    const turn = this.bearingAt(this.solve(x0, x1, rate0, () => path.azimuthRate));
    this.narrow(start, turn, rate0 > 0 ? 1 : -1, 0);
    this.narrow(turn, end, rate1 > 0 ? 1 : -1, 0);
  }

  private bearingAt(x: number): Bearing {
    const { path } = this;
    path.evaluateBearing(x);
    return { x, azimuth: path.azimuth, elevation: path.elevation };
  }

  /**
   * A piece along which elevation and azimuth each run one way. Most of it is far over or far under all of the horizon that it
   * passes, and is settled by its two ends; what is not is halved, until a part meets a single line or is short.
   */
  private narrow(start: Bearing, end: Bearing, way: 1 | -1, halvings: number): void {
    const { azimuths } = this;
    const first = way === 1 ? start.azimuth : end.azimuth;
    const last = way === 1 ? end.azimuth : start.azimuth;
    const width = ahead(first, last, 1);
    let line = maskLineAt(this.mask, ahead(0, first, 1) / DEG);
    let lowest = this.heightOf(line, first);
    let highest = lowest;
    let corners = 0;
    for (; corners < azimuths.length; corners += 1) {
      const next = line + 1 === azimuths.length ? 0 : line + 1;
      if (ahead(first, azimuths[next]!, 1) > width) break;
      line = next;
      lowest = Math.min(lowest, this.elevations[line]!);
      highest = Math.max(highest, this.elevations[line]!);
    }
    const height = this.heightOf(line, last);
    if (width > NEARLY_TURN) {
      this.sweep(start.x, end.x, way);
    } else if (Math.min(start.elevation, end.elevation) > Math.max(highest, height)) {
      this.gate.open(start.x);
    } else if (Math.max(start.elevation, end.elevation) < Math.min(lowest, height)) {
      this.gate.close(start.x);
    } else if (corners === 0 || halvings === MOST_HALVINGS) {
      this.sweep(start.x, end.x, way);
    } else {
      const middle = this.bearingAt(0.5 * (start.x + end.x));
      this.narrow(start, middle, way, halvings + 1);
      this.narrow(middle, end, way, halvings + 1);
    }
  }

  /** Height of a line in an azimuth. */
  private heightOf(line: number, azimuth: number): number {
    return this.elevations[line]! + this.slopes[line]! * signedAngle(azimuth - this.azimuths[line]!);
  }

  /** A piece along which the azimuth runs one way, corner by corner. */
  private sweep(x0: number, x1: number, way: 1 | -1): void {
    const { path, azimuths } = this;
    path.evaluateBearing(x1);
    const endAzimuth = path.azimuth;
    path.evaluateBearing(x0);
    const startAzimuth = path.azimuth;
    let left = ahead(startAzimuth, endAzimuth, way);
    if (left > NEARLY_TURN) left = 0;
    this.line = maskLineAt(this.mask, ahead(0, startAzimuth, 1) / DEG);
    let from = x0;
    let azimuth = startAzimuth;
    // Every corner once, and one more part for what follows the last.
    for (let corner = 0; corner <= azimuths.length; corner += 1) {
      const nextCorner = way === 1 ? (this.line + 1) % azimuths.length : this.line;
      const toCorner = ahead(azimuth, azimuths[nextCorner]!, way);
      // Standing exactly on the corner, a walk back has passed it already.
      if (toCorner >= left) break;
      const until = toCorner < ON_CORNER ? from : this.reach(from, x1, azimuths[nextCorner]!, way);
      this.part(from, until);
      this.line = way === 1 ? nextCorner : (this.line - 1 + azimuths.length) % azimuths.length;
      left -= toCorner;
      azimuth = azimuths[nextCorner]!;
      from = until;
    }
    this.part(from, x1);
  }

  /** Where the azimuth comes to a corner. */
  private reach(x0: number, x1: number, corner: number, way: 1 | -1): number {
    const { path } = this;
    return this.solve(
      x0,
      x1,
      -way,
      () => signedAngle(path.azimuth - corner),
      () => path.azimuthRate,
    );
  }

  /** One straight line of the horizon. */
  private part(x0: number, x1: number): void {
    const { path, gate } = this;
    const slope = this.slopes[this.line]!;
    path.evaluateBearing(x0);
    const over0 = this.overLine();
    const rate0 = path.elevationRate - slope * path.azimuthRate;
    if (over0 > 0) gate.open(x0);
    else gate.close(x0);
    if (!(x1 > x0)) return;
    path.evaluateBearing(x1);
    const over1 = this.overLine();
    const rate1 = path.elevationRate - slope * path.azimuthRate;
    if (over0 > 0 !== over1 > 0) {
      this.cross(x0, x1, over0);
      return;
    }
    // Both ends on one side: the line may still be touched between them, where the distance turns towards it.
    const away = over0 > 0 ? 1 : -1;
    if (slope === 0 || !(rate0 * away < 0 && rate1 * away > 0)) return;
    const turn = this.solve(x0, x1, rate0, () => path.elevationRate - slope * path.azimuthRate);
    path.evaluateBearing(turn);
    const overTurn = this.overLine();
    if (overTurn > 0 === over0 > 0) return;
    this.cross(x0, turn, over0);
    this.cross(turn, x1, overTurn);
  }

  private cross(x0: number, x1: number, over0: number): void {
    const { path, gate } = this;
    const slope = this.slopes[this.line]!;
    const x = this.solve(
      x0,
      x1,
      over0,
      () => this.overLine(),
      () => path.elevationRate - slope * path.azimuthRate,
    );
    if (over0 > 0) gate.close(x);
    else gate.open(x);
  }

  /** Radians over the current line at the place last evaluated. */
  private overLine(): number {
    const along = signedAngle(this.path.azimuth - this.azimuths[this.line]!);
    return this.path.elevation - this.elevations[this.line]! - this.slopes[this.line]! * along;
  }

  /**
   * The place between x0 and x1 where a value changes its sign, by Newton inside a shrinking bracket, or by halving and
   * secants where no derivative is given.
   */
  private solve(x0: number, x1: number, value0: number, value: () => number, rate?: () => number): number {
    let [low, high] = [x0, x1];
    let x = 0.5 * (low + high);
    let before = x0;
    let valueBefore = value0;
    for (let round = 0; round < MOST_ROUNDS && high - low > ENOUGH * 1e-3; round += 1) {
      this.path.evaluateBearing(x);
      const now = value();
      if (now > 0 === value0 > 0) low = x;
      else high = x;
      const slope = rate ? rate() : (now - valueBefore) / (x - before);
      let next = x - now / slope;
      if (!(next > low && next < high)) next = Math.abs(next - x) < ENOUGH ? x : 0.5 * (low + high);
      before = x;
      valueBefore = now;
      const step = Math.abs(next - x);
      x = next;
      if (step < ENOUGH) break;
    }
    return x;
  }
}

/** Radians from one azimuth to another going one way, 0 to a turn. */
function ahead(from: number, to: number, way: 1 | -1): number {
  const angle = (to - from) * way;
  return angle - TURN * Math.floor(angle / TURN);
}

/** The same angle between -pi and pi. */
function signedAngle(angle: number): number {
  return angle - TURN * Math.round(angle / TURN);
}
