/** Opening the database file with the settings that its guarantees rest on, and migrating it. */
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import Database from 'better-sqlite3';
import { type BetterSQLite3Database, drizzle } from 'drizzle-orm/better-sqlite3';
import { migrate } from 'drizzle-orm/better-sqlite3/migrator';
import * as schema from './schema/index.js';

export type SkyberthDatabase = BetterSQLite3Database<typeof schema> & { readonly $client: Database.Database };

const MIGRATIONS_FOLDER = fileURLToPath(new URL('../migrations', import.meta.url));

/**
 * Opens `file` (or `:memory:`). Write-ahead log, foreign keys on, five seconds' patience for another writer;
 * `synchronous` FULL, because a confirmed booking must survive a power cut.
 */
export function openDatabase(file: string): SkyberthDatabase {
  const client = new Database(file, { timeout: 5_000 });
  client.pragma('journal_mode = WAL');
  client.pragma('synchronous = FULL');
  client.pragma('foreign_keys = ON');
  client.pragma('recursive_triggers = ON');
  client.pragma('temp_store = MEMORY');
  return drizzle(client, { schema });
}

/** Applies the migrations that are missing, in order, each in a transaction. */
export function migrateDatabase(db: SkyberthDatabase): void {
  migrate(db, { migrationsFolder: MIGRATIONS_FOLDER });
}

/** How many migrations this database has had, and how many this version of the application knows. */
export function migrationState(db: SkyberthDatabase): { readonly applied: number; readonly known: number } {
  const row = db.$client.prepare('SELECT count(*) AS applied FROM __drizzle_migrations').get() as { applied: number };
  const journal = JSON.parse(readFileSync(`${MIGRATIONS_FOLDER}/meta/_journal.json`, 'utf8')) as { entries: unknown[] };
  return { applied: row.applied, known: journal.entries.length };
}
