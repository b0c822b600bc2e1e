/** Gathers from the other features what a question to the pass engine needs. */
import { Injectable } from '@nestjs/common';
import { BookingRepository } from '../bookings/bookings.repository.js';
import { ClearanceBook } from '../clearances/clearance-book.js';
import { notFound } from '../platform/domain-error.js';
import { WeightedCache } from '../platform/weighted-cache.js';
import { ElementsService } from '../spacecraft/elements.service.js';
import { EphemeridesService } from '../spacecraft/ephemerides.service.js';
import { SpacecraftService } from '../spacecraft/spacecraft.service.js';
import { AntennaCatalogue, type SaleAntenna } from '../stations/antenna-catalogue.js';
import { groupBy } from './group-by.js';
import { MarketRepository } from './market.repository.js';
import type { AntennaInput, BusyInput, CraftInput, ElementsSpan } from './workers/job-types.js';

export interface Period {
  readonly fromMs: number;
  readonly toMs: number;
}

/** Volume is counted by calendar month, which reaches at most this far to either side of a contact. */
const MONTH_MS = 32 * 86_400_000;

/** A pass that reaches over the end of a period is followed for a day or two. */
const REACH_MS = 3 * 86_400_000;

/** Antennas on sale with all that keeps them busy, as the engine takes them. */
export interface Offered {
  readonly sale: readonly SaleAntenna[];
  readonly antennas: readonly AntennaInput[];
}

/** A new price becomes valid by itself, at a minute's notice; a hold always asks the database. */
const STEADY_MS = 60_000;
/** Questions whose antennas are kept. */
const MAX_OFFERED = 16;

@Injectable()
export class MarketInputs {
  private readonly offered = new WeightedCache<Offered & { readonly stamp: string }>(MAX_OFFERED);

  constructor(
    private readonly repository: MarketRepository,
    private readonly bookings: BookingRepository,
    private readonly clearances: ClearanceBook,
    private readonly fleet: SpacecraftService,
    private readonly elements: ElementsService,
    private readonly ephemerides: EphemeridesService,
    private readonly catalogue: AntennaCatalogue,
  ) {}

  /** Antennas on sale, sorted by station and antenna name. */
  onSale(period: Period, stationIds: readonly string[]): SaleAntenna[] {
    return this.catalogue.onSale({ ...period, stationIds });
  }

  /** One antenna, on sale or not: a contact outlives the sale. Throws `not-found`. */
  antenna(id: string, period: Period): SaleAntenna {
    const antenna = this.catalogue.byId(id, period);
    if (antenna === null) throw notFound('antenna');
    return antenna;
  }

  /** The caller's own spacecraft with radios, elements and contacts. Throws `not-found` where one is not theirs. */
  craft(operatorId: string, ids: readonly string[], period: Period): CraftInput[] {
    const rows = this.fleet.forMarket(operatorId, ids);
    const busy = this.bookings.spacecraftBusyIn(ids, period.fromMs, period.toMs);
    const clearances = groupBy(this.clearances.ofCraft(ids, period.fromMs, period.toMs), (each) => each.spacecraftId);
    const names = this.repository.antennaNames([...new Set(busy.map((each) => each.antennaId))]);
    return rows.map((row) => ({
      id: row.id,
      name: row.name,
      shortName: row.shortName,
      spans: this.spansOf(row.id, period),
      radios: row.radios,
      clearances: clearances.get(row.id) ?? [],
      contacts: busy
        .filter((each) => each.spacecraftId === row.id)
        .map((each) => ({
          fromMs: each.aosMs,
          toMs: each.losMs,
          antennaId: each.antennaId,
          antennaName: names.get(each.antennaId) ?? 'another antenna',
        })),
    }));
  }

