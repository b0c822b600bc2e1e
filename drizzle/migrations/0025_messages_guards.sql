CREATE TRIGGER messages_unchanged BEFORE UPDATE ON messages BEGIN SELECT RAISE(ABORT, 'messages rows never change'); END;
--> statement-breakpoint
CREATE TRIGGER messages_kept BEFORE DELETE ON messages BEGIN SELECT RAISE(ABORT, 'messages rows are kept'); END;
--> statement-breakpoint
-- Reading goes forward only.
CREATE TRIGGER message_reads_forward BEFORE UPDATE OF seq ON message_reads
WHEN NEW.seq < OLD.seq
BEGIN SELECT RAISE(ABORT, 'a message cannot be unread'); END;
