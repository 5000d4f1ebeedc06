DROP INDEX `imports_study` ON `imports`;--> statement-breakpoint
ALTER TABLE `imports` ADD CONSTRAINT `imports_number` UNIQUE(`study_id`,`number`);