/** Antennas and all that is published about them. */
import { Injectable } from '@nestjs/common';
import {
  antennaBands,
  antennaMasks,
  antennas,
  availabilityRules,
  blackouts,
  bookings,
  calendarRules,
  organisations,
  priceCards,
  stations,
} from '@skyberth/drizzle';
import { OCCUPYING_STATES } from '@skyberth/shared';
import { and, asc, desc, eq, gt, inArray, lt, lte, max, sql } from 'drizzle-orm';
import { newId } from '../platform/ids.js';
import { inGoodStanding } from '../platform/standing.js';
import type { Db } from '../platform/transaction.js';
import type { OwnedStation, Scope } from './stations.repository.js';

export type AntennaRow = typeof antennas.$inferSelect;
export type BandRow = typeof antennaBands.$inferSelect;
export type MaskRow = typeof antennaMasks.$inferSelect;
export type RuleRow = typeof availabilityRules.$inferSelect;
export type BlackoutRow = typeof blackouts.$inferSelect;
export type CalendarRuleRow = typeof calendarRules.$inferSelect;
export type PriceCardRow = typeof priceCards.$inferSelect;

/** An antenna with everything about it that is in force. */
export interface WholeAntenna {
  readonly antenna: AntennaRow;
  readonly station: OwnedStation;
  readonly bands: readonly BandRow[];
  readonly mask: MaskRow | null;
  readonly rules: readonly RuleRow[];
  readonly blackouts: readonly BlackoutRow[];
  /** Openings and blackouts that come again. */
  readonly calendar: readonly CalendarRuleRow[];
  readonly price: PriceCardRow | null;
}

/** Which blackouts are wanted, and at which instant the price. */
export interface Period {
  readonly fromMs: number;
  readonly toMs: number;
  readonly nowMs: number;
}

/** Identifiers in one statement; SQLite takes at most 32,766 variables. */
const CHUNK = 1_000;

@Injectable()
export class AntennasRepository {
  find(db: Db, scope: Scope, id: string, period: Period): WholeAntenna | undefined {
    const mine = scope === null ? undefined : eq(stations.organisationId, scope);
    return this.whole(
      db,
      this.base(db)
        .where(and(eq(antennas.id, id), mine))
        .all(),
      period,
    )[0];
  }

  ofStations(db: Db, stationIds: readonly string[], period: Period): WholeAntenna[] {
    const rows = chunks(stationIds).flatMap((ids) =>
      this.base(db).where(inArray(antennas.stationId, ids)).orderBy(asc(antennas.createdMs), asc(antennas.id)).all(),
    );
    return this.whole(db, rows, period);
  }

  /** Antennas that their owners have put on sale at approved stations. */
  onSale(db: Db, stationIds: readonly string[], period: Period): WholeAntenna[] {
    const chosen = stationIds.length > 0 ? inArray(stations.id, [...stationIds]) : undefined;
    const rows = this.base(db)
      .where(
        and(
          eq(stations.state, 'approved'),
          eq(antennas.state, 'on sale'),
          inGoodStanding(stations.organisationId),
          chosen,
        ),
      )
      .orderBy(asc(sql`lower(${stations.name})`), asc(stations.id), asc(sql`lower(${antennas.name})`))
      .all();
    return this.whole(db, rows, period);
  }

  private base(db: Db) {
    return db
      .select({ antenna: antennas, station: stations, ownerName: organisations.name })
      .from(antennas)
      .innerJoin(stations, eq(stations.id, antennas.stationId))
      .innerJoin(organisations, eq(organisations.id, stations.organisationId))
      .$dynamic();
  }

