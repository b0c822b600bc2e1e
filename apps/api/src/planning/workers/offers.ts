/** From what the market found to the planner's candidates, each with the pass as the page shows it. */
import type { Candidate } from '@skyberth/planner';
import { type FoundPass, type FoundStation, type PlannedPass, SearchResult } from '@skyberth/shared';
import { vatOf } from '../../market/tax.js';
import type { AntennaInput, CraftInput } from '../../market/workers/job-types.js';
import type { FoundText, HadContact, PlanJob } from './plan-job.js';
import { volumeMeter } from './volume.js';

export interface Offers {
  readonly candidates: readonly Candidate[];
  readonly passes: ReadonlyMap<string, PlannedPass>;
  readonly stationNames: ReadonlyMap<string, string>;
  /** Currencies of everything that could be bought, sorted. */
  readonly currencies: readonly string[];
  /** Spacecraft with passes on offer, for none of which a volume can be worked out. */
  readonly withoutVolume: readonly string[];
}

type Seller = FoundStation['antennas'][number] & { readonly station: FoundStation };

export function offersOf(job: PlanJob): Offers {
  const craftById = new Map(job.craft.map((each) => [each.id, each]));
  const antennaById = new Map(job.antennas.map((each) => [each.id, each]));
  const candidates = new Map<string, Candidate>();
  const passes = new Map<string, PlannedPass>();
  const stationNames = new Map<string, string>();
  const measured = new Set<string>();
  for (const text of job.found) {
    const result = resultOf(text);
    const sellers = new Map<string, Seller>();
    for (const station of result.stations) {
      stationNames.set(station.id, station.name);
      for (const antenna of station.antennas) sellers.set(antenna.id, { ...antenna, station });
    }
    const meters = new Map<string, ReturnType<typeof volumeMeter>>();
    for (const pass of result.passes) {
      const [craft, antenna, seller] = [
        craftById.get(pass.spacecraftId),
        antennaById.get(pass.antennaId),
        sellers.get(pass.antennaId),
      ];
      if (craft === undefined || antenna === undefined || seller === undefined || pass.bookingId !== null) continue;
      if (!meters.has(antenna.id)) meters.set(antenna.id, volumeMeter(craft, antenna));
      const meter = meters.get(antenna.id) ?? null;
      if (meter !== null) measured.add(craft.id);
      for (const part of pass.parts) {
        const offer = offerOf(job, { text, pass, part, craft, antenna, seller, meter });
        // A pass that can also be commanded, for the same stretch and price, serves every wish that the other does.
        const plain = text.need === 'both' ? offer.candidate.id.replace('~both~', '~downlink~') : null;
        if (plain !== null && candidates.get(plain)?.losMs === offer.candidate.losMs) candidates.delete(plain);
        candidates.set(offer.candidate.id, offer.candidate);
        passes.set(offer.candidate.id, offer.planned);
      }
    }
  }
  const currencies = [...new Set([...candidates.values()].map((each) => each.currency))].sort();
  const offered = new Set([...candidates.values()].map((each) => each.craftId));
  for (const had of job.had) {
    const { candidate, planned } = hadOf(had, craftById.get(had.spacecraftId));
    candidates.set(candidate.id, candidate);
    passes.set(candidate.id, planned);
    stationNames.set(had.stationId, had.stationName);
  }
  const withoutVolume = [...offered].filter((id) => !measured.has(id));
  return { candidates: [...candidates.values()], passes, stationNames, currencies, withoutVolume };
}

function resultOf({ pieces }: FoundText): SearchResult {
  return JSON.parse(Buffer.concat(pieces.map((piece) => Buffer.from(piece))).toString('utf8')) as SearchResult;
}

interface Found {
  readonly text: FoundText;
  readonly pass: FoundPass;
  readonly part: FoundPass['parts'][number];
  readonly craft: CraftInput;
  readonly antenna: AntennaInput;
  readonly seller: Seller;
  readonly meter: ReturnType<typeof volumeMeter>;
}

