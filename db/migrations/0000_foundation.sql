CREATE TABLE `analyses` (
	`id` char(36) NOT NULL,
	`study_id` char(36) NOT NULL,
	`version` int NOT NULL DEFAULT 1,
	`created_at` datetime(3) NOT NULL,
	`dataset_id` char(36) NOT NULL,
	`number` int NOT NULL,
	`kind` enum('accuracy','agreement') NOT NULL,
	`badge` enum('planned','plannedAmended','exploratory') NOT NULL,
	`title` varchar(200) NOT NULL,
	`parameters` json NOT NULL,
	`protocol_version` int NOT NULL,
	`statistics_version` varchar(20) NOT NULL,
	`seed` int NOT NULL,
	`result` mediumtext NOT NULL,
	`result_hash` char(64) NOT NULL,
	`run_by` char(36) NOT NULL,
	`run_at` datetime(3) NOT NULL,
	CONSTRAINT `analyses_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `analytes` (
	`id` char(36) NOT NULL,
	`study_id` char(36) NOT NULL,
	`version` int NOT NULL DEFAULT 1,
	`created_at` datetime(3) NOT NULL,
	`key` varchar(40) NOT NULL,
	`name` varchar(80) NOT NULL,
	`formula` varchar(20),
	`cas_number` varchar(12),
	`molar_mass_g_per_mol` double,
	`unit` varchar(20) NOT NULL,
	CONSTRAINT `analytes_id` PRIMARY KEY(`id`),
	CONSTRAINT `analytes_key` UNIQUE(`study_id`,`key`)
);
--> statement-breakpoint
CREATE TABLE `audit_chains` (
	`id` varchar(36) NOT NULL,
	`count` bigint NOT NULL,
	`head_hash` char(64) NOT NULL,
	CONSTRAINT `audit_chains_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `audit_events` (
	`chain_id` varchar(36) NOT NULL,
	`position` bigint NOT NULL,
	`event` varchar(60) NOT NULL,
	`record_type` varchar(40) NOT NULL,
	`record_id` varchar(36) NOT NULL,
	`record_label` varchar(120),
	`record_site_id` char(36),
	`information_class` enum('none','index','reference','linked') NOT NULL,
	`person_id` char(36),
	`person_name` varchar(200) NOT NULL,
	`role` varchar(20),
	`duty` varchar(20),
	`site_id` char(36),
	`reason` varchar(500),
	`collected_at` datetime(3),
	`entered_at` datetime(3),
	`received_at` datetime(3) NOT NULL,
	`local_offset` varchar(6),
	`request_id` varchar(36) NOT NULL,
	`digests` json NOT NULL,
	`previous_hash` char(64) NOT NULL,
	`hash` char(64) NOT NULL,
	CONSTRAINT `audit_events_chain_id_position_pk` PRIMARY KEY(`chain_id`,`position`)
);
--> statement-breakpoint
CREATE TABLE `audit_values` (
	`chain_id` varchar(36) NOT NULL,
	`position` bigint NOT NULL,
	`ordinal` int NOT NULL,
	`field` varchar(80) NOT NULL,
	`information_class` enum('none','index','reference','linked') NOT NULL,
	`old_value` mediumtext,
	`old_salt` char(32),
	`new_value` mediumtext,
	`new_salt` char(32),
	`redacted_at` datetime(3),
	CONSTRAINT `audit_values_chain_id_position_ordinal_pk` PRIMARY KEY(`chain_id`,`position`,`ordinal`)
);
--> statement-breakpoint
CREATE TABLE `dataset_rows` (
	`dataset_id` char(36) NOT NULL,
	`position` int NOT NULL,
	`row` json NOT NULL,
	`hash` char(64) NOT NULL,
	CONSTRAINT `dataset_rows_dataset_id_position_pk` PRIMARY KEY(`dataset_id`,`position`)
);
--> statement-breakpoint
CREATE TABLE `datasets` (
	`id` char(36) NOT NULL,
	`study_id` char(36) NOT NULL,
	`version` int NOT NULL DEFAULT 1,
	`created_at` datetime(3) NOT NULL,
	`lock_id` char(36) NOT NULL,
	`frozen_at` datetime(3) NOT NULL,
	`protocol_version_id` char(36) NOT NULL,
	`subject_count` int NOT NULL,
	`row_count` int NOT NULL,
	`hash` char(64) NOT NULL,
	`manifest` json NOT NULL,
	`audit_count` bigint NOT NULL,
	`audit_head_hash` char(64) NOT NULL,
	CONSTRAINT `datasets_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `import_chunks` (
	`import_id` char(36) NOT NULL,
	`position` int NOT NULL,
	`bytes` mediumblob NOT NULL,
	CONSTRAINT `import_chunks_import_id_position_pk` PRIMARY KEY(`import_id`,`position`)
);
--> statement-breakpoint
CREATE TABLE `import_rows` (
	`import_id` char(36) NOT NULL,
	`line` int NOT NULL,
	`fate` enum('new','same','refused') NOT NULL,
	`entry` json,
	`problems` json NOT NULL,
	`subject_code` varchar(16),
	CONSTRAINT `import_rows_import_id_line_pk` PRIMARY KEY(`import_id`,`line`)
);
--> statement-breakpoint
CREATE TABLE `imports` (
	`id` char(36) NOT NULL,
	`study_id` char(36) NOT NULL,
	`version` int NOT NULL DEFAULT 1,
	`created_at` datetime(3) NOT NULL,
	`number` int NOT NULL,
	`state` enum('uploaded','previewing','previewed','entering','entered','discarded','failed') NOT NULL,
	`file_hash` char(64) NOT NULL,
	`file_bytes` int NOT NULL,
	`format` json,
	`columns` json,
	`mapping` json,
	`counts` json,
	`job_id` char(36),
	`uploaded_by` char(36) NOT NULL,
	`entered_at` datetime(3),
	CONSTRAINT `imports_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `jobs` (
	`id` char(36) NOT NULL,
	`study_id` char(36) NOT NULL,
	`kind` enum('import.preview','import.enter','report.write') NOT NULL,
	`state` enum('queued','running','done','failed','cancelled') NOT NULL,
	`record_id` char(36) NOT NULL,
	`payload` json NOT NULL,
	`started_by` char(36) NOT NULL,
	`queued_at` datetime(3) NOT NULL,
	`attempts` int NOT NULL DEFAULT 0,
	`held_until` datetime(3),
	`progress_done` int NOT NULL DEFAULT 0,
	`progress_total` int NOT NULL DEFAULT 0,
	`progress_words` varchar(120),
	`cancel_requested` boolean NOT NULL DEFAULT false,
	`finished_at` datetime(3),
	`failure` varchar(500),
	CONSTRAINT `jobs_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `locks` (
	`id` char(36) NOT NULL,
	`study_id` char(36) NOT NULL,
	`version` int NOT NULL DEFAULT 1,
	`created_at` datetime(3) NOT NULL,
	`number` int NOT NULL,
	`kind` enum('cut','final') NOT NULL,
	`state` enum('requested','returned','withdrawn','approved') NOT NULL,
	`requested_by` char(36) NOT NULL,
	`requested_at` datetime(3) NOT NULL,
	`request_note` varchar(500),
	`decided_by` char(36),
	`decided_at` datetime(3),
	`decision_note` varchar(500),
	`checklist` json,
	`dataset_id` char(36),
	`signature_id` char(36),
	CONSTRAINT `locks_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `login_attempts` (
	`id_hash` char(64) NOT NULL,
	`state` varchar(128) NOT NULL,
	`nonce` varchar(128) NOT NULL,
	`code_verifier` varchar(128) NOT NULL,
	`return_to` varchar(500) NOT NULL,
	`started_at` datetime(3) NOT NULL,
	`ends_at` datetime(3) NOT NULL,
	`signing_person_id` char(36),
	`signing_purpose` varchar(120),
	CONSTRAINT `login_attempts_id_hash` PRIMARY KEY(`id_hash`)
);
--> statement-breakpoint
CREATE TABLE `logins` (
	`id_hash` char(64) NOT NULL,
	`person_id` char(36) NOT NULL,
	`started_at` datetime(3) NOT NULL,
	`last_seen_at` datetime(3) NOT NULL,
	`ends_at` datetime(3) NOT NULL,
	`authenticated_at` datetime(3) NOT NULL,
	`id_token` text,
	CONSTRAINT `logins_id_hash` PRIMARY KEY(`id_hash`)
);
--> statement-breakpoint
CREATE TABLE `mails` (
	`id` char(36) NOT NULL,
	`study_id` char(36),
	`recipient` varchar(254) NOT NULL,
	`subject` varchar(200) NOT NULL,
	`text` text NOT NULL,
	`state` enum('waiting','sent','givenUp') NOT NULL,
	`attempts` int NOT NULL DEFAULT 0,
	`next_attempt_at` datetime(3) NOT NULL,
	`written_at` datetime(3) NOT NULL,
	`sent_at` datetime(3),
	`failure` varchar(300),
	CONSTRAINT `mails_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `members` (
	`id` char(36) NOT NULL,
	`study_id` char(36) NOT NULL,
	`version` int NOT NULL DEFAULT 1,
	`created_at` datetime(3) NOT NULL,
	`person_id` char(36) NOT NULL,
	`role` enum('coordinator','monitor','analyst') NOT NULL,
	`duty` enum('bedside','reference','siteLead','studyLead','verifyIndex','verifyReference','oversight'),
	`site_id` char(36),
	`starts_at` datetime(3) NOT NULL,
	`ends_at` datetime(3),
	`end_reason` varchar(500),
	CONSTRAINT `members_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `people` (
	`id` char(36) NOT NULL,
	`issuer` varchar(255) NOT NULL,
	`subject` varchar(255) NOT NULL,
	`name` varchar(200) NOT NULL,
	`email` varchar(254),
	`roles` json NOT NULL,
	`disabled` boolean NOT NULL DEFAULT false,
	`first_seen_at` datetime(3) NOT NULL,
	`last_seen_at` datetime(3) NOT NULL,
	CONSTRAINT `people_id` PRIMARY KEY(`id`),
	CONSTRAINT `people_issuer_subject` UNIQUE(`issuer`,`subject`)
);
--> statement-breakpoint
CREATE TABLE `protocol_versions` (
	`id` char(36) NOT NULL,
	`study_id` char(36) NOT NULL,
	`version` int NOT NULL DEFAULT 1,
	`created_at` datetime(3) NOT NULL,
	`number` int NOT NULL,
	`document` json NOT NULL,
	`document_hash` char(64) NOT NULL,
	`created_by` char(36) NOT NULL,
	CONSTRAINT `protocol_versions_id` PRIMARY KEY(`id`),
	CONSTRAINT `protocol_versions_number` UNIQUE(`study_id`,`number`)
);
--> statement-breakpoint
CREATE TABLE `rate_windows` (
	`caller` varchar(100) NOT NULL,
	`window_at` datetime(3) NOT NULL,
	`count` int NOT NULL,
	CONSTRAINT `rate_windows_caller_window_at_pk` PRIMARY KEY(`caller`,`window_at`)
);
--> statement-breakpoint
CREATE TABLE `reference_measurements` (
	`id` char(36) NOT NULL,
	`study_id` char(36) NOT NULL,
	`version` int NOT NULL DEFAULT 1,
	`created_at` datetime(3) NOT NULL,
	`site_id` char(36) NOT NULL,
	`session_id` char(36) NOT NULL,
	`analyte_id` char(36) NOT NULL,
	`value` double NOT NULL,
	CONSTRAINT `reference_measurements_id` PRIMARY KEY(`id`),
	CONSTRAINT `reference_measurements_analyte` UNIQUE(`session_id`,`analyte_id`)
);
--> statement-breakpoint
CREATE TABLE `reference_outcomes` (
	`id` char(36) NOT NULL,
	`study_id` char(36) NOT NULL,
	`version` int NOT NULL DEFAULT 1,
	`created_at` datetime(3) NOT NULL,
	`site_id` char(36) NOT NULL,
	`subject_id` char(36) NOT NULL,
	`outcome` enum('present','absent','indeterminate','notDone') NOT NULL,
	`reason` varchar(200),
	CONSTRAINT `reference_outcomes_id` PRIMARY KEY(`id`),
	CONSTRAINT `reference_outcomes_subject` UNIQUE(`subject_id`)
);
--> statement-breakpoint
CREATE TABLE `report_files` (
	`report_id` char(36) NOT NULL,
	`part` enum('open','closed') NOT NULL,
	`study_id` char(36) NOT NULL,
	`pages` int NOT NULL,
	`sha256` char(64) NOT NULL,
	`bytes` longblob NOT NULL,
	`stored_at` datetime(3) NOT NULL,
	CONSTRAINT `report_files_report_id_part_pk` PRIMARY KEY(`report_id`,`part`)
);
--> statement-breakpoint
CREATE TABLE `reports` (
	`id` char(36) NOT NULL,
	`study_id` char(36) NOT NULL,
	`version` int NOT NULL DEFAULT 1,
	`created_at` datetime(3) NOT NULL,
	`number` int NOT NULL,
	`state` enum('preparing','issued','failed') NOT NULL,
	`title` varchar(200) NOT NULL,
	`dataset_id` char(36) NOT NULL,
	`analysis_ids` json NOT NULL,
	`issued_by` char(36) NOT NULL,
	`issued_at` datetime(3) NOT NULL,
	`job_id` char(36),
	CONSTRAINT `reports_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `sessions` (
	`id` char(36) NOT NULL,
	`study_id` char(36) NOT NULL,
	`version` int NOT NULL DEFAULT 1,
	`created_at` datetime(3) NOT NULL,
	`site_id` char(36) NOT NULL,
	`subject_id` char(36) NOT NULL,
	`number` int NOT NULL,
	`started_at` datetime(3),
	CONSTRAINT `sessions_id` PRIMARY KEY(`id`),
	CONSTRAINT `sessions_number` UNIQUE(`subject_id`,`number`)
);
--> statement-breakpoint
CREATE TABLE `session_values` (
	`id` char(36) NOT NULL,
	`study_id` char(36) NOT NULL,
	`version` int NOT NULL DEFAULT 1,
	`created_at` datetime(3) NOT NULL,
	`site_id` char(36) NOT NULL,
	`session_id` char(36) NOT NULL,
	`analyte_id` char(36) NOT NULL,
	`value` double NOT NULL,
	`below_lod` boolean NOT NULL DEFAULT false,
	CONSTRAINT `session_values_id` PRIMARY KEY(`id`),
	CONSTRAINT `session_values_analyte` UNIQUE(`session_id`,`analyte_id`)
);
--> statement-breakpoint
CREATE TABLE `signatures` (
	`id` char(36) NOT NULL,
	`study_id` char(36) NOT NULL,
	`version` int NOT NULL DEFAULT 1,
	`created_at` datetime(3) NOT NULL,
	`person_id` char(36) NOT NULL,
	`printed_name` varchar(200) NOT NULL,
	`meaning` varchar(200) NOT NULL,
	`record_type` varchar(40) NOT NULL,
	`record_id` char(36) NOT NULL,
	`record_hash` char(64) NOT NULL,
	`signed_at` datetime(3) NOT NULL,
	`authenticated_at` datetime(3) NOT NULL,
	`audit_head_hash` char(64) NOT NULL,
	CONSTRAINT `signatures_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `signing_grants` (
	`id` char(36) NOT NULL,
	`person_id` char(36) NOT NULL,
	`login_id_hash` char(64) NOT NULL,
	`purpose` varchar(120) NOT NULL,
	`authenticated_at` datetime(3) NOT NULL,
	`ends_at` datetime(3) NOT NULL,
	`used_at` datetime(3),
	CONSTRAINT `signing_grants_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `sites` (
	`id` char(36) NOT NULL,
	`study_id` char(36) NOT NULL,
	`version` int NOT NULL DEFAULT 1,
	`created_at` datetime(3) NOT NULL,
	`prefix` varchar(4) NOT NULL,
	`name` varchar(120) NOT NULL,
	`planned_subjects` int,
	CONSTRAINT `sites_id` PRIMARY KEY(`id`),
	CONSTRAINT `sites_prefix` UNIQUE(`study_id`,`prefix`)
);
--> statement-breakpoint
CREATE TABLE `studies` (
	`id` char(36) NOT NULL,
	`code` varchar(20) NOT NULL,
	`title` varchar(200) NOT NULL,
	`kind` enum('prospective','earlierData') NOT NULL,
	`demonstration` boolean NOT NULL DEFAULT false,
	`version` int NOT NULL DEFAULT 1,
	`created_at` datetime(3) NOT NULL,
	`created_by` char(36) NOT NULL,
	`released_at` datetime(3),
	CONSTRAINT `studies_id` PRIMARY KEY(`id`),
	CONSTRAINT `studies_code` UNIQUE(`code`)
);
--> statement-breakpoint
CREATE TABLE `study_guards` (
	`study_id` char(36) NOT NULL,
	`locked_at` datetime(3),
	CONSTRAINT `study_guards_study_id` PRIMARY KEY(`study_id`)
);
--> statement-breakpoint
CREATE TABLE `subjects` (
	`id` char(36) NOT NULL,
	`study_id` char(36) NOT NULL,
	`version` int NOT NULL DEFAULT 1,
	`created_at` datetime(3) NOT NULL,
	`site_id` char(36) NOT NULL,
	`code` varchar(16) NOT NULL,
	`sex` enum('F','M','other','unknown'),
	`age_band` enum('0-4','5-9','10-14','15-19','20-24','25-29','30-34','35-39','40-44','45-49','50-54','55-59','60-64','65-69','70-74','75-79','80-84','85-89','90+'),
	`enrolled_at` datetime(3) NOT NULL,
	`covariates` json NOT NULL,
	`import_id` char(36),
	`source_digest` char(64),
	CONSTRAINT `subjects_id` PRIMARY KEY(`id`),
	CONSTRAINT `subjects_code` UNIQUE(`study_id`,`code`)
);
--> statement-breakpoint
CREATE INDEX `analyses_study` ON `analyses` (`study_id`,`number`);--> statement-breakpoint
CREATE INDEX `analyses_dataset` ON `analyses` (`dataset_id`);--> statement-breakpoint
CREATE INDEX `audit_events_record` ON `audit_events` (`chain_id`,`record_type`,`record_id`);--> statement-breakpoint
CREATE INDEX `audit_events_person` ON `audit_events` (`chain_id`,`person_id`,`position`);--> statement-breakpoint
CREATE INDEX `audit_events_event` ON `audit_events` (`chain_id`,`event`,`position`);--> statement-breakpoint
CREATE INDEX `datasets_study` ON `datasets` (`study_id`,`frozen_at`);--> statement-breakpoint
CREATE INDEX `imports_study` ON `imports` (`study_id`,`number`);--> statement-breakpoint
CREATE INDEX `jobs_state` ON `jobs` (`state`,`queued_at`);--> statement-breakpoint
CREATE INDEX `jobs_record` ON `jobs` (`record_id`);--> statement-breakpoint
CREATE INDEX `locks_study` ON `locks` (`study_id`,`number`);--> statement-breakpoint
CREATE INDEX `login_attempts_ends` ON `login_attempts` (`ends_at`);--> statement-breakpoint
CREATE INDEX `logins_person` ON `logins` (`person_id`);--> statement-breakpoint
CREATE INDEX `logins_ends` ON `logins` (`ends_at`);--> statement-breakpoint
CREATE INDEX `mails_waiting` ON `mails` (`state`,`next_attempt_at`);--> statement-breakpoint
CREATE INDEX `members_person` ON `members` (`person_id`,`study_id`);--> statement-breakpoint
CREATE INDEX `members_study` ON `members` (`study_id`);--> statement-breakpoint
CREATE INDEX `reference_measurements_study` ON `reference_measurements` (`study_id`,`analyte_id`);--> statement-breakpoint
CREATE INDEX `reference_outcomes_study` ON `reference_outcomes` (`study_id`,`outcome`);--> statement-breakpoint
CREATE INDEX `reports_study` ON `reports` (`study_id`,`number`);--> statement-breakpoint
CREATE INDEX `sessions_study` ON `sessions` (`study_id`,`site_id`);--> statement-breakpoint
CREATE INDEX `session_values_study` ON `session_values` (`study_id`,`analyte_id`);--> statement-breakpoint
CREATE INDEX `signatures_record` ON `signatures` (`record_type`,`record_id`);--> statement-breakpoint
CREATE INDEX `signing_grants_login` ON `signing_grants` (`login_id_hash`,`purpose`);--> statement-breakpoint
CREATE INDEX `subjects_site` ON `subjects` (`study_id`,`site_id`,`code`);--> statement-breakpoint
CREATE INDEX `subjects_import` ON `subjects` (`import_id`);--> statement-breakpoint
CREATE INDEX `subjects_source` ON `subjects` (`study_id`,`source_digest`);