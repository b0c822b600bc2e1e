-- A file stays as it came. It may go while nothing is attached to it, and what is attached stays attached.
CREATE TRIGGER files_unchanged BEFORE UPDATE ON files BEGIN SELECT RAISE(ABORT, 'a file never changes'); END;
--> statement-breakpoint
CREATE TRIGGER files_attached_kept BEFORE DELETE ON files
BEGIN
  SELECT RAISE(ABORT, 'the file is attached to something') WHERE EXISTS (SELECT 1 FROM file_links l WHERE l.file_id = OLD.id);
END;
--> statement-breakpoint
CREATE TRIGGER file_links_unchanged BEFORE UPDATE ON file_links BEGIN SELECT RAISE(ABORT, 'file_links rows never change'); END;
--> statement-breakpoint
CREATE TRIGGER file_links_kept BEFORE DELETE ON file_links BEGIN SELECT RAISE(ABORT, 'a file stays attached'); END;
