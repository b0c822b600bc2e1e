/** Finds every stay of one path above one station's horizon. */
import type { Ephemeris } from './ephemeris.js';
import { LocalPath } from './local-path.js';
import { type Gate, MaskWalk } from './mask-walk.js';
import { leastHeightKm, type SiteView } from './site-view.js';

/** A place on the path: an interval between samples and where in it. */
export interface PathPlace {
  interval: number;
  x: number;
}

/** A stay above the horizon as places on the path. The object is used again for the next one. */
export interface Stay {
  readonly aos: PathPlace;
  readonly highest: PathPlace;
  readonly los: PathPlace;
  clippedStart: boolean;
  clippedEnd: boolean;
}

/** Slow paths are looked at in thirds of an interval, so that two turnings of the elevation never hide in one. */
const PARTS_WHEN_SLOW = 3;
/** In intervals, 2 microseconds in low orbit: closer than this, an end and a beginning are one crossing seen twice. */
const SAME_PLACE = 1e-8;

export class HorizonSearch implements Gate {
  private readonly path: LocalPath;
  private readonly walk: MaskWalk | undefined;
  private readonly sinLowest: number;
  private readonly sinHighest: number;
  private readonly upX: number;
  private readonly upY: number;
  private readonly upZ: number;
  /** Up component that the path must exceed, and how many samples from the zenith it does so at most. */
  private readonly threshold: number;
  private readonly nearSamples: number;
  private interval = 0;
  private isOpen = false;
  /** A stay that has ended but may go on at the same place. */
  private pending = false;
  private highestSin = 0.5;
  private readonly stay: Stay = {
    aos: { interval: 0, x: 0.5 },
    highest: { interval: 0, x: 0.5 },
    los: { interval: 0, x: 0.5 },
    clippedStart: false,
    clippedEnd: false,
  };
  /** State at the end of the interval looked at last, taken over as the start of the next. */
  private doneInterval = -2;
  private endOver = 0.5;
  private endClimb = 0.5;

  constructor(
    private readonly ephemeris: Ephemeris,
    view: SiteView,
    private readonly found: (stay: Stay) => void,
  ) {
    this.path = new LocalPath(ephemeris, view);
    this.sinLowest = view.sinLowest;
    this.sinHighest = view.sinHighest;
    [this.upX, this.upY, this.upZ] = view.frame.up;
    this.threshold = view.upOfSiteKm + leastHeightKm(view, ephemeris);
    this.nearSamples = ephemeris.turns.mostSamples(this.threshold);
    this.walk = view.mask.flat ? undefined : new MaskWalk(this.path, view.mask, this);
  }

  run(): void {
    const { startAt, endAt } = this.ephemeris;
    const last = Math.max(0, Math.ceil(endAt) - 1);
    let interval = this.nextNear(Math.floor(startAt), last);
    while (interval <= last) {
      this.lookAt(interval, Math.max(0, startAt - interval), Math.min(1, endAt - interval));
      interval = this.nextNear(interval + 1, last);
    }
    if (this.isOpen) {
      this.stay.clippedEnd = true;
      this.end(Math.min(1, endAt - last));
    }
    this.flush();
  }

  /** The next interval, from one on, in which the path may stand over the lowest part of the mask; beyond `last` if none. */
  private nextNear(from: number, last: number): number {
    const { upX, upY, upZ, threshold, nearSamples } = this;
    const { positions, turns } = this.ephemeris;
    const { samplesFromZenith, lowestKm, binsPerKm } = turns;
    let interval = from;
    while (interval <= last) {
      const at = 3 * interval;
      const upKm = upX * positions[at]! + upY * positions[at + 1]! + upZ * positions[at + 2]!;
      if (upKm > threshold) return interval;
      const skip = samplesFromZenith[((upKm - lowestKm) * binsPerKm) | 0]! - nearSamples;
      if (skip >= 1) {
        interval += skip | 0;
        continue;
      }
      const nextKm = upX * positions[at + 3]! + upY * positions[at + 4]! + upZ * positions[at + 5]!;
      if (nextKm > threshold) return interval;
      interval += 1;
    }
    return interval;
  }

  /** One interval, from x0 to x1 of it. */
  private lookAt(interval: number, x0: number, x1: number): void {
    const { path } = this;
    this.interval = interval;
    path.enter(interval);
    if (this.doneInterval !== interval - 1) {
      path.evaluate(x0);
      this.endOver = path.over(this.sinLowest);
      this.endClimb = path.climb();
      this.isOpen = false;
      if (this.doneInterval === -2 && interval === Math.floor(this.ephemeris.startAt) && this.visibleAt(x0)) {
        this.open(x0);
        this.stay.clippedStart = true;
      }
    }
    const parts = this.ephemeris.slow ? PARTS_WHEN_SLOW : 1;
    for (let part = 0; part < parts; part += 1) {
      const from = x0 + ((x1 - x0) * part) / parts;
      const to = part + 1 === parts ? x1 : x0 + ((x1 - x0) * (part + 1)) / parts;
      this.lookAlong(from, to);
    }
    this.doneInterval = interval;
  }

