-- What the database refuses by itself, whatever the code above it believes.
-- The lower bounds on *_from_ms use that no guarded interval is longer than 700,000 s (bookings_order).
-- One beam serves one contact at a time, set-up and teardown included; one spacecraft talks to one antenna.
CREATE TRIGGER bookings_no_overlap_insert BEFORE INSERT ON bookings
WHEN NEW.state IN ('held','awaiting owner','confirmed','under way','reporting','settled','failed','in dispute')
BEGIN
  SELECT RAISE(ABORT, 'berth-taken') WHERE EXISTS (
    SELECT 1 FROM bookings b
    WHERE b.antenna_id = NEW.antenna_id AND b.beam = NEW.beam AND b.id <> NEW.id
      AND b.state IN ('held','awaiting owner','confirmed','under way','reporting','settled','failed','in dispute')
      AND b.guard_from_ms < NEW.guard_to_ms AND b.guard_from_ms > NEW.guard_from_ms - 700000000 AND NEW.guard_from_ms < b.guard_to_ms);
  SELECT RAISE(ABORT, 'spacecraft-busy') WHERE EXISTS (
    SELECT 1 FROM bookings b
    WHERE b.spacecraft_id = NEW.spacecraft_id AND b.id <> NEW.id
      AND b.state IN ('held','awaiting owner','confirmed','under way','reporting','settled','failed','in dispute')
      AND b.aos_ms < NEW.los_ms AND b.aos_ms > NEW.aos_ms - 700000000 AND NEW.aos_ms < b.los_ms);
END;
--> statement-breakpoint
CREATE TRIGGER bookings_no_overlap_update BEFORE UPDATE OF state, antenna_id, beam, spacecraft_id, aos_ms, los_ms, guard_from_ms, guard_to_ms ON bookings
WHEN NEW.state IN ('held','awaiting owner','confirmed','under way','reporting','settled','failed','in dispute')
BEGIN
  SELECT RAISE(ABORT, 'berth-taken') WHERE EXISTS (
    SELECT 1 FROM bookings b
    WHERE b.antenna_id = NEW.antenna_id AND b.beam = NEW.beam AND b.id <> NEW.id
      AND b.state IN ('held','awaiting owner','confirmed','under way','reporting','settled','failed','in dispute')
      AND b.guard_from_ms < NEW.guard_to_ms AND b.guard_from_ms > NEW.guard_from_ms - 700000000 AND NEW.guard_from_ms < b.guard_to_ms);
  SELECT RAISE(ABORT, 'spacecraft-busy') WHERE EXISTS (
    SELECT 1 FROM bookings b
    WHERE b.spacecraft_id = NEW.spacecraft_id AND b.id <> NEW.id
      AND b.state IN ('held','awaiting owner','confirmed','under way','reporting','settled','failed','in dispute')
      AND b.aos_ms < NEW.los_ms AND b.aos_ms > NEW.aos_ms - 700000000 AND NEW.aos_ms < b.los_ms);
END;
--> statement-breakpoint
-- The table of moves of shared/src/booking-states.ts, again; a test holds the two against each other.
CREATE TABLE booking_moves (from_state text NOT NULL, to_state text NOT NULL, PRIMARY KEY (from_state, to_state)) WITHOUT ROWID;
--> statement-breakpoint
INSERT INTO booking_moves (from_state, to_state) VALUES
  ('held', 'cancelled'),
  ('held', 'lapsed'),
  ('held', 'confirmed'),
  ('held', 'awaiting owner'),
  ('awaiting owner', 'confirmed'),
  ('awaiting owner', 'declined'),
  ('awaiting owner', 'lapsed'),
  ('awaiting owner', 'cancelled'),
  ('confirmed', 'cancelled'),
  ('confirmed', 'lapsed'),
  ('confirmed', 'under way'),
  ('under way', 'reporting'),
  ('under way', 'failed'),
  ('reporting', 'settled'),
  ('reporting', 'failed'),
  ('reporting', 'in dispute'),
  ('settled', 'in dispute'),
  ('failed', 'in dispute'),
  ('in dispute', 'settled'),
  ('in dispute', 'failed');
