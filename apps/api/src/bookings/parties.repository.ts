/** Who stands on the two sides of a booking, and what their things are called. */
import { Inject, Injectable } from '@nestjs/common';
import {
  antennas,
  bookings,
  memberships,
  organisations,
  people,
  type SkyberthDatabase,
  spacecraft,
  stations,
} from '@skyberth/drizzle';
import { and, eq, inArray } from 'drizzle-orm';
import { alias } from 'drizzle-orm/sqlite-core';
import { DATABASE } from '../platform/database.module.js';
import type { Db } from '../platform/transaction.js';

export interface BookingNames {
  readonly spacecraftName: string;
  readonly spacecraftShortName: string;
  readonly antennaName: string;
  readonly stationId: string;
  readonly stationName: string;
  readonly stationTimeZone: string;
  readonly operatorName: string;
  readonly ownerName: string;
}

const operators = alias(organisations, 'operators');
const owners = alias(organisations, 'owners');

/** The columns of the names, for queries that list bookings. */
export const nameColumns = {
  spacecraftName: spacecraft.name,
  spacecraftShortName: spacecraft.shortName,
  antennaName: antennas.name,
  stationId: stations.id,
  stationName: stations.name,
  stationTimeZone: stations.timeZone,
  operatorName: operators.name,
  ownerName: owners.name,
};

@Injectable()
export class PartiesRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  names(bookingId: string, tx: Db = this.db): BookingNames {
    const row = tx
      .select(nameColumns)
      .from(bookings)
      .innerJoin(spacecraft, eq(spacecraft.id, bookings.spacecraftId))
      .innerJoin(antennas, eq(antennas.id, bookings.antennaId))
      .innerJoin(stations, eq(stations.id, antennas.stationId))
      .innerJoin(operators, eq(operators.id, bookings.operatorId))
      .innerJoin(owners, eq(owners.id, bookings.ownerId))
      .where(eq(bookings.id, bookingId))
      .get();
    if (!row) throw new Error(`There is no booking ${bookingId}.`);
    return row;
  }

  /** Everybody of an organisation who does its work. */
  workers(tx: Db, organisationId: string): string[] {
    return tx
      .select({ email: people.email })
      .from(memberships)
      .innerJoin(people, eq(people.id, memberships.personId))
      .where(and(eq(memberships.organisationId, organisationId), inArray(memberships.role, ['manager', 'member'])))
      .all()
      .map((row) => row.email);
  }

  emailOf(tx: Db, personId: string): string | undefined {
    return tx.select({ email: people.email }).from(people).where(eq(people.id, personId)).get()?.email;
  }

  organisation(organisationId: string, tx: Db = this.db): typeof organisations.$inferSelect {
    const row = tx.select().from(organisations).where(eq(organisations.id, organisationId)).get();
    if (!row) throw new Error(`There is no organisation ${organisationId}.`);
    return row;
  }

  /** Names of people and organisations that appear in a diary. */
  actors(personIds: readonly string[], organisationIds: readonly string[]): Map<string, string> {
    const found = new Map<string, string>();
    if (personIds.length > 0) {
      const rows = this.db
        .select({ id: people.id, name: people.name })
        .from(people)
        .where(inArray(people.id, [...personIds]))
        .all();
      for (const row of rows) found.set(row.id, row.name);
    }
    if (organisationIds.length > 0) {
      const rows = this.db
        .select({ id: organisations.id, name: organisations.name })
        .from(organisations)
        .where(inArray(organisations.id, [...organisationIds]))
        .all();
      for (const row of rows) found.set(row.id, row.name);
    }
    return found;
  }
}

/** The joins that `nameColumns` needs are the same wherever bookings are listed. */
export { operators, owners };
