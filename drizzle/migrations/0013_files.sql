CREATE TABLE `file_links` (
	`file_id` text NOT NULL,
	`subject_kind` text NOT NULL,
	`subject_id` text NOT NULL,
	`created_ms` integer NOT NULL,
	PRIMARY KEY(`file_id`, `subject_kind`, `subject_id`),
	FOREIGN KEY (`file_id`) REFERENCES `files`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `file_links_subject` ON `file_links` (`subject_kind`,`subject_id`);--> statement-breakpoint
CREATE TABLE `files` (
	`id` text PRIMARY KEY NOT NULL,
	`organisation_id` text NOT NULL,
	`name` text NOT NULL,
	`media_type` text NOT NULL,
	`bytes` integer NOT NULL,
	`sha256` text NOT NULL,
	`created_by` text NOT NULL,
	`created_ms` integer NOT NULL,
	FOREIGN KEY (`organisation_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`created_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "files_size" CHECK("files"."bytes" > 0),
	CONSTRAINT "files_digest_form" CHECK(length("files"."sha256") = 64 AND "files"."sha256" NOT GLOB '*[^0-9a-f]*'),
	CONSTRAINT "files_media_type" CHECK("files"."media_type" IN ('application/pdf','image/png','image/jpeg','text/csv','text/plain'))
);
--> statement-breakpoint
CREATE INDEX `files_organisation` ON `files` (`organisation_id`,`created_ms`);--> statement-breakpoint
CREATE INDEX `files_digest` ON `files` (`sha256`);