import { BOOKING_STATES, BOOKING_TRANSITIONS, OCCUPYING_STATES } from '@skyberth/shared';
import { describe, expect, it } from 'vitest';
import { migrateDatabase, openDatabase } from './open.js';

const fresh = () => {
  const db = openDatabase(':memory:');
  migrateDatabase(db);
  return db;
};

describe('the migrated database', () => {
  it('permits exactly the moves of the shared state table', () => {
    const rows = fresh().$client.prepare('SELECT from_state, to_state FROM booking_moves').raw().all() as [
      string,
      string,
    ][];
    const inDatabase = rows.map((row) => row.join(' -> ')).sort();
    const inTable = new Set(
      BOOKING_TRANSITIONS.filter((move) => move.from !== null).map((move) => `${move.from} -> ${move.to}`),
    );
    expect(inDatabase).toEqual([...inTable].sort());
  });

  it('guards the same states as the shared table', () => {
    const triggers = fresh().$client.prepare("SELECT name, sql FROM sqlite_master WHERE type = 'trigger'").all() as {
      name: string;
      sql: string;
    }[];
    const list = (states: readonly string[]) => states.map((state) => `'${state}'`).join(',');
    for (const name of ['bookings_no_overlap_insert', 'bookings_no_overlap_update']) {
      expect(triggers.find((trigger) => trigger.name === name)?.sql).toContain(
        `NEW.state IN (${list(OCCUPYING_STATES)})`,
      );
    }
    expect(triggers.find((trigger) => trigger.name === 'bookings_state_known')?.sql).toContain(
      `NOT IN (${list(BOOKING_STATES)})`,
    );
  });

  it('is sound and keeps foreign keys', () => {
    const client = fresh().$client;
    expect(client.pragma('integrity_check', { simple: true })).toBe('ok');
    expect(client.pragma('foreign_keys', { simple: true })).toBe(1);
  });

  it('refuses an unbalanced journal entry, and any change to a sealed one', () => {
    const client = fresh().$client;
    const entry = client.prepare(
      "INSERT INTO journal_entries (id, at_ms, cause_key, cause, currency) VALUES (?, 0, ?, 'test', 'EUR')",
    );
    const posting = client.prepare(
      "INSERT INTO journal_postings (entry_id, line, account, amount_minor, at_ms, currency) VALUES (?, ?, ?, ?, 0, 'EUR')",
    );
    const seal = client.prepare('UPDATE journal_entries SET sealed = 1 WHERE id = ?');
    entry.run('e1', 'k1');
    posting.run('e1', 1, 'a', 100);
    posting.run('e1', 2, 'b', -99);
    expect(() => seal.run('e1')).toThrow('must balance');
    posting.run('e1', 3, 'b', -1);
    seal.run('e1');
    expect(() => posting.run('e1', 4, 'c', 5)).toThrow('takes no more postings');
    expect(() => seal.run('e1')).toThrow('never change');
    expect(() => client.prepare("UPDATE journal_postings SET amount_minor = 1 WHERE entry_id = 'e1'").run()).toThrow(
      'never change',
    );
    expect(() => client.prepare("DELETE FROM journal_entries WHERE id = 'e1'").run()).toThrow('kept');
    expect(() => entry.run('e2', 'k1')).toThrow('UNIQUE');
  });

  it('refuses a broken audit chain', () => {
    const client = fresh().$client;
    const row = client.prepare(
      "INSERT INTO audit_log (seq, at_ms, action, subject, data, previous_hash, hash) VALUES (?, 0, 'a', 's', '{}', ?, ?)",
    );
    row.run(1, '', 'h1');
    expect(() => row.run(3, 'h1', 'h3')).toThrow('chain is broken');
    expect(() => row.run(2, 'other', 'h2')).toThrow('chain is broken');
    row.run(2, 'h1', 'h2');
    expect(() => client.prepare("UPDATE audit_log SET action = 'b' WHERE seq = 1").run()).toThrow('never change');
  });
});
