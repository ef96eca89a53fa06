ALTER TABLE `pumping_tests` MODIFY COLUMN `kind` enum('constant-rate','reported','step','slug','specific-capacity') NOT NULL;--> statement-breakpoint
ALTER TABLE `pumping_tests` ADD `details` json;