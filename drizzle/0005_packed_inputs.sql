CREATE TABLE IF NOT EXISTS `analysis_input_parts` (
	`analysis_id` bigint unsigned NOT NULL,
	`part` int NOT NULL,
	`bytes` longblob NOT NULL,
	CONSTRAINT `analysis_input_parts_analysis_id_part_pk` PRIMARY KEY(`analysis_id`,`part`)
);
--> statement-breakpoint
REPLACE INTO `analysis_input_parts` SELECT `id`, 0, COMPRESS(`inputs`) FROM `analyses`;--> statement-breakpoint
ALTER TABLE `analyses` DROP COLUMN `inputs`;
