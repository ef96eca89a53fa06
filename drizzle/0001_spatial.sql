CREATE SPATIAL INDEX `wells_position` ON `wells` (`position`);--> statement-breakpoint
CREATE SPATIAL INDEX `streams_path` ON `streams` (`path`);--> statement-breakpoint
CREATE SPATIAL INDEX `aquifer_units_outline` ON `aquifer_units` (`outline`);--> statement-breakpoint
CREATE SPATIAL INDEX `boundaries_path` ON `boundaries` (`path`);
