-- What the application's own account may do, table by table, in the current database. Everything may
-- be read; nothing may be truncated or dropped. A test fails for a table that is not named here.
GRANT SELECT ON * TO 'breathmark_app'@'127.0.0.1';

-- Written once, never changed.
GRANT INSERT ON audit_events TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT ON audit_values TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT ON signatures TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT ON datasets TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT ON dataset_rows TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT ON analyses TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT ON report_files TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT ON protocol_versions TO 'breathmark_app'@'127.0.0.1';

-- Records and workflow: corrected, never removed.
GRANT INSERT, UPDATE ON audit_chains TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT, UPDATE ON study_guards TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT, UPDATE ON people TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT, UPDATE ON studies TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT, UPDATE ON sites TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT, UPDATE ON members TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT, UPDATE ON analytes TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT, UPDATE ON subjects TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT, UPDATE ON sessions TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT, UPDATE ON session_values TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT, UPDATE ON reference_measurements TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT, UPDATE ON reference_outcomes TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT, UPDATE ON imports TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT, UPDATE ON locks TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT, UPDATE ON reports TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT, UPDATE ON jobs TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT, UPDATE ON mails TO 'breathmark_app'@'127.0.0.1';

-- Passing things, swept when they are over.
GRANT INSERT, UPDATE, DELETE ON logins TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT, UPDATE, DELETE ON login_attempts TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT, UPDATE, DELETE ON signing_grants TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT, UPDATE, DELETE ON rate_windows TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT, DELETE ON import_chunks TO 'breathmark_app'@'127.0.0.1';
GRANT INSERT, UPDATE, DELETE ON import_rows TO 'breathmark_app'@'127.0.0.1';

-- Two people may have an identifying value blanked; who, when and why stay.
GRANT SELECT, UPDATE (old_value, old_salt, new_value, new_salt, redacted_at) ON audit_values TO 'breathmark_redact'@'127.0.0.1';
