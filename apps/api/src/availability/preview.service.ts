/** What a change of an antenna would do, before it is saved: time to sell, income, and contacts that are sold already. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { type Interval, totalMs } from '@skyberth/market';
import { validateMask } from '@skyberth/orbit';
import type { ChangePreview, PreviewInput, Principal } from '@skyberth/shared';
import { MarketInputs } from '../market/market-inputs.js';
import { PASS_ENGINE, type PassEngine } from '../market/workers/pass-engine.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError, notFound } from '../platform/domain-error.js';
import { AntennaCatalogue, type SaleAntenna } from '../stations/antenna-catalogue.js';
import { AntennasRepository, type WholeAntenna } from '../stations/antennas.repository.js';
import { refuseBadPrice, refuseBadRules } from '../stations/input-checks.js';
import { scopeOf } from '../stations/stations.service.js';
import { AvailabilityRepository, type ServedContact, type SoldContact } from './availability.repository.js';
import { openTimes } from './availability.service.js';
import { entryInstances, refuseBadEntries } from './entries.js';
import { buyerGets, freeTimes, maskTouch, pricesBy, sum, type Times, timesTouch } from './preview-figures.js';
import { type PreviewTools, sellableMinutes, visibleMs } from './preview-passes.js';

const DAY_MS = 86_400_000;
const WEEK_MS = 7 * DAY_MS;
const LAST_WEEKS = 4;
const LAST_MONTH_MS = 30 * DAY_MS;
/** Volume is counted by the month, so contacts from its very beginning bear on a price. */
const MONTH_BEFORE_MS = 31 * DAY_MS;
/** Spacecraft that have booked within this time are those that may want the antenna again. */
const BUYERS_SINCE_MS = 90 * DAY_MS;
const MOST_BUYERS = 20;
const MOST_SOLD = 200;
/** Each costs two questions to the engine. */
const MOST_SOLD_FOR_MASK = 40;

type Side = NonNullable<ChangePreview['after']>;

@Injectable()
export class PreviewService {
  /** Passes are remembered by the antenna's version; what is only tried takes versions that no antenna has. */
  private lastTried = 0;

  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    @Inject(PASS_ENGINE) private readonly engine: PassEngine,
    private readonly inputs: MarketInputs,
    private readonly catalogue: AntennaCatalogue,
    private readonly antennas: AntennasRepository,
    private readonly repository: AvailabilityRepository,
  ) {}

  /** Throws `not-found`, and `bad-input` for whatever saving would refuse too. */
  async preview(caller: Principal, id: string, change: PreviewInput): Promise<ChangePreview> {
    const nowMs = this.clock.nowMs();
    const whole = this.antennas.find(this.db, scopeOf(caller), id, { fromMs: nowMs, toMs: nowMs, nowMs });
    if (!whole) throw notFound('antenna');
    refuseBadChange(change, whole, nowMs);
    const sold = this.repository.sold(id, nowMs, MOST_SOLD);
    const week: Interval = { fromMs: nowMs, toMs: nowMs + WEEK_MS };
    const period: Interval = {
      fromMs: nowMs - DAY_MS,
      toMs: Math.max(week.toMs, sold.at(-1)?.guardToMs ?? 0) + DAY_MS,
    };
    const before = this.catalogue.byId(id, period);
    const soldMinor = sum(sold.filter((each) => each.aosMs < week.toMs).map((each) => each.netMinor));
    const none = {
      currency: whole.station.currency,
      soldMinor,
      spacecraft: 0,
      before: null,
      after: null,
      lastMonth: null,
    };
    // Without a price nothing is for sale, so there is nothing that a change could change.
    if (before === null) return { ...none, touched: [] };
    const after = this.changed(before, change, period);
    const tools: PreviewTools = { inputs: this.inputs, engine: this.engine, nowMs };
    const buyers = this.repository.buyers(id, nowMs - BUYERS_SINCE_MS, MOST_BUYERS);
    const beforeMin = await sellableMinutes(tools, before, buyers, week);
    const afterMin = await sellableMinutes(tools, after, buyers, week);
    const served = this.repository.served(whole.station.id, nowMs - LAST_MONTH_MS - MONTH_BEFORE_MS, nowMs);
    const weekly = (sale: SaleAntenna): number | null => weekLikeTheLast(sale, served, nowMs);
    return {
      ...none,
      spacecraft: buyers.length,
      before: side(before, week, beforeMin, weekly(before)),
      after: side(after, week, afterMin, inProportion(weekly(after), beforeMin, afterMin)),
      touched: await this.touched(tools, { before, after }, sold, { period, byMask: change.mask !== undefined }),
      lastMonth: change.price === undefined ? null : lastMonth(after, served, nowMs),
    };
  }

  private changed(sale: SaleAntenna, change: PreviewInput, { fromMs, toMs }: Interval): SaleAntenna {
    const { price } = change;
    this.lastTried -= 1;
    return {
      ...sale,
      version: change.mask === undefined ? sale.version : this.lastTried,
      weekly: change.hours ?? sale.weekly,
      openings: [...sale.openings, ...change.addOpenings.flatMap((each) => entryInstances(each, fromMs, toMs))],
      blackouts: [
        ...sale.blackouts,
        ...change.addBlackouts.flatMap(({ reason, ...entry }) =>
          entryInstances({ ...entry, reason }, fromMs, toMs).map((each) => ({ ...each, reason })),
        ),
      ].sort((a, b) => a.fromMs - b.fromMs),
      mask: change.mask ?? sale.mask,
      price: price === undefined ? sale.price : { ...price, currency: sale.currency },
    };
  }

  private async touched(
    tools: PreviewTools,
    { before, after }: { readonly before: SaleAntenna; readonly after: SaleAntenna },
    sold: readonly SoldContact[],
    { period, byMask }: { readonly period: Interval; readonly byMask: boolean },
  ): Promise<ChangePreview['touched']> {
    const [was, becomes] = [timesOf(before, period), timesOf(after, period)];
    const touched: ChangePreview['touched'] = [];
    for (const [index, contact] of sold.entries()) {
      let why = timesTouch(contact, was, becomes);
      if (why === null && byMask && index < MOST_SOLD_FOR_MASK) {
        const visible = {
          before: await visibleMs(tools, before, contact),
          after: await visibleMs(tools, after, contact),
        };
        why = maskTouch(contact, visible);
      }
      if (why !== null) touched.push(touchView(contact, why));
    }
    return touched;
  }
}

