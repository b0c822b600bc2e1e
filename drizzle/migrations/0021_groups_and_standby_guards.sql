-- A group stays what it was; all that happens to a member is that its money is secured, once.
CREATE TRIGGER booking_groups_unchanged BEFORE UPDATE ON booking_groups BEGIN SELECT RAISE(ABORT, 'booking_groups rows never change'); END;
--> statement-breakpoint
CREATE TRIGGER booking_groups_kept BEFORE DELETE ON booking_groups BEGIN SELECT RAISE(ABORT, 'booking_groups rows are kept'); END;
--> statement-breakpoint
CREATE TRIGGER booking_group_members_kept BEFORE DELETE ON booking_group_members BEGIN SELECT RAISE(ABORT, 'booking_group_members rows are kept'); END;
--> statement-breakpoint
CREATE TRIGGER booking_group_members_unchanged BEFORE UPDATE ON booking_group_members
WHEN OLD.secured_ms IS NOT NULL OR NEW.booking_id <> OLD.booking_id OR NEW.group_id <> OLD.group_id
BEGIN SELECT RAISE(ABORT, 'a member of a group is secured once and changes in nothing else'); END;
--> statement-breakpoint
CREATE TRIGGER booking_group_members_own BEFORE INSERT ON booking_group_members
BEGIN
  SELECT RAISE(ABORT, 'the booking belongs to another organisation') WHERE NOT EXISTS (
    SELECT 1 FROM bookings b JOIN booking_groups g ON g.operator_id = b.operator_id
    WHERE b.id = NEW.booking_id AND g.id = NEW.group_id AND b.state = 'held');
END;
--> statement-breakpoint
-- None of a group is sold before the money for all of it is secured.
CREATE TRIGGER bookings_group_whole BEFORE UPDATE OF state ON bookings
WHEN OLD.state = 'held' AND NEW.state IN ('confirmed', 'awaiting owner')
BEGIN
  SELECT RAISE(ABORT, 'the group is not secured') WHERE EXISTS (
    SELECT 1 FROM booking_group_members m JOIN booking_group_members o ON o.group_id = m.group_id
    WHERE m.booking_id = NEW.id AND o.secured_ms IS NULL);
END;
--> statement-breakpoint
-- A place in the line is kept until it ends, and an ended one stays ended.
CREATE TRIGGER standby_entries_moves BEFORE UPDATE ON standby_entries
WHEN OLD.state NOT IN ('waiting', 'offered') OR NEW.place <> OLD.place OR NEW.operator_id <> OLD.operator_id OR NEW.antenna_id <> OLD.antenna_id
  OR NEW.spacecraft_id <> OLD.spacecraft_id OR NEW.aos_ms <> OLD.aos_ms OR NEW.los_ms <> OLD.los_ms OR NEW.joined_ms <> OLD.joined_ms
  OR NEW.state = 'waiting' AND OLD.state <> 'waiting'
BEGIN SELECT RAISE(ABORT, 'a place in the line keeps its order and ends once'); END;
--> statement-breakpoint
CREATE TRIGGER standby_entries_kept BEFORE DELETE ON standby_entries BEGIN SELECT RAISE(ABORT, 'standby_entries rows are kept'); END;
