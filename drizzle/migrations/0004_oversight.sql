CREATE TABLE `suspensions` (
	`organisation_id` text PRIMARY KEY NOT NULL,
	`reason` text NOT NULL,
	`suspended_by` text NOT NULL,
	`suspended_ms` integer NOT NULL,
	FOREIGN KEY (`organisation_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`suspended_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "suspensions_reason" CHECK(length("suspensions"."reason") > 0)
);
