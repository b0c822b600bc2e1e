CREATE TABLE `api_keys` (
	`id` text PRIMARY KEY NOT NULL,
	`organisation_id` text NOT NULL,
	`person_id` text NOT NULL,
	`name` text NOT NULL,
	`hash` text NOT NULL,
	`tail` text NOT NULL,
	`scopes` text NOT NULL,
	`created_ms` integer NOT NULL,
	`ends_ms` integer,
	`last_used_ms` integer,
	`revoked_ms` integer,
	`revoked_by` text,
	FOREIGN KEY (`organisation_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`revoked_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "api_keys_hash" CHECK(length("api_keys"."hash") = 64),
	CONSTRAINT "api_keys_tail" CHECK(length("api_keys"."tail") = 4),
	CONSTRAINT "api_keys_scopes" CHECK(json_array_length("api_keys"."scopes") > 0),
	CONSTRAINT "api_keys_end" CHECK("api_keys"."ends_ms" IS NULL OR "api_keys"."ends_ms" > "api_keys"."created_ms"),
	CONSTRAINT "api_keys_revoked" CHECK(("api_keys"."revoked_ms" IS NULL) = ("api_keys"."revoked_by" IS NULL))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `api_keys_hash_unique` ON `api_keys` (`hash`);--> statement-breakpoint
CREATE INDEX `api_keys_organisation` ON `api_keys` (`organisation_id`);