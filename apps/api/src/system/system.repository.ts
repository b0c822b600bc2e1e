/** What the database says of itself. */
import { Inject, Injectable } from '@nestjs/common';
import { migrationState, providerEvents, type SkyberthDatabase } from '@skyberth/drizzle';
import { count } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';

@Injectable()
export class SystemRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  /** Throws where the database does not answer. */
  migrations(): { readonly applied: number; readonly known: number } {
    return migrationState(this.db);
  }

  sizeBytes(): number {
    const { $client } = this.db;
    const pages = $client.pragma('page_count', { simple: true }) as number;
    return pages * ($client.pragma('page_size', { simple: true }) as number);
  }

  /** `ok`, or the first thing that is broken. Reads every page once. */
  integrity(): string {
    return this.db.$client.pragma('quick_check(1)', { simple: true }) as string;
  }

  providerEvents(): { readonly received: number; readonly processed: number } {
    const row = this.db
      .select({ received: count(), processed: count(providerEvents.processedMs) })
      .from(providerEvents)
      .get();
    return { received: row?.received ?? 0, processed: row?.processed ?? 0 };
  }
}
