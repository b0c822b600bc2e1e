-- 1, 2, 3 ... in each series, without a gap; a bill's sums and lines stay as they were sent.
CREATE TRIGGER credit_bills_gap_free BEFORE INSERT ON credit_bills
BEGIN
  SELECT RAISE(ABORT, 'bill numbers leave no gap')
  WHERE NEW.seq <> (SELECT coalesce(max(seq), 0) + 1 FROM credit_bills WHERE series = NEW.series);
END;
--> statement-breakpoint
CREATE TRIGGER credit_bills_unchanged BEFORE UPDATE OF id, account_id, series, seq, number, month, issued_ms, due_ms, currency, total_minor ON credit_bills
BEGIN SELECT RAISE(ABORT, 'what was billed never changes'); END;
--> statement-breakpoint
CREATE TRIGGER credit_bills_paid_once BEFORE UPDATE OF paid_ms, intent_id ON credit_bills
WHEN OLD.paid_ms IS NOT NULL
BEGIN SELECT RAISE(ABORT, 'a paid bill stays paid'); END;
--> statement-breakpoint
CREATE TRIGGER credit_bills_kept BEFORE DELETE ON credit_bills BEGIN SELECT RAISE(ABORT, 'credit_bills rows are kept'); END;
--> statement-breakpoint
CREATE TRIGGER credit_bill_lines_unchanged BEFORE UPDATE ON credit_bill_lines BEGIN SELECT RAISE(ABORT, 'what was billed never changes'); END;
--> statement-breakpoint
CREATE TRIGGER credit_bill_lines_kept BEFORE DELETE ON credit_bill_lines BEGIN SELECT RAISE(ABORT, 'what was billed never changes'); END;
--> statement-breakpoint
CREATE TRIGGER credit_purchases_kept BEFORE DELETE ON credit_purchases BEGIN SELECT RAISE(ABORT, 'credit_purchases rows are kept'); END;
--> statement-breakpoint
CREATE TRIGGER credit_purchases_open BEFORE INSERT ON credit_purchases
BEGIN
  SELECT RAISE(ABORT, 'that monthly account is not open')
  WHERE NOT EXISTS (SELECT 1 FROM credit_accounts a WHERE a.id = NEW.account_id AND a.state = 'open');
END;