--> statement-breakpoint
CREATE TRIGGER bookings_moves BEFORE UPDATE OF state ON bookings
WHEN NEW.state <> OLD.state
BEGIN
  SELECT RAISE(ABORT, 'wrong-state') WHERE NOT EXISTS (
    SELECT 1 FROM booking_moves m WHERE m.from_state = OLD.state AND m.to_state = NEW.state);
END;
--> statement-breakpoint
CREATE TRIGGER bookings_state_known BEFORE INSERT ON bookings
WHEN NEW.state NOT IN ('held','awaiting owner','confirmed','under way','reporting','settled','lapsed','declined','cancelled','failed','in dispute')
BEGIN SELECT RAISE(ABORT, 'unknown booking state'); END;
--> statement-breakpoint
-- A frozen price stays frozen.
CREATE TRIGGER bookings_price_frozen BEFORE UPDATE OF quote, currency, net_minor, vat_minor, to_pay_minor, operator_id, owner_id, number ON bookings
BEGIN SELECT RAISE(ABORT, 'the terms of a booking cannot change'); END;
--> statement-breakpoint
CREATE TRIGGER bookings_kept BEFORE DELETE ON bookings BEGIN SELECT RAISE(ABORT, 'bookings are kept'); END;
--> statement-breakpoint
CREATE TRIGGER booking_events_unchanged BEFORE UPDATE ON booking_events BEGIN SELECT RAISE(ABORT, 'booking_events rows never change'); END;
--> statement-breakpoint
CREATE TRIGGER booking_events_kept BEFORE DELETE ON booking_events BEGIN SELECT RAISE(ABORT, 'booking_events rows are kept'); END;
--> statement-breakpoint
CREATE TRIGGER audit_log_unchanged BEFORE UPDATE ON audit_log BEGIN SELECT RAISE(ABORT, 'audit_log rows never change'); END;
--> statement-breakpoint
CREATE TRIGGER audit_log_kept BEFORE DELETE ON audit_log BEGIN SELECT RAISE(ABORT, 'audit_log rows are kept'); END;
--> statement-breakpoint
CREATE TRIGGER invoices_unchanged BEFORE UPDATE ON invoices BEGIN SELECT RAISE(ABORT, 'invoices rows never change'); END;
--> statement-breakpoint
CREATE TRIGGER invoices_kept BEFORE DELETE ON invoices BEGIN SELECT RAISE(ABORT, 'invoices rows are kept'); END;
--> statement-breakpoint
CREATE TRIGGER price_cards_unchanged BEFORE UPDATE ON price_cards BEGIN SELECT RAISE(ABORT, 'price_cards rows never change'); END;
--> statement-breakpoint
CREATE TRIGGER price_cards_kept BEFORE DELETE ON price_cards BEGIN SELECT RAISE(ABORT, 'price_cards rows are kept'); END;
--> statement-breakpoint
CREATE TRIGGER antenna_masks_unchanged BEFORE UPDATE ON antenna_masks BEGIN SELECT RAISE(ABORT, 'antenna_masks rows never change'); END;
--> statement-breakpoint
CREATE TRIGGER antenna_masks_kept BEFORE DELETE ON antenna_masks BEGIN SELECT RAISE(ABORT, 'antenna_masks rows are kept'); END;
--> statement-breakpoint
CREATE TRIGGER element_sets_unchanged BEFORE UPDATE ON element_sets BEGIN SELECT RAISE(ABORT, 'element_sets rows never change'); END;
--> statement-breakpoint
CREATE TRIGGER element_sets_kept BEFORE DELETE ON element_sets BEGIN SELECT RAISE(ABORT, 'element_sets rows are kept'); END;
--> statement-breakpoint
CREATE TRIGGER journal_postings_unchanged BEFORE UPDATE ON journal_postings BEGIN SELECT RAISE(ABORT, 'journal_postings rows never change'); END;
--> statement-breakpoint
CREATE TRIGGER journal_postings_kept BEFORE DELETE ON journal_postings BEGIN SELECT RAISE(ABORT, 'journal_postings rows are kept'); END;
--> statement-breakpoint
CREATE TRIGGER audit_log_chained BEFORE INSERT ON audit_log
BEGIN
  SELECT RAISE(ABORT, 'the audit chain is broken') WHERE NEW.seq <> (SELECT coalesce(max(seq), 0) + 1 FROM audit_log)
    OR NEW.previous_hash <> coalesce((SELECT hash FROM audit_log ORDER BY seq DESC LIMIT 1), '');
