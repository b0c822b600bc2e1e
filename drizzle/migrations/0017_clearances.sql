CREATE TABLE `booking_clearances` (
	`booking_id` text NOT NULL,
	`clearance_id` text NOT NULL,
	PRIMARY KEY(`booking_id`, `clearance_id`),
	FOREIGN KEY (`booking_id`) REFERENCES `bookings`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`clearance_id`) REFERENCES `clearances`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `booking_clearances_clearance` ON `booking_clearances` (`clearance_id`);--> statement-breakpoint
CREATE TABLE `clearance_events` (
	`id` text PRIMARY KEY NOT NULL,
	`clearance_id` text NOT NULL,
	`at_ms` integer NOT NULL,
	`to_state` text NOT NULL,
	`sentence` text NOT NULL,
	`person_id` text,
	FOREIGN KEY (`clearance_id`) REFERENCES `clearances`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `clearance_events_clearance` ON `clearance_events` (`clearance_id`,`at_ms`);--> statement-breakpoint
CREATE TABLE `clearances` (
	`id` text PRIMARY KEY NOT NULL,
	`number` integer NOT NULL,
	`spacecraft_id` text NOT NULL,
	`operator_id` text NOT NULL,
	`station_id` text NOT NULL,
	`owner_id` text NOT NULL,
	`band` text NOT NULL,
	`state` text NOT NULL,
	`valid_from_ms` integer NOT NULL,
	`valid_to_ms` integer NOT NULL,
	`purpose` text NOT NULL,
	`conditions` text NOT NULL,
	`requested_by` text NOT NULL,
	`requested_ms` integer NOT NULL,
	`changed_ms` integer NOT NULL,
	FOREIGN KEY (`spacecraft_id`) REFERENCES `spacecraft`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`operator_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`station_id`) REFERENCES `stations`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`owner_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`requested_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "clearances_order" CHECK("clearances"."valid_from_ms" < "clearances"."valid_to_ms")
);
--> statement-breakpoint
CREATE UNIQUE INDEX `clearances_number_unique` ON `clearances` (`number`);--> statement-breakpoint
CREATE INDEX `clearances_operator` ON `clearances` (`operator_id`,`state`);--> statement-breakpoint
CREATE INDEX `clearances_owner` ON `clearances` (`owner_id`,`state`);--> statement-breakpoint
CREATE INDEX `clearances_state` ON `clearances` (`state`,`valid_to_ms`);--> statement-breakpoint
CREATE UNIQUE INDEX `clearances_once` ON `clearances` (`spacecraft_id`,`station_id`,`band`,`valid_from_ms`) WHERE "clearances"."state" IN ('requested','granted','in force');