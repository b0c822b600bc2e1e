CREATE TABLE `dispute_decisions` (
	`dispute_id` text NOT NULL,
	`round` integer NOT NULL,
	`outcome` text NOT NULL,
	`refund_basis_points` integer NOT NULL,
	`borne_by` text NOT NULL,
	`text` text NOT NULL,
	`decided_by` text NOT NULL,
	`decided_ms` integer NOT NULL,
	`effect` text NOT NULL,
	`refund_minor` integer NOT NULL,
	PRIMARY KEY(`dispute_id`, `round`),
	FOREIGN KEY (`dispute_id`) REFERENCES `disputes`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`decided_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "dispute_decisions_round" CHECK("dispute_decisions"."round" IN (1, 2)),
	CONSTRAINT "dispute_decisions_refund" CHECK("dispute_decisions"."refund_minor" >= 0 AND "dispute_decisions"."refund_basis_points" BETWEEN 0 AND 10000)
);
--> statement-breakpoint
CREATE TABLE `dispute_evidence` (
	`dispute_id` text NOT NULL,
	`version` integer NOT NULL,
	`assembled_ms` integer NOT NULL,
	`evidence` text NOT NULL,
	PRIMARY KEY(`dispute_id`, `version`),
	FOREIGN KEY (`dispute_id`) REFERENCES `disputes`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `dispute_statements` (
	`id` text PRIMARY KEY NOT NULL,
	`dispute_id` text NOT NULL,
	`side` text NOT NULL,
	`person_id` text NOT NULL,
	`at_ms` integer NOT NULL,
	`text` text NOT NULL,
	`observations` text NOT NULL,
	FOREIGN KEY (`dispute_id`) REFERENCES `disputes`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "dispute_statements_side" CHECK("dispute_statements"."side" IN ('operator','owner','admin'))
);
--> statement-breakpoint
CREATE INDEX `dispute_statements_dispute` ON `dispute_statements` (`dispute_id`,`at_ms`);--> statement-breakpoint
CREATE TABLE `disputes` (
	`id` text PRIMARY KEY NOT NULL,
	`number` integer NOT NULL,
	`booking_id` text NOT NULL,
	`operator_id` text NOT NULL,
	`owner_id` text NOT NULL,
	`reason` text NOT NULL,
	`state` text NOT NULL,
	`opened_ms` integer NOT NULL,
	`statement_due_ms` integer NOT NULL,
	`decide_by_ms` integer NOT NULL,
	`gap_from_ms` integer,
	`gap_to_ms` integer,
	`appeal_by_ms` integer,
	`appealed_by` text,
	FOREIGN KEY (`booking_id`) REFERENCES `bookings`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`operator_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`owner_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "disputes_state_known" CHECK("disputes"."state" IN ('open','decided','appealed','closed')),
	CONSTRAINT "disputes_gap" CHECK(("disputes"."gap_from_ms" IS NULL AND "disputes"."gap_to_ms" IS NULL) OR "disputes"."gap_from_ms" < "disputes"."gap_to_ms")
);
--> statement-breakpoint
CREATE UNIQUE INDEX `disputes_number_unique` ON `disputes` (`number`);--> statement-breakpoint
CREATE UNIQUE INDEX `disputes_booking_id_unique` ON `disputes` (`booking_id`);--> statement-breakpoint
CREATE INDEX `disputes_operator` ON `disputes` (`operator_id`,`opened_ms`);--> statement-breakpoint
CREATE INDEX `disputes_owner` ON `disputes` (`owner_id`,`opened_ms`);--> statement-breakpoint
CREATE INDEX `disputes_state` ON `disputes` (`state`,`decide_by_ms`);