END;
--> statement-breakpoint
-- 1, 2, 3 ... in each series, without a gap.
CREATE TRIGGER invoices_gap_free BEFORE INSERT ON invoices
BEGIN
  SELECT RAISE(ABORT, 'invoice numbers leave no gap')
  WHERE NEW.seq <> (SELECT coalesce(max(seq), 0) + 1 FROM invoices WHERE series = NEW.series);
END;
--> statement-breakpoint
-- A journal entry is written open, filled, and sealed in one transaction; sealed means balanced and for ever.
CREATE TRIGGER journal_entries_begin_open BEFORE INSERT ON journal_entries
WHEN NEW.sealed <> 0
BEGIN SELECT RAISE(ABORT, 'a journal entry begins open'); END;
--> statement-breakpoint
CREATE TRIGGER journal_entries_seal BEFORE UPDATE ON journal_entries
BEGIN
  SELECT RAISE(ABORT, 'journal entries never change')
  WHERE OLD.sealed = 1 OR NEW.sealed <> 1 OR NEW.id <> OLD.id OR NEW.at_ms <> OLD.at_ms OR NEW.cause_key <> OLD.cause_key
    OR NEW.cause <> OLD.cause OR NEW.currency <> OLD.currency OR NEW.booking_id IS NOT OLD.booking_id;
  SELECT RAISE(ABORT, 'a journal entry must balance')
  WHERE (SELECT coalesce(sum(amount_minor), 1) FROM journal_postings WHERE entry_id = OLD.id) <> 0
    OR (SELECT count(*) FROM journal_postings WHERE entry_id = OLD.id) < 2;
END;
--> statement-breakpoint
CREATE TRIGGER journal_entries_kept BEFORE DELETE ON journal_entries BEGIN SELECT RAISE(ABORT, 'journal entries are kept'); END;
--> statement-breakpoint
CREATE TRIGGER journal_postings_into_open BEFORE INSERT ON journal_postings
BEGIN
  SELECT RAISE(ABORT, 'a sealed journal entry takes no more postings')
  WHERE (SELECT sealed FROM journal_entries WHERE id = NEW.entry_id) <> 0;
END;
--> statement-breakpoint
CREATE TRIGGER memberships_role_insert BEFORE INSERT ON memberships
BEGIN
  SELECT RAISE(ABORT, 'that role does not exist in that kind of organisation') WHERE NOT EXISTS (
    SELECT 1 FROM organisations o WHERE o.id = NEW.organisation_id
      AND ((o.kind IN ('operator','owner') AND NEW.role IN ('manager','member','viewer')) OR (o.kind = 'staff' AND NEW.role IN ('finance','admin'))));
END;
--> statement-breakpoint
CREATE TRIGGER memberships_role_update BEFORE UPDATE ON memberships
BEGIN
  SELECT RAISE(ABORT, 'that role does not exist in that kind of organisation') WHERE NOT EXISTS (
    SELECT 1 FROM organisations o WHERE o.id = NEW.organisation_id
      AND ((o.kind IN ('operator','owner') AND NEW.role IN ('manager','member','viewer')) OR (o.kind = 'staff' AND NEW.role IN ('finance','admin'))));
END;
