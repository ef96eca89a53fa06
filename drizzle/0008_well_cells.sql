CREATE TABLE `well_cells` (
	`bits` int NOT NULL,
	`cx` int NOT NULL,
	`cy` int NOT NULL,
	`visibility` enum('published','internal','private') NOT NULL,
	`embargoed` boolean NOT NULL,
	`created_by` bigint unsigned NOT NULL,
	`well_count` int NOT NULL,
	`sum_id` bigint NOT NULL,
	`sum_mx` bigint NOT NULL,
	`sum_my` bigint NOT NULL,
	CONSTRAINT `well_cells_bits_cx_cy_visibility_embargoed_created_by_pk` PRIMARY KEY(`bits`,`cx`,`cy`,`visibility`,`embargoed`,`created_by`)
);--> statement-breakpoint
INSERT INTO `well_cells` (`bits`, `cx`, `cy`, `visibility`, `embargoed`, `created_by`, `well_count`, `sum_id`, `sum_mx`, `sum_my`)
	SELECT `level`.`bits`, `mx` >> `level`.`bits` AS `x`, `my` >> `level`.`bits` AS `y`, `visibility`, `embargo_until` IS NOT NULL AS `held`, IFNULL(`created_by`, 0) AS `owner`,
		COUNT(*), SUM(`id`), SUM(`mx`), SUM(`my`)
	FROM `wells` CROSS JOIN (SELECT 12 AS `bits` UNION ALL SELECT 14 UNION ALL SELECT 16) AS `level`
	GROUP BY `level`.`bits`, `x`, `y`, `visibility`, `held`, `owner`;
