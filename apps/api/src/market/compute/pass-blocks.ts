/**
 * Passes day by day, remembered. A day of one element set over one version of one antenna always gives the same passes,
 * whatever was asked before or with it, so a repeated or shifted search pays only for what is new, and a hold recomputes to
 * the very millisecond what the search has shown.
 */
import {
  type AosHighestLos,
  CLIPPED_END,
  CLIPPED_START,
  OrbitError,
  type PassColumns,
  searchPassesColumns,
} from '@skyberth/orbit';
import { WeightedCache } from '../../platform/weighted-cache.js';
import type { AntennaInput, ElementsSpan } from '../workers/job-types.js';
import { sourceName } from './ephemeris-layers.js';
import { antennaKey, type Horizons } from './horizons.js';
import { joinDays, type Stay } from './stay.js';
import { stretchOf } from './stretch.js';
import type { TrackTables } from './track-table.js';

const DAY_MS = 86_400_000;
/** What a kept pass weighs with the text made from it, roughly, in bytes. */
const STAY_WEIGHT = 3_500;
const BLOCK_WEIGHT = 300;
const MAX_WEIGHT = 96_000_000;

/** The stays of one day, or why there are none. */
interface Block {
  readonly stays: readonly Stay[];
  readonly fault: string | null;
}

export interface Viewpoint {
  readonly antenna: AntennaInput;
  /** Nothing below it counts, whatever the mask says. */
  readonly floorDeg: number;
}

export interface BlocksQuestion {
  readonly span: ElementsSpan;
  readonly antennas: readonly Viewpoint[];
  readonly fromMs: number;
  readonly toMs: number;
  /** Called after each day of so many antennas; what it throws ends the work. */
  readonly afterDay?: (antennas: number) => void;
}

export class PassBlocks {
  private readonly kept = new WeightedCache<Block>(MAX_WEIGHT);

  constructor(
    private readonly horizons: Horizons,
    private readonly tables: TrackTables,
  ) {}

  /**
   * Stays that touch the period, by antenna. One that reaches over its end is followed for a day further; one that goes on
   * beyond that is as good as permanent and is cut to the period.
   */
  touching(question: BlocksQuestion): { stays: Stay[][]; fault: string | null } {
    const { span, antennas, fromMs, toMs } = question;
    if (antennas.length === 0 || toMs <= fromMs) return { stays: antennas.map(() => []), fault: null };
    const firstDay = Math.floor(fromMs / DAY_MS);
    const lastDay = Math.ceil(toMs / DAY_MS) - 1;
    let fault: string | null = null;
    const pieces: Stay[][] = antennas.map(() => []);
    const add = (day: number, atFront: boolean, only: readonly number[]): void => {
      this.day(span, antennas, only, day).forEach((block, place) => {
        const own = pieces[only[place] ?? 0];
        fault ??= block.fault;
        if (own === undefined) return;
        if (atFront) own.unshift(...block.stays);
        else own.push(...block.stays);
      });
      question.afterDay?.(only.length);
    };
    const all = antennas.map((_, index) => index);
    for (let day = firstDay; day <= lastDay; day += 1) add(day, false, all);
    const cutAtStart = all.filter((index) => reachesBack(pieces[index]?.[0], firstDay * DAY_MS, fromMs));
    if (cutAtStart.length > 0) add(firstDay - 1, true, cutAtStart);
    const cutAtEnd = all.filter((index) => reachesOn(pieces[index]?.at(-1), (lastDay + 1) * DAY_MS, toMs));
    if (cutAtEnd.length > 0) add(lastDay + 1, false, cutAtEnd);
    const stays = pieces.map((own, index) =>
      joinDays(own)
        .filter((stay) => stay.losMs > fromMs && stay.aosMs < toMs)
        .map((stay) => this.cutToPeriod(stay, question, index)),
    );
    return { stays, fault };
  }