function refuseBadChange(change: PreviewInput, { station }: WholeAntenna, nowMs: number): void {
  if (change.hours !== undefined) refuseBadRules(change.hours, station.timeZone, nowMs);
  refuseBadEntries(change.addOpenings, '/addOpenings');
  refuseBadEntries(change.addBlackouts, '/addBlackouts');
  if (change.price !== undefined) refuseBadPrice(change.price, station.currency);
  const faults = change.mask === undefined ? [] : validateMask(change.mask);
  if (faults.length > 0)
    throw new DomainError(
      'bad-input',
      faults.join(' '),
      faults.map((detail) => ({ pointer: '/mask', detail })),
    );
}

const timesOf = (sale: SaleAntenna, period: Interval): Times => ({
  open: openTimes(sale.weekly, sale.timeZone, sale.openings, period),
  blackouts: sale.blackouts,
});

const side = (sale: SaleAntenna, week: Interval, sellableMin: number, expectedMinor: number | null): Side => ({
  openMin: totalMs(freeTimes(timesOf(sale, week))) / 60_000,
  sellableMin,
  expectedMinor,
});

/** A quarter of what the contacts of the last four weeks would earn by this card; null without any. */
function weekLikeTheLast(sale: SaleAntenna, served: readonly ServedContact[], nowMs: number): number | null {
  const prices = pricesSince(sale, served, nowMs - LAST_WEEKS * WEEK_MS);
  return prices.length === 0 ? null : Math.round(sum(prices) / LAST_WEEKS);
}

function inProportion(amountMinor: number | null, beforeMin: number, afterMin: number): number | null {
  return amountMinor === null || beforeMin === 0 ? null : Math.round((amountMinor * afterMin) / beforeMin);
}

function lastMonth(sale: SaleAntenna, served: readonly ServedContact[], nowMs: number): ChangePreview['lastMonth'] {
  const sinceMs = nowMs - LAST_MONTH_MS;
  const own = served.filter((each) => each.antennaId === sale.id && each.aosMs >= sinceMs);
  return {
    contacts: own.length,
    thenMinor: sum(own.map((each) => each.netMinor)),
    nowMinor: sum(pricesSince(sale, served, sinceMs)),
  };
}

/** Prices of the antenna's own contacts that began since; earlier ones only fill the months' minutes. */
function pricesSince(sale: SaleAntenna, served: readonly ServedContact[], sinceMs: number): number[] {
  const isOwn = (each: ServedContact): boolean => each.antennaId === sale.id;
  const prices = pricesBy(sale, served);
  return served.filter(isOwn).flatMap((each, index) => (each.aosMs >= sinceMs ? [prices[index] ?? 0] : []));
}

const touchView = (contact: SoldContact, why: string): ChangePreview['touched'][number] => ({
  bookingId: contact.bookingId,
  number: contact.number,
  spacecraftName: contact.spacecraftName,
  operatorName: contact.operatorName,
  aosUtc: new Date(contact.aosMs).toISOString(),
  why,
  buyerGets: buyerGets(contact),
  refundMinor: contact.toPayMinor,
});
