/** Masks that were published, in the database. */
import { Inject, Injectable } from '@nestjs/common';
import { antennaMasks, people, type SkyberthDatabase } from '@skyberth/drizzle';
import type { PublishedMask } from '@skyberth/shared';
import { desc, eq } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';

const MOST_LISTED = 100;

@Injectable()
export class MaskHistoryRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  /** Newest first. */
  of(antennaId: string): PublishedMask[] {
    return this.db
      .select({ mask: antennaMasks, publishedByName: people.name })
      .from(antennaMasks)
      .leftJoin(people, eq(people.id, antennaMasks.publishedBy))
      .where(eq(antennaMasks.antennaId, antennaId))
      .orderBy(desc(antennaMasks.version))
      .limit(MOST_LISTED)
      .all()
      .map(({ mask: { version, points, reason, publishedMs }, publishedByName }) => ({
        version,
        points,
        reason,
        publishedByName,
        publishedUtc: new Date(publishedMs).toISOString(),
      }));
  }
}
