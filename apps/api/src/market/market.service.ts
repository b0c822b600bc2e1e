/** Finding contact time: searches, and one pass or booked contact in full. */
import { Inject, Injectable } from '@nestjs/common';
import {
  type FoundStation,
  type Need,
  type PassDetail,
  type ResponseOf,
  type routes,
  type SearchInput,
  SearchResult,
} from '@skyberth/shared';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DomainError, notFound } from '../platform/domain-error.js';
import type { SaleAntenna } from '../stations/antenna-catalogue.js';
import { askToStop, daysDone, newPulseMemory } from './compute/pulse.js';
import { daysOf } from './compute/search.js';
import { groupBy } from './group-by.js';
import { MarketInputs, type Period } from './market-inputs.js';
import { detailView, foundAntenna, foundCraft, withPasses } from './market-views.js';
import { NightKeeper } from './night-keeper.js';
import { type BerthRequest, NOT_ON_SALE, OfferService } from './offer.service.js';
import { PassFinder } from './pass-finder.js';
import type { AntennaInput, SearchJob, SearchOutcome } from './workers/job-types.js';
import { PASS_ENGINE, type PassEngine } from './workers/pass-engine.js';

/** 200 antennas for 14 days have some 16,000 passes of one spacecraft; a board of more serves nobody. */
export const MOST_PASSES = 20_000;
/** Spacecraft in one job of a lane: some tenths of a second of work at the most. */
const CRAFT_AT_ONCE = 4;
/** Few people search twice at the same time. */
const SEARCHES_AT_ONCE = 8;
/** What lies just outside the period may bear on its first and last passes. */
const ABOUT_MS = 86_400_000;

/** What the market needs to know of a booking to show its geometry. */
export interface BookedContact {
  readonly operatorId: string;
  readonly spacecraftId: string;
  readonly antennaId: string;
  readonly need: Need;
  readonly aosMs: number;
  readonly losMs: number;
}

type Found = Extract<SearchOutcome, { kind: 'found' }>;
const Head = SearchResult.omit({ passes: true });

/** A search at work. */
interface Running {
  readonly operatorId: string;
  readonly pulse: SharedArrayBuffer;
  readonly pairs: number;
  /** Days of the calendar that each pair of spacecraft and antenna is looked at for. */
  readonly days: number;
}

@Injectable()
export class MarketService {
  /** By the name that the asker gave. */
  private readonly running = new Map<string, Running>();

