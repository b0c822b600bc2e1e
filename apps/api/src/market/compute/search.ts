/** A whole search, within one thread: from elements and antennas to the text that travels to the browser. */
import type { Interval } from '@skyberth/market';
import { OrbitError } from '@skyberth/orbit';
import type { AntennaInput, CraftInput, SearchJob, SearchOutcome } from '../workers/job-types.js';
import type { Horizons } from './horizons.js';
import type { WrittenText } from './json-writer.js';
import { gapsNotSold, type MountGaps } from './mount-gaps.js';
import { type Fit, fitOf } from './objections.js';
import type { OpeningHours } from './opening-hours.js';
import { type PairAnswer, type PairAnswers, spansName } from './pair-answers.js';
import type { PassBlocks } from './pass-blocks.js';
import { isForSale, type PassTexts, spanOf } from './pass-text.js';
import { Pulse, SearchStopped } from './pulse.js';
import { type QuestionNames, sameAnswer } from './sale-validity.js';
import { offersOf, type Sale, saleOf } from './sales.js';
import type { Stay } from './stay.js';
import { staysOf } from './stays-of.js';
import type { TrackTables } from './track-table.js';

export interface SearchTools {
  readonly blocks: PassBlocks;
  readonly horizons: Horizons;
  readonly gaps: MountGaps;
  readonly hours: OpeningHours;
  readonly names: QuestionNames;
  readonly pairs: PairAnswers;
  readonly tables: TrackTables;
  readonly texts: PassTexts;
}

const DAY_MS = 86_400_000;

/** Carries a search out. Elements that cannot be used are named; the other spacecraft are searched all the same. */
export function searchPasses(job: SearchJob, tools: SearchTools): SearchOutcome {
  const pulse = new Pulse(job.pulse, job.antennas.length * daysOf(job));
  const answers: PairAnswer[] = [];
  const faults: { spacecraftId: string; sentence: string }[] = [];
  let passes = 0;
  try {
    for (const craft of job.spacecraft) {
      try {
        const { found, fault } = searchCraft(craft, job, tools, job.maxPasses - passes, pulse);
        if (found === 'too many') return { kind: 'too many' };
        for (const each of found) {
          answers.push(each);
          passes += each.passes;
        }
        if (fault !== null) faults.push({ spacecraftId: craft.id, sentence: fault });
      } catch (error) {
        if (!(error instanceof OrbitError)) throw error;
        faults.push({ spacecraftId: craft.id, sentence: error.message });
      }
      pulse.craftDone();
    }
  } catch (error) {
    if (error instanceof SearchStopped) return { kind: 'cancelled' };
    throw error;
  }
  const forSale = answers.reduce((sum, each) => sum + each.forSale, 0);
  return { kind: 'found', json: jsonOf(answers), passes, forSale, faults };
}

/** Days of the period, begun ones counted: what a search of one antenna looks at. */
export const daysOf = ({ fromMs, toMs }: Interval): number => Math.ceil(toMs / DAY_MS) - Math.floor(fromMs / DAY_MS);

/** The text of all passes in few pieces: what was written one after the other lies so in memory. */
function jsonOf(answers: readonly PairAnswer[]): Uint8Array[] {
  const pieces: WrittenText[] = [];
  for (const { texts } of answers) for (const text of texts) append(pieces, text);
  return pieces.map(({ bytes, from, to }) => new Uint8Array(bytes.buffer, bytes.byteOffset + from, to - from));
}

function append(pieces: WrittenText[], text: WrittenText): void {
  const last = pieces.at(-1);
  if (last !== undefined && last.bytes === text.bytes && last.to === text.from) {
    pieces[pieces.length - 1] = { ...last, to: text.to };
  } else {
    pieces.push(text);
  }
}

/** An antenna with what the question about it is called. */
interface View {
  readonly antenna: AntennaInput;
  readonly fit: Fit;
  readonly name: string;
  readonly kept: PairAnswer | null;
}

