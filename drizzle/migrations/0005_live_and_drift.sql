CREATE TABLE `booking_retimes` (
	`seq` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`booking_id` text NOT NULL,
	`at_ms` integer NOT NULL,
	`cause` text NOT NULL,
	`from_element_set_id` text NOT NULL,
	`to_element_set_id` text NOT NULL,
	`from_aos_ms` integer NOT NULL,
	`from_los_ms` integer NOT NULL,
	`to_aos_ms` integer NOT NULL,
	`to_tca_ms` integer NOT NULL,
	`to_los_ms` integer NOT NULL,
	`to_guard_from_ms` integer NOT NULL,
	`to_guard_to_ms` integer NOT NULL,
	`from_pass` text NOT NULL,
	`to_pass` text NOT NULL,
	`accepted_by` text,
	FOREIGN KEY (`booking_id`) REFERENCES `bookings`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`from_element_set_id`) REFERENCES `element_sets`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`to_element_set_id`) REFERENCES `element_sets`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`accepted_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "booking_retimes_order" CHECK("booking_retimes"."to_aos_ms" < "booking_retimes"."to_los_ms"),
	CONSTRAINT "booking_retimes_accepted" CHECK(("booking_retimes"."accepted_by" IS NULL) = ("booking_retimes"."cause" = 'inside the guard'))
);
--> statement-breakpoint
CREATE INDEX `booking_retimes_booking` ON `booking_retimes` (`booking_id`,`seq`);--> statement-breakpoint
CREATE TABLE `drift_checks` (
	`booking_id` text PRIMARY KEY NOT NULL,
	`checked_ms` integer NOT NULL,
	`element_set_id` text NOT NULL,
	`aos_shift_ms` integer,
	`los_shift_ms` integer,
	FOREIGN KEY (`booking_id`) REFERENCES `bookings`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`element_set_id`) REFERENCES `element_sets`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `drift_questions` (
	`id` text PRIMARY KEY NOT NULL,
	`booking_id` text NOT NULL,
	`element_set_id` text NOT NULL,
	`state` text NOT NULL,
	`to_aos_ms` integer NOT NULL,
	`to_tca_ms` integer NOT NULL,
	`to_los_ms` integer NOT NULL,
	`to_pass` text NOT NULL,
	`sentence` text NOT NULL,
	`asked_ms` integer NOT NULL,
	`answered_ms` integer,
	`answered_by` text,
	FOREIGN KEY (`booking_id`) REFERENCES `bookings`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`element_set_id`) REFERENCES `element_sets`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`answered_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "drift_questions_state" CHECK("drift_questions"."state" IN ('open', 'accepted', 'cancelled', 'overtaken')),
	CONSTRAINT "drift_questions_answered" CHECK(("drift_questions"."answered_ms" IS NULL) = ("drift_questions"."state" = 'open'))
);
--> statement-breakpoint
CREATE INDEX `drift_questions_booking` ON `drift_questions` (`booking_id`,`asked_ms`);--> statement-breakpoint
CREATE UNIQUE INDEX `drift_questions_open` ON `drift_questions` (`booking_id`) WHERE state = 'open';--> statement-breakpoint
CREATE TABLE `contact_events` (
	`seq` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`booking_id` text NOT NULL,
	`kind` text NOT NULL,
	`at_ms` integer NOT NULL,
	`happened_ms` integer NOT NULL,
	`value` real,
	`sentence` text NOT NULL,
	`actor_id` text,
	`actor_organisation_id` text,
	FOREIGN KEY (`booking_id`) REFERENCES `bookings`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`actor_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`actor_organisation_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "contact_events_value" CHECK(("contact_events"."value" IS NULL) = ("contact_events"."kind" NOT IN ('bytes', 'eb/n0'))),
	CONSTRAINT "contact_events_bytes" CHECK("contact_events"."kind" <> 'bytes' OR "contact_events"."value" >= 0)
);
--> statement-breakpoint
CREATE INDEX `contact_events_booking` ON `contact_events` (`booking_id`,`seq`);--> statement-breakpoint
CREATE TABLE `dish_stops` (
	`antenna_id` text PRIMARY KEY NOT NULL,
	`reason` text NOT NULL,
	`stopped_ms` integer NOT NULL,
	`stopped_by` text NOT NULL,
	FOREIGN KEY (`antenna_id`) REFERENCES `antennas`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`stopped_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `dish_visits` (
	`id` text PRIMARY KEY NOT NULL,
	`antenna_id` text NOT NULL,
	`name` text NOT NULL,
	`came_ms` integer NOT NULL,
	`signed_in_by` text NOT NULL,
	`left_ms` integer,
	`signed_out_by` text,
	FOREIGN KEY (`antenna_id`) REFERENCES `antennas`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`signed_in_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`signed_out_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "dish_visits_name" CHECK(length("dish_visits"."name") > 0),
	CONSTRAINT "dish_visits_left" CHECK(("dish_visits"."left_ms" IS NULL) = ("dish_visits"."signed_out_by" IS NULL))
);
--> statement-breakpoint
CREATE INDEX `dish_visits_antenna` ON `dish_visits` (`antenna_id`,`left_ms`);--> statement-breakpoint
CREATE UNIQUE INDEX `dish_visits_once` ON `dish_visits` (`antenna_id`,`name`) WHERE left_ms IS NULL;--> statement-breakpoint
CREATE TABLE `hand_over_notes` (
	`id` text PRIMARY KEY NOT NULL,
	`station_id` text NOT NULL,
	`text` text NOT NULL,
	`written_ms` integer NOT NULL,
	`written_by` text NOT NULL,
	FOREIGN KEY (`station_id`) REFERENCES `stations`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`written_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `hand_over_notes_station` ON `hand_over_notes` (`station_id`,`written_ms`);