CREATE TABLE `booking_ephemerides` (
	`booking_id` text PRIMARY KEY NOT NULL,
	`ephemeris_id` text NOT NULL,
	`pass_source` text NOT NULL,
	FOREIGN KEY (`booking_id`) REFERENCES `bookings`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`ephemeris_id`) REFERENCES `ephemerides`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `ephemerides` (
	`id` text PRIMARY KEY NOT NULL,
	`spacecraft_id` text NOT NULL,
	`start_ms` integer NOT NULL,
	`stop_ms` integer NOT NULL,
	`object_name` text NOT NULL,
	`object_id` text NOT NULL,
	`originator` text NOT NULL,
	`segments` text NOT NULL,
	`states` blob NOT NULL,
	`state_count` integer NOT NULL,
	`text` text NOT NULL,
	`digest` text NOT NULL,
	`source` text NOT NULL,
	`added_by` text NOT NULL,
	`added_ms` integer NOT NULL,
	`withdrawn_by` text,
	`withdrawn_ms` integer,
	FOREIGN KEY (`spacecraft_id`) REFERENCES `spacecraft`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`added_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`withdrawn_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "ephemerides_order" CHECK("ephemerides"."start_ms" < "ephemerides"."stop_ms"),
	CONSTRAINT "ephemerides_size" CHECK("ephemerides"."state_count" BETWEEN 2 AND 200000 AND length("ephemerides"."states") = 56 * "ephemerides"."state_count"),
	CONSTRAINT "ephemerides_withdrawn" CHECK(("ephemerides"."withdrawn_by" IS NULL) = ("ephemerides"."withdrawn_ms" IS NULL))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `ephemerides_digest` ON `ephemerides` (`spacecraft_id`,`digest`) WHERE "ephemerides"."withdrawn_ms" IS NULL;--> statement-breakpoint
CREATE INDEX `ephemerides_span` ON `ephemerides` (`spacecraft_id`,`stop_ms`);