-- A key is made by a manager of its organisation.
CREATE TRIGGER api_keys_made_by_manager BEFORE INSERT ON api_keys
WHEN NOT EXISTS (SELECT 1 FROM memberships m WHERE m.person_id = NEW.person_id AND m.organisation_id = NEW.organisation_id AND m.role = 'manager')
BEGIN SELECT RAISE(ABORT, 'only a manager makes an API key'); END;
--> statement-breakpoint
-- Scopes never widen and an end is never put off: neither changes at all.
CREATE TRIGGER api_keys_facts BEFORE UPDATE OF id, organisation_id, person_id, name, hash, tail, scopes, created_ms, ends_ms ON api_keys
BEGIN SELECT RAISE(ABORT, 'what an API key may do never changes'); END;
--> statement-breakpoint
CREATE TRIGGER api_keys_revoked BEFORE UPDATE ON api_keys
WHEN OLD.revoked_ms IS NOT NULL
BEGIN SELECT RAISE(ABORT, 'a revoked API key stays revoked'); END;
--> statement-breakpoint
CREATE TRIGGER api_keys_used_forward BEFORE UPDATE OF last_used_ms ON api_keys
WHEN NEW.last_used_ms IS NULL OR NEW.last_used_ms < coalesce(OLD.last_used_ms, 0)
BEGIN SELECT RAISE(ABORT, 'the last use of an API key only moves on'); END;
--> statement-breakpoint
CREATE TRIGGER api_keys_kept BEFORE DELETE ON api_keys BEGIN SELECT RAISE(ABORT, 'api_keys rows are kept'); END;
