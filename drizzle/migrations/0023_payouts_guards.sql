-- draft -> reviewed -> approved; a run that was not approved can be dropped; a change of a reviewed line asks for a new review.
CREATE TRIGGER payout_runs_moves BEFORE UPDATE OF state ON payout_runs
WHEN NEW.state <> OLD.state AND (OLD.state || ' ' || NEW.state) NOT IN ('draft reviewed', 'reviewed draft', 'reviewed approved', 'draft dropped', 'reviewed dropped')
BEGIN SELECT RAISE(ABORT, 'wrong-state'); END;
--> statement-breakpoint
CREATE TRIGGER payout_runs_facts BEFORE UPDATE OF id, number, currency, prepared_by, prepared_ms ON payout_runs
BEGIN SELECT RAISE(ABORT, 'the facts of a payout run never change'); END;
--> statement-breakpoint
CREATE TRIGGER payout_runs_decided BEFORE UPDATE ON payout_runs
WHEN OLD.state IN ('approved','dropped')
BEGIN SELECT RAISE(ABORT, 'a payout run that was approved or dropped never changes'); END;
--> statement-breakpoint
-- Who lets money go holds a second factor.
CREATE TRIGGER payout_runs_second_factor BEFORE UPDATE OF reviewed_by, approved_by ON payout_runs
WHEN (NEW.reviewed_by IS NOT NULL AND NOT EXISTS (SELECT 1 FROM second_factors f WHERE f.person_id = NEW.reviewed_by AND f.confirmed_ms IS NOT NULL))
  OR (NEW.approved_by IS NOT NULL AND NOT EXISTS (SELECT 1 FROM second_factors f WHERE f.person_id = NEW.approved_by AND f.confirmed_ms IS NOT NULL))
BEGIN SELECT RAISE(ABORT, 'a second factor is needed'); END;
--> statement-breakpoint
CREATE TRIGGER payout_runs_kept BEFORE DELETE ON payout_runs BEGIN SELECT RAISE(ABORT, 'payout_runs rows are kept'); END;
--> statement-breakpoint
CREATE TRIGGER payout_lines_kept BEFORE DELETE ON payout_lines BEGIN SELECT RAISE(ABORT, 'payout_lines rows are kept'); END;
--> statement-breakpoint
-- Money leaves only by an approved run, and what was paid or has failed stays so.
CREATE TRIGGER payout_lines_moves BEFORE UPDATE OF state ON payout_lines
WHEN NEW.state <> OLD.state
BEGIN
  SELECT RAISE(ABORT, 'wrong-state') WHERE OLD.state IN ('paid','failed')
    OR (OLD.state = 'paying' AND NEW.state NOT IN ('paid','failed'))
    OR (NEW.state IN ('paid','failed') AND OLD.state <> 'paying');
  SELECT RAISE(ABORT, 'the run is not approved')
  WHERE NEW.state = 'paying' AND (OLD.state <> 'ready'
    OR NOT EXISTS (SELECT 1 FROM payout_runs r WHERE r.id = NEW.run_id AND r.state = 'approved'));
END;
--> statement-breakpoint
CREATE TRIGGER payout_lines_sums BEFORE UPDATE OF run_id, owner_id, contact_count, settled_minor, fee_minor, refund_minor, reserve_minor, adjusted_minor, to_pay_minor ON payout_lines
WHEN NOT EXISTS (SELECT 1 FROM payout_runs r WHERE r.id = OLD.run_id AND r.state = 'draft')
BEGIN SELECT RAISE(ABORT, 'only a draft can be changed'); END;
--> statement-breakpoint
CREATE TRIGGER payout_items_unchanged BEFORE UPDATE ON payout_items
WHEN NOT (OLD.live = 1 AND NEW.live = 0 AND NEW.id = OLD.id AND NEW.line_id = OLD.line_id AND NEW.entry_id = OLD.entry_id AND NEW.posting_line = OLD.posting_line)
BEGIN SELECT RAISE(ABORT, 'what a payout settles never changes'); END;
--> statement-breakpoint
-- What was paid is settled for good, and what is on its way is not given free meanwhile.
CREATE TRIGGER payout_items_settled BEFORE UPDATE OF live ON payout_items
WHEN EXISTS (SELECT 1 FROM payout_lines l WHERE l.id = OLD.line_id AND l.state IN ('paying','paid'))
BEGIN SELECT RAISE(ABORT, 'what is paid is not given free'); END;
--> statement-breakpoint
CREATE TRIGGER payout_items_kept BEFORE DELETE ON payout_items BEGIN SELECT RAISE(ABORT, 'payout_items rows are kept'); END;
--> statement-breakpoint
-- A code counts once: the step of the last one only rises.
CREATE TRIGGER second_factors_rise BEFORE UPDATE OF last_step ON second_factors
WHEN NEW.last_step <= OLD.last_step AND NEW.secret = OLD.secret
BEGIN SELECT RAISE(ABORT, 'a code counts once'); END;
