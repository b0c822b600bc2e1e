import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import Database from 'better-sqlite3';
import type { Kind, Kinds } from './kinds.js';
import { SCHEMA_SQL } from './schema.js';

/** The account name of the platform itself; connected accounts use their `acct_` id. */
export const PLATFORM = '';

export interface Page<T> {
  items: T[];
  hasMore: boolean;
}

export interface Query {
  account: string;
  /** Exact values of body fields; the names come from our own code, never from a request. */
  where?: Readonly<Record<string, string | number | undefined>>;
  created?: { fromS?: number; toS?: number };
  types?: readonly string[];
  limit: number;
  /** Sequence numbers to start strictly after (older) or strictly before (newer). */
  olderThan?: number;
  newerThan?: number;
}

interface Row {
  seq: number;
  body: string;
}

/** All that the service remembers, in one SQLite file. Writes belong inside `transaction`. */
export class Store {
  readonly db: Database.Database;
  readonly #statements = new Map<string, Database.Statement>();

  constructor(dataDir: string) {
    if (dataDir !== ':memory:') mkdirSync(dataDir, { recursive: true });
    this.db = new Database(dataDir === ':memory:' ? dataDir : join(dataDir, 'payments.sqlite'));
    this.db.pragma('journal_mode = WAL');
    // A crash of the process loses nothing; only a power cut could, and that is not what a stand-in is for.
    this.db.pragma('synchronous = NORMAL');
    this.db.pragma('foreign_keys = ON');
    this.db.exec(SCHEMA_SQL);
  }

  /** Prepared once per text, since the same few dozen statements serve every request. */
  sql(text: string): Database.Statement {
    let statement = this.#statements.get(text);
    if (!statement) {
      statement = this.db.prepare(text);
      this.#statements.set(text, statement);
    }
    return statement;
  }

  transaction<T>(work: () => T): T {
    return this.db.transaction(work).immediate();
  }

  find<K extends Kind>(kind: K, id: string, account = PLATFORM): Kinds[K] | undefined {
    const row = this.sql('SELECT body FROM objects WHERE id = ? AND kind = ? AND account = ? AND deleted = 0').get(
      id,
      kind,
      account,
    );
    return row ? (JSON.parse((row as Row).body) as Kinds[K]) : undefined;
  }

  findByClientSecret(secret: string): Intent | undefined {
    const row = this.sql(
      "SELECT body FROM objects WHERE json_extract(body, '$.client_secret') = ? AND kind IN ('payment_intent', 'setup_intent')",
    ).get(secret);
    return row ? (JSON.parse((row as Row).body) as Intent) : undefined;
  }

  accountOf(id: string): string | undefined {
    const row = this.sql('SELECT account FROM objects WHERE id = ?').get(id);
    return row ? (row as { account: string }).account : undefined;
  }

  sequenceOf(id: string, kind: Kind, account: string): number | undefined {
    const row = this.sql('SELECT seq FROM objects WHERE id = ? AND kind = ? AND account = ?').get(id, kind, account);
    return row ? (row as Row).seq : undefined;
  }

  insert<K extends Kind>(kind: K, body: Kinds[K], createdS: number, account = PLATFORM, hidden: object = {}): void {
    this.sql('INSERT INTO objects (id, kind, account, created, body, hidden) VALUES (?, ?, ?, ?, ?, ?)').run(
      body.id,
      kind,
      account,
      createdS,
      JSON.stringify(body),
      JSON.stringify(hidden),
    );
  }

  save<K extends Kind>(body: Kinds[K]): void {
    this.sql('UPDATE objects SET body = ? WHERE id = ?').run(JSON.stringify(body), body.id);
  }

  remove(id: string): void {
    this.sql('UPDATE objects SET deleted = 1 WHERE id = ?').run(id);
  }

  /** Facts the API never shows, such as how a test card behaves. */
  hidden(id: string): Record<string, unknown> {
    const row = this.sql('SELECT hidden FROM objects WHERE id = ?').get(id);
    return row ? (JSON.parse((row as { hidden: string }).hidden) as Record<string, unknown>) : {};
  }

  setHidden(id: string, change: Record<string, unknown>): void {
    this.sql('UPDATE objects SET hidden = ? WHERE id = ?').run(JSON.stringify({ ...this.hidden(id), ...change }), id);
  }

  /** Newest first, as every list of the API is. */
  list<K extends Kind>(kind: K, query: Query): Page<Kinds[K]> {
    const conditions = ['kind = ?', 'account = ?', 'deleted = 0'];
    const values: (string | number)[] = [kind, query.account];
    for (const [field, value] of Object.entries(query.where ?? {})) {
      if (value === undefined) continue;
      conditions.push(`json_extract(body, '$.${field}') = ?`);
      values.push(value);
    }
    if (query.types) {
      conditions.push("json_extract(body, '$.type') IN (SELECT value FROM json_each(?))");
      values.push(JSON.stringify(query.types));
    }
    const bounds: [string, number | undefined][] = [
      ['created >= ?', query.created?.fromS],
      ['created <= ?', query.created?.toS],
      ['seq < ?', query.olderThan],
      ['seq > ?', query.newerThan],
    ];
    for (const [condition, value] of bounds) {
      if (value === undefined) continue;
      conditions.push(condition);
      values.push(value);
    }
    const towardsNewer = query.newerThan !== undefined;
    const rows = this.sql(
      `SELECT seq, body FROM objects WHERE ${conditions.join(' AND ')} ORDER BY seq ${towardsNewer ? 'ASC' : 'DESC'} LIMIT ?`,
    ).all(...values, query.limit + 1) as Row[];
    const hasMore = rows.length > query.limit;
    const kept = rows.slice(0, query.limit);
    if (towardsNewer) kept.reverse();
    return { items: kept.map((row) => JSON.parse(row.body) as Kinds[K]), hasMore };
  }

  readNote(name: string): string | undefined {
    const row = this.sql('SELECT value FROM notes WHERE name = ?').get(name);
    return row ? (row as { value: string }).value : undefined;
  }

  writeNote(name: string, value: string): void {
    this.sql(
      'INSERT INTO notes (name, value) VALUES (?, ?) ON CONFLICT (name) DO UPDATE SET value = excluded.value',
    ).run(name, value);
  }

  close(): void {
    this.db.close();
  }
}

type Intent = Kinds['payment_intent'] | Kinds['setup_intent'];