  private visibleAt(x: number): boolean {
    const { path, walk } = this;
    if (walk) return walk.visibleAt(x);
    path.evaluate(x);
    return path.over(this.sinLowest) > 0;
  }

  /** A part of an interval in which the elevation turns at most once. */
  private lookAlong(x0: number, x1: number): void {
    const { path, sinLowest } = this;
    const over0 = this.endOver;
    const climb0 = this.endClimb;
    path.evaluate(x1);
    const over1 = path.over(sinLowest);
    const climb1 = path.climb();
    this.endOver = over1;
    this.endClimb = climb1;
    const peak = climb0 > 0 && climb1 <= 0;
    const dip = climb0 < 0 && climb1 >= 0 && (over0 > 0 || over1 > 0);
    if (!peak && !dip) {
      this.piece(x0, x1, over0, over1);
      return;
    }
    const turn = path.turning(x0, x1, climb0, climb1);
    const overTurn = path.over(sinLowest);
    const sinTurn = path.sinElevation();
    this.piece(x0, turn, over0, overTurn);
    if (peak && this.isOpen) this.offerHighest(turn, sinTurn);
    this.piece(turn, x1, overTurn, over1);
  }

  /** A piece along which the elevation only rises or only falls; `over` is measured from the mask's lowest point. */
  private piece(x0: number, x1: number, over0: number, over1: number): void {
    const { path, sinLowest } = this;
    if (over0 <= 0 && over1 <= 0) {
      if (this.isOpen) this.close(x0);
      return;
    }
    let from = x0;
    let to = x1;
    if (over0 > 0 !== over1 > 0) {
      const x = path.crossing(sinLowest, { x0, x1, over0, over1 });
      if (over1 > 0) from = x;
      else to = x;
    }
    if (this.walk) this.unevenPiece(this.walk, from, to);
    else this.open(from);
    if (over1 <= 0) this.close(to);
  }

  /** Over an uneven mask: above its highest point the sky is open; below it the walk decides. */
  private unevenPiece(walk: MaskWalk, x0: number, x1: number): void {
    const { path, sinHighest } = this;
    path.evaluate(x0);
    const over0 = path.over(sinHighest);
    path.evaluate(x1);
    const over1 = path.over(sinHighest);
    if (over0 > 0 && over1 > 0) {
      this.open(x0);
    } else if (over0 <= 0 && over1 <= 0) {
      walk.walk(x0, x1);
    } else {
      const x = path.crossing(sinHighest, { x0, x1, over0, over1 });
      if (over0 > 0) {
        this.open(x0);
        walk.walk(x, x1);
      } else {
        walk.walk(x0, x);
        this.open(x);
      }
    }
  }

  open(x: number): void {
    if (this.isOpen) return;
    const { stay, interval } = this;
    this.isOpen = true;
    if (this.pending && interval + x - (stay.los.interval + stay.los.x) < SAME_PLACE) {
      this.pending = false;
      return;
    }
    this.flush();
    stay.clippedStart = false;
    stay.clippedEnd = false;
    setPlace(stay.aos, interval, x);
    this.highestSin = Number.NEGATIVE_INFINITY;
    this.offerEnd(x);
  }

  close(x: number): void {
    if (this.isOpen) this.end(x);
  }

  private end(x: number): void {
    const { stay, interval } = this;
    this.isOpen = false;
    this.pending = true;
    setPlace(stay.los, interval, x);
    this.offerEnd(x);
  }

  /** The ends of a stay may be its highest point, where a cliff or the period cuts it. */
  private offerEnd(x: number): void {
    this.path.evaluate(x);
    this.offerHighest(x, this.path.sinElevation());
  }

  private offerHighest(x: number, sinElevation: number): void {
    if (sinElevation <= this.highestSin) return;
    this.highestSin = sinElevation;
    setPlace(this.stay.highest, this.interval, x);
  }

  /** Hands the last stay over. One without length is a touch of the horizon from below, or rounding. */
  private flush(): void {
    if (!this.pending) return;
    this.pending = false;
    const { aos, los } = this.stay;
    if (los.interval + los.x - (aos.interval + aos.x) >= SAME_PLACE) this.found(this.stay);
  }
}

function setPlace(place: PathPlace, interval: number, x: number): void {
  place.interval = interval;
  place.x = x;
}
