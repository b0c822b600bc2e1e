CREATE TABLE `booking_group_members` (
	`booking_id` text PRIMARY KEY NOT NULL,
	`group_id` text NOT NULL,
	`secured_ms` integer,
	FOREIGN KEY (`booking_id`) REFERENCES `bookings`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`group_id`) REFERENCES `booking_groups`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `booking_group_members_group` ON `booking_group_members` (`group_id`);--> statement-breakpoint
CREATE TABLE `booking_groups` (
	`id` text PRIMARY KEY NOT NULL,
	`operator_id` text NOT NULL,
	`created_by` text NOT NULL,
	`created_ms` integer NOT NULL,
	`hold_ends_ms` integer NOT NULL,
	FOREIGN KEY (`operator_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`created_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `booking_groups_operator` ON `booking_groups` (`operator_id`,`created_ms`);--> statement-breakpoint
CREATE TABLE `standby_entries` (
	`id` text PRIMARY KEY NOT NULL,
	`place` integer NOT NULL,
	`operator_id` text NOT NULL,
	`person_id` text NOT NULL,
	`antenna_id` text NOT NULL,
	`spacecraft_id` text NOT NULL,
	`need` text NOT NULL,
	`bands` text NOT NULL,
	`aos_ms` integer NOT NULL,
	`los_ms` integer NOT NULL,
	`guard_from_ms` integer NOT NULL,
	`guard_to_ms` integer NOT NULL,
	`state` text NOT NULL,
	`booking_id` text,
	`note` text NOT NULL,
	`joined_ms` integer NOT NULL,
	`changed_ms` integer NOT NULL,
	FOREIGN KEY (`operator_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`antenna_id`) REFERENCES `antennas`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`spacecraft_id`) REFERENCES `spacecraft`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`booking_id`) REFERENCES `bookings`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "standby_entries_state" CHECK("standby_entries"."state" IN ('waiting','offered','bought','passed','left','ended')),
	CONSTRAINT "standby_entries_order" CHECK("standby_entries"."guard_from_ms" <= "standby_entries"."aos_ms" AND "standby_entries"."aos_ms" < "standby_entries"."los_ms" AND "standby_entries"."los_ms" <= "standby_entries"."guard_to_ms"),
	CONSTRAINT "standby_entries_offer" CHECK(("standby_entries"."state" IN ('offered','bought')) <= ("standby_entries"."booking_id" IS NOT NULL))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `standby_entries_place_unique` ON `standby_entries` (`place`);--> statement-breakpoint
CREATE INDEX `standby_entries_line` ON `standby_entries` (`antenna_id`,`state`,`guard_from_ms`);--> statement-breakpoint
CREATE INDEX `standby_entries_operator` ON `standby_entries` (`operator_id`,`joined_ms`);--> statement-breakpoint
CREATE UNIQUE INDEX `standby_entries_once` ON `standby_entries` (`operator_id`,`antenna_id`,`spacecraft_id`,`aos_ms`) WHERE state IN ('waiting','offered');