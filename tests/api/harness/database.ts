/** A look into the database from outside, for what no route shows. */
import Database from 'better-sqlite3';
import type { Skyberth } from '../harness.js';

/** Every row of a table as one text. */
export function databaseText(skyberth: Skyberth, table: string): string {
  const client = new Database(skyberth.databaseFile, { readonly: true });
  try {
    return JSON.stringify(client.prepare(`SELECT * FROM "${table}"`).all());
  } finally {
    client.close();
  }
}
