-- An ephemeris stays as it was given; all that may happen to it is to be withdrawn, once.
CREATE TRIGGER ephemerides_unchanged BEFORE UPDATE ON ephemerides
WHEN OLD.withdrawn_ms IS NOT NULL OR NEW.id <> OLD.id OR NEW.spacecraft_id <> OLD.spacecraft_id
  OR NEW.start_ms <> OLD.start_ms OR NEW.stop_ms <> OLD.stop_ms OR NEW.object_name <> OLD.object_name
  OR NEW.object_id <> OLD.object_id OR NEW.originator <> OLD.originator OR NEW.segments <> OLD.segments
  OR NEW.states <> OLD.states OR NEW.state_count <> OLD.state_count OR NEW.text <> OLD.text
  OR NEW.digest <> OLD.digest OR NEW.source <> OLD.source OR NEW.added_by <> OLD.added_by OR NEW.added_ms <> OLD.added_ms
BEGIN SELECT RAISE(ABORT, 'an ephemeris never changes'); END;
--> statement-breakpoint
CREATE TRIGGER ephemerides_kept BEFORE DELETE ON ephemerides BEGIN SELECT RAISE(ABORT, 'ephemerides are kept'); END;
--> statement-breakpoint
-- A contact is sold on an ephemeris of its own spacecraft, and what it was sold on stays.
CREATE TRIGGER booking_ephemerides_own BEFORE INSERT ON booking_ephemerides
BEGIN
  SELECT RAISE(ABORT, 'the ephemeris is of another spacecraft') WHERE NOT EXISTS (
    SELECT 1 FROM bookings b JOIN ephemerides e ON e.spacecraft_id = b.spacecraft_id
    WHERE b.id = NEW.booking_id AND e.id = NEW.ephemeris_id);
  SELECT RAISE(ABORT, 'unknown source of a pass') WHERE NEW.pass_source NOT IN ('ephemeris', 'both');
END;
--> statement-breakpoint
CREATE TRIGGER booking_ephemerides_unchanged BEFORE UPDATE ON booking_ephemerides BEGIN SELECT RAISE(ABORT, 'booking_ephemerides rows never change'); END;
--> statement-breakpoint
CREATE TRIGGER booking_ephemerides_kept BEFORE DELETE ON booking_ephemerides BEGIN SELECT RAISE(ABORT, 'booking_ephemerides rows are kept'); END;
