-- An address is made by somebody of the organisation, for an antenna that is its own.
CREATE TRIGGER calendar_feeds_made_by_member BEFORE INSERT ON calendar_feeds
WHEN NOT EXISTS (SELECT 1 FROM memberships m WHERE m.person_id = NEW.person_id AND m.organisation_id = NEW.organisation_id)
BEGIN SELECT RAISE(ABORT, 'only a member makes a calendar address'); END;
--> statement-breakpoint
CREATE TRIGGER calendar_feeds_own_antenna BEFORE INSERT ON calendar_feeds
WHEN NEW.antenna_id IS NOT NULL AND NOT EXISTS (SELECT 1 FROM antennas a JOIN stations s ON s.id = a.station_id WHERE a.id = NEW.antenna_id AND s.organisation_id = NEW.organisation_id)
BEGIN SELECT RAISE(ABORT, 'a calendar address shows an own antenna'); END;
--> statement-breakpoint
CREATE TRIGGER calendar_feeds_facts BEFORE UPDATE OF id, person_id, organisation_id, antenna_id, hash, created_ms ON calendar_feeds
BEGIN SELECT RAISE(ABORT, 'what a calendar address shows never changes'); END;
--> statement-breakpoint
CREATE TRIGGER calendar_feeds_revoked BEFORE UPDATE ON calendar_feeds
WHEN OLD.revoked_ms IS NOT NULL
BEGIN SELECT RAISE(ABORT, 'a revoked calendar address stays revoked'); END;
--> statement-breakpoint
CREATE TRIGGER calendar_feeds_kept BEFORE DELETE ON calendar_feeds BEGIN SELECT RAISE(ABORT, 'calendar_feeds rows are kept'); END;
