CREATE TABLE `other_wells` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`pumping_test_id` bigint unsigned NOT NULL,
	`well_id` bigint unsigned,
	`label` varchar(40) NOT NULL,
	`place` json NOT NULL,
	`rate_steps` json NOT NULL,
	`fitted` boolean NOT NULL,
	`active` boolean NOT NULL,
	`created_by` bigint unsigned,
	`created_at` datetime(3) NOT NULL,
	`changed_by` bigint unsigned,
	`changed_at` datetime(3) NOT NULL,
	`deleted_at` datetime(3),
	`row_version` int NOT NULL DEFAULT 1,
	CONSTRAINT `other_wells_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `outside_readings` (
	`series_id` bigint unsigned NOT NULL,
	`seq` int NOT NULL,
	`file_row` int NOT NULL,
	`raw` varchar(1000) NOT NULL,
	`elapsed_s` double,
	`value` double,
	`taken` boolean NOT NULL,
	`flags` varchar(300) NOT NULL,
	`issues` json,
	CONSTRAINT `outside_readings_series_id_seq_pk` PRIMARY KEY(`series_id`,`seq`)
);
--> statement-breakpoint
CREATE TABLE `outside_series` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`pumping_test_id` bigint unsigned NOT NULL,
	`quantity` enum('air-pressure','river-stage','tide-gauge') NOT NULL,
	`label` varchar(60) NOT NULL,
	`file_name` varchar(200) NOT NULL,
	`file_sha256` varchar(64) NOT NULL,
	`mapping` json NOT NULL,
	`row_count` int NOT NULL,
	`taken_count` int NOT NULL,
	`first_s` double NOT NULL,
	`last_s` double NOT NULL,
	`lowest` double NOT NULL,
	`highest` double NOT NULL,
	`created_by` bigint unsigned,
	`created_at` datetime(3) NOT NULL,
	`deleted_at` datetime(3),
	`row_version` int NOT NULL DEFAULT 1,
	CONSTRAINT `outside_series_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `test_corrections` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`pumping_test_id` bigint unsigned NOT NULL,
	`kind` varchar(20) NOT NULL,
	`settings` json NOT NULL,
	`outside_series_id` bigint unsigned,
	`well_ids` json,
	`active` boolean NOT NULL,
	`created_by` bigint unsigned,
	`created_at` datetime(3) NOT NULL,
	`changed_by` bigint unsigned,
	`changed_at` datetime(3) NOT NULL,
	`deleted_at` datetime(3),
	`row_version` int NOT NULL DEFAULT 1,
	CONSTRAINT `test_corrections_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE INDEX `other_wells_test` ON `other_wells` (`pumping_test_id`);--> statement-breakpoint
CREATE INDEX `other_wells_well` ON `other_wells` (`well_id`);--> statement-breakpoint
CREATE INDEX `outside_series_test` ON `outside_series` (`pumping_test_id`);--> statement-breakpoint
CREATE INDEX `test_corrections_test` ON `test_corrections` (`pumping_test_id`);