CREATE TABLE `credit_accounts` (
	`id` text PRIMARY KEY NOT NULL,
	`operator_id` text NOT NULL,
	`currency` text NOT NULL,
	`state` text NOT NULL,
	`wished_minor` integer NOT NULL,
	`limit_minor` integer NOT NULL,
	`terms_days` integer NOT NULL,
	`note` text NOT NULL,
	`asked_by` text NOT NULL,
	`asked_ms` integer NOT NULL,
	`decided_by` text,
	`decided_ms` integer,
	`reason` text NOT NULL,
	FOREIGN KEY (`operator_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`asked_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`decided_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "credit_accounts_state" CHECK("credit_accounts"."state" IN ('asked','open','refused','closed')),
	CONSTRAINT "credit_accounts_limit" CHECK("credit_accounts"."limit_minor" >= 0 AND "credit_accounts"."wished_minor" > 0),
	CONSTRAINT "credit_accounts_terms" CHECK("credit_accounts"."terms_days" BETWEEN 1 AND 90)
);
--> statement-breakpoint
CREATE UNIQUE INDEX `credit_accounts_one` ON `credit_accounts` (`operator_id`,`currency`);--> statement-breakpoint
CREATE TABLE `credit_bill_lines` (
	`entry_id` text PRIMARY KEY NOT NULL,
	`bill_id` text NOT NULL,
	`amount_minor` integer NOT NULL,
	FOREIGN KEY (`entry_id`) REFERENCES `journal_entries`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`bill_id`) REFERENCES `credit_bills`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `credit_bill_lines_bill` ON `credit_bill_lines` (`bill_id`);--> statement-breakpoint
CREATE TABLE `credit_bills` (
	`id` text PRIMARY KEY NOT NULL,
	`account_id` text NOT NULL,
	`series` text NOT NULL,
	`seq` integer NOT NULL,
	`number` text NOT NULL,
	`month` text NOT NULL,
	`issued_ms` integer NOT NULL,
	`due_ms` integer NOT NULL,
	`currency` text NOT NULL,
	`total_minor` integer NOT NULL,
	`checkout_id` text,
	`intent_id` text,
	`paid_ms` integer,
	FOREIGN KEY (`account_id`) REFERENCES `credit_accounts`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "credit_bills_total" CHECK("credit_bills"."total_minor" > 0)
);
--> statement-breakpoint
CREATE UNIQUE INDEX `credit_bills_number_unique` ON `credit_bills` (`number`);--> statement-breakpoint
CREATE UNIQUE INDEX `credit_bills_checkout_id_unique` ON `credit_bills` (`checkout_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `credit_bills_intent_id_unique` ON `credit_bills` (`intent_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `credit_bills_series` ON `credit_bills` (`series`,`seq`);--> statement-breakpoint
CREATE UNIQUE INDEX `credit_bills_month` ON `credit_bills` (`account_id`,`month`);--> statement-breakpoint
CREATE INDEX `credit_bills_due` ON `credit_bills` (`paid_ms`,`due_ms`);--> statement-breakpoint
CREATE TABLE `credit_purchases` (
	`booking_id` text PRIMARY KEY NOT NULL,
	`account_id` text NOT NULL,
	`amount_minor` integer NOT NULL,
	`bought_ms` integer NOT NULL,
	FOREIGN KEY (`booking_id`) REFERENCES `bookings`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`account_id`) REFERENCES `credit_accounts`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `credit_purchases_account` ON `credit_purchases` (`account_id`);--> statement-breakpoint
CREATE TABLE `credit_reminders` (
	`bill_id` text NOT NULL,
	`step` integer NOT NULL,
	`sent_ms` integer NOT NULL,
	PRIMARY KEY(`bill_id`, `step`),
	FOREIGN KEY (`bill_id`) REFERENCES `credit_bills`(`id`) ON UPDATE no action ON DELETE no action
);
