/** The search itself: many spacecraft over many stations, or one over one. */
import { DEG } from '../frames/ellipsoid.js';
import { OrbitError } from '../orbit-error.js';
import type { AosHighestLos, GeodeticSite, MaskPoint, Pass, TrajectorySource } from '../types.js';
import type { Ephemeris } from './ephemeris.js';
import { HorizonSearch, type PathPlace, type Stay } from './horizon-search.js';
import type { CompiledMask } from './mask.js';
import { CLIPPED_END, CLIPPED_START, type PassColumns, PassSink } from './pass-block.js';
import type { SampleRoom } from './sample-room.js';
import { type SearchSite, type SiteView, siteView } from './site-view.js';
import { type SampledPath, samplePath } from './stretches.js';

/** Ten years, far beyond what any elements are good for. */
const LONGEST_PERIOD_MS = 3_660 * 86_400_000;

export interface PassSearch {
  readonly satellites: readonly TrajectorySource[];
  readonly sites: readonly SearchSite[];
  readonly fromMs: number;
  readonly toMs: number;
  /** Called before each satellite; `false` ends the search there. */
  readonly goOn?: (satellitesDone: number) => boolean;
}

/** What stops one satellite, wholly or in part of the period; the others are complete. */
export interface SearchFault {
  readonly satellite: number;
  readonly error: OrbitError;
}

export interface PassSearchResult {
  /** In the order of satellites, within that of sites, within that by AOS. */
  readonly blocks: readonly PassColumns[];
  readonly count: number;
  readonly faults: readonly SearchFault[];
  /** False where `goOn` ended it. */
  readonly complete: boolean;
}

/**
 * Every pass of every satellite over every site in `[fromMs, toMs)`, as columns. Each satellite stands by itself, so that any
 * division of the list over threads gives the same rows.
 * @throws OrbitError `bad interval`, `bad place` or `bad mask`; what is wrong with a satellite is in `faults` instead.
 */
export function searchPassesColumns(search: PassSearch): PassSearchResult {
  checkPeriod(search.fromMs, search.toMs);
  const views = search.sites.map(siteView);
  const sink = new PassSink();
  const faults: SearchFault[] = [];
  const rooms: SampleRoom[] = [];
  let complete = true;
  for (const [satellite, source] of search.satellites.entries()) {
    if (search.goOn?.(satellite) === false) {
      complete = false;
      break;
    }
    const path = samplePath(source, search.fromMs, search.toMs, rooms);
    if (path.fault) faults.push({ satellite, error: path.fault });
    for (const [site, view] of views.entries()) searchPath(path, view, { sink, satellite, site });
  }
  return { blocks: sink.blocks, count: sink.count, faults, complete };
}

export interface PassQuestion {
  readonly source: TrajectorySource;
  readonly site: GeodeticSite;
  readonly mask: readonly MaskPoint[] | CompiledMask;
  readonly fromMs: number;
  readonly toMs: number;
  /** Nothing below it counts, whatever the mask says. */
  readonly minElevationDeg?: number;
}

/** Where a source is searched over many sites in turn, its samples are kept as long as the source itself. */
const lastPaths = new WeakMap<TrajectorySource, { fromMs: number; toMs: number; path: SampledPath }>();

/**
 * The passes of one spacecraft over one site, by AOS. A source that gives out inside the period is followed as far as it
 * answers, and a pass cut there is marked as clipped.
 * @throws OrbitError where the source answers for no part of the period, and as `searchPassesColumns` does.
 */
export function findPasses(question: PassQuestion): Pass[] {
  const { source, fromMs, toMs } = question;
  checkPeriod(fromMs, toMs);
  const kept = lastPaths.get(source);
  const path = kept?.fromMs === fromMs && kept.toMs === toMs ? kept.path : samplePath(source, fromMs, toMs);
  lastPaths.set(source, { fromMs, toMs, path });
  if (path.fault && path.ephemerides.length === 0) throw path.fault;
  const sink = new PassSink();
  searchPath(path, siteView(question), { sink, satellite: 0, site: 0 });
  return sink.blocks.flatMap((block) => Array.from({ length: block.count }, (_, row) => passAt(block, row)));
}

function checkPeriod(fromMs: number, toMs: number): void {
  if (!(toMs > fromMs) || !(toMs - fromMs <= LONGEST_PERIOD_MS)) {
    const sentence = 'A period must end after it begins and last at most ten years.';
    throw new OrbitError('bad interval', sentence, { fromMs, toMs });
  }
}

