-- Everything in a booking's diary reaches those who listen to the contact, whoever wrote it.
INSERT INTO contact_events (booking_id, kind, at_ms, happened_ms, sentence, actor_id, actor_organisation_id)
SELECT booking_id, 'diary', at_ms, at_ms, sentence, actor_id, actor_organisation_id FROM booking_events ORDER BY at_ms, id;
--> statement-breakpoint
CREATE TRIGGER booking_events_heard AFTER INSERT ON booking_events
BEGIN
  INSERT INTO contact_events (booking_id, kind, at_ms, happened_ms, sentence, actor_id, actor_organisation_id)
  VALUES (NEW.booking_id, 'diary', NEW.at_ms, NEW.at_ms, NEW.sentence, NEW.actor_id, NEW.actor_organisation_id);
END;
--> statement-breakpoint
CREATE TRIGGER contact_events_unchanged BEFORE UPDATE ON contact_events BEGIN SELECT RAISE(ABORT, 'contact_events rows never change'); END;
--> statement-breakpoint
CREATE TRIGGER contact_events_kept BEFORE DELETE ON contact_events BEGIN SELECT RAISE(ABORT, 'contact_events rows are kept'); END;
--> statement-breakpoint
-- No contact begins while somebody is at the dish, or while the dish is to stay still.
CREATE TRIGGER bookings_dish_clear BEFORE UPDATE OF state ON bookings
WHEN NEW.state = 'under way' AND OLD.state <> 'under way'
BEGIN
  SELECT RAISE(ABORT, 'dish-not-clear') WHERE EXISTS (SELECT 1 FROM dish_visits v WHERE v.antenna_id = NEW.antenna_id AND v.left_ms IS NULL)
    OR EXISTS (SELECT 1 FROM dish_stops s WHERE s.antenna_id = NEW.antenna_id);
END;
--> statement-breakpoint
CREATE TRIGGER dish_visits_end_once BEFORE UPDATE ON dish_visits
BEGIN
  SELECT RAISE(ABORT, 'a visit to a dish ends once and is never rewritten')
  WHERE OLD.left_ms IS NOT NULL OR NEW.id <> OLD.id OR NEW.antenna_id <> OLD.antenna_id OR NEW.name <> OLD.name
    OR NEW.came_ms <> OLD.came_ms OR NEW.signed_in_by <> OLD.signed_in_by;
END;
--> statement-breakpoint
CREATE TRIGGER dish_visits_kept BEFORE DELETE ON dish_visits BEGIN SELECT RAISE(ABORT, 'dish_visits rows are kept'); END;
--> statement-breakpoint
-- The times of a booking change only before the contact, and only to what its newest re-time says.
CREATE TRIGGER bookings_times_kept BEFORE UPDATE OF aos_ms, tca_ms, los_ms, guard_from_ms, guard_to_ms, pass, element_set_id, spacecraft_id, antenna_id ON bookings
BEGIN
  SELECT RAISE(ABORT, 'the times of a booking change only by a recorded re-time') WHERE OLD.state NOT IN ('awaiting owner', 'confirmed')
    OR NEW.spacecraft_id <> OLD.spacecraft_id OR NEW.antenna_id <> OLD.antenna_id
    OR NOT EXISTS (
      SELECT 1 FROM booking_retimes r
      WHERE r.seq = (SELECT max(seq) FROM booking_retimes WHERE booking_id = OLD.id)
        AND r.from_aos_ms = OLD.aos_ms AND r.from_los_ms = OLD.los_ms AND r.from_element_set_id = OLD.element_set_id
        AND r.to_aos_ms = NEW.aos_ms AND r.to_tca_ms = NEW.tca_ms AND r.to_los_ms = NEW.los_ms
        AND r.to_guard_from_ms = NEW.guard_from_ms AND r.to_guard_to_ms = NEW.guard_to_ms
        AND r.to_element_set_id = NEW.element_set_id AND r.to_pass = NEW.pass);
END;
--> statement-breakpoint
CREATE TRIGGER booking_retimes_unchanged BEFORE UPDATE ON booking_retimes BEGIN SELECT RAISE(ABORT, 'booking_retimes rows never change'); END;
--> statement-breakpoint
CREATE TRIGGER booking_retimes_kept BEFORE DELETE ON booking_retimes BEGIN SELECT RAISE(ABORT, 'booking_retimes rows are kept'); END;
--> statement-breakpoint
CREATE TRIGGER drift_questions_kept BEFORE DELETE ON drift_questions BEGIN SELECT RAISE(ABORT, 'drift_questions rows are kept'); END;
