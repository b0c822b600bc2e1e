CREATE TABLE `chargebacks` (
	`id` text PRIMARY KEY NOT NULL,
	`booking_id` text NOT NULL,
	`operator_id` text NOT NULL,
	`owner_id` text NOT NULL,
	`charge_id` text NOT NULL,
	`amount_minor` integer NOT NULL,
	`currency` text NOT NULL,
	`reason` text NOT NULL,
	`state` text NOT NULL,
	`reserved_minor` integer NOT NULL,
	`opened_ms` integer NOT NULL,
	`closed_ms` integer,
	FOREIGN KEY (`booking_id`) REFERENCES `bookings`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`operator_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`owner_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "chargebacks_state" CHECK("chargebacks"."state" IN ('open','won','lost'))
);
--> statement-breakpoint
CREATE INDEX `chargebacks_booking` ON `chargebacks` (`booking_id`);--> statement-breakpoint
CREATE INDEX `chargebacks_owner` ON `chargebacks` (`owner_id`,`state`);--> statement-breakpoint
CREATE TABLE `closed_months` (
	`month` text PRIMARY KEY NOT NULL,
	`from_ms` integer NOT NULL,
	`to_ms` integer NOT NULL,
	`closed_ms` integer NOT NULL,
	`closed_by` text NOT NULL,
	`trial_balance` text NOT NULL,
	FOREIGN KEY (`closed_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `ledger_checks` (
	`id` text PRIMARY KEY NOT NULL,
	`at_ms` integer NOT NULL,
	`postings` integer NOT NULL,
	`provider_asked` integer NOT NULL,
	`faults` text NOT NULL
);
--> statement-breakpoint
CREATE INDEX `ledger_checks_at` ON `ledger_checks` (`at_ms`);--> statement-breakpoint
CREATE TABLE `ledger_totals` (
	`account` text NOT NULL,
	`organisation_id` text NOT NULL,
	`currency` text NOT NULL,
	`month` text NOT NULL,
	`debit_minor` integer NOT NULL,
	`credit_minor` integer NOT NULL,
	`postings` integer NOT NULL,
	PRIMARY KEY(`account`, `organisation_id`, `currency`, `month`)
);
--> statement-breakpoint
CREATE TABLE `provider_movements` (
	`id` text PRIMARY KEY NOT NULL,
	`type` text NOT NULL,
	`category` text NOT NULL,
	`source_id` text,
	`intent_id` text,
	`amount_minor` integer NOT NULL,
	`fee_minor` integer NOT NULL,
	`net_minor` integer NOT NULL,
	`currency` text NOT NULL,
	`at_ms` integer NOT NULL,
	`available_ms` integer NOT NULL,
	`description` text NOT NULL,
	`imported_ms` integer NOT NULL,
	`imported_from` text NOT NULL,
	`state` text NOT NULL,
	`entry_cause` text,
	`changed_ms` integer NOT NULL,
	CONSTRAINT "provider_movements_net" CHECK("provider_movements"."net_minor" = "provider_movements"."amount_minor" - "provider_movements"."fee_minor"),
	CONSTRAINT "provider_movements_state" CHECK("provider_movements"."state" IN ('open','matched','in suspense')),
	CONSTRAINT "provider_movements_matched" CHECK(("provider_movements"."state" = 'open') = ("provider_movements"."entry_cause" IS NULL))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `provider_movements_entry_cause_unique` ON `provider_movements` (`entry_cause`);--> statement-breakpoint
CREATE INDEX `provider_movements_state` ON `provider_movements` (`state`,`at_ms`);--> statement-breakpoint
CREATE INDEX `provider_movements_at` ON `provider_movements` (`at_ms`);--> statement-breakpoint
CREATE TABLE `provider_readings` (
	`name` text PRIMARY KEY NOT NULL,
	`read_until_ms` integer NOT NULL,
	`ran_ms` integer NOT NULL,
	`note` text NOT NULL
);
--> statement-breakpoint
DROP INDEX `journal_postings_account`;--> statement-breakpoint
ALTER TABLE `journal_postings` ADD `at_ms` integer;--> statement-breakpoint
ALTER TABLE `journal_postings` ADD `currency` text;--> statement-breakpoint
CREATE INDEX `journal_postings_walk` ON `journal_postings` (`account`,`currency`,`at_ms`,`entry_id`,`line`,`amount_minor`);--> statement-breakpoint
CREATE INDEX `journal_postings_party` ON `journal_postings` (`organisation_id`,`account`,`currency`,`at_ms`,`entry_id`,`line`,`amount_minor`);--> statement-breakpoint
CREATE INDEX `journal_postings_at` ON `journal_postings` (`at_ms`,`entry_id`,`line`);--> statement-breakpoint
DROP INDEX `journal_entries_at`;--> statement-breakpoint
CREATE INDEX `journal_entries_at` ON `journal_entries` (`at_ms`,`id`);