function offerOf(
  job: PlanJob,
  { text, pass, part, craft, antenna, seller, meter }: Found,
): { candidate: Candidate; planned: PlannedPass } {
  const [aosMs, losMs] = [Date.parse(part.aosUtc), Date.parse(part.losUtc)];
  const { seller: from, buyer, nowMs } = job;
  const toPayMinor =
    part.totalMinor + vatOf({ seller: from, buyer, netMinor: part.totalMinor, dateMs: nowMs }).amountMinor;
  const volumeBits = text.need === 'downlink' || text.need === 'both' ? (meter?.(pass, aosMs, losMs) ?? 0) : 0;
  const id = `${pass.key}~${text.need}~${aosMs}`;
  const candidate: Candidate = {
    id,
    craftId: craft.id,
    antennaId: antenna.id,
    stationId: seller.station.id,
    aosMs,
    losMs,
    guardFromMs: aosMs - antenna.setupS * 1000,
    guardToMs: losMs + antenna.teardownS * 1000 + halfTurnMs(antenna),
    beams: antenna.beams,
    priceMinor: toPayMinor,
    currency: seller.currency,
    volumeBits,
    uplink: text.need === 'both',
    booked: false,
  };
  const planned: PlannedPass = {
    key: id,
    spacecraftId: craft.id,
    spacecraftName: craft.name,
    spacecraftShortName: craft.shortName,
    antennaId: antenna.id,
    antennaName: seller.name,
    stationId: seller.station.id,
    stationName: seller.station.name,
    stationTimeZone: seller.station.timeZone,
    need: text.need,
    aosUtc: part.aosUtc,
    tcaUtc: pass.geometry.tcaUtc,
    losUtc: part.losUtc,
    passAosUtc: pass.geometry.aosUtc,
    passLosUtc: pass.geometry.losUtc,
    maxElevationDeg: pass.geometry.maxElevationDeg,
    currency: seller.currency,
    toPayMinor,
    bytes: Math.floor(volumeBits / 8),
    bookedBefore: null,
    profile: pass.profile,
  };
  return { candidate, planned };
}

/**
 * The dish may have to turn between two contacts, half a circle at the most. The market looks at the turn itself; here every
 * pair is kept that far apart, which leaves out a few that could be had and never plans one that could not.
 */
const halfTurnMs = (antenna: AntennaInput): number => (180 / antenna.slewAzimuthDegPerS) * 1000;

function hadOf(had: HadContact, craft: CraftInput | undefined): { candidate: Candidate; planned: PlannedPass } {
  const id = `booking~${had.bookingId}`;
  const { aosMs, losMs, currency } = had;
  const candidate: Candidate = {
    id,
    craftId: had.spacecraftId,
    antennaId: had.antennaId,
    stationId: had.stationId,
    aosMs,
    losMs,
    guardFromMs: aosMs,
    guardToMs: losMs,
    beams: 1,
    priceMinor: 0,
    currency,
    volumeBits: 0,
    uplink: had.need !== 'downlink',
    booked: true,
  };
  const utc = (timeMs: number): string => new Date(timeMs).toISOString();
  const planned: PlannedPass = {
    key: id,
    spacecraftId: had.spacecraftId,
    spacecraftName: craft?.name ?? '',
    spacecraftShortName: craft?.shortName ?? '',
    antennaId: had.antennaId,
    antennaName: had.antennaName,
    stationId: had.stationId,
    stationName: had.stationName,
    stationTimeZone: had.stationTimeZone,
    need: had.need,
    aosUtc: utc(aosMs),
    tcaUtc: utc(had.tcaMs),
    losUtc: utc(losMs),
    passAosUtc: utc(aosMs),
    passLosUtc: utc(losMs),
    maxElevationDeg: had.maxElevationDeg,
    currency,
    toPayMinor: 0,
    bytes: 0,
    bookedBefore: had.bookingId,
    profile: null,
  };
  return { candidate, planned };
}
