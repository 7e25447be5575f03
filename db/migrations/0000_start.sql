CREATE TABLE `audit_entry` (
	`id` text PRIMARY KEY NOT NULL,
	`dealership_id` text NOT NULL,
	`person_id` text,
	`operation_id` text,
	`at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	`verb` text NOT NULL,
	`thing` text NOT NULL,
	`thing_id` text,
	`summary` text NOT NULL,
	`detail` text
);
--> statement-breakpoint
CREATE INDEX `audit_dealership_at` ON `audit_entry` (`dealership_id`,`at`);--> statement-breakpoint
CREATE TABLE `dealership` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`current_season` integer NOT NULL,
	`soybean_price_cents_per_bushel` integer DEFAULT 1050 NOT NULL,
	`created_at` integer DEFAULT (unixepoch() * 1000) NOT NULL
);
--> statement-breakpoint
CREATE TABLE `invitation` (
	`id` text PRIMARY KEY NOT NULL,
	`dealership_id` text NOT NULL,
	`email` text NOT NULL,
	`name` text NOT NULL,
	`role` text NOT NULL,
	`operation_id` text,
	`token_hash` text NOT NULL,
	`invited_by_person_id` text NOT NULL,
	`expires_at` integer NOT NULL,
	`accepted_at` integer,
	`withdrawn_at` integer,
	`created_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	FOREIGN KEY (`dealership_id`) REFERENCES `dealership`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `invitation_token` ON `invitation` (`token_hash`);--> statement-breakpoint
CREATE INDEX `invitation_dealership` ON `invitation` (`dealership_id`);--> statement-breakpoint
CREATE TABLE `outbox_mail` (
	`id` text PRIMARY KEY NOT NULL,
	`dealership_id` text,
	`to` text NOT NULL,
	`subject` text NOT NULL,
	`text` text NOT NULL,
	`html` text NOT NULL,
	`dedupe_key` text NOT NULL,
	`state` text NOT NULL,
	`attempts` integer DEFAULT 0 NOT NULL,
	`next_attempt_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	`last_error` text,
	`created_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	`sent_at` integer
);
--> statement-breakpoint
CREATE UNIQUE INDEX `outbox_dedupe` ON `outbox_mail` (`dedupe_key`);--> statement-breakpoint
CREATE INDEX `outbox_state` ON `outbox_mail` (`state`,`next_attempt_at`);--> statement-breakpoint
CREATE TABLE `password_reset` (
	`id` text PRIMARY KEY NOT NULL,
	`person_id` text NOT NULL,
	`token_hash` text NOT NULL,
	`expires_at` integer NOT NULL,
	`used_at` integer,
	`created_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	FOREIGN KEY (`person_id`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `password_reset_token` ON `password_reset` (`token_hash`);--> statement-breakpoint
CREATE TABLE `person` (
	`id` text PRIMARY KEY NOT NULL,
	`dealership_id` text NOT NULL,
	`email` text NOT NULL,
	`name` text NOT NULL,
	`role` text NOT NULL,
	`password_hash` text NOT NULL,
	`wants_mail` integer DEFAULT true NOT NULL,
	`disabled_at` integer,
	`created_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	FOREIGN KEY (`dealership_id`) REFERENCES `dealership`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `person_email` ON `person` (`email`);--> statement-breakpoint
CREATE INDEX `person_dealership` ON `person` (`dealership_id`);--> statement-breakpoint
CREATE TABLE `session` (
	`id` text PRIMARY KEY NOT NULL,
	`user_id` text NOT NULL,
	`expires_at` integer NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `session_user` ON `session` (`user_id`);--> statement-breakpoint
CREATE TABLE `sign_in_try` (
	`key` text PRIMARY KEY NOT NULL,
	`failures` integer NOT NULL,
	`last_failure_at` integer NOT NULL
);
--> statement-breakpoint
CREATE TABLE `field_facts` (
	`field_id` text NOT NULL,
	`season` integer NOT NULL,
	`row_width_inches` real,
	`planting_date` text,
	`population_seeds_per_acre` integer,
	`seed_treated` integer,
	`tillage` text,
	`irrigated` integer,
	`drainage` text,
	`tiled` integer,
	`last_crop` text,
	`soybean_years_of_last_four` integer,
	`yield_goal_bushels_per_acre` real,
	`yield_history_bushels_per_acre` text,
	`probe_depth_inches` real,
	`penetrometer_psi` real,
	`cyst_eggs_per_100cc` real,
	`cyst_source_last_grown` text,
	`white_mould_history` integer,
	`sudden_death_history` integer,
	`brown_stem_rot_history` integer,
	`frogeye_history` integer,
	`iron_chlorosis_history` integer,
	`crusting_soil` integer,
	`weed_programme` text,
	`weed_programme_actives` text,
	`sensitive_neighbours` text,
	`must_be_off_by` text,
	`must_be_off_charge_bushels_per_acre` real,
	`updated_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	PRIMARY KEY(`field_id`, `season`),
	FOREIGN KEY (`field_id`) REFERENCES `field`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `field` (
	`id` text PRIMARY KEY NOT NULL,
	`operation_id` text NOT NULL,
	`farm_id` text,
	`name` text NOT NULL,
	`boundary` text NOT NULL,
	`area_acres` real NOT NULL,
	`latitude` real NOT NULL,
	`longitude` real NOT NULL,
	`state` text,
	`elevation_ft` real,
	`upload_id` text,
	`created_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	`updated_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	`archived_at` integer,
	FOREIGN KEY (`operation_id`) REFERENCES `operation`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`farm_id`) REFERENCES `farm`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`upload_id`) REFERENCES `upload`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `field_operation` ON `field` (`operation_id`);--> statement-breakpoint
CREATE INDEX `field_upload` ON `field` (`upload_id`);--> statement-breakpoint
CREATE TABLE `farm` (
	`id` text PRIMARY KEY NOT NULL,
	`operation_id` text NOT NULL,
	`name` text NOT NULL,
	`created_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	FOREIGN KEY (`operation_id`) REFERENCES `operation`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `farm_name` ON `farm` (`operation_id`,`name`);--> statement-breakpoint
CREATE TABLE `operation_person` (
	`operation_id` text NOT NULL,
	`person_id` text NOT NULL,
	PRIMARY KEY(`operation_id`, `person_id`),
	FOREIGN KEY (`operation_id`) REFERENCES `operation`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`person_id`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `operation_person_person` ON `operation_person` (`person_id`);--> statement-breakpoint
CREATE TABLE `operation` (
	`id` text PRIMARY KEY NOT NULL,
	`dealership_id` text NOT NULL,
	`name` text NOT NULL,
	`state` text,
	`county` text,
	`note` text,
	`created_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	`archived_at` integer,
	FOREIGN KEY (`dealership_id`) REFERENCES `dealership`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `operation_name` ON `operation` (`dealership_id`,`name`);--> statement-breakpoint
CREATE TABLE `laboratory_layout` (
	`id` text PRIMARY KEY NOT NULL,
	`dealership_id` text NOT NULL,
	`header_signature` text NOT NULL,
	`laboratory` text,
	`columns` text NOT NULL,
	`updated_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	FOREIGN KEY (`dealership_id`) REFERENCES `dealership`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `laboratory_layout_signature` ON `laboratory_layout` (`dealership_id`,`header_signature`);--> statement-breakpoint
CREATE TABLE `upload_chunk` (
	`file_id` text NOT NULL,
	`ordinal` integer NOT NULL,
	`compressed` integer NOT NULL,
	`bytes` blob NOT NULL,
	PRIMARY KEY(`file_id`, `ordinal`),
	FOREIGN KEY (`file_id`) REFERENCES `upload_file`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `upload_file` (
	`id` text PRIMARY KEY NOT NULL,
	`upload_id` text NOT NULL,
	`ordinal` integer NOT NULL,
	`name` text NOT NULL,
	`size_bytes` integer NOT NULL,
	`sha256` text NOT NULL,
	FOREIGN KEY (`upload_id`) REFERENCES `upload`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `upload_file_upload` ON `upload_file` (`upload_id`);--> statement-breakpoint
CREATE TABLE `upload` (
	`id` text PRIMARY KEY NOT NULL,
	`dealership_id` text NOT NULL,
	`operation_id` text,
	`person_id` text NOT NULL,
	`kind` text NOT NULL,
	`season` integer NOT NULL,
	`state` text NOT NULL,
	`inspection` text,
	`choices` text,
	`problems` text,
	`outcome` text,
	`created_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	`kept_at` integer,
	`undone_at` integer,
	FOREIGN KEY (`dealership_id`) REFERENCES `dealership`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`operation_id`) REFERENCES `operation`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`person_id`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `upload_operation` ON `upload` (`operation_id`);--> statement-breakpoint
CREATE INDEX `upload_dealership` ON `upload` (`dealership_id`);--> statement-breakpoint
CREATE TABLE `seed_lot` (
	`id` text PRIMARY KEY NOT NULL,
	`variety_id` text NOT NULL,
	`lot_number` text NOT NULL,
	`seeds_per_lb` real,
	`germination_percent` real,
	`treatment` text,
	`unit_size_seeds` integer DEFAULT 140000 NOT NULL,
	`units_on_hand` real DEFAULT 0 NOT NULL,
	`price_cents_per_unit` integer,
	`created_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	`updated_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	`archived_at` integer,
	FOREIGN KEY (`variety_id`) REFERENCES `variety`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `seed_lot_number` ON `seed_lot` (`variety_id`,`lot_number`);--> statement-breakpoint
CREATE INDEX `seed_lot_variety` ON `seed_lot` (`variety_id`);--> statement-breakpoint
CREATE TABLE `variety` (
	`id` text PRIMARY KEY NOT NULL,
	`dealership_id` text NOT NULL,
	`season` integer NOT NULL,
	`code` text NOT NULL,
	`relative_maturity` real NOT NULL,
	`height` text,
	`bush_type` text,
	`standability` real,
	`emergence` real,
	`phytophthora_genes` text NOT NULL,
	`phytophthora` real,
	`sudden_death` real,
	`brown_stem_rot` real,
	`white_mould` real,
	`frogeye` real,
	`stem_canker` real,
	`charcoal_rot` real,
	`iron_chlorosis` real,
	`drought` real,
	`cyst_nematode_source` text,
	`tolerances` text NOT NULL,
	`release` text DEFAULT 'full' NOT NULL,
	`published` integer DEFAULT false NOT NULL,
	`note` text,
	`upload_id` text,
	`revision` integer DEFAULT 1 NOT NULL,
	`created_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	`updated_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	`archived_at` integer,
	FOREIGN KEY (`dealership_id`) REFERENCES `dealership`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`upload_id`) REFERENCES `upload`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `variety_code` ON `variety` (`dealership_id`,`season`,`code`);--> statement-breakpoint
CREATE TABLE `added_station` (
	`id` text PRIMARY KEY NOT NULL,
	`dealership_id` text NOT NULL,
	`station_id` text NOT NULL,
	`name` text NOT NULL,
	`normals` text NOT NULL,
	`created_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	FOREIGN KEY (`dealership_id`) REFERENCES `dealership`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `added_station_dealership` ON `added_station` (`dealership_id`);--> statement-breakpoint
CREATE TABLE `coefficient_override` (
	`dealership_id` text NOT NULL,
	`name` text NOT NULL,
	`value` real NOT NULL,
	`changed_by_person_id` text,
	`changed_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	PRIMARY KEY(`dealership_id`, `name`),
	FOREIGN KEY (`dealership_id`) REFERENCES `dealership`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `field_score` (
	`field_id` text NOT NULL,
	`season` integer NOT NULL,
	`engine_version` text NOT NULL,
	`inputs_hash` text NOT NULL,
	`ranking` text NOT NULL,
	`scored_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	`scored_by_person_id` text,
	PRIMARY KEY(`field_id`, `season`),
	FOREIGN KEY (`field_id`) REFERENCES `field`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `field_weather` (
	`field_id` text NOT NULL,
	`year` integer NOT NULL,
	`days` text NOT NULL,
	`created_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	PRIMARY KEY(`field_id`, `year`),
	FOREIGN KEY (`field_id`) REFERENCES `field`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `maturity_zone` (
	`id` text PRIMARY KEY NOT NULL,
	`dealership_id` text NOT NULL,
	`name` text NOT NULL,
	`geometry` text NOT NULL,
	`relative_maturity_from` real NOT NULL,
	`relative_maturity_to` real NOT NULL,
	`created_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	`updated_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	FOREIGN KEY (`dealership_id`) REFERENCES `dealership`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `maturity_zone_dealership` ON `maturity_zone` (`dealership_id`);--> statement-breakpoint
CREATE TABLE `plan_event` (
	`id` text PRIMARY KEY NOT NULL,
	`plan_id` text NOT NULL,
	`person_id` text,
	`at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	`verb` text NOT NULL,
	`word` text,
	`plan_row_id` text,
	`snapshot` text,
	FOREIGN KEY (`plan_id`) REFERENCES `plan`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `plan_event_plan` ON `plan_event` (`plan_id`,`at`);--> statement-breakpoint
CREATE TABLE `plan_row` (
	`id` text PRIMARY KEY NOT NULL,
	`plan_id` text NOT NULL,
	`field_id` text NOT NULL,
	`part_name` text DEFAULT '' NOT NULL,
	`part_geometry` text,
	`area_acres` real NOT NULL,
	`variety_id` text,
	`seed_lot_id` text,
	`row_width_inches` real,
	`population_seeds_per_acre` integer,
	`locked` integer DEFAULT false NOT NULL,
	`note` text,
	`assessment` text,
	`updated_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	FOREIGN KEY (`plan_id`) REFERENCES `plan`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`field_id`) REFERENCES `field`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`variety_id`) REFERENCES `variety`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`seed_lot_id`) REFERENCES `seed_lot`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `plan_row_field_part` ON `plan_row` (`plan_id`,`field_id`,`part_name`);--> statement-breakpoint
CREATE TABLE `plan` (
	`id` text PRIMARY KEY NOT NULL,
	`operation_id` text NOT NULL,
	`season` integer NOT NULL,
	`state` text DEFAULT 'draft' NOT NULL,
	`revision` integer DEFAULT 1 NOT NULL,
	`signed_name` text,
	`signed_by_person_id` text,
	`signed_at` integer,
	`created_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	`updated_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	FOREIGN KEY (`operation_id`) REFERENCES `operation`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `plan_operation_season` ON `plan` (`operation_id`,`season`);--> statement-breakpoint
CREATE TABLE `planted_mark` (
	`id` text PRIMARY KEY NOT NULL,
	`plan_row_id` text NOT NULL,
	`sheet_link_id` text,
	`planted_on` text NOT NULL,
	`lot_number` text,
	`area_acres` real,
	`note` text,
	`photo` text,
	`received_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	FOREIGN KEY (`plan_row_id`) REFERENCES `plan_row`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `planted_mark_row` ON `planted_mark` (`plan_row_id`);--> statement-breakpoint
CREATE TABLE `sheet_link` (
	`id` text PRIMARY KEY NOT NULL,
	`plan_id` text NOT NULL,
	`token_hash` text NOT NULL,
	`created_by_person_id` text,
	`created_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	`expires_at` integer NOT NULL,
	`revoked_at` integer,
	FOREIGN KEY (`plan_id`) REFERENCES `plan`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `sheet_link_token` ON `sheet_link` (`token_hash`);--> statement-breakpoint
CREATE TABLE `soil_map_unit` (
	`id` text PRIMARY KEY NOT NULL,
	`field_id` text NOT NULL,
	`upload_id` text,
	`map_unit_key` text NOT NULL,
	`symbol` text NOT NULL,
	`name` text NOT NULL,
	`geometry` text NOT NULL,
	`area_acres` real NOT NULL,
	`share` real NOT NULL,
	`drainage` text,
	`hydrologic_group` text,
	`slope_percent` real,
	`available_water_inches` real,
	`flooding` text,
	`surface_ph` real,
	`surface_carbonate_percent` real,
	`created_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	FOREIGN KEY (`field_id`) REFERENCES `field`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`upload_id`) REFERENCES `upload`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `soil_map_unit_field` ON `soil_map_unit` (`field_id`);--> statement-breakpoint
CREATE TABLE `soil_sample` (
	`id` text PRIMARY KEY NOT NULL,
	`operation_id` text NOT NULL,
	`field_id` text,
	`upload_id` text,
	`sample_number` text,
	`laboratory` text,
	`sampled_on` text,
	`sampled_year_only` integer DEFAULT false NOT NULL,
	`latitude` real,
	`longitude` real,
	`depth_from_inches` real,
	`depth_to_inches` real,
	`ph` real,
	`salt_ph` real,
	`buffer_ph` real,
	`buffer_method` text,
	`organic_matter_percent` real,
	`cation_exchange_capacity` real,
	`phosphorus_ppm` real,
	`phosphorus_method` text,
	`potassium_ppm` real,
	`calcium_ppm` real,
	`magnesium_ppm` real,
	`carbonate_percent` real,
	`electrical_conductivity_ds_per_m` real,
	`cyst_eggs_per_100cc` real,
	`created_at` integer DEFAULT (unixepoch() * 1000) NOT NULL,
	FOREIGN KEY (`operation_id`) REFERENCES `operation`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`field_id`) REFERENCES `field`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`upload_id`) REFERENCES `upload`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `soil_sample_operation` ON `soil_sample` (`operation_id`);--> statement-breakpoint
CREATE INDEX `soil_sample_field` ON `soil_sample` (`field_id`);--> statement-breakpoint
CREATE INDEX `soil_sample_upload` ON `soil_sample` (`upload_id`);