CREATE TABLE `payout_items` (
	`id` text PRIMARY KEY NOT NULL,
	`line_id` text NOT NULL,
	`entry_id` text NOT NULL,
	`posting_line` integer NOT NULL,
	`live` integer NOT NULL,
	FOREIGN KEY (`line_id`) REFERENCES `payout_lines`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`entry_id`) REFERENCES `journal_entries`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `payout_items_line` ON `payout_items` (`line_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `payout_items_once` ON `payout_items` (`entry_id`,`posting_line`) WHERE live = 1;--> statement-breakpoint
CREATE TABLE `payout_lines` (
	`id` text PRIMARY KEY NOT NULL,
	`run_id` text NOT NULL,
	`owner_id` text NOT NULL,
	`state` text NOT NULL,
	`note` text NOT NULL,
	`contact_count` integer NOT NULL,
	`settled_minor` integer NOT NULL,
	`fee_minor` integer NOT NULL,
	`refund_minor` integer NOT NULL,
	`reserve_minor` integer NOT NULL,
	`adjusted_minor` integer NOT NULL,
	`to_pay_minor` integer NOT NULL,
	`transfer_id` text,
	`paid_ms` integer,
	FOREIGN KEY (`run_id`) REFERENCES `payout_runs`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`owner_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "payout_lines_state" CHECK("payout_lines"."state" IN ('ready','held back','below minimum','nothing due','paying','paid','failed')),
	CONSTRAINT "payout_lines_sum" CHECK("payout_lines"."to_pay_minor" = "payout_lines"."settled_minor" - "payout_lines"."fee_minor" - "payout_lines"."refund_minor" - "payout_lines"."reserve_minor" + "payout_lines"."adjusted_minor"),
	CONSTRAINT "payout_lines_paying" CHECK("payout_lines"."state" NOT IN ('paying','paid') OR "payout_lines"."to_pay_minor" > 0),
	CONSTRAINT "payout_lines_paid" CHECK(("payout_lines"."state" = 'paid') = ("payout_lines"."transfer_id" IS NOT NULL))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `payout_lines_transfer_id_unique` ON `payout_lines` (`transfer_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `payout_lines_owner` ON `payout_lines` (`run_id`,`owner_id`);--> statement-breakpoint
CREATE INDEX `payout_lines_of_owner` ON `payout_lines` (`owner_id`,`state`);--> statement-breakpoint
CREATE TABLE `payout_runs` (
	`id` text PRIMARY KEY NOT NULL,
	`number` integer NOT NULL,
	`currency` text NOT NULL,
	`state` text NOT NULL,
	`prepared_by` text NOT NULL,
	`prepared_ms` integer NOT NULL,
	`reviewed_by` text,
	`reviewed_ms` integer,
	`approved_by` text,
	`approved_ms` integer,
	FOREIGN KEY (`prepared_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`reviewed_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`approved_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "payout_runs_state" CHECK("payout_runs"."state" IN ('draft','reviewed','approved','dropped')),
	CONSTRAINT "payout_runs_two_people" CHECK("payout_runs"."approved_by" IS NULL OR "payout_runs"."approved_by" <> "payout_runs"."reviewed_by"),
	CONSTRAINT "payout_runs_maker" CHECK("payout_runs"."approved_by" IS NULL OR "payout_runs"."approved_by" <> "payout_runs"."prepared_by"),
	CONSTRAINT "payout_runs_reviewed" CHECK("payout_runs"."state" NOT IN ('reviewed','approved') OR "payout_runs"."reviewed_by" IS NOT NULL),
	CONSTRAINT "payout_runs_approved" CHECK(("payout_runs"."state" = 'approved') = ("payout_runs"."approved_by" IS NOT NULL))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `payout_runs_number_unique` ON `payout_runs` (`number`);--> statement-breakpoint
CREATE UNIQUE INDEX `payout_runs_one_open` ON `payout_runs` (`currency`) WHERE state IN ('draft','reviewed');--> statement-breakpoint
CREATE TABLE `second_factors` (
	`person_id` text PRIMARY KEY NOT NULL,
	`secret` text NOT NULL,
	`confirmed_ms` integer,
	`last_step` integer NOT NULL,
	FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action
);
