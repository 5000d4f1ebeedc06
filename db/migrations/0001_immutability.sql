-- What must never change, refused by the database itself; the service says it better and first.
CREATE TRIGGER `audit_events_refuse_update` BEFORE UPDATE ON `audit_events` FOR EACH ROW
BEGIN
  SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'append-only: audit_events never changes';
END
--> statement-breakpoint
CREATE TRIGGER `audit_events_refuse_delete` BEFORE DELETE ON `audit_events` FOR EACH ROW
BEGIN
  SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'append-only: audit_events never changes';
END
--> statement-breakpoint
CREATE TRIGGER `datasets_refuse_update` BEFORE UPDATE ON `datasets` FOR EACH ROW
BEGIN
  SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'append-only: datasets never changes';
END
--> statement-breakpoint
CREATE TRIGGER `datasets_refuse_delete` BEFORE DELETE ON `datasets` FOR EACH ROW
BEGIN
  SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'append-only: datasets never changes';
END
--> statement-breakpoint
CREATE TRIGGER `dataset_rows_refuse_update` BEFORE UPDATE ON `dataset_rows` FOR EACH ROW
BEGIN
  SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'append-only: dataset_rows never changes';
END
--> statement-breakpoint
CREATE TRIGGER `dataset_rows_refuse_delete` BEFORE DELETE ON `dataset_rows` FOR EACH ROW
BEGIN
  SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'append-only: dataset_rows never changes';
END
--> statement-breakpoint
CREATE TRIGGER `signatures_refuse_update` BEFORE UPDATE ON `signatures` FOR EACH ROW
BEGIN
  SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'append-only: signatures never changes';
END
--> statement-breakpoint
CREATE TRIGGER `signatures_refuse_delete` BEFORE DELETE ON `signatures` FOR EACH ROW
BEGIN
  SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'append-only: signatures never changes';
END
--> statement-breakpoint
CREATE TRIGGER `report_files_refuse_update` BEFORE UPDATE ON `report_files` FOR EACH ROW
BEGIN
  SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'append-only: report_files never changes';
END
--> statement-breakpoint
CREATE TRIGGER `report_files_refuse_delete` BEFORE DELETE ON `report_files` FOR EACH ROW
BEGIN
  SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'append-only: report_files never changes';
END
--> statement-breakpoint
CREATE TRIGGER `protocol_versions_refuse_update` BEFORE UPDATE ON `protocol_versions` FOR EACH ROW
BEGIN
  SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'append-only: protocol_versions never changes';
END
--> statement-breakpoint
CREATE TRIGGER `protocol_versions_refuse_delete` BEFORE DELETE ON `protocol_versions` FOR EACH ROW
BEGIN
  SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'append-only: protocol_versions never changes';
END
--> statement-breakpoint
CREATE TRIGGER `analyses_refuse_update` BEFORE UPDATE ON `analyses` FOR EACH ROW
BEGIN
  SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'append-only: analyses never changes';
END
--> statement-breakpoint
CREATE TRIGGER `analyses_refuse_delete` BEFORE DELETE ON `analyses` FOR EACH ROW
BEGIN
  SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'append-only: analyses never changes';
END
--> statement-breakpoint
CREATE TRIGGER `audit_values_refuse_delete` BEFORE DELETE ON `audit_values` FOR EACH ROW
BEGIN
  SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'append-only: audit_values are never removed';
END
--> statement-breakpoint
CREATE TRIGGER `audit_values_redaction_only` BEFORE UPDATE ON `audit_values` FOR EACH ROW
BEGIN
  -- Blanking a value and its salt is the redaction account's alone; the digest in the event stays.
  IF SUBSTRING_INDEX(USER(), '@', 1) NOT LIKE 'breathmark_redact%'
    OR NEW.`field` <> OLD.`field` OR NEW.`information_class` <> OLD.`information_class` THEN
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'append-only: audit_values change by redaction alone';
  END IF;
END
--> statement-breakpoint
CREATE TRIGGER `dataset_rows_refuse_late_insert` BEFORE INSERT ON `dataset_rows` FOR EACH ROW
BEGIN
  -- A dataset is written after its rows: once it stands, no row can join it.
  IF EXISTS (SELECT 1 FROM `datasets` WHERE `id` = NEW.`dataset_id`) THEN
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'frozen: the dataset stands';
  END IF;