  constructor(
    private readonly inputs: MarketInputs,
    private readonly finder: PassFinder,
    private readonly offers: OfferService,
    private readonly nights: NightKeeper,
    @Inject(PASS_ENGINE) private readonly engine: PassEngine,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  /** Stations with at least one antenna on sale. */
  stations(): ResponseOf<typeof routes.listMarketStations> {
    const nowMs = this.clock.nowMs();
    const stations = groupBy(this.inputs.onSale({ fromMs: nowMs, toMs: nowMs }, []), (each) => each.stationId);
    return {
      items: [...stations.values()].flatMap((antennas) => {
        const [first] = antennas;
        if (first === undefined) return [];
        const { stationId: id, stationName: name, country, site } = first;
        return [
          {
            id,
            name,
            country,
            latitudeDeg: site.latitudeDeg,
            longitudeDeg: site.longitudeDeg,
            antennas: antennas.length,
          },
        ];
      }),
    };
  }

  /**
   * The whole answer as JSON in pieces, in the form of `SearchResult`. Throws `not-found` for someone else's spacecraft and
   * `too-large` where there are more passes than can be shown.
   */
  async search(operatorId: string, input: SearchInput, signal: AbortSignal): Promise<Uint8Array[]> {
    const nowMs = this.clock.nowMs();
    const period: Period = { fromMs: Date.parse(input.fromUtc), toMs: Date.parse(input.toUtc) };
    const about: Period = { fromMs: period.fromMs - ABOUT_MS, toMs: period.toMs + ABOUT_MS };
    const craft = this.inputs.craft(operatorId, [...new Set(input.spacecraftIds)], about);
    const { sale, antennas } = this.inputs.forSearch(operatorId, about, input.stationIds, nowMs);
    const pulse = newPulseMemory();
    const { searchId, ...wish } = input;
    const ask: SearchJob = {
      kind: 'search',
      nowMs,
      ...period,
      wish,
      spacecraft: craft,
      antennas,
      maxPasses: MOST_PASSES,
      pulse,
    };
    const pairs = craft.length * antennas.length;
    const [found, stations] = await this.whileRunning(
      searchId,
      { operatorId, pulse, pairs, days: daysOf(period) },
      () => Promise.all([this.inLanes(ask, pulse, signal), this.foundStations(sale, antennas, period)]),
    );
    const passes = found.reduce((sum, each) => sum + each.passes, 0);
    const faults = new Map(found.flatMap((each) => each.faults.map((fault) => [fault.spacecraftId, fault.sentence])));
    const head = Head.parse({
      computedUtc: utc(nowMs),
      stations,
      spacecraft: craft.map((each) => foundCraft(each, faults.get(each.id) ?? null, period, nowMs)),
      counts: { forSale: found.reduce((sum, each) => sum + each.forSale, 0), passes },
    });
    return withPasses(
      JSON.stringify(head),
      found.flatMap((each) => each.json),
    );
  }

  /** How far a search of this organisation is. Throws `not-found` where none of that name is at work. */
  progress(operatorId: string, searchId: string): ResponseOf<typeof routes.searchProgress> {
    const search = this.running.get(searchId);
    if (search?.operatorId !== operatorId) throw notFound('search');
    const { pulse, pairs, days } = search;
    return { done: Math.min(pairs, Math.floor(daysDone(pulse) / days)), of: pairs };
  }

  private async whileRunning<T>(searchId: string | undefined, search: Running, work: () => Promise<T>): Promise<T> {
    if (searchId === undefined) return work();
    const others = [...this.running.values()].filter((each) => each.operatorId === search.operatorId);
    if (others.length >= SEARCHES_AT_ONCE) return work();
    // A page keeps the name for each of its searches; the newest of them is the one it asks about.
    this.running.set(searchId, search);
    try {
      return await work();
    } finally {
      if (this.running.get(searchId) === search) this.running.delete(searchId);
    }
  }

  /** One pass, or a part of it, with everything that the card shows. */
  async detail(operatorId: string, request: BerthRequest): Promise<PassDetail> {
    const { spacecraftId, antennaId, need, bands } = request;
    const [aosMs, losMs] = [Date.parse(request.aosUtc), Date.parse(request.losUtc)];
    const question = { operatorId, spacecraftId, antennaId, need, bands, aosMs, losMs };
    const answer = await this.finder.find({ ...question, withTrack: true, booked: false });
    const reasons = answer.sale.onSale ? answer.outcome.reasons : [NOT_ON_SALE, ...answer.outcome.reasons];
    return {
      ...detailView(answer, need),
      reasons: [...reasons],
      quote: reasons.length > 0 ? null : this.offers.quote(operatorId, answer),
    };
  }

  /** A booked contact by the elements in force for it, whatever has become of the antenna since. No price, no offer. */
  async geometryOf(booking: BookedContact): Promise<PassDetail> {
    const answer = await this.finder.find({ ...booking, bands: [], withTrack: true, booked: true });
    return { ...detailView(answer, booking.need), reasons: [], quote: null };
  }

  /**
   * Shares the antennas out over the lanes, so that even one spacecraft keeps all of them busy; each takes a few spacecraft
   * at a time, so that others get their turn between. When the asker hangs up, all of them stop within a day's passes.
   */
  private async inLanes(ask: SearchJob, pulse: SharedArrayBuffer, signal: AbortSignal): Promise<Found[]> {
    const stop = (): void => askToStop(pulse);
    signal.addEventListener('abort', stop, { once: true });
    let passes = 0;
    const runLane = async (antennas: readonly AntennaInput[]): Promise<Found[]> => {
      const found: Found[] = [];
      for (let i = 0; i < ask.spacecraft.length; i += CRAFT_AT_ONCE) {
        const spacecraft = ask.spacecraft.slice(i, i + CRAFT_AT_ONCE);
        const outcome = foundOrRefused(
          await this.engine.run({ ...ask, spacecraft, antennas }, (antennas[0] as AntennaInput).id),
        );
        passes += outcome.passes;
        if (passes > MOST_PASSES) throw tooMany();
        found.push(outcome);
      }
      return found;
    };
    try {
      const lanes = groupBy(ask.antennas, (each) => String(this.engine.laneOf(each.id)));
      return (await Promise.all([...lanes.values()].map(runLane))).flat();
    } finally {
      // Where one lane was refused, the others need not go on.
      stop();
      signal.removeEventListener('abort', stop);
    }
  }

  private async foundStations(
    sale: readonly SaleAntenna[],
    antennas: readonly AntennaInput[],
    period: Period,
  ): Promise<FoundStation[]> {
    const busy = new Map(antennas.map((antenna) => [antenna.id, antenna.busy]));
    const stations = [...groupBy(sale, (antenna) => antenna.stationId).values()];
    const sites = stations.flatMap(([first]) => (first === undefined ? [] : [first.site]));
    const nights = await this.nights.of(sites, period);
    return stations.flatMap((some, index) => {
      const [first] = some;
      if (first === undefined) return [];
      return [
        {
          id: first.stationId,
          name: first.stationName,
          ownerName: first.ownerName,
          country: first.country,
          timeZone: first.timeZone,
          latitudeDeg: first.site.latitudeDeg,
          longitudeDeg: first.site.longitudeDeg,
          nights: nights[index] ?? [],
          antennas: some.map((antenna) => foundAntenna(antenna, busy.get(antenna.id) ?? [], period)),
        },
      ];
    });
  }
}

const utc = (timeMs: number): string => new Date(timeMs).toISOString();

const tooMany = (): DomainError =>
  new DomainError(
    'too-large',
    `That search finds more than ${MOST_PASSES.toLocaleString('en')} passes. Choose a shorter period, fewer spacecraft, or some of the stations.`,
  );

function foundOrRefused(outcome: SearchOutcome): Found {
  if (outcome.kind === 'found') return outcome;
  if (outcome.kind === 'too many') throw tooMany();
  throw new DomainError('unavailable', 'The search was given up because nobody waited for it.');
}
