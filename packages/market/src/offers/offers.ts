/**
 * Offers: passes minus everything that blocks them. Reasons claim time in a fixed order, so each lost instant has exactly
 * one; what nothing claims, and is long enough, is for sale.
 */
import { type Interval, mergeIntervals, subtractIntervals, totalMs } from '../interval.js';
import { MarketError } from '../market-error.js';
import { lengthText, timeText } from '../words/words.js';
import { type Block, commonBlocks, longestMs, type PreparedTimes, type Words } from './blocks.js';
import { bookingBlocks, type GuardedBooking } from './booking-blocks.js';
import {
  type LostStretch,
  type Offer,
  type OfferAntenna,
  type OfferPass,
  type OffersInput,
  type PassOffers,
} from './offer-types.js';
import { refusalOf } from './refusal.js';
import { azimuthAlong } from './turn.js';

interface Prepared extends PreparedTimes {
  readonly input: OffersInput;
  /** By beam, 1 first; sorted by beginning. */
  readonly beams: readonly (readonly GuardedBooking[])[];
  readonly longestGuardMs: number;
}

/**
 * What of each pass can be sold over one antenna, and why the rest cannot. Answers in the order of `passes`.
 * Edges are as exact as the passes'; round inwards before storing. Throws `bad antenna` for lengths or beams that contradict
 * themselves, or a booking on a beam that does not exist.
 */
export function offersFor(input: OffersInput): PassOffers[] {
  const prepared = prepare(input);
  return input.passes.map((pass) => offersOfPass(pass, prepared));
}

function prepare(input: OffersInput): Prepared {
  const { antenna } = input;
  const refuse = (why: string): never => {
    throw new MarketError('bad antenna', `${antenna.name}: ${why}`, { antenna: antenna.name });
  };
  if (!(antenna.maxContactS >= antenna.minContactS && antenna.minContactS >= 0))
    refuse(`the longest contact (${antenna.maxContactS} s) is shorter than the shortest (${antenna.minContactS} s).`);
  if (!(Number.isInteger(antenna.beams) && antenna.beams >= 1)) refuse(`${antenna.beams} beams are impossible.`);
  const beams = Array.from({ length: antenna.beams }, (): GuardedBooking[] => []);
  for (const booking of input.bookings) {
    const beam = beams[booking.beam - 1];
    if (beam === undefined) return refuse(`a booking lies on beam ${booking.beam} of ${antenna.beams}.`);
    beam.push({ fromMs: booking.guardFromMs, toMs: booking.guardToMs, booking });
  }
  for (const beam of beams) beam.sort((a, b) => a.fromMs - b.fromMs);
  const open = mergeIntervals(input.open);
  const blackouts = input.blackouts
    .map((blackout) => ({
      fromMs: blackout.fromMs - antenna.teardownS * 1000,
      toMs: blackout.toMs + antenna.setupS * 1000,
      reason: blackout.reason,
      blackout,
    }))
    .sort((a, b) => a.fromMs - b.fromMs);
  return {
    input,
    open,
    longestOpenMs: longestMs(open),
    blackouts,
    longestBlackoutMs: longestMs(blackouts),
    beams,
    longestGuardMs: longestMs(beams.flat()),
  };
}

/** Takes a block's time out of what remains and writes down what it claimed. */
function claim(remaining: Interval[], block: Block, lost: LostStretch[]): Interval[] {
  if (!remaining.some((piece) => piece.fromMs < block.toMs && block.fromMs < piece.toMs)) return remaining;
  let words: Words | undefined;
  const rest: Interval[] = [];
  for (const piece of remaining) {
    const fromMs = Math.max(piece.fromMs, block.fromMs);
    const toMs = Math.min(piece.toMs, block.toMs);
    if (toMs <= fromMs) {
      rest.push(piece);
      continue;
    }
    words ??= block.say();
    lost.push({ fromMs, toMs, code: block.code, word: block.word, sentence: words.sentence, remedy: words.remedy });
    if (piece.fromMs < fromMs) rest.push({ fromMs: piece.fromMs, toMs: fromMs });
    if (toMs < piece.toMs) rest.push({ fromMs: toMs, toMs: piece.toMs });
  }
  return rest;
}