END
--> statement-breakpoint
CREATE TRIGGER `subjects_locked_insert` BEFORE INSERT ON `subjects` FOR EACH ROW
BEGIN
  IF (SELECT `locked_at` FROM `study_guards` WHERE `study_id` = NEW.`study_id`) IS NOT NULL THEN
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'locked: the data of this study are locked';
  END IF;
END
--> statement-breakpoint
CREATE TRIGGER `subjects_locked_update` BEFORE UPDATE ON `subjects` FOR EACH ROW
BEGIN
  IF (SELECT `locked_at` FROM `study_guards` WHERE `study_id` = OLD.`study_id`) IS NOT NULL THEN
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'locked: the data of this study are locked';
  END IF;
END
--> statement-breakpoint
CREATE TRIGGER `subjects_locked_delete` BEFORE DELETE ON `subjects` FOR EACH ROW
BEGIN
  IF (SELECT `locked_at` FROM `study_guards` WHERE `study_id` = OLD.`study_id`) IS NOT NULL THEN
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'locked: the data of this study are locked';
  END IF;
END
--> statement-breakpoint
CREATE TRIGGER `sessions_locked_insert` BEFORE INSERT ON `sessions` FOR EACH ROW
BEGIN
  IF (SELECT `locked_at` FROM `study_guards` WHERE `study_id` = NEW.`study_id`) IS NOT NULL THEN
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'locked: the data of this study are locked';
  END IF;
END
--> statement-breakpoint
CREATE TRIGGER `sessions_locked_update` BEFORE UPDATE ON `sessions` FOR EACH ROW
BEGIN
  IF (SELECT `locked_at` FROM `study_guards` WHERE `study_id` = OLD.`study_id`) IS NOT NULL THEN
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'locked: the data of this study are locked';
  END IF;
END
--> statement-breakpoint
CREATE TRIGGER `sessions_locked_delete` BEFORE DELETE ON `sessions` FOR EACH ROW
BEGIN
  IF (SELECT `locked_at` FROM `study_guards` WHERE `study_id` = OLD.`study_id`) IS NOT NULL THEN
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'locked: the data of this study are locked';
  END IF;
END
--> statement-breakpoint
CREATE TRIGGER `session_values_locked_insert` BEFORE INSERT ON `session_values` FOR EACH ROW
BEGIN
  IF (SELECT `locked_at` FROM `study_guards` WHERE `study_id` = NEW.`study_id`) IS NOT NULL THEN
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'locked: the data of this study are locked';
  END IF;
END
--> statement-breakpoint
CREATE TRIGGER `session_values_locked_update` BEFORE UPDATE ON `session_values` FOR EACH ROW
BEGIN
  IF (SELECT `locked_at` FROM `study_guards` WHERE `study_id` = OLD.`study_id`) IS NOT NULL THEN
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'locked: the data of this study are locked';
  END IF;
END
--> statement-breakpoint
CREATE TRIGGER `session_values_locked_delete` BEFORE DELETE ON `session_values` FOR EACH ROW
BEGIN
  IF (SELECT `locked_at` FROM `study_guards` WHERE `study_id` = OLD.`study_id`) IS NOT NULL THEN
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'locked: the data of this study are locked';
  END IF;
END
--> statement-breakpoint
CREATE TRIGGER `reference_measurements_locked_insert` BEFORE INSERT ON `reference_measurements` FOR EACH ROW
BEGIN
  IF (SELECT `locked_at` FROM `study_guards` WHERE `study_id` = NEW.`study_id`) IS NOT NULL THEN
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'locked: the data of this study are locked';
  END IF;
END
--> statement-breakpoint
CREATE TRIGGER `reference_measurements_locked_update` BEFORE UPDATE ON `reference_measurements` FOR EACH ROW
BEGIN
  IF (SELECT `locked_at` FROM `study_guards` WHERE `study_id` = OLD.`study_id`) IS NOT NULL THEN
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'locked: the data of this study are locked';
  END IF;
