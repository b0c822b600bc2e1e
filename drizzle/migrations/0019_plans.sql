CREATE TABLE `plans` (
	`id` text PRIMARY KEY NOT NULL,
	`operator_id` text NOT NULL,
	`state` text NOT NULL,
	`work` text NOT NULL,
	`need` text NOT NULL,
	`pinned_keys` text NOT NULL,
	`struck_keys` text NOT NULL,
	`failure` text,
	`group_id` text,
	`outcome` text,
	`created_by` text NOT NULL,
	`created_ms` integer NOT NULL,
	`changed_ms` integer NOT NULL,
	FOREIGN KEY (`operator_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`created_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "plans_state" CHECK("plans"."state" IN ('draft', 'held', 'bought', 'given up')),
	CONSTRAINT "plans_work" CHECK("plans"."work" IN ('working', 'done', 'stopped', 'failed')),
	CONSTRAINT "plans_failure" CHECK(("plans"."failure" IS NOT NULL) = ("plans"."work" = 'failed'))
);
--> statement-breakpoint
CREATE INDEX `plans_operator` ON `plans` (`operator_id`,`changed_ms`);