  private whole(
    db: Db,
    rows: readonly { antenna: AntennaRow; station: typeof stations.$inferSelect; ownerName: string }[],
    period: Period,
  ): WholeAntenna[] {
    const ids = rows.map((row) => row.antenna.id);
    const bands = byAntenna(chunks(ids).flatMap((some) => this.bandsOf(db, some)));
    const masks = byAntenna(chunks(ids).flatMap((some) => this.masksOf(db, some)));
    const rules = byAntenna(chunks(ids).flatMap((some) => this.rulesOf(db, some)));
    const closed = byAntenna(chunks(ids).flatMap((some) => this.blackoutsOf(db, some, period)));
    const calendar = byAntenna(chunks(ids).flatMap((some) => this.calendarOf(db, some)));
    const prices = byAntenna(chunks(ids).flatMap((some) => this.pricesOf(db, some, period.nowMs)));
    return rows.map(({ antenna, station, ownerName }) => ({
      antenna,
      station: { ...station, ownerName },
      bands: bands.get(antenna.id) ?? [],
      mask: masks.get(antenna.id)?.[0] ?? null,
      rules: rules.get(antenna.id) ?? [],
      blackouts: closed.get(antenna.id) ?? [],
      calendar: calendar.get(antenna.id) ?? [],
      price: prices.get(antenna.id)?.[0] ?? null,
    }));
  }

  private bandsOf(db: Db, ids: string[]): BandRow[] {
    return db
      .select()
      .from(antennaBands)
      .where(inArray(antennaBands.antennaId, ids))
      .orderBy(asc(antennaBands.fromMhz), asc(antennaBands.id))
      .all();
  }

  /** Only the newest of each antenna. */
  private masksOf(db: Db, ids: string[]): MaskRow[] {
    const newest = db
      .select({ antennaId: antennaMasks.antennaId, version: max(antennaMasks.version).as('newest') })
      .from(antennaMasks)
      .where(inArray(antennaMasks.antennaId, ids))
      .groupBy(antennaMasks.antennaId)
      .as('newest_masks');
    return db
      .select({ mask: antennaMasks })
      .from(antennaMasks)
      .innerJoin(newest, and(eq(newest.antennaId, antennaMasks.antennaId), eq(newest.version, antennaMasks.version)))
      .all()
      .map((row) => row.mask);
  }

  private rulesOf(db: Db, ids: string[]): RuleRow[] {
    return db
      .select()
      .from(availabilityRules)
      .where(inArray(availabilityRules.antennaId, ids))
      .orderBy(asc(availabilityRules.fromLocal), asc(availabilityRules.id))
      .all();
  }

  private blackoutsOf(db: Db, ids: string[], { fromMs, toMs }: Period): BlackoutRow[] {
    return db
      .select()
      .from(blackouts)
      .where(and(inArray(blackouts.antennaId, ids), lt(blackouts.fromMs, toMs), gt(blackouts.toMs, fromMs)))
      .orderBy(asc(blackouts.fromMs), asc(blackouts.id))
      .all();
  }

  private calendarOf(db: Db, ids: string[]): CalendarRuleRow[] {
    return db
      .select()
      .from(calendarRules)
      .where(inArray(calendarRules.antennaId, ids))
      .orderBy(asc(calendarRules.createdMs), asc(calendarRules.id))
      .all();
  }

  /** The newest first. */
  private pricesOf(db: Db, ids: string[], nowMs: number): PriceCardRow[] {
    return db
      .select()
      .from(priceCards)
      .where(and(inArray(priceCards.antennaId, ids), lte(priceCards.validFromMs, nowMs)))
      .orderBy(desc(priceCards.validFromMs), desc(priceCards.id))
      .all();
  }

  add(tx: Db, antenna: AntennaRow): void {
    tx.insert(antennas).values(antenna).run();
  }

  change(tx: Db, id: string, values: Partial<AntennaRow>): void {
    tx.update(antennas).set(values).where(eq(antennas.id, id)).run();
  }

  replaceBands(tx: Db, antennaId: string, bands: readonly Omit<BandRow, 'id' | 'antennaId'>[]): void {
    tx.delete(antennaBands).where(eq(antennaBands.antennaId, antennaId)).run();
    for (const band of bands)
      tx.insert(antennaBands)
        .values({ ...band, id: newId(), antennaId })
        .run();
  }