  /** For searches: what is on sale over a period, read anew only where anything was written since it was last asked. */
  forSearch(operatorId: string, period: Period, stationIds: readonly string[], nowMs: number): Offered {
    const key = `${operatorId} ${period.fromMs} ${period.toMs} ${Math.floor(nowMs / STEADY_MS)} ${stationIds.join(' ')}`;
    const stamp = this.repository.writeStamp();
    const known = this.offered.get(key);
    if (known?.stamp === stamp) return known;
    const sale = this.onSale(period, stationIds);
    const offered = { stamp, sale, antennas: this.forEngine(operatorId, sale, period) };
    this.offered.set(key, offered, 1);
    return offered;
  }

  /** Antennas as the engine takes them, with what keeps them busy and what the caller has bought there. */
  forEngine(operatorId: string, antennas: readonly SaleAntenna[], period: Period): AntennaInput[] {
    const busy = groupBy(
      this.bookings.busyIn(
        antennas.map((antenna) => antenna.id),
        period.fromMs,
        period.toMs,
      ),
      (each) => each.antennaId,
    );
    const tiered = antennas.some((antenna) => antenna.price.volume.length > 0);
    const bought = tiered
      ? groupBy(
          this.repository.boughtAt(operatorId, period.fromMs - MONTH_MS, period.toMs + MONTH_MS),
          (each) => each.stationId,
        )
      : new Map<string, Period[]>();
    return antennas.map((antenna) => ({
      ...engineFields(antenna),
      busy: (busy.get(antenna.id) ?? []).map(
        (each): BusyInput => ({
          beam: each.beam,
          guardFromMs: each.guardFromMs,
          guardToMs: each.guardToMs,
          aosMs: each.aosMs,
          losMs: each.losMs,
          startAzimuthDeg: each.startAzimuthDeg,
          endAzimuthDeg: each.endAzimuthDeg,
          own:
            each.operatorId === operatorId
              ? { bookingId: each.bookingId, spacecraftId: each.spacecraftId, state: each.state }
              : null,
        }),
      ),
      bought: (bought.get(antenna.stationId) ?? []).map(({ fromMs, toMs }) => ({ fromMs, toMs })),
    }));
  }

  /**
   * The element sets in force over a period, each for the passes whose highest point lies in its stretch. The first and the
   * last serve beyond the period too, for passes that reach over its ends. Ephemerides stand above all of them.
   */
  private spansOf(spacecraftId: string, { fromMs, toMs }: Period): ElementsSpan[] {
    const spans = this.elements.inForceOver(spacecraftId, fromMs, toMs);
    const ephemerides = this.ephemerides.inUse(spacecraftId, fromMs - REACH_MS, toMs + REACH_MS);
    return spans.map(({ fromMs: startMs, toMs: endMs, elements }) => ({
      fromMs: startMs <= fromMs ? Number.NEGATIVE_INFINITY : startMs,
      toMs: endMs >= toMs ? Number.POSITIVE_INFINITY : endMs,
      elementSetId: elements.id,
      digest: elements.digest,
      elementSet: elements.elementSet,
      ephemerides,
    }));
  }
}

/** Only what the engine uses: everything here is copied to a thread. */
function engineFields(antenna: SaleAntenna): Omit<AntennaInput, 'busy' | 'bought'> {
  const {
    id,
    stationId,
    stationName,
    version,
    name,
    site,
    mask,
    mount,
    tiltDeg,
    bands,
    timeZone,
    weekly,
    openings,
    blackouts,
    price,
  } = antenna;
  const { slewAzimuthDegPerS, slewElevationDegPerS, lowestReceiveDeg, lowestTransmitDeg, setupS, teardownS } = antenna;
  const { beams, minNoticeMin, horizonDays, minContactS, maxContactS, partsAllowed } = antenna;
  return {
    id,
    stationId,
    stationName,
    version,
    name,
    site,
    mask,
    mount,
    tiltDeg,
    bands,
    timeZone,
    weekly,
    openings,
    blackouts,
    price,
    slewAzimuthDegPerS,
    slewElevationDegPerS,
    lowestReceiveDeg,
    lowestTransmitDeg,
    setupS,
    teardownS,
    beams,
    minNoticeMin,
    horizonDays,
    minContactS,
    maxContactS,
    partsAllowed,
  };
}
