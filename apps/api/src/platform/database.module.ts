/** Opens and migrates the database for the whole application, and closes it last. */
import { mkdirSync } from 'node:fs';
import { dirname } from 'node:path';
import { Global, Inject, Module, type OnApplicationShutdown } from '@nestjs/common';
import { migrateDatabase, openDatabase, type SkyberthDatabase } from '@skyberth/drizzle';
import { CONFIG, type Config } from './config.js';

export const DATABASE = Symbol('Database');

function open(config: Config): SkyberthDatabase {
  if (config.databaseFile !== ':memory:') mkdirSync(dirname(config.databaseFile), { recursive: true });
  const db = openDatabase(config.databaseFile);
  migrateDatabase(db);
  return db;
}

@Global()
@Module({
  providers: [{ provide: DATABASE, inject: [CONFIG], useFactory: open }],
  exports: [DATABASE],
})
export class DatabaseModule implements OnApplicationShutdown {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  onApplicationShutdown(): void {
    this.db.$client.close();
  }
}