/** Every pass of one spacecraft, antenna by antenna, sorted by AOS. Only what is not kept from before is worked out. */
function searchCraft(
  craft: CraftInput,
  job: SearchJob,
  tools: SearchTools,
  room: number,
  pulse: Pulse,
): { found: PairAnswer[] | 'too many'; fault: string | null } {
  const spans = spansName(craft);
  const views = job.antennas.map((antenna): View => {
    const fit = fitOf(craft, antenna, job.wish);
    const name = tools.names.of(craft, antenna, fit, job.wish);
    return { antenna, fit, name, kept: tools.pairs.get(craft, antenna, { name, spans, ...job }) };
  });
  const fresh = views.filter((view) => view.kept === null);
  const { stays, fault } = staysOf(tools.blocks, {
    craft,
    antennas: fresh.map(({ antenna, fit }) => ({ antenna, floorDeg: fit.floorDeg })),
    fromMs: job.fromMs,
    toMs: job.toMs,
    afterDay: (antennas) => pulse.beat(antennas),
  });
  const wanted = new Map(
    fresh.map((view, index) => [view, (stays[index] ?? []).filter((stay) => isWanted(stay, job))] as const),
  );
  const passes = views.reduce((sum, view) => sum + (view.kept?.passes ?? wanted.get(view)?.length ?? 0), 0);
  if (passes > room) return { found: 'too many', fault };
  const found = views.map((view): PairAnswer => {
    if (view.kept !== null) return view.kept;
    const { answer, at } = answerOf(craft, view, wanted.get(view) ?? [], job, tools);
    // What could not be computed is tried again the next time, so that its fault is told again.
    if (at !== null && fault === null)
      tools.pairs.keep(craft, view.antenna, { name: view.name, spans, ...job }, at, answer);
    return answer;
  });
  return { found, fault };
}

/** The passes of one spacecraft over one antenna as text, and for which instants of asking they stay as they are. */
function answerOf(
  craft: CraftInput,
  { antenna, fit, name }: View,
  stays: readonly Stay[],
  job: SearchJob,
  tools: SearchTools,
): { answer: PairAnswer; at: Interval | null } {
  const { wish, nowMs, fromMs, toMs } = job;
  if (stays.length === 0) return { answer: { texts: [], passes: 0, forSale: 0 }, at: ALWAYS };
  const fresh = stays.filter((stay) => !isKnown(stay, name, nowMs));
  const open = tools.hours.of(antenna, fromMs, toMs);
  const horizon = tools.horizons.of(antenna, fit.floorDeg);
  const limits = fresh.map((stay) =>
    gapsNotSold(stay, tools.gaps.of({ stay, span: spanOf(craft, stay), antenna, horizon })),
  );
  const question = { craft, antenna, fit, open, stays: fresh, limits, nowMs, wish };
  const sales = offersOf(question).map((offers, place) => saleOf(fresh[place] as Stay, offers, question));
  const texts: WrittenText[] = [];
  let forSale = 0;
  let at: Interval | null = ALWAYS;
  let next = 0;
  for (const stay of stays) {
    const known = isKnown(stay, name, nowMs) ? stay.answer : null;
    if (known !== null) {
      append(texts, known.text);
      forSale += known.forSale ? 1 : 0;
      at = overlap(at, known.at);
      continue;
    }
    const sale = sales[next++] as Sale;
    const same = sameAnswer(stay, antenna, nowMs);
    const keep = same === null ? null : { question: name, at: same };
    append(texts, tools.texts.write({ stay, craft, antenna, horizon, sale, keep }));
    forSale += isForSale(sale) ? 1 : 0;
    at = overlap(at, same);
  }
  return { answer: { texts, passes: stays.length, forSale }, at };
}

const ALWAYS: Interval = { fromMs: Number.NEGATIVE_INFINITY, toMs: Number.POSITIVE_INFINITY };

const overlap = (a: Interval | null, b: Interval | null): Interval | null =>
  a === null || b === null ? null : { fromMs: Math.max(a.fromMs, b.fromMs), toMs: Math.min(a.toMs, b.toMs) };

function isKnown({ answer }: Stay, question: string, nowMs: number): boolean {
  return answer !== null && answer.question === question && nowMs >= answer.at.fromMs && nowMs <= answer.at.toMs;
}

function isWanted(stay: Stay, { wish }: SearchJob): boolean {
  return stay.maxElevationDeg >= wish.lowestElevationDeg && stay.losMs - stay.aosMs >= wish.shortestS * 1000;
}
