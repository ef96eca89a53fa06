CREATE TABLE `analysis_editors` (
	`analysis_id` bigint unsigned NOT NULL,
	`user_id` bigint unsigned NOT NULL,
	CONSTRAINT `analysis_editors_analysis_id_user_id_pk` PRIMARY KEY(`analysis_id`,`user_id`)
);--> statement-breakpoint
INSERT IGNORE INTO `analysis_editors` SELECT `id`, `created_by` FROM `analyses` WHERE `created_by` IS NOT NULL;--> statement-breakpoint
INSERT IGNORE INTO `analysis_editors` SELECT `analyses`.`id`, `audit_trail`.`actor_id` FROM `analyses` INNER JOIN `audit_trail` ON `audit_trail`.`subject` = 'analysis' AND `audit_trail`.`subject_id` = `analyses`.`id` WHERE `audit_trail`.`action` IN ('analyses/edit','analyses/submit') AND `audit_trail`.`actor_id` IS NOT NULL;