  addMask(tx: Db, mask: Omit<MaskRow, 'version'>): void {
    const last = tx
      .select({ version: max(antennaMasks.version) })
      .from(antennaMasks)
      .where(eq(antennaMasks.antennaId, mask.antennaId))
      .get();
    tx.insert(antennaMasks)
      .values({ ...mask, version: (last?.version ?? 0) + 1 })
      .run();
  }

  replaceRules(tx: Db, antennaId: string, rules: readonly Omit<RuleRow, 'id' | 'antennaId'>[]): void {
    tx.delete(availabilityRules).where(eq(availabilityRules.antennaId, antennaId)).run();
    for (const rule of rules)
      tx.insert(availabilityRules)
        .values({ ...rule, id: newId(), antennaId })
        .run();
  }

  addPrice(tx: Db, card: PriceCardRow): void {
    tx.insert(priceCards).values(card).run();
  }

  addBlackout(tx: Db, blackout: BlackoutRow): void {
    tx.insert(blackouts).values(blackout).run();
  }

  addCalendarRule(tx: Db, rule: CalendarRuleRow): void {
    tx.insert(calendarRules).values(rule).run();
  }

  /** Removes a rule of this owner and returns it; undefined where there is none. */
  removeCalendarRule(tx: Db, organisationId: string, id: string): CalendarRuleRow | undefined {
    const row = tx
      .select({ rule: calendarRules })
      .from(calendarRules)
      .innerJoin(antennas, eq(antennas.id, calendarRules.antennaId))
      .innerJoin(stations, eq(stations.id, antennas.stationId))
      .where(and(eq(calendarRules.id, id), eq(stations.organisationId, organisationId)))
      .get();
    if (row) tx.delete(calendarRules).where(eq(calendarRules.id, id)).run();
    return row?.rule;
  }

  /** All cards of an antenna, the last to come first. */
  priceCards(db: Db, antennaId: string): PriceCardRow[] {
    return db
      .select()
      .from(priceCards)
      .where(eq(priceCards.antennaId, antennaId))
      .orderBy(desc(priceCards.validFromMs), desc(priceCards.id))
      .all();
  }

  /** Removes a blackout of this owner and returns it; undefined where there is none. */
  removeBlackout(tx: Db, organisationId: string, id: string): BlackoutRow | undefined {
    const row = tx
      .select({ blackout: blackouts })
      .from(blackouts)
      .innerJoin(antennas, eq(antennas.id, blackouts.antennaId))
      .innerJoin(stations, eq(stations.id, antennas.stationId))
      .where(and(eq(blackouts.id, id), eq(stations.organisationId, organisationId)))
      .get();
    if (row) tx.delete(blackouts).where(eq(blackouts.id, id)).run();
    return row?.blackout;
  }

  /** Sold contacts whose guarded time lies in the period. */
  contactsIn(db: Db, antennaId: string, fromMs: number, toMs: number) {
    return db
      .select({
        bookingId: bookings.id,
        number: bookings.number,
        aosMs: bookings.aosMs,
        guardFromMs: bookings.guardFromMs,
        guardToMs: bookings.guardToMs,
      })
      .from(bookings)
      .where(
        and(
          eq(bookings.antennaId, antennaId),
          inArray(bookings.state, [...OCCUPYING_STATES]),
          lt(bookings.guardFromMs, toMs),
          gt(bookings.guardToMs, fromMs),
        ),
      )
      .orderBy(asc(bookings.aosMs))
      .all();
  }
}

function byAntenna<T extends { readonly antennaId: string }>(rows: readonly T[]): Map<string, T[]> {
  const groups = new Map<string, T[]>();
  for (const row of rows) {
    const group = groups.get(row.antennaId);
    if (group) group.push(row);
    else groups.set(row.antennaId, [row]);
  }
  return groups;
}

function chunks(ids: readonly string[]): string[][] {
  const parts: string[][] = [];
  for (let i = 0; i < ids.length; i += CHUNK) parts.push(ids.slice(i, i + CHUNK));
  return parts;
}
