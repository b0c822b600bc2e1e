/** Spacecraft and their radios in the database. */
import { Inject, Injectable } from '@nestjs/common';
import { bookings, radios, type SkyberthDatabase, spacecraft } from '@skyberth/drizzle';
import { BOOKING_STATE_FACTS, BOOKING_STATES, type Radio } from '@skyberth/shared';
import { and, asc, count, eq, gt, inArray, type SQL, sql } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';
import { newId } from '../platform/ids.js';
import type { Db } from '../platform/transaction.js';

export type SpacecraftRow = typeof spacecraft.$inferSelect;
export type RadioRow = typeof radios.$inferSelect;

/** A spacecraft with what it speaks and hears with. */
export interface EquippedSpacecraft extends SpacecraftRow {
  readonly radios: readonly Radio[];
}

/** States in which a contact is still to be flown. */
const TO_COME = BOOKING_STATES.filter(
  (state) => BOOKING_STATE_FACTS[state].occupiesAntenna && BOOKING_STATE_FACTS[state].open && state !== 'in dispute',
);
/** Identifiers in one statement; SQLite takes at most 32,766 variables. */
const CHUNK = 1_000;

@Injectable()
export class SpacecraftRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  list(
    organisationId: string,
    filter: { state: 'active' | 'retired' | 'all'; limit: number; offset: number },
  ): { rows: EquippedSpacecraft[]; total: number } {
    const wanted = and(
      eq(spacecraft.organisationId, organisationId),
      filter.state === 'all' ? undefined : eq(spacecraft.state, filter.state),
    );
    const total = this.db.select({ rows: count() }).from(spacecraft).where(wanted).get()?.rows ?? 0;
    const rows = this.db
      .select()
      .from(spacecraft)
      .where(wanted)
      .orderBy(asc(sql`lower(${spacecraft.name})`), asc(spacecraft.id))
      .limit(filter.limit)
      .offset(filter.offset)
      .all();
    return { rows: this.equip(this.db, rows), total };
  }

  find(db: Db, organisationId: string, id: string): EquippedSpacecraft | undefined {
    return this.select(db, and(eq(spacecraft.id, id), eq(spacecraft.organisationId, organisationId)))[0];
  }

  /** Those of the ids that belong to the organisation, in the order of their names. */
  findSome(db: Db, organisationId: string, ids: readonly string[]): EquippedSpacecraft[] {
    return chunks(ids).flatMap((some) =>
      this.select(db, and(eq(spacecraft.organisationId, organisationId), inArray(spacecraft.id, some))),
    );
  }

  /** Every spacecraft of an organisation, without radios. */
  all(db: Db, organisationId: string): SpacecraftRow[] {
    return db.select().from(spacecraft).where(eq(spacecraft.organisationId, organisationId)).all();
  }

  /** Active spacecraft of every organisation that carry one of these catalogue numbers, without radios. */
  withNumbers(db: Db, catalogNumbers: readonly number[]): SpacecraftRow[] {
    const rows: SpacecraftRow[] = [];
    for (let i = 0; i < catalogNumbers.length; i += CHUNK) {
      const some = inArray(spacecraft.catalogNumber, catalogNumbers.slice(i, i + CHUNK));
      rows.push(
        ...db
          .select()
          .from(spacecraft)
          .where(and(some, eq(spacecraft.state, 'active')))
          .all(),
      );
    }
    return rows;
  }

  private select(db: Db, where: SQL | undefined): EquippedSpacecraft[] {
    const rows = db
      .select()
      .from(spacecraft)
      .where(where)
      .orderBy(asc(sql`lower(${spacecraft.name})`))
      .all();
    return this.equip(db, rows);
  }

  private equip(db: Db, rows: readonly SpacecraftRow[]): EquippedSpacecraft[] {
    const all = chunks(rows.map((row) => row.id)).flatMap((ids) =>
      db
        .select()
        .from(radios)
        .where(inArray(radios.spacecraftId, ids))
        .orderBy(asc(radios.centreFrequencyMhz), asc(radios.id))
        .all(),
    );
    const fitted = new Map<string, RadioRow[]>();
    for (const radio of all) fitted.set(radio.spacecraftId, [...(fitted.get(radio.spacecraftId) ?? []), radio]);
    return rows.map((row) => ({ ...row, radios: (fitted.get(row.id) ?? []).map(radioView) }));
  }

  add(tx: Db, row: SpacecraftRow): void {
    tx.insert(spacecraft).values(row).run();
  }

  change(tx: Db, id: string, values: Partial<SpacecraftRow>): void {
    tx.update(spacecraft).set(values).where(eq(spacecraft.id, id)).run();
  }

  /** Replaces the radios; one that keeps its name and direction keeps its id. */
  replaceRadios(tx: Db, spacecraftId: string, wanted: readonly Omit<Radio, 'id'>[]): void {
    const present = tx.select().from(radios).where(eq(radios.spacecraftId, spacecraftId)).all();
    tx.delete(radios).where(eq(radios.spacecraftId, spacecraftId)).run();
    for (const radio of wanted) {
      const index = present.findIndex((each) => each.name === radio.name && each.direction === radio.direction);
      const [same] = index < 0 ? [] : present.splice(index, 1);
      tx.insert(radios)
        .values({ ...radio, id: same?.id ?? newId(), spacecraftId })
        .run();
    }
  }

  /** Contacts that have not ended yet. */
  contactsToCome(db: Db, spacecraftId: string, nowMs: number): number {
    const row = db
      .select({ contacts: count() })
      .from(bookings)
      .where(and(eq(bookings.spacecraftId, spacecraftId), inArray(bookings.state, TO_COME), gt(bookings.losMs, nowMs)))
      .get();
    return row?.contacts ?? 0;
  }
}

const radioView = ({ spacecraftId: _spacecraftId, ...radio }: RadioRow): Radio => ({
  ...radio,
  band: radio.band as Radio['band'],
  polarisation: radio.polarisation as Radio['polarisation'],
});

function chunks(ids: readonly string[]): string[][] {
  const parts: string[][] = [];
  for (let i = 0; i < ids.length; i += CHUNK) parts.push(ids.slice(i, i + CHUNK));
  return parts;
}
