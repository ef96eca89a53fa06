CREATE TABLE `password_tokens` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`user_id` bigint unsigned NOT NULL,
	`purpose` enum('invitation','reset','first-administrator') NOT NULL,
	`token_hash` varchar(64) NOT NULL,
	`expires_at` datetime(3) NOT NULL,
	`used_at` datetime(3),
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `password_tokens_id` PRIMARY KEY(`id`),
	CONSTRAINT `password_tokens_hash` UNIQUE(`token_hash`)
);
--> statement-breakpoint
CREATE TABLE `rate_limits` (
	`id` varchar(190) NOT NULL,
	`hits` int NOT NULL,
	`reset_at` datetime(3) NOT NULL,
	CONSTRAINT `rate_limits_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `sessions` (
	`id` varchar(128) NOT NULL,
	`user_id` bigint unsigned,
	`data` json NOT NULL,
	`created_at` datetime(3) NOT NULL,
	`expires_at` datetime(3) NOT NULL,
	CONSTRAINT `sessions_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `users` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`email` varchar(254) NOT NULL,
	`name` varchar(120) NOT NULL,
	`role` enum('reader','analyst','steward','administrator') NOT NULL,
	`may_review` boolean NOT NULL DEFAULT false,
	`active` boolean NOT NULL DEFAULT true,
	`demo` boolean NOT NULL DEFAULT false,
	`password_hash` varchar(255),
	`preferences` json,
	`created_at` datetime(3) NOT NULL,
	`last_seen_at` datetime(3),
	`row_version` int NOT NULL DEFAULT 1,
	CONSTRAINT `users_id` PRIMARY KEY(`id`),
	CONSTRAINT `users_email` UNIQUE(`email`)
);
--> statement-breakpoint
CREATE TABLE `aquifer_units` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`code` varchar(20) NOT NULL,
	`name` varchar(120) NOT NULL,
	`kind` enum('confined','leaky','unconfined','aquitard') NOT NULL,
	`parent_id` bigint unsigned,
	`depth_order` int NOT NULL,
	`outline` polygon NOT NULL,
	`description` text,
	`row_version` int NOT NULL DEFAULT 1,
	CONSTRAINT `aquifer_units_id` PRIMARY KEY(`id`),
	CONSTRAINT `aquifer_units_code` UNIQUE(`code`)
);
--> statement-breakpoint
CREATE TABLE `boundaries` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`name` varchar(120) NOT NULL,
	`kind` enum('fault','barrier','coast','constant-head') NOT NULL,
	`path` linestring NOT NULL,
	CONSTRAINT `boundaries_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `boundary_units` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`boundary_id` bigint unsigned NOT NULL,
	`unit_id` bigint unsigned NOT NULL,
	CONSTRAINT `boundary_units_id` PRIMARY KEY(`id`),
	CONSTRAINT `boundary_units_pair` UNIQUE(`boundary_id`,`unit_id`)
);
--> statement-breakpoint
CREATE TABLE `region` (
	`id` int NOT NULL,
	`name` varchar(120) NOT NULL,
	`epsg` int NOT NULL,
	`extent` json NOT NULL,
	`unit_system` varchar(20) NOT NULL,
	`zone` varchar(60) NOT NULL,
	`open_to_visitors` boolean NOT NULL DEFAULT false,
	`row_version` int NOT NULL DEFAULT 1,
	CONSTRAINT `region_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `streams` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`name` varchar(120) NOT NULL,
	`stream_order` int NOT NULL,
	`path` linestring NOT NULL,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `streams_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `unit_picks` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`well_id` bigint unsigned NOT NULL,
	`unit_id` bigint unsigned NOT NULL,
	`top_m` double NOT NULL,
	`bottom_m` double,
	`source` varchar(200) NOT NULL,
	CONSTRAINT `unit_picks_id` PRIMARY KEY(`id`),
	CONSTRAINT `unit_picks_pair` UNIQUE(`well_id`,`unit_id`)
);
--> statement-breakpoint
CREATE TABLE `unit_streams` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`unit_id` bigint unsigned NOT NULL,
	`stream_id` bigint unsigned NOT NULL,
	CONSTRAINT `unit_streams_id` PRIMARY KEY(`id`),
	CONSTRAINT `unit_streams_pair` UNIQUE(`unit_id`,`stream_id`)
);
--> statement-breakpoint
CREATE TABLE `well_screens` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`well_id` bigint unsigned NOT NULL,
	`top_m` double NOT NULL,
	`bottom_m` double NOT NULL,
	`valid_from` datetime(3),
	`valid_to` datetime(3),
	CONSTRAINT `well_screens_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `wells` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`code` varchar(40) NOT NULL,
	`name` varchar(120),
	`kind` enum('well','piezometer','planned') NOT NULL,
	`position` point NOT NULL,
	`mx` int NOT NULL,
	`my` int NOT NULL,
	`original_x` double NOT NULL,
	`original_y` double NOT NULL,
	`original_epsg` int NOT NULL,
	`position_operation` varchar(200) NOT NULL,
	`position_accuracy_m` double NOT NULL,
	`ground_elevation_m` double,
	`measuring_point_m` double,
	`vertical_datum` varchar(40),
	`depth_m` double,
	`well_radius_m` double,
	`casing_radius_m` double,
	`static_depth_m` double,
	`drilled_year` int,
	`owner_label` varchar(120),
	`notes` text,
	`visibility` enum('published','internal','private') NOT NULL,
	`embargo_until` datetime(3),
	`created_by` bigint unsigned,
	`created_at` datetime(3) NOT NULL,
	`row_version` int NOT NULL DEFAULT 1,
	CONSTRAINT `wells_id` PRIMARY KEY(`id`),
	CONSTRAINT `wells_code` UNIQUE(`code`)
);
--> statement-breakpoint
CREATE TABLE `pumping_tests` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`kind` enum('constant-rate','reported') NOT NULL,
	`well_id` bigint unsigned NOT NULL,
	`start_at` datetime(3) NOT NULL,
	`start_precision` enum('instant','day','year') NOT NULL,
	`zone` varchar(60) NOT NULL,
	`aquifer` enum('confined','leaky','unconfined') NOT NULL,
	`interval_top_m` double,
	`interval_bottom_m` double,
	`interval_basis` enum('screens','packers','open-hole','unknown') NOT NULL,
	`thickness_m` double,
	`thickness_basis` enum('aquifer','screen','saturated','unknown') NOT NULL,
	`thickness_error` double NOT NULL,
	`rate_error` double NOT NULL,
	`conditions` text,
	`source` varchar(300),
	`visibility` enum('published','internal','private') NOT NULL,
	`embargo_until` datetime(3),
	`created_by` bigint unsigned,
	`created_at` datetime(3) NOT NULL,
	`row_version` int NOT NULL DEFAULT 1,
	CONSTRAINT `pumping_tests_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `rate_steps` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`pumping_test_id` bigint unsigned NOT NULL,
	`start_s` double NOT NULL,
	`rate_m_3_s` double NOT NULL,
	`entered_value` double NOT NULL,
	`entered_unit` varchar(20) NOT NULL,
	CONSTRAINT `rate_steps_id` PRIMARY KEY(`id`),
	CONSTRAINT `rate_steps_start` UNIQUE(`pumping_test_id`,`start_s`)
);
--> statement-breakpoint
CREATE TABLE `reading_edits` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`series_id` bigint unsigned NOT NULL,
	`seq` int NOT NULL,
	`action` enum('leave-out','take') NOT NULL,
	`reason` varchar(300) NOT NULL,
	`created_by` bigint unsigned,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `reading_edits_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `reading_series` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`pumping_test_id` bigint unsigned NOT NULL,
	`test_well_id` bigint unsigned NOT NULL,
	`quantity` enum('depth','level','drawdown') NOT NULL,
	`file_name` varchar(200) NOT NULL,
	`file_sha256` varchar(64) NOT NULL,
	`mapping` json NOT NULL,
	`row_count` int NOT NULL,
	`taken_count` int NOT NULL,
	`created_by` bigint unsigned,
	`created_at` datetime(3) NOT NULL,
	`deleted_at` datetime(3),
	`row_version` int NOT NULL DEFAULT 1,
	CONSTRAINT `reading_series_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `readings` (
	`series_id` bigint unsigned NOT NULL,
	`seq` int NOT NULL,
	`file_row` int NOT NULL,
	`raw` varchar(1000) NOT NULL,
	`elapsed_s` double,
	`value_m` double,
	`taken` boolean NOT NULL,
	`flags` varchar(300) NOT NULL,
	`issues` json,
	CONSTRAINT `readings_series_id_seq_pk` PRIMARY KEY(`series_id`,`seq`)
);
--> statement-breakpoint
CREATE TABLE `test_units` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`pumping_test_id` bigint unsigned NOT NULL,
	`unit_id` bigint unsigned NOT NULL,
	`share` double NOT NULL,
	`basis` enum('single-unit','flow-log','judgement') NOT NULL,
	CONSTRAINT `test_units_id` PRIMARY KEY(`id`),
	CONSTRAINT `test_units_pair` UNIQUE(`pumping_test_id`,`unit_id`)
);
--> statement-breakpoint
CREATE TABLE `test_wells` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`pumping_test_id` bigint unsigned NOT NULL,
	`well_id` bigint unsigned NOT NULL,
	`role` enum('pumped','observation') NOT NULL,
	`distance_m` double NOT NULL,
	`distance_sd_m` double NOT NULL,
	`distance_basis` enum('measured','map','override') NOT NULL,
	`distance_reason` varchar(300),
	`static_level_m` double,
	`static_basis` enum('given','mean-before-pumping') NOT NULL,
	CONSTRAINT `test_wells_id` PRIMARY KEY(`id`),
	CONSTRAINT `test_wells_pair` UNIQUE(`pumping_test_id`,`well_id`)
);
--> statement-breakpoint
CREATE TABLE `adopted_values` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`pumping_test_id` bigint unsigned NOT NULL,
	`analysis_id` bigint unsigned NOT NULL,
	`well_id` bigint unsigned NOT NULL,
	`unit_id` bigint unsigned NOT NULL,
	`quantity` enum('T','S','K') NOT NULL,
	`storage_class` enum('elastic','specific-yield','apparent','unclassified'),
	`log10_value` double NOT NULL,
	`log10_error` double NOT NULL,
	`evidence` enum('firm','fair','slight') NOT NULL,
	`method` varchar(40) NOT NULL,
	`origin` enum('observation-well','pumped-well','slug-test','other') NOT NULL,
	`thickness_basis` enum('aquifer','screen','saturated','unknown') NOT NULL,
	`composite` boolean NOT NULL DEFAULT false,
	`usable` boolean NOT NULL DEFAULT true,
	`test_year` int NOT NULL,
	`valid_from` datetime(3) NOT NULL,
	`valid_to` datetime(3),
	`replaced_by` bigint unsigned,
	`adopted_by` bigint unsigned,
	`review_id` bigint unsigned,
	CONSTRAINT `adopted_values_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `analyses` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`pumping_test_id` bigint unsigned NOT NULL,
	`method` varchar(40) NOT NULL,
	`method_version` int NOT NULL,
	`state` enum('draft','submitted','accepted','returned','withdrawn') NOT NULL,
	`inputs` json NOT NULL,
	`inputs_sha256` varchar(64) NOT NULL,
	`inputs_changed` boolean NOT NULL DEFAULT false,
	`options` json,
	`result` json NOT NULL,
	`label` varchar(120),
	`rationale` text,
	`submitted_at` datetime(3),
	`created_by` bigint unsigned,
	`created_at` datetime(3) NOT NULL,
	`row_version` int NOT NULL DEFAULT 1,
	CONSTRAINT `analyses_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `data_versions` (
	`unit_id` bigint unsigned NOT NULL,
	`version` int NOT NULL,
	CONSTRAINT `data_versions_unit_id` PRIMARY KEY(`unit_id`)
);
--> statement-breakpoint
CREATE TABLE `reviews` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`analysis_id` bigint unsigned NOT NULL,
	`decision` enum('accepted','returned') NOT NULL,
	`comment` text,
	`reviewer_id` bigint unsigned,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `reviews_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `variogram_models` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`unit_id` bigint unsigned NOT NULL,
	`quantity` varchar(4) NOT NULL,
	`scope` enum('published','internal') NOT NULL,
	`data_version` int NOT NULL,
	`value_count` int NOT NULL,
	`model` json NOT NULL,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `variogram_models_id` PRIMARY KEY(`id`),
	CONSTRAINT `variogram_models_key` UNIQUE(`unit_id`,`quantity`,`scope`,`data_version`)
);
--> statement-breakpoint
CREATE TABLE `audit_trail` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`at` datetime(3) NOT NULL,
	`actor_id` bigint unsigned,
	`actor_name` varchar(120) NOT NULL,
	`action` varchar(60) NOT NULL,
	`subject` varchar(40) NOT NULL,
	`subject_id` bigint unsigned,
	`details` json NOT NULL,
	CONSTRAINT `audit_trail_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `idempotency_keys` (
	`id` varchar(190) NOT NULL,
	`request_sha256` varchar(64) NOT NULL,
	`status` int,
	`response` json,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `idempotency_keys_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `jobs` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`kind` varchar(40) NOT NULL,
	`payload` json NOT NULL,
	`state` enum('waiting','running','done','failed','cancelled') NOT NULL,
	`unique_key` varchar(120),
	`done` int NOT NULL DEFAULT 0,
	`total` int,
	`message` varchar(300),
	`result` json,
	`error_code` varchar(80),
	`error_detail` text,
	`attempts` int NOT NULL DEFAULT 0,
	`max_attempts` int NOT NULL DEFAULT 3,
	`cancel_requested` boolean NOT NULL DEFAULT false,
	`claimed_by` varchar(80),
	`heartbeat_at` datetime(3),
	`run_at` datetime(3) NOT NULL,
	`created_by` bigint unsigned,
	`created_at` datetime(3) NOT NULL,
	`finished_at` datetime(3),
	CONSTRAINT `jobs_id` PRIMARY KEY(`id`),
	CONSTRAINT `jobs_unique` UNIQUE(`unique_key`)
);
--> statement-breakpoint
CREATE TABLE `leases` (
	`name` varchar(80) NOT NULL,
	`holder` varchar(80) NOT NULL,
	`expires_at` datetime(3) NOT NULL,
	CONSTRAINT `leases_name` PRIMARY KEY(`name`)
);
--> statement-breakpoint
CREATE TABLE `mail_outbox` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`recipient` varchar(254) NOT NULL,
	`subject` varchar(200) NOT NULL,
	`body` text NOT NULL,
	`state` enum('waiting','sent','failed') NOT NULL,
	`error` text,
	`created_at` datetime(3) NOT NULL,
	`sent_at` datetime(3),
	CONSTRAINT `mail_outbox_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE INDEX `password_tokens_user` ON `password_tokens` (`user_id`);--> statement-breakpoint
CREATE INDEX `rate_limits_reset` ON `rate_limits` (`reset_at`);--> statement-breakpoint
CREATE INDEX `sessions_user` ON `sessions` (`user_id`);--> statement-breakpoint
CREATE INDEX `sessions_expiry` ON `sessions` (`expires_at`);--> statement-breakpoint
CREATE INDEX `streams_name` ON `streams` (`name`);--> statement-breakpoint
CREATE INDEX `unit_picks_unit` ON `unit_picks` (`unit_id`);--> statement-breakpoint
CREATE INDEX `well_screens_well` ON `well_screens` (`well_id`);--> statement-breakpoint
CREATE INDEX `wells_mercator` ON `wells` (`mx`,`my`,`visibility`,`embargo_until`);--> statement-breakpoint
CREATE INDEX `pumping_tests_well` ON `pumping_tests` (`well_id`);--> statement-breakpoint
CREATE INDEX `pumping_tests_start` ON `pumping_tests` (`start_at`);--> statement-breakpoint
CREATE INDEX `reading_edits_series` ON `reading_edits` (`series_id`,`seq`);--> statement-breakpoint
CREATE INDEX `reading_series_test` ON `reading_series` (`pumping_test_id`);--> statement-breakpoint
CREATE INDEX `adopted_values_current` ON `adopted_values` (`unit_id`,`quantity`,`valid_to`);--> statement-breakpoint
CREATE INDEX `adopted_values_valid` ON `adopted_values` (`valid_to`,`quantity`);--> statement-breakpoint
CREATE INDEX `adopted_values_test` ON `adopted_values` (`pumping_test_id`);--> statement-breakpoint
CREATE INDEX `adopted_values_well` ON `adopted_values` (`well_id`,`valid_to`);--> statement-breakpoint
CREATE INDEX `adopted_values_analysis` ON `adopted_values` (`analysis_id`);--> statement-breakpoint
CREATE INDEX `analyses_test` ON `analyses` (`pumping_test_id`);--> statement-breakpoint
CREATE INDEX `analyses_state` ON `analyses` (`state`);--> statement-breakpoint
CREATE INDEX `reviews_analysis` ON `reviews` (`analysis_id`);--> statement-breakpoint
CREATE INDEX `audit_trail_at` ON `audit_trail` (`at`);--> statement-breakpoint
CREATE INDEX `audit_trail_subject` ON `audit_trail` (`subject`,`subject_id`);--> statement-breakpoint
CREATE INDEX `audit_trail_actor` ON `audit_trail` (`actor_id`);--> statement-breakpoint
CREATE INDEX `idempotency_keys_age` ON `idempotency_keys` (`created_at`);--> statement-breakpoint
CREATE INDEX `jobs_ready` ON `jobs` (`state`,`run_at`);--> statement-breakpoint
CREATE INDEX `mail_outbox_created` ON `mail_outbox` (`created_at`);