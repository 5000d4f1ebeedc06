DROP INDEX `reports_study` ON `reports`;--> statement-breakpoint
ALTER TABLE `reports` ADD CONSTRAINT `reports_number` UNIQUE(`study_id`,`number`);