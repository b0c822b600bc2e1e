/** Whether an organisation is suspended: asked by the guard before every change, and by what is put on sale. */
import { Inject, Injectable } from '@nestjs/common';
import { type SkyberthDatabase, suspensions } from '@skyberth/drizzle';
import { type Permission } from '@skyberth/shared';
import { eq, type SQL, sql } from 'drizzle-orm';
import type { SQLiteColumn } from 'drizzle-orm/sqlite-core';
import { DATABASE } from './database.module.js';

/** What a suspended organisation may still change: contacts already sold must be flown and told of, and a lost key ended. */
export const KEPT_WHEN_SUSPENDED: readonly Permission[] = [
  'bookings.report',
  'api-keys.revoke',
  'calendar-feeds.revoke',
];

@Injectable()
export class StandingService {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  /** The reason of its suspension, or null in good standing. */
  suspendedFor(organisationId: string): string | null {
    const row = this.db
      .select({ reason: suspensions.reason })
      .from(suspensions)
      .where(eq(suspensions.organisationId, organisationId))
      .get();
    return row?.reason ?? null;
  }
}

/** A condition for queries: the organisation in this column is in good standing. */
export const inGoodStanding = (organisationId: SQLiteColumn): SQL =>
  sql`not exists (select 1 from ${suspensions} where ${eq(suspensions.organisationId, organisationId)})`;