interface BeamResult {
  readonly beam: number;
  readonly saleable: readonly Interval[];
  /** With reasons, for everything of the pass that this beam cannot sell. */
  readonly lost: readonly LostStretch[];
}

function offersOfPass(pass: OfferPass, prepared: Prepared): PassOffers {
  const { input, beams } = prepared;
  const commonLost: LostStretch[] = [];
  let common: Interval[] = pass.losMs > pass.aosMs ? [{ fromMs: pass.aosMs, toMs: pass.losMs }] : [];
  for (const block of commonBlocks(pass, input, prepared)) {
    if (common.length === 0) break;
    common = claim(common, block, commonLost);
  }
  const azimuthAt = azimuthAlong(pass);
  const results = beams.map((bookings, index): BeamResult => {
    const lost = [...commonLost];
    let free = common;
    if (free.length > 0) {
      for (const block of bookingBlocks({
        pass,
        azimuthAt,
        antenna: input.antenna,
        bookings,
        longestGuardMs: prepared.longestGuardMs,
      }))
        free = claim(free, block, lost);
    }
    return { beam: index + 1, ...applyLengths(pass, input.antenna, free, lost) };
  });
  const best = results.reduce((a, b) => (totalMs(b.saleable) > totalMs(a.saleable) ? b : a));
  const offers = offersOfBeams(pass, input.antenna, results);
  const lost = joinLost(results.length === 1 ? best.lost : outsideOffers(best.lost, offers));
  return { passId: pass.id, offers, lost, refusal: refusalOf(pass, input.antenna, offers, lost) };
}

/** Drops pieces that may not be sold for their length, each with its reason. */
function applyLengths(
  pass: OfferPass,
  antenna: OfferAntenna,
  free: readonly Interval[],
  lost: LostStretch[],
): { saleable: Interval[]; lost: LostStretch[] } {
  const saleable: Interval[] = [];
  for (const piece of free) {
    const why = antenna.partsAllowed ? shortReason(pass, antenna, piece) : wholeReason(pass, antenna, piece, lost);
    if (why === null) saleable.push({ fromMs: piece.fromMs, toMs: piece.toMs });
    else lost.push({ fromMs: piece.fromMs, toMs: piece.toMs, ...why });
  }
  return { saleable, lost };
}

type Reason = Omit<LostStretch, 'fromMs' | 'toMs'>;

function shortReason(pass: OfferPass, antenna: OfferAntenna, piece: Interval): Reason | null {
  const lengthMs = piece.toMs - piece.fromMs;
  if (lengthMs >= antenna.minContactS * 1000) return null;
  const whole = piece.fromMs === pass.aosMs && piece.toMs === pass.losMs;
  return {
    code: 'short',
    word: 'short',
    sentence: `${whole ? 'The pass lasts' : `From ${timeText(piece.fromMs, pass.aosMs)} only`} ${lengthText(lengthMs)}${whole ? '' : ' are free'}; ${antenna.name} sells contacts of at least ${lengthText(antenna.minContactS * 1000)}.`,
    remedy: 'Choose a longer pass.',
  };
}

