ALTER TABLE `wells` DROP INDEX `wells_mercator`, ADD INDEX `wells_mercator` (`mx`,`my`,`visibility`,`embargo_until`,`created_by`);
