/** A whole search, within one thread: from elements and antennas to the text that travels to the browser. */
import { OrbitError } from '@skyberth/orbit';
import type { FoundPass } from '@skyberth/shared';
import type { AntennaInput, CraftInput, SearchJob, SearchOutcome } from '../workers/job-types.js';
import { joinObjects, type ObjectPieces } from './json-list.js';
import { fitOf } from './objections.js';
import type { OpeningHours } from './opening-hours.js';
import type { PassBlocks } from './pass-blocks.js';
import type { ProfileTexts } from './profile-texts.js';
import { offersOf, saleOf } from './sales.js';
import type { Stay } from './stay.js';
import { staysOf } from './stays-of.js';
import type { TrackTables } from './track-table.js';

export interface SearchTools {
  readonly blocks: PassBlocks;
  readonly hours: OpeningHours;
  readonly profiles: ProfileTexts;
  readonly tables: TrackTables;
}

interface Found extends ObjectPieces {
  readonly aosMs: number;
}

/** Carries a search out. Elements that cannot be used are named; the other spacecraft are searched all the same. */
export function searchPasses(job: SearchJob, tools: SearchTools): SearchOutcome {
  const cancel = job.cancel === null ? null : new Int32Array(job.cancel);
  const all: Found[] = [];
  const faults: { spacecraftId: string; sentence: string }[] = [];
  let forSale = 0;
  for (const craft of job.spacecraft) {
    if (cancel !== null && Atomics.load(cancel, 0) !== 0) return { kind: 'cancelled' };
    try {
      const { found, forSale: more, fault } = searchCraft(craft, job, tools, job.maxPasses - all.length);
      if (found === 'too many') return { kind: 'too many' };
      for (const each of found) all.push(each);
      forSale += more;
      if (fault !== null) faults.push({ spacecraftId: craft.id, sentence: fault });
    } catch (error) {
      if (!(error instanceof OrbitError)) throw error;
      faults.push({ spacecraftId: craft.id, sentence: error.message });
    }
  }
  return { kind: 'found', json: joinObjects(all), passes: all.length, forSale, faults };
}

/** Every pass of one spacecraft, sorted by AOS. */
function searchCraft(
  craft: CraftInput,
  job: SearchJob,
  tools: SearchTools,
  room: number,
): { found: Found[] | 'too many'; forSale: number; fault: string | null } {
  const { wish, nowMs, fromMs, toMs } = job;
  const fits = job.antennas.map((antenna) => fitOf(craft, antenna, wish));
  const { stays, fault } = staysOf(tools.blocks, {
    craft,
    antennas: job.antennas.map((antenna, index) => ({ antenna, floorDeg: fits[index]?.floorDeg ?? 0 })),
    fromMs,
    toMs,
  });
  const wanted = stays.map((each) => each.filter((stay) => isWanted(stay, job)));
  if (wanted.reduce((sum, each) => sum + each.length, 0) > room) return { found: 'too many', forSale: 0, fault };
  const found: Found[] = [];
  let forSale = 0;
  job.antennas.forEach((antenna, index) => {
    const fit = fits[index];
    const own = wanted[index];
    if (fit === undefined || own === undefined || own.length === 0) return;
    const open = tools.hours.of(antenna, fromMs, toMs);
    const question = { craft, antenna, fit, open, stays: own, nowMs, wish };
    offersOf(question).forEach((offers, place) => {
      const stay = own[place];
      if (stay === undefined) return;
      const sale = saleOf(stay, offers, question);
      if (sale.parts.length > 0 && sale.bookingId === null) forSale += 1;
      const pass: Omit<FoundPass, 'geometry' | 'profile'> = {
        key: keyOf(craft, antenna, stay),
        antennaId: antenna.id,
        spacecraftId: craft.id,
        currency: antenna.price.currency,
        ...sale,
      };
      const members = tools.profiles.of({ craft, antenna, floorDeg: fit.floorDeg, stay });
      found.push({ aosMs: stay.aosMs, head: JSON.stringify(pass).slice(0, -1), members });
    });
  });
  found.sort((a, b) => a.aosMs - b.aosMs);
  return { found, forSale, fault };
}

function isWanted(stay: Stay, { wish }: SearchJob): boolean {
  return stay.maxElevationDeg >= wish.lowestElevationDeg && stay.losMs - stay.aosMs >= wish.shortestS * 1000;
}

/** Short enough for an address, and the same whoever asks: AOS to the millisecond and the random ends of both ids. */
function keyOf(craft: CraftInput, antenna: AntennaInput, stay: Stay): string {
  return `${stay.aosMs.toString(36)}-${antenna.id.slice(-12)}-${craft.id.slice(-12)}`;
}
