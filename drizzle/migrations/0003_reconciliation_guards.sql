-- A posting carries its entry's time and currency; the ones written before it did are filled in here, once.
DROP TRIGGER journal_postings_unchanged;
--> statement-breakpoint
UPDATE journal_postings SET
  at_ms = (SELECT at_ms FROM journal_entries e WHERE e.id = entry_id),
  currency = (SELECT currency FROM journal_entries e WHERE e.id = entry_id);
--> statement-breakpoint
CREATE TRIGGER journal_postings_unchanged BEFORE UPDATE ON journal_postings BEGIN SELECT RAISE(ABORT, 'journal_postings rows never change'); END;
--> statement-breakpoint
CREATE TRIGGER journal_postings_of_entry BEFORE INSERT ON journal_postings
BEGIN
  SELECT RAISE(ABORT, 'a posting carries the time and the currency of its entry')
  WHERE NOT EXISTS (SELECT 1 FROM journal_entries e WHERE e.id = NEW.entry_id AND e.at_ms = NEW.at_ms AND e.currency = NEW.currency);
END;
--> statement-breakpoint
-- Sums by month follow every posting.
INSERT INTO ledger_totals (account, organisation_id, currency, month, debit_minor, credit_minor, postings)
SELECT account, coalesce(organisation_id, ''), currency, strftime('%Y-%m', at_ms / 1000, 'unixepoch'),
  sum(max(amount_minor, 0)), sum(max(-amount_minor, 0)), count(*)
FROM journal_postings GROUP BY 1, 2, 3, 4;
--> statement-breakpoint
CREATE TRIGGER journal_postings_totals AFTER INSERT ON journal_postings
BEGIN
  INSERT INTO ledger_totals (account, organisation_id, currency, month, debit_minor, credit_minor, postings)
  VALUES (NEW.account, coalesce(NEW.organisation_id, ''), NEW.currency, strftime('%Y-%m', NEW.at_ms / 1000, 'unixepoch'),
    max(NEW.amount_minor, 0), max(-NEW.amount_minor, 0), 1)
  ON CONFLICT (account, organisation_id, currency, month) DO UPDATE SET
    debit_minor = debit_minor + excluded.debit_minor,
    credit_minor = credit_minor + excluded.credit_minor,
    postings = postings + 1;
END;
--> statement-breakpoint
CREATE TRIGGER ledger_totals_kept BEFORE DELETE ON ledger_totals BEGIN SELECT RAISE(ABORT, 'ledger_totals rows are kept'); END;
--> statement-breakpoint
-- What is closed stays closed: no entry is dated before the end of the last closed month, and months close one after the other.
CREATE TRIGGER journal_entries_month_open BEFORE INSERT ON journal_entries
BEGIN
  SELECT RAISE(ABORT, 'that month is closed') WHERE EXISTS (SELECT 1 FROM closed_months WHERE to_ms > NEW.at_ms);
END;
--> statement-breakpoint
CREATE TRIGGER closed_months_in_order BEFORE INSERT ON closed_months
BEGIN
  SELECT RAISE(ABORT, 'a month closes after its end') WHERE NEW.closed_ms < NEW.to_ms;
  SELECT RAISE(ABORT, 'months close one after the other')
  WHERE NEW.from_ms <> (SELECT coalesce(max(to_ms), NEW.from_ms) FROM closed_months);
END;
--> statement-breakpoint
CREATE TRIGGER closed_months_unchanged BEFORE UPDATE ON closed_months BEGIN SELECT RAISE(ABORT, 'a closed month never changes'); END;
--> statement-breakpoint
CREATE TRIGGER closed_months_kept BEFORE DELETE ON closed_months BEGIN SELECT RAISE(ABORT, 'a closed month cannot be opened again'); END;
--> statement-breakpoint
CREATE TRIGGER provider_movements_facts BEFORE UPDATE ON provider_movements
BEGIN
  SELECT RAISE(ABORT, 'what the provider said never changes')
  WHERE OLD.id <> NEW.id OR OLD.type <> NEW.type OR OLD.amount_minor <> NEW.amount_minor OR OLD.fee_minor <> NEW.fee_minor
    OR OLD.currency <> NEW.currency OR OLD.at_ms <> NEW.at_ms OR OLD.source_id IS NOT NEW.source_id OR OLD.category <> NEW.category;
  SELECT RAISE(ABORT, 'a matched movement stays matched') WHERE OLD.state = 'matched' AND NEW.state <> 'matched';
END;
--> statement-breakpoint
CREATE TRIGGER provider_movements_kept BEFORE DELETE ON provider_movements BEGIN SELECT RAISE(ABORT, 'provider_movements rows are kept'); END;
--> statement-breakpoint
CREATE TRIGGER chargebacks_kept BEFORE DELETE ON chargebacks BEGIN SELECT RAISE(ABORT, 'chargebacks rows are kept'); END;
--> statement-breakpoint
CREATE TRIGGER ledger_checks_unchanged BEFORE UPDATE ON ledger_checks BEGIN SELECT RAISE(ABORT, 'ledger_checks rows never change'); END;
