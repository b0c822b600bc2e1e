CREATE TABLE `audit_log` (
	`seq` integer PRIMARY KEY NOT NULL,
	`at_ms` integer NOT NULL,
	`person_id` text,
	`organisation_id` text,
	`action` text NOT NULL,
	`subject` text NOT NULL,
	`data` text NOT NULL,
	`previous_hash` text NOT NULL,
	`hash` text NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `audit_log_hash_unique` ON `audit_log` (`hash`);--> statement-breakpoint
CREATE INDEX `audit_log_subject` ON `audit_log` (`subject`);--> statement-breakpoint
CREATE TABLE `idempotency_keys` (
	`caller` text NOT NULL,
	`key` text NOT NULL,
	`route` text NOT NULL,
	`input_hash` text NOT NULL,
	`status` integer,
	`answer` text,
	`created_ms` integer NOT NULL,
	PRIMARY KEY(`caller`, `key`)
);
--> statement-breakpoint
CREATE INDEX `idempotency_keys_age` ON `idempotency_keys` (`created_ms`);--> statement-breakpoint
CREATE TABLE `mailed_tokens` (
	`hash` text PRIMARY KEY NOT NULL,
	`purpose` text NOT NULL,
	`person_id` text NOT NULL,
	`expires_ms` integer NOT NULL,
	`used_ms` integer,
	FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "mailed_tokens_purpose" CHECK("mailed_tokens"."purpose" IN ('verify','reset','invite'))
);
--> statement-breakpoint
CREATE TABLE `memberships` (
	`person_id` text NOT NULL,
	`organisation_id` text NOT NULL,
	`role` text NOT NULL,
	`created_ms` integer NOT NULL,
	PRIMARY KEY(`person_id`, `organisation_id`),
	FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`organisation_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "memberships_role" CHECK("memberships"."role" IN ('manager','member','viewer','finance','admin'))
);
--> statement-breakpoint
CREATE INDEX `memberships_organisation` ON `memberships` (`organisation_id`);--> statement-breakpoint
CREATE TABLE `organisations` (
	`id` text PRIMARY KEY NOT NULL,
	`kind` text NOT NULL,
	`name` text NOT NULL,
	`address` text NOT NULL,
	`vat_number` text,
	`billing_email` text NOT NULL,
	`provider_customer_id` text,
	`provider_account_id` text,
	`created_ms` integer NOT NULL,
	CONSTRAINT "organisations_kind" CHECK("organisations"."kind" IN ('operator','owner','staff'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `organisations_provider_customer_id_unique` ON `organisations` (`provider_customer_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `organisations_provider_account_id_unique` ON `organisations` (`provider_account_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `organisations_name` ON `organisations` (lower("name"));--> statement-breakpoint
CREATE TABLE `people` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`email` text NOT NULL,
	`password_hash` text,
	`email_verified_ms` integer,
	`last_seen_ms` integer,
	`created_ms` integer NOT NULL,
	CONSTRAINT "people_email_lower" CHECK("people"."email" = lower("people"."email"))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `people_email` ON `people` (`email`);--> statement-breakpoint
CREATE TABLE `refresh_tokens` (
	`hash` text PRIMARY KEY NOT NULL,
	`family_id` text NOT NULL,
	`issued_ms` integer NOT NULL,
	`expires_ms` integer NOT NULL,
	`used_ms` integer,
	FOREIGN KEY (`family_id`) REFERENCES `session_families`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `session_families` (
	`id` text PRIMARY KEY NOT NULL,
	`person_id` text NOT NULL,
	`organisation_id` text NOT NULL,
	`user_agent` text NOT NULL,
	`created_ms` integer NOT NULL,
	`last_used_ms` integer NOT NULL,
	`revoked_ms` integer,
	`revoked_reason` text,
	FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`organisation_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `session_families_person` ON `session_families` (`person_id`);--> statement-breakpoint
CREATE TABLE `booking_events` (
	`id` text PRIMARY KEY NOT NULL,
	`booking_id` text NOT NULL,
	`at_ms` integer NOT NULL,
	`kind` text NOT NULL,
	`from_state` text,
	`to_state` text,
	`sentence` text NOT NULL,
	`actor_id` text,
	`actor_organisation_id` text,
	FOREIGN KEY (`booking_id`) REFERENCES `bookings`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`actor_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`actor_organisation_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `booking_events_booking` ON `booking_events` (`booking_id`,`at_ms`);--> statement-breakpoint
CREATE TABLE `bookings` (
	`id` text PRIMARY KEY NOT NULL,
	`number` integer NOT NULL,
	`operator_id` text NOT NULL,
	`owner_id` text NOT NULL,
	`spacecraft_id` text NOT NULL,
	`antenna_id` text NOT NULL,
	`beam` integer NOT NULL,
	`element_set_id` text NOT NULL,
	`need` text NOT NULL,
	`state` text NOT NULL,
	`aos_ms` integer NOT NULL,
	`tca_ms` integer NOT NULL,
	`los_ms` integer NOT NULL,
	`guard_from_ms` integer NOT NULL,
	`guard_to_ms` integer NOT NULL,
	`pass` text NOT NULL,
	`quote` text NOT NULL,
	`currency` text NOT NULL,
	`net_minor` integer NOT NULL,
	`vat_minor` integer NOT NULL,
	`to_pay_minor` integer NOT NULL,
	`hold_ends_ms` integer,
	`answer_by_ms` integer,
	`report` text,
	`created_by` text NOT NULL,
	`created_ms` integer NOT NULL,
	`changed_ms` integer NOT NULL,
	FOREIGN KEY (`operator_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`owner_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`spacecraft_id`) REFERENCES `spacecraft`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`antenna_id`) REFERENCES `antennas`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`element_set_id`) REFERENCES `element_sets`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`created_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "bookings_order" CHECK("bookings"."guard_from_ms" <= "bookings"."aos_ms" AND "bookings"."aos_ms" < "bookings"."los_ms" AND "bookings"."los_ms" <= "bookings"."guard_to_ms" AND "bookings"."guard_to_ms" - "bookings"."guard_from_ms" <= 700000000),
	CONSTRAINT "bookings_money" CHECK("bookings"."net_minor" >= 0 AND "bookings"."vat_minor" >= 0 AND "bookings"."to_pay_minor" = "bookings"."net_minor" + "bookings"."vat_minor"),
	CONSTRAINT "bookings_beam_range" CHECK("bookings"."beam" BETWEEN 1 AND 8)
);
--> statement-breakpoint
CREATE UNIQUE INDEX `bookings_number_unique` ON `bookings` (`number`);--> statement-breakpoint
CREATE INDEX `bookings_beam` ON `bookings` (`antenna_id`,`beam`,`guard_from_ms`);--> statement-breakpoint
CREATE INDEX `bookings_spacecraft` ON `bookings` (`spacecraft_id`,`aos_ms`);--> statement-breakpoint
CREATE INDEX `bookings_operator` ON `bookings` (`operator_id`,`aos_ms`);--> statement-breakpoint
CREATE INDEX `bookings_owner` ON `bookings` (`owner_id`,`aos_ms`);--> statement-breakpoint
CREATE INDEX `bookings_state` ON `bookings` (`state`,`aos_ms`);--> statement-breakpoint
CREATE TABLE `payments` (
	`id` text PRIMARY KEY NOT NULL,
	`booking_id` text NOT NULL,
	`intent_id` text,
	`checkout_id` text,
	`checkout_url` text,
	`state` text NOT NULL,
	`currency` text NOT NULL,
	`amount_minor` integer NOT NULL,
	`captured_minor` integer NOT NULL,
	`refunded_minor` integer NOT NULL,
	`card` text,
	`failure` text,
	`capture_before_ms` integer,
	`created_ms` integer NOT NULL,
	`changed_ms` integer NOT NULL,
	FOREIGN KEY (`booking_id`) REFERENCES `bookings`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "payments_amounts" CHECK("payments"."amount_minor" >= 0 AND "payments"."captured_minor" BETWEEN 0 AND "payments"."amount_minor" AND "payments"."refunded_minor" BETWEEN 0 AND "payments"."captured_minor")
);
--> statement-breakpoint
CREATE UNIQUE INDEX `payments_booking_id_unique` ON `payments` (`booking_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `payments_intent_id_unique` ON `payments` (`intent_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `payments_checkout_id_unique` ON `payments` (`checkout_id`);--> statement-breakpoint
CREATE TABLE `provider_events` (
	`id` text PRIMARY KEY NOT NULL,
	`type` text NOT NULL,
	`payload` text NOT NULL,
	`received_ms` integer NOT NULL,
	`processed_ms` integer,
	`outcome` text
);
--> statement-breakpoint
CREATE INDEX `provider_events_open` ON `provider_events` (`processed_ms`,`received_ms`);--> statement-breakpoint
CREATE TABLE `invoices` (
	`id` text PRIMARY KEY NOT NULL,
	`series` text NOT NULL,
	`seq` integer NOT NULL,
	`number` text NOT NULL,
	`kind` text NOT NULL,
	`booking_id` text NOT NULL,
	`operator_id` text NOT NULL,
	`owner_id` text NOT NULL,
	`issued_ms` integer NOT NULL,
	`currency` text NOT NULL,
	`net_minor` integer NOT NULL,
	`vat_minor` integer NOT NULL,
	`gross_minor` integer NOT NULL,
	`document` text NOT NULL,
	FOREIGN KEY (`booking_id`) REFERENCES `bookings`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`operator_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`owner_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "invoices_sum" CHECK("invoices"."gross_minor" = "invoices"."net_minor" + "invoices"."vat_minor")
);
--> statement-breakpoint
CREATE UNIQUE INDEX `invoices_number_unique` ON `invoices` (`number`);--> statement-breakpoint
CREATE UNIQUE INDEX `invoices_series` ON `invoices` (`series`,`seq`);--> statement-breakpoint
CREATE INDEX `invoices_operator` ON `invoices` (`operator_id`,`issued_ms`);--> statement-breakpoint
CREATE INDEX `invoices_booking` ON `invoices` (`booking_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `invoices_one_each` ON `invoices` (`booking_id`,`kind`);--> statement-breakpoint
CREATE TABLE `journal_entries` (
	`id` text PRIMARY KEY NOT NULL,
	`at_ms` integer NOT NULL,
	`cause_key` text NOT NULL,
	`cause` text NOT NULL,
	`booking_id` text,
	`currency` text NOT NULL,
	`sealed` integer DEFAULT 0 NOT NULL,
	FOREIGN KEY (`booking_id`) REFERENCES `bookings`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "journal_entries_sealed" CHECK("journal_entries"."sealed" IN (0,1))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `journal_entries_cause_key_unique` ON `journal_entries` (`cause_key`);--> statement-breakpoint
CREATE INDEX `journal_entries_at` ON `journal_entries` (`at_ms`);--> statement-breakpoint
CREATE INDEX `journal_entries_booking` ON `journal_entries` (`booking_id`);--> statement-breakpoint
CREATE TABLE `journal_postings` (
	`entry_id` text NOT NULL,
	`line` integer NOT NULL,
	`account` text NOT NULL,
	`organisation_id` text,
	`amount_minor` integer NOT NULL,
	PRIMARY KEY(`entry_id`, `line`),
	FOREIGN KEY (`entry_id`) REFERENCES `journal_entries`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`organisation_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "journal_postings_amount" CHECK("journal_postings"."amount_minor" <> 0)
);
--> statement-breakpoint
CREATE INDEX `journal_postings_account` ON `journal_postings` (`account`,`organisation_id`);--> statement-breakpoint
CREATE TABLE `outbox` (
	`id` text PRIMARY KEY NOT NULL,
	`kind` text NOT NULL,
	`dedupe_key` text NOT NULL,
	`payload` text NOT NULL,
	`state` text NOT NULL,
	`attempts` integer NOT NULL,
	`next_attempt_ms` integer NOT NULL,
	`claimed_until_ms` integer,
	`last_error` text,
	`created_ms` integer NOT NULL,
	`done_ms` integer,
	CONSTRAINT "outbox_state" CHECK("outbox"."state" IN ('pending','done','failed'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `outbox_dedupe_key_unique` ON `outbox` (`dedupe_key`);--> statement-breakpoint
CREATE INDEX `outbox_due` ON `outbox` (`state`,`next_attempt_ms`);--> statement-breakpoint
CREATE TABLE `element_sets` (
	`id` text PRIMARY KEY NOT NULL,
	`spacecraft_id` text NOT NULL,
	`epoch_utc` text NOT NULL,
	`epoch_ms` real NOT NULL,
	`format` text NOT NULL,
	`elements` text NOT NULL,
	`digest` text NOT NULL,
	`source` text NOT NULL,
	`added_by` text,
	`added_ms` integer NOT NULL,
	FOREIGN KEY (`spacecraft_id`) REFERENCES `spacecraft`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`added_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `element_sets_digest` ON `element_sets` (`spacecraft_id`,`digest`);--> statement-breakpoint
CREATE INDEX `element_sets_epoch` ON `element_sets` (`spacecraft_id`,`epoch_ms`);--> statement-breakpoint
CREATE TABLE `radios` (
	`id` text PRIMARY KEY NOT NULL,
	`spacecraft_id` text NOT NULL,
	`name` text NOT NULL,
	`direction` text NOT NULL,
	`band` text NOT NULL,
	`centre_frequency_mhz` real NOT NULL,
	`bandwidth_khz` real NOT NULL,
	`polarisation` text NOT NULL,
	`modulation` text NOT NULL,
	`coding` text NOT NULL,
	`data_rate_bps` integer NOT NULL,
	`eirp_dbw` real,
	`required_eb_n0_db` real,
	`required_eirp_dbw` real,
	`pointing_loss_db` real NOT NULL,
	FOREIGN KEY (`spacecraft_id`) REFERENCES `spacecraft`(`id`) ON UPDATE no action ON DELETE cascade,
	CONSTRAINT "radios_direction" CHECK("radios"."direction" IN ('downlink','uplink')),
	CONSTRAINT "radios_positive" CHECK("radios"."centre_frequency_mhz" > 0 AND "radios"."bandwidth_khz" > 0 AND "radios"."data_rate_bps" > 0)
);
--> statement-breakpoint
CREATE INDEX `radios_spacecraft` ON `radios` (`spacecraft_id`);--> statement-breakpoint
CREATE TABLE `spacecraft` (
	`id` text PRIMARY KEY NOT NULL,
	`organisation_id` text NOT NULL,
	`name` text NOT NULL,
	`short_name` text NOT NULL,
	`catalog_number` integer,
	`international_designator` text,
	`state` text NOT NULL,
	`created_ms` integer NOT NULL,
	FOREIGN KEY (`organisation_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "spacecraft_state" CHECK("spacecraft"."state" IN ('active','retired')),
	CONSTRAINT "spacecraft_number_range" CHECK("spacecraft"."catalog_number" IS NULL OR "spacecraft"."catalog_number" BETWEEN 1 AND 999999999)
);
--> statement-breakpoint
CREATE UNIQUE INDEX `spacecraft_name` ON `spacecraft` (`organisation_id`,lower("name"));--> statement-breakpoint
CREATE UNIQUE INDEX `spacecraft_number` ON `spacecraft` (`organisation_id`,`catalog_number`);--> statement-breakpoint
CREATE TABLE `antenna_bands` (
	`id` text PRIMARY KEY NOT NULL,
	`antenna_id` text NOT NULL,
	`direction` text NOT NULL,
	`band` text NOT NULL,
	`from_mhz` real NOT NULL,
	`to_mhz` real NOT NULL,
	`polarisations` text NOT NULL,
	`g_over_t_db_k` real,
	`eirp_dbw` real,
	`lowest_elevation_deg` real,
	FOREIGN KEY (`antenna_id`) REFERENCES `antennas`(`id`) ON UPDATE no action ON DELETE cascade,
	CONSTRAINT "antenna_bands_range" CHECK("antenna_bands"."to_mhz" > "antenna_bands"."from_mhz" AND "antenna_bands"."from_mhz" > 0),
	CONSTRAINT "antenna_bands_figure" CHECK(("antenna_bands"."direction" = 'receive' AND "antenna_bands"."g_over_t_db_k" IS NOT NULL) OR ("antenna_bands"."direction" = 'transmit' AND "antenna_bands"."eirp_dbw" IS NOT NULL))
);
--> statement-breakpoint
CREATE INDEX `antenna_bands_antenna` ON `antenna_bands` (`antenna_id`);--> statement-breakpoint
CREATE TABLE `antenna_masks` (
	`id` text PRIMARY KEY NOT NULL,
	`antenna_id` text NOT NULL,
	`version` integer NOT NULL,
	`points` text NOT NULL,
	`reason` text NOT NULL,
	`published_by` text,
	`published_ms` integer NOT NULL,
	FOREIGN KEY (`antenna_id`) REFERENCES `antennas`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`published_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `antenna_masks_version` ON `antenna_masks` (`antenna_id`,`version`);--> statement-breakpoint
CREATE TABLE `antennas` (
	`id` text PRIMARY KEY NOT NULL,
	`station_id` text NOT NULL,
	`name` text NOT NULL,
	`diameter_m` real NOT NULL,
	`mount` text NOT NULL,
	`tilt_deg` real NOT NULL,
	`slew_azimuth_deg_per_s` real NOT NULL,
	`slew_elevation_deg_per_s` real NOT NULL,
	`lowest_receive_deg` real NOT NULL,
	`lowest_transmit_deg` real NOT NULL,
	`setup_s` integer NOT NULL,
	`teardown_s` integer NOT NULL,
	`beams` integer NOT NULL,
	`min_notice_min` integer NOT NULL,
	`horizon_days` integer NOT NULL,
	`min_contact_s` integer NOT NULL,
	`max_contact_s` integer NOT NULL,
	`parts_allowed` integer NOT NULL,
	`acceptance` text NOT NULL,
	`answer_within_min` integer NOT NULL,
	`state` text NOT NULL,
	`version` integer NOT NULL,
	`created_ms` integer NOT NULL,
	FOREIGN KEY (`station_id`) REFERENCES `stations`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "antennas_state" CHECK("antennas"."state" IN ('draft','on sale','paused')),
	CONSTRAINT "antennas_acceptance" CHECK("antennas"."acceptance" IN ('instant','owner')),
	CONSTRAINT "antennas_times" CHECK("antennas"."setup_s" >= 0 AND "antennas"."teardown_s" >= 0 AND "antennas"."beams" BETWEEN 1 AND 8 AND "antennas"."min_contact_s" <= "antennas"."max_contact_s")
);
--> statement-breakpoint
CREATE UNIQUE INDEX `antennas_name` ON `antennas` (`station_id`,lower("name"));--> statement-breakpoint
CREATE TABLE `availability_rules` (
	`id` text PRIMARY KEY NOT NULL,
	`antenna_id` text NOT NULL,
	`days` text NOT NULL,
	`from_local` text NOT NULL,
	`to_local` text NOT NULL,
	FOREIGN KEY (`antenna_id`) REFERENCES `antennas`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `availability_rules_antenna` ON `availability_rules` (`antenna_id`);--> statement-breakpoint
CREATE TABLE `blackouts` (
	`id` text PRIMARY KEY NOT NULL,
	`antenna_id` text NOT NULL,
	`from_ms` integer NOT NULL,
	`to_ms` integer NOT NULL,
	`reason` text NOT NULL,
	`note` text NOT NULL,
	`created_by` text,
	`created_ms` integer NOT NULL,
	FOREIGN KEY (`antenna_id`) REFERENCES `antennas`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`created_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "blackouts_order" CHECK("blackouts"."to_ms" > "blackouts"."from_ms")
);
--> statement-breakpoint
CREATE INDEX `blackouts_antenna` ON `blackouts` (`antenna_id`,`from_ms`);--> statement-breakpoint
CREATE TABLE `price_cards` (
	`id` text PRIMARY KEY NOT NULL,
	`antenna_id` text NOT NULL,
	`currency` text NOT NULL,
	`per_minute_minor` integer NOT NULL,
	`setup_minor` integer NOT NULL,
	`minimum_minor` integer NOT NULL,
	`terms` text NOT NULL,
	`valid_from_ms` integer NOT NULL,
	`created_ms` integer NOT NULL,
	FOREIGN KEY (`antenna_id`) REFERENCES `antennas`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "price_cards_positive" CHECK("price_cards"."per_minute_minor" >= 0 AND "price_cards"."setup_minor" >= 0 AND "price_cards"."minimum_minor" >= 0)
);
--> statement-breakpoint
CREATE INDEX `price_cards_antenna` ON `price_cards` (`antenna_id`,`valid_from_ms`);--> statement-breakpoint
CREATE TABLE `stations` (
	`id` text PRIMARY KEY NOT NULL,
	`organisation_id` text NOT NULL,
	`name` text NOT NULL,
	`latitude_deg` real NOT NULL,
	`longitude_deg` real NOT NULL,
	`altitude_m` real NOT NULL,
	`country` text NOT NULL,
	`time_zone` text NOT NULL,
	`currency` text NOT NULL,
	`description` text NOT NULL,
	`contact_name` text NOT NULL,
	`contact_phone` text NOT NULL,
	`state` text NOT NULL,
	`state_note` text NOT NULL,
	`created_ms` integer NOT NULL,
	FOREIGN KEY (`organisation_id`) REFERENCES `organisations`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "stations_state" CHECK("stations"."state" IN ('draft','waiting','approved','refused','suspended')),
	CONSTRAINT "stations_place" CHECK("stations"."latitude_deg" BETWEEN -90 AND 90 AND "stations"."longitude_deg" BETWEEN -180 AND 180)
);
--> statement-breakpoint
CREATE INDEX `stations_organisation` ON `stations` (`organisation_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `stations_name` ON `stations` (`organisation_id`,lower("name"));