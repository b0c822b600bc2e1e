/** A whole search, within one thread: from elements and antennas to the text that travels to the browser. */
import { OrbitError } from '@skyberth/orbit';
import type { CraftInput, SearchJob, SearchOutcome } from '../workers/job-types.js';
import type { Horizons } from './horizons.js';
import type { WrittenText } from './json-writer.js';
import { fitOf } from './objections.js';
import type { OpeningHours } from './opening-hours.js';
import type { PassBlocks } from './pass-blocks.js';
import { isForSale, type PassTexts, type Sent } from './pass-text.js';
import { type QuestionNames, sameAnswer } from './sale-validity.js';
import { offersOf, type Sale, saleOf } from './sales.js';
import type { SentAnswer, Stay } from './stay.js';
import { staysOf } from './stays-of.js';
import type { TrackTables } from './track-table.js';

export interface SearchTools {
  readonly blocks: PassBlocks;
  readonly horizons: Horizons;
  readonly hours: OpeningHours;
  readonly names: QuestionNames;
  readonly tables: TrackTables;
  readonly texts: PassTexts;
}

/** A pass of the answer: its text from before, or what there is to write. */
type Found = { readonly known: SentAnswer } | { readonly sent: Sent };

/** Carries a search out. Elements that cannot be used are named; the other spacecraft are searched all the same. */
export function searchPasses(job: SearchJob, tools: SearchTools): SearchOutcome {
  const cancel = job.cancel === null ? null : new Int32Array(job.cancel);
  const all: Found[] = [];
  const faults: { spacecraftId: string; sentence: string }[] = [];
  for (const craft of job.spacecraft) {
    if (cancel !== null && Atomics.load(cancel, 0) !== 0) return { kind: 'cancelled' };
    try {
      const { found, fault } = searchCraft(craft, job, tools, job.maxPasses - all.length);
      if (found === 'too many') return { kind: 'too many' };
      for (const each of found) all.push(each);
      if (fault !== null) faults.push({ spacecraftId: craft.id, sentence: fault });
    } catch (error) {
      if (!(error instanceof OrbitError)) throw error;
      faults.push({ spacecraftId: craft.id, sentence: error.message });
    }
  }
  const forSale = all.filter((each) => ('known' in each ? each.known.forSale : isForSale(each.sent.sale))).length;
  return { kind: 'found', json: jsonOf(all, tools), passes: all.length, forSale, faults };
}

/** The text of all passes in few pieces: what was written one after the other lies so in memory. */
function jsonOf(all: readonly Found[], { texts }: SearchTools): Uint8Array[] {
  const pieces: WrittenText[] = [];
  for (const each of all) {
    const text = 'known' in each ? each.known.text : texts.write(each.sent);
    const last = pieces.at(-1);
    if (last !== undefined && last.bytes === text.bytes && last.to === text.from) {
      pieces[pieces.length - 1] = { ...last, to: text.to };
    } else {
      pieces.push(text);
    }
  }
  return pieces.map(({ bytes, from, to }) => new Uint8Array(bytes.buffer, bytes.byteOffset + from, to - from));
}

/** Every pass of one spacecraft, antenna by antenna, sorted by AOS. */
function searchCraft(
  craft: CraftInput,
  job: SearchJob,
  tools: SearchTools,
  room: number,
): { found: Found[] | 'too many'; fault: string | null } {
  const { wish, nowMs, fromMs, toMs } = job;
  const views = job.antennas.map((antenna) => ({ antenna, fit: fitOf(craft, antenna, wish) }));
  const { stays, fault } = staysOf(tools.blocks, {
    craft,
    antennas: views.map(({ antenna, fit }) => ({ antenna, floorDeg: fit.floorDeg })),
    fromMs,
    toMs,
  });
  const wanted = stays.map((each) => each.filter((stay) => isWanted(stay, job)));
  if (wanted.reduce((sum, each) => sum + each.length, 0) > room) return { found: 'too many', fault };
  const found = views.flatMap(({ antenna, fit }, index): Found[] => {
    const own = wanted[index];
    if (own === undefined || own.length === 0) return [];
    const name = tools.names.of(craft, antenna, fit, wish);
    const fresh = own.filter((stay) => !isKnown(stay, name, nowMs));
    const open = tools.hours.of(antenna, fromMs, toMs);
    const horizon = tools.horizons.of(antenna, fit.floorDeg);
    const question = { craft, antenna, fit, open, stays: fresh, nowMs, wish };
    const sales = offersOf(question).map((offers, place) => saleOf(fresh[place] as Stay, offers, question));
    let next = 0;
    return own.map((stay) => {
      if (stay.answer !== null && isKnown(stay, name, nowMs)) return { known: stay.answer };
      const sale = sales[next++] as Sale;
      const at = sameAnswer(stay, antenna, nowMs);
      const keep = at === null ? null : { question: name, at };
      return { sent: { stay, craft, antenna, horizon, sale, keep } };
    });
  });
  return { found, fault };
}

function isKnown({ answer }: Stay, question: string, nowMs: number): boolean {
  return answer !== null && answer.question === question && nowMs >= answer.at.fromMs && nowMs <= answer.at.toMs;
}

function isWanted(stay: Stay, { wish }: SearchJob): boolean {
  return stay.maxElevationDeg >= wish.lowestElevationDeg && stay.losMs - stay.aosMs >= wish.shortestS * 1000;
}