END
--> statement-breakpoint
CREATE TRIGGER `reference_measurements_locked_delete` BEFORE DELETE ON `reference_measurements` FOR EACH ROW
BEGIN
  IF (SELECT `locked_at` FROM `study_guards` WHERE `study_id` = OLD.`study_id`) IS NOT NULL THEN
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'locked: the data of this study are locked';
  END IF;
END
--> statement-breakpoint
CREATE TRIGGER `reference_outcomes_locked_insert` BEFORE INSERT ON `reference_outcomes` FOR EACH ROW
BEGIN
  IF (SELECT `locked_at` FROM `study_guards` WHERE `study_id` = NEW.`study_id`) IS NOT NULL THEN
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'locked: the data of this study are locked';
  END IF;
END
--> statement-breakpoint
CREATE TRIGGER `reference_outcomes_locked_update` BEFORE UPDATE ON `reference_outcomes` FOR EACH ROW
BEGIN
  IF (SELECT `locked_at` FROM `study_guards` WHERE `study_id` = OLD.`study_id`) IS NOT NULL THEN
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'locked: the data of this study are locked';
  END IF;
END
--> statement-breakpoint
CREATE TRIGGER `reference_outcomes_locked_delete` BEFORE DELETE ON `reference_outcomes` FOR EACH ROW
BEGIN
  IF (SELECT `locked_at` FROM `study_guards` WHERE `study_id` = OLD.`study_id`) IS NOT NULL THEN
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'locked: the data of this study are locked';
  END IF;
END
--> statement-breakpoint
CREATE TRIGGER `sites_locked_insert` BEFORE INSERT ON `sites` FOR EACH ROW
BEGIN
  IF (SELECT `locked_at` FROM `study_guards` WHERE `study_id` = NEW.`study_id`) IS NOT NULL THEN
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'locked: the data of this study are locked';
  END IF;
END
--> statement-breakpoint
CREATE TRIGGER `sites_locked_update` BEFORE UPDATE ON `sites` FOR EACH ROW
BEGIN
  IF (SELECT `locked_at` FROM `study_guards` WHERE `study_id` = OLD.`study_id`) IS NOT NULL THEN
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'locked: the data of this study are locked';
  END IF;
END
--> statement-breakpoint
CREATE TRIGGER `sites_locked_delete` BEFORE DELETE ON `sites` FOR EACH ROW
BEGIN
  IF (SELECT `locked_at` FROM `study_guards` WHERE `study_id` = OLD.`study_id`) IS NOT NULL THEN
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'locked: the data of this study are locked';
  END IF;
END
--> statement-breakpoint
CREATE TRIGGER `analytes_locked_insert` BEFORE INSERT ON `analytes` FOR EACH ROW
BEGIN
  IF (SELECT `locked_at` FROM `study_guards` WHERE `study_id` = NEW.`study_id`) IS NOT NULL THEN
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'locked: the data of this study are locked';
  END IF;
END
--> statement-breakpoint
CREATE TRIGGER `analytes_locked_update` BEFORE UPDATE ON `analytes` FOR EACH ROW
BEGIN
  IF (SELECT `locked_at` FROM `study_guards` WHERE `study_id` = OLD.`study_id`) IS NOT NULL THEN
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'locked: the data of this study are locked';
  END IF;
END
--> statement-breakpoint
CREATE TRIGGER `analytes_locked_delete` BEFORE DELETE ON `analytes` FOR EACH ROW
BEGIN
  IF (SELECT `locked_at` FROM `study_guards` WHERE `study_id` = OLD.`study_id`) IS NOT NULL THEN
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'locked: the data of this study are locked';
  END IF;
END
--> statement-breakpoint
CREATE TRIGGER `protocol_versions_locked_insert` BEFORE INSERT ON `protocol_versions` FOR EACH ROW
BEGIN
  IF (SELECT `locked_at` FROM `study_guards` WHERE `study_id` = NEW.`study_id`) IS NOT NULL THEN
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'locked: the data of this study are locked';
  END IF;
END
--> statement-breakpoint
-- Sign-ins and whatever belongs to no study have a chain of their own.
INSERT INTO `audit_chains` (`id`, `count`, `head_hash`) VALUES ('installation', 0, REPEAT('0', 64));
