/** One pass for one caller: recomputed from elements, never taken from what the caller says it is. */
import { type Offer, type PassOffers } from '@skyberth/market';
import type { MountGap } from '@skyberth/orbit';
import type { Reason } from '@skyberth/shared';
import type { PassJob, PassOutcome } from '../workers/job-types.js';
import { gapsNotSold, gapsWithin } from './mount-gaps.js';
import { fitOf } from './objections.js';
import { spanOf } from './pass-text.js';
import { trackOf } from './pass-track.js';
import { priceOf } from './price.js';
import { offersOf, reasonOf, utc } from './sales.js';
import type { SearchTools } from './search.js';
import { geometryOf, type Stay } from './stay.js';
import { staysOf } from './stays-of.js';
import { stretchOf } from './stretch.js';

/**
 * How far the ends of a request may lie from the ends of what is for sale and still mean them. Times on the wire are whole
 * milliseconds, so an honest request is exact; one from older elements is not, and is told so.
 */
export const SNAP_MS = 1;

/** How far about the request the pass is looked for; a pass longer than that is as good as permanent. */
const REACH_MS = 86_400_000;

interface Stretch {
  readonly aosMs: number;
  readonly losMs: number;
}

/** Finds the pass that a request means, and says whether, and for how much, that very stretch can be sold. */
export function onePass(job: PassJob, tools: SearchTools): PassOutcome {
  const { spacecraft: craft, antenna, need, nowMs } = job;
  const fit = fitOf(craft, antenna, { need, bands: job.bands });
  const { stays, fault } = staysOf(tools.blocks, {
    craft,
    antennas: [{ antenna, floorDeg: fit.floorDeg }],
    fromMs: job.aosMs - REACH_MS,
    toMs: job.losMs + REACH_MS,
  });
  const stay = meant(stays[0] ?? [], job);
  if (stay === null && fault !== null) return { kind: 'elements unusable', sentence: fault };
  if (stay === null) return { kind: 'no pass', reasons: [noPass(job)] };
  const horizon = tools.horizons.of(antenna, fit.floorDeg);
  const gaps = tools.gaps.of({ stay, span: spanOf(craft, stay), antenna, horizon });
  if (job.booked) return answer(job, tools, { stay, gaps }, job, []);
  const open = tools.hours.of(antenna, stay.aosMs, stay.losMs);
  const [offers] = offersOf({ craft, antenna, fit, open, stays: [stay], limits: [gapsNotSold(stay, gaps)], nowMs });
  if (offers === undefined) throw new Error('One pass must have one answer.');
  const stretch = sold(offers, job);
  if (stretch !== null) return answer(job, tools, { stay, gaps }, stretch, []);
  return answer(job, tools, { stay, gaps }, inside(stay, job), refusal(offers, job));
}

/** The stay that shares most time with the request. */
function meant(stays: readonly Stay[], asked: Stretch): Stay | null {
  let best: Stay | null = null;
  let mostMs = 0;
  for (const stay of stays) {
    const sharedMs = Math.min(stay.losMs, asked.losMs) - Math.max(stay.aosMs, asked.aosMs);
    if (sharedMs > mostMs) {
      best = stay;
      mostMs = sharedMs;
    }
  }
  return best;
}

/** The request as it can be sold: its ends moved onto those of an offer where they mean them; null where it cannot. */
function sold(offers: PassOffers, asked: Stretch): Stretch | null {
  for (const offer of offers.offers) {
    const [fromMs, toMs] = [Math.ceil(offer.fromMs), Math.floor(offer.toMs)];
    const aosMs = Math.abs(asked.aosMs - fromMs) <= SNAP_MS ? fromMs : asked.aosMs;
    const losMs = Math.abs(asked.losMs - toMs) <= SNAP_MS ? toMs : asked.losMs;
    if (aosMs >= fromMs && losMs <= toMs && lengthFits(offer, losMs - aosMs)) return { aosMs, losMs };
  }
  return null;
}

/** A length may miss its bounds by the rounding of both its ends. */
function lengthFits(offer: Offer, lengthMs: number): boolean {
  return lengthMs >= offer.minPartS * 1000 - 2 * SNAP_MS && lengthMs <= offer.maxPartS * 1000 + 2 * SNAP_MS;
}

/** The part of the request that lies in the pass, to be shown where it cannot be sold. */
function inside(stay: Stay, asked: Stretch): Stretch {
  const aosMs = Math.abs(asked.aosMs - stay.aosMs) <= SNAP_MS ? stay.aosMs : Math.max(asked.aosMs, stay.aosMs);
  const losMs = Math.abs(asked.losMs - stay.losMs) <= SNAP_MS ? stay.losMs : Math.min(asked.losMs, stay.losMs);
  return { aosMs, losMs };
}

function noPass(asked: Stretch): Reason {
  return {
    code: 'no pass',
    word: 'no pass',
    sentence: `By the elements in force the spacecraft is not above this antenna’s horizon between ${utc(asked.aosMs)} and ${utc(asked.losMs)}.`,
    remedy: 'Search again.',
  };
}

/** Why the request cannot be sold: what blocks it, or that it does not lie in what is for sale. */
function refusal(offers: PassOffers, asked: Stretch): Reason[] {
  const blocked = offers.lost.filter(
    (lost) => lost.fromMs < asked.losMs - SNAP_MS && lost.toMs > asked.aosMs + SNAP_MS,
  );
  const reasons = distinct(blocked.map(reasonOf));
  if (reasons.length > 0) return reasons;
  const first = offers.offers[0];
  if (first === undefined) return offers.refusal === null ? [] : [reasonOf(offers.refusal)];
  const range =
    first.minPartS === first.maxPartS
      ? 'as a whole'
      : `in parts of ${Math.ceil(first.minPartS)} to ${Math.floor(first.maxPartS)} s`;
  return [
    {
      code: 'not as asked',
      word: 'moved',
      sentence: `Of this pass ${utc(Math.ceil(first.fromMs))} to ${utc(Math.floor(first.toMs))} is for sale, ${range}; you asked for ${utc(asked.aosMs)} to ${utc(asked.losMs)}.`,
      remedy: 'Newer elements or another sale may have changed it since you looked. Search again.',
    },
  ];
}

function distinct(reasons: readonly Reason[]): Reason[] {
  const seen = new Set<string>();
  return reasons.filter((reason) => !seen.has(reason.sentence) && seen.add(reason.sentence));
}

function answer(
  job: PassJob,
  tools: SearchTools,
  { stay, gaps }: { stay: Stay; gaps: readonly MountGap[] },
  stretch: Stretch,
  reasons: readonly Reason[],
): PassOutcome {
  const { spacecraft: craft, antenna } = job;
  const span = spanOf(craft, stay);
  const source = tools.tables.source(span);
  const part = stretchOf({ stay, source, site: antenna.site, fromMs: stretch.aosMs, toMs: stretch.losMs });
  const origin = tools.tables.originOf(span, part);
  const forSale = !job.booked && reasons.length === 0;
  return {
    kind: 'pass',
    elementSetId: stay.elementSetId,
    source: origin.source,
    ephemerisId: origin.ephemeris?.id ?? null,
    pass: geometryOf(stay),
    aosMs: part.aosMs,
    tcaMs: part.tcaMs,
    losMs: part.losMs,
    part: geometryOf(part),
    gaps: gapsWithin(gaps, part),
    reasons,
    price: forSale ? priceOf(antenna, { fromMs: part.aosMs, toMs: part.losMs }, job.nowMs) : null,
    detail: job.withTrack ? trackOf({ craft, antenna, source, part, need: job.need, bands: job.bands }) : null,
  };
}
