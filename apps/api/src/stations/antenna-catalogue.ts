/** What the market may sell: antennas on sale at approved stations, with all that bounds them in a period. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import type { Interval, LadderStep, OfferBlackout, PriceCard } from '@skyberth/market';
import type { GeodeticSite, MaskPoint } from '@skyberth/orbit';
import type { Antenna, AntennaBand, WeeklyRule } from '@skyberth/shared';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { AntennasRepository, type Period, type WholeAntenna } from './antennas.repository.js';
import { CalendarTimes } from './calendar-times.js';
import { bandView, maskPointsOf, missingOf, ruleView } from './station-views.js';

type Figures = Omit<
  Antenna,
  'mask' | 'maskReason' | 'bands' | 'availability' | 'blackouts' | 'price' | 'missing' | 'state'
>;

/** An antenna as the market sees it. */
export interface SaleAntenna extends Figures {
  readonly ownerId: string;
  readonly ownerName: string;
  readonly country: string;
  readonly timeZone: string;
  readonly currency: string;
  readonly site: GeodeticSite;
  readonly mask: readonly MaskPoint[];
  readonly bands: readonly AntennaBand[];
  readonly weekly: readonly WeeklyRule[];
  /** Open beyond the weekly hours, in the period; uncut. */
  readonly openings: readonly Interval[];
  readonly blackouts: readonly OfferBlackout[];
  readonly price: PriceCard & { readonly ladder: readonly LadderStep[] };
  /** Whether it is for sale at all at this moment. */
  readonly onSale: boolean;
}

export interface CatalogueFilter {
  /** Empty or absent for all. */
  readonly stationIds?: readonly string[] | undefined;
  /** The period whose blackouts are wanted. */
  readonly fromMs: number;
  readonly toMs: number;
}

@Injectable()
export class AntennaCatalogue {
  private readonly times = new CalendarTimes();

  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly antennas: AntennasRepository,
  ) {}

  /** Sorted by station and antenna name. The price is the one that a purchase now would freeze. */
  onSale(filter: CatalogueFilter): SaleAntenna[] {
    return this.antennas.onSale(this.db, filter.stationIds ?? [], this.period(filter)).flatMap((whole) => {
      const antenna = this.saleAntenna(whole, filter);
      return antenna?.onSale ? [antenna] : [];
    });
  }

  /** One antenna, on sale or not (a contact outlives the sale), or null where it is unknown or never had a price. */
  byId(id: string, period: { readonly fromMs: number; readonly toMs: number }): SaleAntenna | null {
    const whole = this.antennas.find(this.db, null, id, this.period(period));
    return whole ? this.saleAntenna(whole, period) : null;
  }

  private saleAntenna(whole: WholeAntenna, { fromMs, toMs }: Interval): SaleAntenna | null {
    const openings = this.times.openings(whole.calendar, fromMs, toMs).map(({ rule: _rule, ...each }) => each);
    const repeated = this.times.blackouts(whole.calendar, fromMs, toMs);
    return saleAntenna(
      whole,
      openings,
      repeated.map((each) => ({ fromMs: each.fromMs, toMs: each.toMs, reason: each.rule.reason })),
    );
  }

  private period({ fromMs, toMs }: { fromMs: number; toMs: number }): Period {
    return { fromMs, toMs, nowMs: this.clock.nowMs() };
  }
}

/** Null where it never had a price. */
function saleAntenna(
  whole: WholeAntenna,
  openings: readonly Interval[],
  repeated: readonly OfferBlackout[],
): SaleAntenna | null {
  const { station, price } = whole;
  if (!price) return null;
  const { state, createdMs: _createdMs, ...figures } = whole.antenna;
  return {
    ...figures,
    stationName: station.name,
    ownerId: station.organisationId,
    ownerName: station.ownerName,
    country: station.country,
    timeZone: station.timeZone,
    currency: station.currency,
    site: { latitudeDeg: station.latitudeDeg, longitudeDeg: station.longitudeDeg, altitudeM: station.altitudeM },
    mask: maskPointsOf(whole),
    bands: whole.bands.map(bandView),
    weekly: whole.rules.map(ruleView),
    openings,
    // A note is for the owner's own people; buyers read the reason.
    blackouts: [
      ...whole.blackouts.map((each) => ({ fromMs: each.fromMs, toMs: each.toMs, reason: each.reason })),
      ...repeated,
    ].sort((a, b) => a.fromMs - b.fromMs),
    price: {
      currency: price.currency,
      perMinuteMinor: price.perMinuteMinor,
      setupMinor: price.setupMinor,
      minimumMinor: price.minimumMinor,
      busyHours: price.terms.busyHours,
      shortNotice: price.terms.shortNotice,
      volume: price.terms.volume,
      ladder: price.terms.ladder,
    },
    onSale: state === 'on sale' && missingOf(whole).length === 0,
  };
}
