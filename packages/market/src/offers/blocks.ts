/** Everything that can take a minute of a pass away, each with its code, its word for the board and its sentence. */
import { type Interval, subtractIntervals } from '../interval.js';
import { DAY_MS, MINUTE_MS } from '../time/local-time.js';
import { lengthText, timeText } from '../words/words.js';
import type { LostCode, OfferBlackout, OfferPass, OffersInput } from './offer-types.js';

export interface Words {
  readonly sentence: string;
  readonly remedy: string;
}

/** Time that is ruled out. Its words are made only when it really claims some of a pass. */
export interface Block extends Interval {
  readonly code: LostCode;
  readonly word: string;
  readonly say: () => Words;
}

const EVER = { fromMs: Number.NEGATIVE_INFINITY, toMs: Number.POSITIVE_INFINITY };
const WORD_OF_OBJECTION = {
  band: 'band',
  polarisation: 'polarisation',
  power: 'power',
  incompatible: 'no fit',
  elements: 'elements',
} as const;

/** The part of a sorted list that can touch `[fromMs, toMs)`, given the longest stretch in the list. */
export function windowOf<T extends Interval>(
  sorted: readonly T[],
  fromMs: number,
  toMs: number,
  longestMs: number,
): T[] {
  let low = 0;
  let high = sorted.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((sorted[middle] as T).fromMs < fromMs - longestMs) low = middle + 1;
    else high = middle;
  }
  const found: T[] = [];
  for (let index = low; index < sorted.length && (sorted[index] as T).fromMs < toMs; index += 1) {
    const each = sorted[index] as T;
    if (each.toMs > fromMs) found.push(each);
  }
  return found;
}

export const longestMs = (intervals: readonly Interval[]): number =>
  intervals.reduce((longest, each) => Math.max(longest, each.toMs - each.fromMs), 0);

/** Lists that are the same for every pass of one search, sorted once. */
export interface PreparedTimes {
  readonly open: readonly Interval[];
  readonly longestOpenMs: number;
  /** Blackouts widened by the guards: the dish must not move for a set-up while people work on it. */
  readonly blackouts: readonly (OfferBlackout & { readonly blackout: OfferBlackout })[];
  readonly longestBlackoutMs: number;
}

/** Blocks that hold for every beam, in the order in which they claim time. */
export function commonBlocks(pass: OfferPass, input: OffersInput, times: PreparedTimes): Block[] {
  return [
    ...input.objections.map(
      (objection): Block => ({
        ...EVER,
        code: objection.code,
        word: WORD_OF_OBJECTION[objection.code],
        say: () => objection,
      }),
    ),
    ...clearanceBlocks(pass, input),
    ...(pass.limits ?? []).map(
      (limit): Block => ({
        ...limit,
        code: 'mount',
        word: 'mount',
        say: () => ({ sentence: limit.sentence, remedy: 'Take the part of the pass that the antenna can follow.' }),
      }),
    ),
    ...noticeBlocks(pass, input),
    ...closedBlocks(pass, input, times),
    ...windowOf(times.blackouts, pass.aosMs, pass.losMs, times.longestBlackoutMs).map((each) =>
      blackoutBlock(each.blackout, each, pass),
    ),
    ...input.spacecraftContacts.map(
      (contact): Block => ({
        fromMs: contact.fromMs,
        toMs: contact.toMs,
        code: 'spacecraft busy',
        word: 'busy',
        say: () => ({
          sentence: `${input.spacecraft} already has a contact with ${contact.antennaName} from ${timeText(contact.fromMs, pass.aosMs)} to ${timeText(contact.toMs, pass.aosMs)}, and one radio serves one antenna.`,
          remedy: 'Ask for two antennas at once if that is meant, or cancel the other contact.',
        }),
      }),
    ),
  ];
}

function clearanceBlocks(pass: OfferPass, { clearance }: OffersInput): Block[] {
  if (clearance === null) return [];
  return subtractIntervals([{ fromMs: pass.aosMs, toMs: pass.losMs }], clearance.valid).map(
    (gap): Block => ({ ...gap, code: 'clearance', word: 'clearance', say: () => clearance }),
  );
}

function noticeBlocks(pass: OfferPass, { antenna, nowMs }: OffersInput): Block[] {
  const fromSetupMs = nowMs + antenna.setupS * 1000;
  const fromNoticeMs = nowMs + antenna.minNoticeMin * MINUTE_MS;
  const horizonMs = nowMs + antenna.horizonDays * DAY_MS;
  // Most passes of a search are neither soon nor far off; building nothing for them is what keeps a large search quick.
  if (pass.aosMs >= fromSetupMs && pass.aosMs >= fromNoticeMs && pass.losMs <= horizonMs) return [];
  const later = 'Choose a later pass.';
  return [
    {
      fromMs: Number.NEGATIVE_INFINITY,
      toMs: fromSetupMs,
      code: 'too late',
      word: 'too late',
      say: () => ({
        sentence:
          pass.aosMs <= nowMs
            ? `This pass began at ${timeText(pass.aosMs, nowMs)}.`
            : `The pass begins at ${timeText(pass.aosMs, nowMs)}, and ${lengthText(antenna.setupS * 1000)} of set-up no longer fit before it.`,
        remedy: later,
      }),
    },
    {
      fromMs: Number.NEGATIVE_INFINITY,
      toMs: fromNoticeMs,
      code: 'notice',
      word: 'notice',
      say: () => ({
        sentence: `${antenna.name} wants ${lengthText(antenna.minNoticeMin * MINUTE_MS)} of notice. Bought now, a contact begins at ${timeText(fromNoticeMs, pass.aosMs)} at the earliest; this pass begins at ${timeText(pass.aosMs, pass.aosMs)}.`,
        remedy: later,
      }),
    },
    {
      fromMs: horizonMs,
      toMs: Number.POSITIVE_INFINITY,
      code: 'horizon',
      word: 'not yet',
      say: () => ({
        sentence: `${antenna.name} is sold ${antenna.horizonDays} days ahead, now until ${timeText(horizonMs, Number.NaN)}.`,
        remedy: `It can be bought from ${timeText(pass.losMs - antenna.horizonDays * DAY_MS, Number.NaN)} on.`,
      }),
    },
  ];
}

function closedBlocks(pass: OfferPass, { antenna }: OffersInput, times: PreparedTimes): Block[] {
  const open = windowOf(times.open, pass.aosMs, pass.losMs, times.longestOpenMs);
  const [only] = open;
  if (only !== undefined && only.fromMs <= pass.aosMs && only.toMs >= pass.losMs) return [];
  return subtractIntervals([{ fromMs: pass.aosMs, toMs: pass.losMs }], open).map(
    (gap): Block => ({
      ...gap,
      code: 'closed',
      word: 'closed',
      say: () => ({
        sentence: `${antenna.name} is not open from ${timeText(gap.fromMs, pass.aosMs)} to ${timeText(gap.toMs, pass.aosMs)} of this pass.`,
        remedy: 'Choose a pass within its opening hours, or ask the owner to open for you.',
      }),
    }),
  );
}

function blackoutBlock(blackout: OfferBlackout, guarded: Interval, pass: OfferPass): Block {
  return {
    fromMs: guarded.fromMs,
    toMs: guarded.toMs,
    code: 'blackout',
    word: 'blackout',
    say: () => ({
      sentence: `The antenna is out of service from ${timeText(blackout.fromMs, pass.aosMs)} to ${timeText(blackout.toMs, pass.aosMs)} (${blackout.reason}); set-up and teardown stay clear of it.`,
      remedy: 'Choose a pass outside that time, or another antenna.',
    }),
  };
}
