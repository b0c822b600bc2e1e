/** What the market knows, in the form of the wire. */
import type { FoundStation, Need, PassDetail, SearchResult } from '@skyberth/shared';
import { freshnessOf } from '../spacecraft/freshness.js';
import type { SaleAntenna } from '../stations/antenna-catalogue.js';
import { cautionsFor } from './cautions.js';
import { radiosFor } from './compute/objections.js';
import type { Period } from './market-inputs.js';
import { freshnessFor, OWN_EPHEMERIS } from './offer.service.js';
import type { PassAnswer } from './pass-finder.js';
import { takenIntervals } from './taken.js';
import type { AntennaInput, CraftInput, EphemerisInput } from './workers/job-types.js';

type FoundCraft = SearchResult['spacecraft'][number];

const utc = (timeMs: number): string => new Date(timeMs).toISOString();
export const utcInterval = (each: Period): { fromUtc: string; toUtc: string } => ({
  fromUtc: utc(each.fromMs),
  toUtc: utc(each.toMs),
});

/** Puts the passes, which are text already and each behind a comma, into the object that the head begins. */
export function withPasses(head: string, passes: readonly Uint8Array[]): Uint8Array[] {
  const [first, ...rest] = passes;
  const opening = Buffer.from(`${head.slice(0, -1)},"passes":[`);
  const inside = first === undefined ? [] : [first.subarray(1), ...rest];
  return [opening, ...inside, Buffer.from(']}')];
}

export function foundCraft(craft: CraftInput, fault: string | null, period: Period, nowMs: number): FoundCraft {
  const { id, name, shortName, spans } = craft;
  const span = spans.findLast((each) => each.fromMs < period.toMs);
  if (span === undefined) {
    const none = { elementsId: null, elementsEpochUtc: null, ageH: null, timingErrorS: null };
    return { id, name, shortName, ...none, freshness: 'none', fault: fault ?? `${name} has no elements yet.` };
  }
  const { epochMs, meanMotionRevPerDay } = span.elementSet;
  const { ageH, ...trust } = freshnessOf(epochMs, meanMotionRevPerDay, nowMs);
  const isCovered = span.ephemerides.some((each) => each.startMs <= period.fromMs && each.stopMs >= period.toMs);
  const { freshness, timingErrorS } = isCovered ? OWN_EPHEMERIS : trust;
  return {
    id,
    name,
    shortName,
    elementsId: span.elementSetId,
    elementsEpochUtc: utc(epochMs),
    ageH,
    timingErrorS,
    freshness,
    fault,
  };
}

export function foundAntenna(
  antenna: SaleAntenna,
  busy: AntennaInput['busy'],
  period: Period,
): FoundStation['antennas'][number] {
  const within = (each: Period): boolean => each.fromMs < period.toMs && each.toMs > period.fromMs;
  return {
    id: antenna.id,
    name: antenna.name,
    diameterM: antenna.diameterM,
    bands: [...new Set(antenna.bands.map((band) => band.band))],
    currency: antenna.price.currency,
    perMinuteMinor: antenna.price.perMinuteMinor,
    acceptance: antenna.acceptance,
    blackouts: antenna.blackouts.filter(within).map((each) => ({ ...utcInterval(each), reason: each.reason })),
    taken: takenIntervals(antenna.beams, busy, period).map(utcInterval),
  };
}

const ephemerisView = ({ id, source, startMs, stopMs, addedMs }: EphemerisInput): PassDetail['ephemeris'] => ({
  id,
  source,
  startUtc: utc(startMs),
  stopUtc: utc(stopMs),
  addedUtc: utc(addedMs),
});

/** What the card and the contact page share. */
export function detailView(answer: PassAnswer, need: Need): Omit<PassDetail, 'reasons' | 'quote'> {
  const { outcome, sale, craft, span } = answer;
  if (outcome.detail === null) throw new Error('A pass in full must come with its track.');
  const { track, sun, illumination, links } = outcome.detail;
  const { freshness, ageH, timingErrorS } = freshnessFor(answer);
  const used = span.ephemerides.find((each) => each.id === outcome.ephemerisId);
  return {
    spacecraft: { id: craft.id, name: craft.name, shortName: craft.shortName },
    antenna: {
      id: sale.id,
      name: sale.name,
      stationName: sale.stationName,
      ownerName: sale.ownerName,
      mask: sale.mask.map(([azimuthDeg, elevationDeg]): [number, number] => [azimuthDeg, elevationDeg]),
      timeZone: sale.timeZone,
    },
    geometry: outcome.pass,
    aosUtc: utc(outcome.aosMs),
    losUtc: utc(outcome.losMs),
    track,
    sun,
    illumination,
    links,
    mountGaps: outcome.gaps.map((gap) => ({ ...utcInterval(gap), code: gap.code, sentence: gap.sentence })),
    source: outcome.source,
    ephemeris: used === undefined ? null : ephemerisView(used),
    elements: { id: span.elementSetId, epochUtc: utc(span.elementSet.epochMs), ageH, timingErrorS, freshness },
    cautions: cautionsFor({
      need,
      sun,
      radiosOnFile: radiosFor(craft, need, []).length > 0,
      stale: freshness === 'stale',
      untrackable: outcome.gaps.map((gap) => gap.sentence),
    }),
    acceptance: sale.acceptance,
  };
}
