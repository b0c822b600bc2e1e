CREATE TABLE `calendar_feeds` (
	`id` text PRIMARY KEY NOT NULL,
	`person_id` text NOT NULL,
	`organisation_id` text NOT NULL,
	`antenna_id` text,
	`hash` text NOT NULL,
	`created_ms` integer NOT NULL,
	`revoked_ms` integer,
	FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`organisation_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`antenna_id`) REFERENCES `antennas`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "calendar_feeds_hash" CHECK(length("calendar_feeds"."hash") = 64),
	CONSTRAINT "calendar_feeds_end" CHECK("calendar_feeds"."revoked_ms" IS NULL OR "calendar_feeds"."revoked_ms" >= "calendar_feeds"."created_ms")
);
--> statement-breakpoint
CREATE UNIQUE INDEX `calendar_feeds_hash_unique` ON `calendar_feeds` (`hash`);--> statement-breakpoint
CREATE INDEX `calendar_feeds_person` ON `calendar_feeds` (`person_id`,`organisation_id`);