-- What was said, found and decided in a dispute stays as it was.
CREATE TRIGGER dispute_statements_unchanged BEFORE UPDATE ON dispute_statements BEGIN SELECT RAISE(ABORT, 'dispute_statements rows never change'); END;
--> statement-breakpoint
CREATE TRIGGER dispute_statements_kept BEFORE DELETE ON dispute_statements BEGIN SELECT RAISE(ABORT, 'dispute_statements rows are kept'); END;
--> statement-breakpoint
CREATE TRIGGER dispute_evidence_unchanged BEFORE UPDATE ON dispute_evidence BEGIN SELECT RAISE(ABORT, 'dispute_evidence rows never change'); END;
--> statement-breakpoint
CREATE TRIGGER dispute_evidence_kept BEFORE DELETE ON dispute_evidence BEGIN SELECT RAISE(ABORT, 'dispute_evidence rows are kept'); END;
--> statement-breakpoint
CREATE TRIGGER dispute_decisions_unchanged BEFORE UPDATE ON dispute_decisions BEGIN SELECT RAISE(ABORT, 'dispute_decisions rows never change'); END;
--> statement-breakpoint
CREATE TRIGGER dispute_decisions_kept BEFORE DELETE ON dispute_decisions BEGIN SELECT RAISE(ABORT, 'dispute_decisions rows are kept'); END;
--> statement-breakpoint
CREATE TRIGGER disputes_kept BEFORE DELETE ON disputes BEGIN SELECT RAISE(ABORT, 'disputes are kept'); END;
--> statement-breakpoint
CREATE TRIGGER disputes_facts_unchanged BEFORE UPDATE OF number, booking_id, operator_id, owner_id, reason, opened_ms ON disputes
BEGIN SELECT RAISE(ABORT, 'the facts of a dispute never change'); END;
--> statement-breakpoint
-- open -> decided -> closed, or decided -> appealed -> closed.
CREATE TRIGGER disputes_moves BEFORE UPDATE OF state ON disputes
WHEN NEW.state <> OLD.state AND (OLD.state || ' ' || NEW.state) NOT IN ('open decided', 'decided appealed', 'decided closed', 'appealed closed')
BEGIN SELECT RAISE(ABORT, 'wrong-state'); END;
--> statement-breakpoint
-- The second decision follows the first, and another person makes it.
CREATE TRIGGER dispute_decisions_second BEFORE INSERT ON dispute_decisions
WHEN NEW.round = 2
BEGIN
  SELECT RAISE(ABORT, 'an appeal is decided by another person') WHERE NOT EXISTS (
    SELECT 1 FROM dispute_decisions d WHERE d.dispute_id = NEW.dispute_id AND d.round = 1 AND d.decided_by <> NEW.decided_by);
END;
--> statement-breakpoint
-- A contact may be credited in steps (a decision, then its appeal), never beyond its invoice; its invoice stays the only one.
CREATE TRIGGER invoices_credit_bound BEFORE INSERT ON invoices
WHEN NEW.kind = 'credit note'
BEGIN
  SELECT RAISE(ABORT, 'credited beyond the invoice')
  WHERE (SELECT coalesce(sum(gross_minor), 0) FROM invoices WHERE booking_id = NEW.booking_id) + NEW.gross_minor < 0;
END;