function wholeReason(
  pass: OfferPass,
  antenna: OfferAntenna,
  piece: Interval,
  lost: readonly LostStretch[],
): Reason | null {
  if (piece.fromMs > pass.aosMs || piece.toMs < pass.losMs) {
    const cause = lost.reduce<LostStretch | undefined>(
      (a, b) => (a === undefined || b.toMs - b.fromMs > a.toMs - a.fromMs ? b : a),
      undefined,
    );
    return {
      code: 'whole only',
      word: cause?.word ?? 'whole only',
      sentence: `${antenna.name} sells whole passes only, and part of this one cannot be sold.`,
      remedy: 'Ask the owner to sell parts of passes, or choose another pass.',
    };
  }
  if (pass.clippedStart || pass.clippedEnd) {
    return {
      code: 'period',
      word: 'cut off',
      sentence: `The pass goes on beyond the period looked at, and ${antenna.name} sells whole passes only.`,
      remedy: 'Widen the period to see the whole pass.',
    };
  }
  if (piece.toMs - piece.fromMs > antenna.maxContactS * 1000) {
    return {
      code: 'long',
      word: 'long',
      sentence: `The pass lasts ${lengthText(piece.toMs - piece.fromMs)}; ${antenna.name} sells whole passes of at most ${lengthText(antenna.maxContactS * 1000)}.`,
      remedy: 'Choose a shorter pass, or ask the owner to sell parts.',
    };
  }
  return shortReason(pass, antenna, piece);
}

/** One offer for each saleable piece that no other beam's piece already contains. */
function offersOfBeams(pass: OfferPass, antenna: OfferAntenna, results: readonly BeamResult[]): Offer[] {
  const pieces = results.flatMap(({ beam, saleable }) => saleable.map(({ fromMs, toMs }) => ({ fromMs, toMs, beam })));
  if (results.length === 1) return pieces.map((piece) => offerOf(pass, antenna, piece));
  const contains = (a: Interval, b: Interval): boolean => a.fromMs <= b.fromMs && a.toMs >= b.toMs;
  const same = (a: Interval, b: Interval): boolean => a.fromMs === b.fromMs && a.toMs === b.toMs;
  const kept = pieces.filter(
    (piece, index) =>
      !pieces.some(
        (other, place) => place !== index && contains(other, piece) && (!same(other, piece) || place < index),
      ),
  );
  return kept.sort((a, b) => a.fromMs - b.fromMs || a.beam - b.beam).map((piece) => offerOf(pass, antenna, piece));
}

function offerOf(pass: OfferPass, antenna: OfferAntenna, piece: Interval & { readonly beam: number }): Offer {
  const lengthMs = piece.toMs - piece.fromMs;
  const longMs = antenna.maxContactS * 1000;
  const whole =
    piece.fromMs === pass.aosMs &&
    piece.toMs === pass.losMs &&
    !pass.clippedStart &&
    !pass.clippedEnd &&
    lengthMs <= longMs;
  const startMs = Math.min(Math.max(pass.tcaMs - longMs / 2, piece.fromMs), piece.toMs - longMs);
  return {
    fromMs: piece.fromMs,
    toMs: piece.toMs,
    beam: piece.beam,
    wholePass: whole,
    suggested:
      lengthMs <= longMs ? { fromMs: piece.fromMs, toMs: piece.toMs } : { fromMs: startMs, toMs: startMs + longMs },
    minPartS: antenna.partsAllowed ? antenna.minContactS : lengthMs / 1000,
    maxPartS: Math.min(longMs, lengthMs) / 1000,
  };
}

/** What no beam can sell, with the reasons of the beam that sells most. */
function outsideOffers(lost: readonly LostStretch[], offers: readonly Offer[]): LostStretch[] {
  return lost.flatMap((stretch) => subtractIntervals([stretch], offers).map((piece) => ({ ...stretch, ...piece })));
}

/** Sorted by beginning; stretches that touch and have one reason are one. */
function joinLost(lost: readonly LostStretch[]): LostStretch[] {
  if (lost.length < 2) return [...lost];
  const sorted = [...lost].sort((a, b) => a.fromMs - b.fromMs);
  const joined: LostStretch[] = [];
  for (const stretch of sorted) {
    const before = joined.at(-1);
    if (
      before !== undefined &&
      before.toMs === stretch.fromMs &&
      before.code === stretch.code &&
      before.sentence === stretch.sentence
    )
      joined[joined.length - 1] = { ...before, toMs: stretch.toMs };
    else joined.push(stretch);
  }
  return joined;
}
