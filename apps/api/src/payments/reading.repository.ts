/** How far repeated readings of the provider have come. */
import { Inject, Injectable } from '@nestjs/common';
import { providerReadings, type SkyberthDatabase } from '@skyberth/drizzle';
import { eq } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';

export type ReadingRow = typeof providerReadings.$inferSelect;

@Injectable()
export class ReadingRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  find(name: string): ReadingRow | undefined {
    return this.db.select().from(providerReadings).where(eq(providerReadings.name, name)).get();
  }

  save(name: string, reading: Omit<ReadingRow, 'name'>): void {
    this.db
      .insert(providerReadings)
      .values({ name, ...reading })
      .onConflictDoUpdate({ target: providerReadings.name, set: reading })
      .run();
  }
}
