/**
 * Objects are kept as the documents the API answers with, because they are what must not change between two answers.
 * Money is also kept as rows of its own, so that a balance is a sum and never a remembered figure.
 */
export const SCHEMA_SQL = `
CREATE TABLE IF NOT EXISTS objects (
  seq INTEGER PRIMARY KEY AUTOINCREMENT,
  id TEXT NOT NULL UNIQUE,
  kind TEXT NOT NULL,
  account TEXT NOT NULL,
  created INTEGER NOT NULL,
  body TEXT NOT NULL CHECK (json_valid(body)),
  hidden TEXT NOT NULL DEFAULT '{}' CHECK (json_valid(hidden)),
  deleted INTEGER NOT NULL DEFAULT 0 CHECK (deleted IN (0, 1))
) STRICT;
CREATE INDEX IF NOT EXISTS objects_by_kind ON objects (kind, account, seq);
CREATE INDEX IF NOT EXISTS objects_by_customer ON objects (kind, json_extract(body, '$.customer'));
CREATE INDEX IF NOT EXISTS objects_by_payment_intent ON objects (kind, json_extract(body, '$.payment_intent'));
CREATE INDEX IF NOT EXISTS objects_by_charge ON objects (kind, json_extract(body, '$.charge'));
CREATE INDEX IF NOT EXISTS objects_by_source ON objects (kind, json_extract(body, '$.source'));
CREATE INDEX IF NOT EXISTS objects_by_source_transaction ON objects (kind, json_extract(body, '$.source_transaction'));
CREATE INDEX IF NOT EXISTS objects_by_transfer ON objects (kind, json_extract(body, '$.transfer'));
CREATE INDEX IF NOT EXISTS objects_by_client_secret ON objects (json_extract(body, '$.client_secret'));

CREATE TABLE IF NOT EXISTS balance_rows (
  id TEXT PRIMARY KEY REFERENCES objects (id),
  account TEXT NOT NULL,
  currency TEXT NOT NULL,
  net_minor INTEGER NOT NULL,
  available_on INTEGER NOT NULL
) STRICT;
CREATE INDEX IF NOT EXISTS balance_rows_sum ON balance_rows (account, currency, available_on, net_minor);
CREATE TRIGGER IF NOT EXISTS balance_rows_stay BEFORE UPDATE ON balance_rows
BEGIN SELECT RAISE(ABORT, 'a balance row never changes'); END;
CREATE TRIGGER IF NOT EXISTS balance_rows_remain BEFORE DELETE ON balance_rows
BEGIN SELECT RAISE(ABORT, 'a balance row is never removed'); END;

CREATE TABLE IF NOT EXISTS answers (
  account TEXT NOT NULL,
  key TEXT NOT NULL,
  request_hash TEXT NOT NULL,
  route TEXT NOT NULL,
  status INTEGER NOT NULL,
  body TEXT NOT NULL,
  request_id TEXT NOT NULL,
  created_ms INTEGER NOT NULL,
  PRIMARY KEY (account, key)
) STRICT;

CREATE INDEX IF NOT EXISTS answers_by_age ON answers (created_ms);

CREATE TABLE IF NOT EXISTS timers (
  seq INTEGER PRIMARY KEY AUTOINCREMENT,
  due_ms INTEGER NOT NULL,
  task TEXT NOT NULL,
  ref TEXT NOT NULL
) STRICT;
CREATE INDEX IF NOT EXISTS timers_due ON timers (due_ms, seq);
CREATE INDEX IF NOT EXISTS timers_by_ref ON timers (ref, task);

CREATE TABLE IF NOT EXISTS deliveries (
  seq INTEGER PRIMARY KEY AUTOINCREMENT,
  event_id TEXT NOT NULL REFERENCES objects (id),
  endpoint_id TEXT NOT NULL,
  state TEXT NOT NULL CHECK (state IN ('waiting', 'held', 'delivered', 'failed', 'dropped')),
  position INTEGER NOT NULL,
  attempts INTEGER NOT NULL DEFAULT 0,
  next_ms INTEGER NOT NULL,
  last_status INTEGER,
  last_error TEXT
) STRICT;
CREATE INDEX IF NOT EXISTS deliveries_due ON deliveries (state, next_ms, position);
CREATE INDEX IF NOT EXISTS deliveries_by_position ON deliveries (position);
CREATE INDEX IF NOT EXISTS deliveries_by_event ON deliveries (event_id);

CREATE TABLE IF NOT EXISTS notes (name TEXT PRIMARY KEY, value TEXT NOT NULL) STRICT;
`;
