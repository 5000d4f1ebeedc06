DROP INDEX `analyses_study` ON `analyses`;--> statement-breakpoint
DROP INDEX `locks_study` ON `locks`;--> statement-breakpoint
ALTER TABLE `analyses` ADD CONSTRAINT `analyses_number` UNIQUE(`study_id`,`number`);--> statement-breakpoint
ALTER TABLE `locks` ADD CONSTRAINT `locks_number` UNIQUE(`study_id`,`number`);