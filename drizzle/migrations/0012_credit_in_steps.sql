DROP INDEX `invoices_one_each`;--> statement-breakpoint
CREATE UNIQUE INDEX `invoices_one_each` ON `invoices` (`booking_id`) WHERE kind = 'invoice';