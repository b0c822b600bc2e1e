CREATE TABLE `calendar_rules` (
	`id` text PRIMARY KEY NOT NULL,
	`antenna_id` text NOT NULL,
	`kind` text NOT NULL,
	`rrule` text,
	`start_local` text NOT NULL,
	`duration_min` integer,
	`end_local` text,
	`time_zone` text NOT NULL,
	`except_local` text NOT NULL,
	`reason` text NOT NULL,
	`note` text NOT NULL,
	`created_by` text,
	`created_ms` integer NOT NULL,
	FOREIGN KEY (`antenna_id`) REFERENCES `antennas`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`created_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "calendar_rules_kind" CHECK("calendar_rules"."kind" IN ('opening','blackout')),
	CONSTRAINT "calendar_rules_repeats" CHECK("calendar_rules"."kind" = 'opening' OR "calendar_rules"."rrule" IS NOT NULL),
	CONSTRAINT "calendar_rules_length" CHECK(("calendar_rules"."duration_min" IS NULL) <> ("calendar_rules"."end_local" IS NULL)),
	CONSTRAINT "calendar_rules_positive" CHECK("calendar_rules"."duration_min" IS NULL OR "calendar_rules"."duration_min" > 0)
);
--> statement-breakpoint
CREATE INDEX `calendar_rules_antenna` ON `calendar_rules` (`antenna_id`);