/** A row of a block as an object. */
export function passAt(columns: PassColumns, row: number): Pass {
  const triple = (values: Float64Array | Float32Array): AosHighestLos<number> => [
    values[3 * row]!,
    values[3 * row + 1]!,
    values[3 * row + 2]!,
  ];
  const [aosMs, tcaMs, losMs] = triple(columns.timeMs);
  const elevationDeg = triple(columns.elevationDeg);
  const flags = columns.flags[row]!;
  return {
    aosMs,
    tcaMs,
    losMs,
    clippedStart: (flags & CLIPPED_START) !== 0,
    clippedEnd: (flags & CLIPPED_END) !== 0,
    maxElevationDeg: elevationDeg[1],
    azimuthDeg: triple(columns.azimuthDeg),
    elevationDeg,
    rangeKm: triple(columns.rangeKm),
    rangeRateKmPerS: triple(columns.rangeRateKmPerS),
  };
}

interface Row {
  readonly sink: PassSink;
  readonly satellite: number;
  readonly site: number;
}

function searchPath({ ephemerides }: SampledPath, view: SiteView, row: Row): void {
  for (const ephemeris of ephemerides) {
    new HorizonSearch(ephemeris, view, (stay) => writeRow(ephemeris, view, stay, row)).run();
  }
}

function writeRow(ephemeris: Ephemeris, view: SiteView, stay: Stay, { sink, satellite, site }: Row): void {
  const block = sink.room();
  const row = block.count;
  block.satellite[row] = satellite;
  block.site[row] = site;
  block.flags[row] = (stay.clippedStart ? CLIPPED_START : 0) | (stay.clippedEnd ? CLIPPED_END : 0);
  writePlace(ephemeris, view, stay.aos, block, 3 * row);
  writePlace(ephemeris, view, stay.highest, block, 3 * row + 1);
  writePlace(ephemeris, view, stay.los, block, 3 * row + 2);
  if (stay.clippedStart) block.timeMs[3 * row] = ephemeris.fromMs;
  if (stay.clippedEnd) block.timeMs[3 * row + 2] = ephemeris.toMs;
  block.count = row + 1;
  sink.count += 1;
}

function writePlace(ephemeris: Ephemeris, view: SiteView, place: PathPlace, out: PassColumns, index: number): void {
  const { interval } = place;
  const x = place.x - 0.5;
  const { powers, velocityPowers } = ephemeris;
  const first = ephemeris.interval(interval);
  let px = 0;
  let py = 0;
  let pz = 0;
  let vx = 0;
  let vy = 0;
  let vz = 0;
  for (let at = first + 21; at >= first; at -= 3) {
    vx = vx * x + px;
    vy = vy * x + py;
    vz = vz * x + pz;
    px = px * x + powers[at]!;
    py = py * x + powers[at + 1]!;
    pz = pz * x + powers[at + 2]!;
  }
  let perSecond = 1;
  if (velocityPowers) {
    [vx, vy, vz] = [0, 0, 0];
    for (let at = first + 21; at >= first; at -= 3) {
      vx = vx * x + velocityPowers[at]!;
      vy = vy * x + velocityPowers[at + 1]!;
      vz = vz * x + velocityPowers[at + 2]!;
    }
  } else {
    perSecond = 1 / ephemeris.secondsPerSample(interval + place.x);
  }
  const { positionKm, east, north, up } = view.frame;
  px -= positionKm[0];
  py -= positionKm[1];
  pz -= positionKm[2];
  const rangeKm = Math.sqrt(px * px + py * py + pz * pz);
  const eastKm = east[0] * px + east[1] * py + east[2] * pz;
  const northKm = north[0] * px + north[1] * py + north[2] * pz;
  const upKm = up[0] * px + up[1] * py + up[2] * pz;
  const azimuthDeg = Math.atan2(eastKm, northKm) / DEG;
  out.timeMs[index] = ephemeris.timeMs(interval + place.x);
  out.azimuthDeg[index] = azimuthDeg < 0 ? azimuthDeg + 360 : azimuthDeg;
  // Near the zenith the arc sine is good to a millionth of a degree, more than the column holds.
  out.elevationDeg[index] = Math.asin(Math.min(1, upKm / rangeKm)) / DEG;
  out.rangeKm[index] = rangeKm;
  out.rangeRateKmPerS[index] = ((px * vx + py * vy + pz * vz) / rangeKm) * perSecond;
}
