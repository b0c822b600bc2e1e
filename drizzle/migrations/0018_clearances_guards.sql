-- The table of moves of shared/src/contracts/clearances.ts, again; a test holds the two against each other.
CREATE TABLE clearance_moves (from_state text NOT NULL, to_state text NOT NULL, PRIMARY KEY (from_state, to_state)) WITHOUT ROWID;
--> statement-breakpoint
INSERT INTO clearance_moves (from_state, to_state) VALUES
  ('requested', 'granted'),
  ('requested', 'refused'),
  ('requested', 'withdrawn'),
  ('requested', 'expired'),
  ('granted', 'in force'),
  ('granted', 'refused'),
  ('granted', 'withdrawn'),
  ('granted', 'expired'),
  ('in force', 'withdrawn'),
  ('in force', 'expired');
--> statement-breakpoint
CREATE TRIGGER clearances_begin BEFORE INSERT ON clearances WHEN NEW.state <> 'requested'
BEGIN SELECT RAISE(ABORT, 'a clearance begins as a request'); END;
--> statement-breakpoint
CREATE TRIGGER clearances_moves BEFORE UPDATE OF state ON clearances WHEN NEW.state <> OLD.state
BEGIN
  SELECT RAISE(ABORT, 'wrong-state') WHERE NOT EXISTS (
    SELECT 1 FROM clearance_moves m WHERE m.from_state = OLD.state AND m.to_state = NEW.state);
END;
--> statement-breakpoint
-- What was granted and checked is what was asked for.
CREATE TRIGGER clearances_frozen BEFORE UPDATE OF id, number, spacecraft_id, operator_id, station_id, owner_id, band, valid_from_ms, valid_to_ms, purpose, requested_by, requested_ms ON clearances
BEGIN SELECT RAISE(ABORT, 'the terms of a clearance cannot change'); END;
--> statement-breakpoint
CREATE TRIGGER clearances_kept BEFORE DELETE ON clearances BEGIN SELECT RAISE(ABORT, 'clearances are kept'); END;
--> statement-breakpoint
CREATE TRIGGER clearance_events_unchanged BEFORE UPDATE ON clearance_events BEGIN SELECT RAISE(ABORT, 'clearance_events rows never change'); END;
--> statement-breakpoint
CREATE TRIGGER clearance_events_kept BEFORE DELETE ON clearance_events BEGIN SELECT RAISE(ABORT, 'clearance_events rows are kept'); END;
--> statement-breakpoint
-- A contact is held under a clearance of its own spacecraft and station, in force through LOS.
CREATE TRIGGER booking_clearances_fit BEFORE INSERT ON booking_clearances
BEGIN
  SELECT RAISE(ABORT, 'not-cleared') WHERE NOT EXISTS (
    SELECT 1 FROM bookings b
    JOIN antennas a ON a.id = b.antenna_id
    JOIN clearances c ON c.spacecraft_id = b.spacecraft_id AND c.station_id = a.station_id
    WHERE b.id = NEW.booking_id AND c.id = NEW.clearance_id AND b.need <> 'downlink' AND c.state = 'in force'
      AND c.valid_from_ms <= b.aos_ms AND b.los_ms <= c.valid_to_ms);
END;
--> statement-breakpoint
CREATE TRIGGER booking_clearances_unchanged BEFORE UPDATE ON booking_clearances BEGIN SELECT RAISE(ABORT, 'booking_clearances rows never change'); END;
--> statement-breakpoint
CREATE TRIGGER booking_clearances_kept BEFORE DELETE ON booking_clearances BEGIN SELECT RAISE(ABORT, 'booking_clearances rows are kept'); END;
--> statement-breakpoint
-- Nothing is sold, and no contact begins, that transmits without leave from AOS to LOS.
CREATE TRIGGER bookings_cleared BEFORE UPDATE OF state ON bookings
WHEN NEW.state IN ('confirmed', 'under way') AND NEW.state <> OLD.state AND NEW.need <> 'downlink'
BEGIN
  SELECT RAISE(ABORT, 'not-cleared') WHERE NOT EXISTS (
    SELECT 1 FROM booking_clearances l JOIN clearances c ON c.id = l.clearance_id
    WHERE l.booking_id = NEW.id AND c.state = 'in force'
      AND c.valid_from_ms <= NEW.aos_ms AND NEW.los_ms <= c.valid_to_ms);
END;
--> statement-breakpoint
CREATE TRIGGER bookings_cleared_insert BEFORE INSERT ON bookings
WHEN NEW.state <> 'held' AND NEW.need <> 'downlink'
BEGIN SELECT RAISE(ABORT, 'not-cleared'); END;
--> statement-breakpoint
-- A need that were changed later would slip past all of the above.
CREATE TRIGGER bookings_need_frozen BEFORE UPDATE OF need ON bookings WHEN NEW.need <> OLD.need
BEGIN SELECT RAISE(ABORT, 'the terms of a booking cannot change'); END;
