CREATE TABLE `message_reads` (
	`person_id` text NOT NULL,
	`booking_id` text NOT NULL,
	`seq` integer NOT NULL,
	PRIMARY KEY(`person_id`, `booking_id`),
	FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`booking_id`) REFERENCES `bookings`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `messages` (
	`seq` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`id` text NOT NULL,
	`booking_id` text NOT NULL,
	`side` text NOT NULL,
	`person_id` text NOT NULL,
	`at_ms` integer NOT NULL,
	`text` text NOT NULL,
	FOREIGN KEY (`booking_id`) REFERENCES `bookings`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "messages_side" CHECK("messages"."side" IN ('operator','owner','admin')),
	CONSTRAINT "messages_text" CHECK(length("messages"."text") > 0)
);
--> statement-breakpoint
CREATE UNIQUE INDEX `messages_id_unique` ON `messages` (`id`);--> statement-breakpoint
CREATE INDEX `messages_booking` ON `messages` (`booking_id`,`seq`);