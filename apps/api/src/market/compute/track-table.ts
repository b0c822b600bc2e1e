/**
 * Where a spacecraft is, read off a table instead of propagated anew: for drawing only. Positions a minute apart with their
 * velocities are joined by cubics; from 300 km up the error stays below 2 m, far under what a picture shows.
 */
import { type Pass, type SiteFrame, type TrajectorySource, temeToEcef } from '@skyberth/orbit';
import { WeightedCache } from '../../platform/weighted-cache.js';
import type { ElementsSpan } from '../workers/job-types.js';
import { EphemerisLayers, type Origin } from './ephemeris-layers.js';

const STEP_MS = 60_000;
const DAY_MS = 86_400_000;
const NODES = DAY_MS / STEP_MS + 1;
const DEG = 180 / Math.PI;
/** Days of tables kept; each is 69 kB. */
const MAX_DAYS = 400;
/** Propagators kept. */
const MAX_SOURCES = 500;

/** Written anew for each instant, since a search asks for hundreds of thousands. */
export interface Look {
  azimuthDeg: number;
  elevationDeg: number;
}

export class TrackTables {
  private readonly layers = new EphemerisLayers();
  private readonly days = new WeightedCache<Float64Array>(MAX_DAYS);
  private readonly sources = new WeightedCache<TrajectorySource>(MAX_SOURCES);
  /** The table used last, since a pass asks for many instants of one day. */
  private current: { readonly span: ElementsSpan; readonly day: number; readonly table: Float64Array } | null = null;

  /** Where the spacecraft is in a span. Throws `OrbitError` for elements that cannot be used. */
  source(span: ElementsSpan): TrajectorySource {
    const key = contentName(span);
    const known = this.sources.get(key);
    if (known !== undefined) return known;
    const source = this.layers.sourceOf(span);
    this.sources.set(key, source, 1);
    return source;
  }

  /** What a stay in a span was computed from. */
  originOf(span: ElementsSpan, { aosMs, tcaMs, losMs }: Pick<Pass, 'aosMs' | 'tcaMs' | 'losMs'>): Origin {
    return this.layers.originOf(span, [aosMs, tcaMs, losMs]);
  }

  /** Direction of the spacecraft from a site, into `out`. */
  look(span: ElementsSpan, { positionKm, east, north, up }: SiteFrame, timeMs: number, out: Look): void {
    const day = Math.floor(timeMs / DAY_MS);
    const table = this.day(span, day);
    const at = (timeMs - day * DAY_MS) / STEP_MS;
    const node = Math.min(NODES - 2, Math.floor(at));
    const share = at - node;
    const base = node * 6;
    const x = cubic(table, base, share) - positionKm[0];
    const y = cubic(table, base + 1, share) - positionKm[1];
    const z = cubic(table, base + 2, share) - positionKm[2];
    const eastKm = x * east[0] + y * east[1] + z * east[2];
    const northKm = x * north[0] + y * north[1] + z * north[2];
    const upKm = x * up[0] + y * up[1] + z * up[2];
    const azimuth = Math.atan2(eastKm, northKm) * DEG;
    out.azimuthDeg = azimuth < 0 ? azimuth + 360 : azimuth;
    out.elevationDeg = Math.atan2(upKm, Math.sqrt(eastKm * eastKm + northKm * northKm)) * DEG;
  }

  private day(span: ElementsSpan, day: number): Float64Array {
    if (this.current?.span === span && this.current.day === day) return this.current.table;
    const key = `${contentName(span)}|${day}`;
    let table = this.days.get(key);
    if (table === undefined) {
      table = tabulate(this.source(span), day);
      this.days.set(key, table, 1);
    }
    this.current = { span, day, table };
    return table;
  }
}

/** By content: equal element sets of two operators share a propagator. */
const contentName = ({ digest, ephemerides }: ElementsSpan): string =>
  ephemerides.length === 0 ? digest : `${digest}+${ephemerides.map((each) => each.id).join('+')}`;

/** Places and velocities in turning axes, km and km/s, six numbers a node. A node beyond decay repeats the one before. */
function tabulate(source: TrajectorySource, day: number): Float64Array {
  const table = new Float64Array(NODES * 6);
  const state = new Float64Array(6);
  for (let node = 0; node < NODES; node += 1) {
    const timeMs = day * DAY_MS + node * STEP_MS;
    if (timeMs >= source.startMs && timeMs <= source.stopMs && usable(source, timeMs, state)) {
      temeToEcef(timeMs, state);
      table.set(state, node * 6);
    } else if (node > 0) {
      table.copyWithin(node * 6, (node - 1) * 6, node * 6);
    }
  }
  return table;
}

/** Some elements decay within a day; its passes before that are still drawn. */
function usable(source: TrajectorySource, timeMs: number, state: Float64Array): boolean {
  try {
    source.stateTeme(timeMs, state);
    return true;
  } catch {
    return false;
  }
}

/** Cubic through two places with the velocities there (Hermite). `share` runs from 0 to 1 between the nodes. */
function cubic(table: Float64Array, index: number, share: number): number {
  const stepS = STEP_MS / 1000;
  const p0 = table[index] as number;
  const m0 = (table[index + 3] as number) * stepS;
  const p1 = table[index + 6] as number;
  const m1 = (table[index + 9] as number) * stepS;
  const s2 = share * share;
  const s3 = s2 * share;
  return (2 * s3 - 3 * s2 + 1) * p0 + (s3 - 2 * s2 + share) * m0 + (3 * s2 - 2 * s3) * p1 + (s3 - s2) * m1;
}