  /** The blocks of one day for some of the antennas; missing ones are computed together. */
  private day(span: ElementsSpan, antennas: readonly Viewpoint[], only: readonly number[], day: number): Block[] {
    const views = only.map((index) => antennas[index] as Viewpoint);
    const name = sourceName(span);
    // By set and not by digest: two operators may hold equal elements, and a stay says whose set it was made from.
    const keys = views.map((view) => `${name}|${antennaKey(view.antenna)}|${view.floorDeg}|${day}`);
    const blocks = keys.map((key) => this.kept.get(key));
    const missing = blocks.flatMap((block, place) => (block === undefined ? [place] : []));
    if (missing.length === 0) return blocks as Block[];
    const made = this.compute(
      span,
      missing.map((place) => views[place] as Viewpoint),
      day,
    );
    missing.forEach((place, index) => {
      const block = made[index] as Block;
      blocks[place] = block;
      this.kept.set(keys[place] as string, block, BLOCK_WEIGHT + block.stays.length * STAY_WEIGHT);
    });
    return blocks as Block[];
  }

  private compute(span: ElementsSpan, views: readonly Viewpoint[], day: number): Block[] {
    const stays: Stay[][] = views.map(() => []);
    let fault: string | null;
    try {
      const found = searchPassesColumns({
        satellites: [this.tables.source(span)],
        sites: views.map(({ antenna, floorDeg }) => ({
          site: antenna.site,
          mask: this.horizons.of(antenna, floorDeg).mask,
        })),
        fromMs: day * DAY_MS,
        toMs: (day + 1) * DAY_MS,
      });
      fault = found.faults[0]?.error.message ?? null;
      for (const block of found.blocks) {
        for (let row = 0; row < block.count; row += 1) {
          stays[block.site[row] ?? 0]?.push(stayOf(block, row, span.elementSetId));
        }
      }
    } catch (error) {
      if (!(error instanceof OrbitError)) throw error;
      fault = error.message;
    }
    return stays.map((each) => ({ stays: each, fault }));
  }

  private cutToPeriod(stay: Stay, { span, antennas, fromMs, toMs }: BlocksQuestion, index: number): Stay {
    if (!stay.clippedStart && !stay.clippedEnd) return stay;
    const { antenna } = antennas[index] as Viewpoint;
    return stretchOf({
      stay,
      source: this.tables.source(span),
      site: antenna.site,
      fromMs: stay.clippedStart ? Math.max(stay.aosMs, fromMs) : stay.aosMs,
      toMs: stay.clippedEnd ? Math.min(stay.losMs, toMs) : stay.losMs,
    });
  }
}

const reachesBack = (first: Stay | undefined, dayStartMs: number, fromMs: number): boolean =>
  first?.clippedStart === true && first.aosMs <= dayStartMs + 1 && first.losMs > fromMs;

const reachesOn = (last: Stay | undefined, dayEndMs: number, toMs: number): boolean =>
  last?.clippedEnd === true && last.losMs >= dayEndMs - 1 && last.aosMs < toMs;

/** A row of the engine's columns, its times rounded. */
function stayOf(columns: PassColumns, row: number, elementSetId: string): Stay {
  const { timeMs, elevationDeg, flags } = columns;
  return {
    elementSetId,
    shape: null,
    answer: null,
    gaps: null,
    joined: null,
    aosMs: Math.round(timeMs[3 * row] ?? 0),
    tcaMs: Math.round(timeMs[3 * row + 1] ?? 0),
    losMs: Math.round(timeMs[3 * row + 2] ?? 0),
    clippedStart: ((flags[row] ?? 0) & CLIPPED_START) !== 0,
    clippedEnd: ((flags[row] ?? 0) & CLIPPED_END) !== 0,
    maxElevationDeg: elevationDeg[3 * row + 1] ?? 0,
    azimuthDeg: three(columns.azimuthDeg, row),
    elevationDeg: three(elevationDeg, row),
    rangeKm: three(columns.rangeKm, row),
    rangeRateKmPerS: three(columns.rangeRateKmPerS, row),
  };
}

const three = (values: ArrayLike<number>, row: number): AosHighestLos<number> => [
  values[3 * row] ?? 0,
  values[3 * row + 1] ?? 0,
  values[3 * row + 2] ?? 0,
];
