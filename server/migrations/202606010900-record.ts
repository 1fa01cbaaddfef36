import { sqlMigration } from '../src/platform/database';

/** Events and their chain, outbox, jobs, and the feed for those who look on. */
const refuse = (table: string, verb: 'UPDATE' | 'DELETE') =>
  sqlMigration(
    `202606010901-${table}-refuse-${verb.toLowerCase()}`,
    `CREATE TRIGGER IF NOT EXISTS ${table}_refuse_${verb.toLowerCase()} BEFORE ${verb} ON ${table} FOR EACH ROW
     SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = '${table} are never changed'`,
    `DROP TRIGGER IF EXISTS ${table}_refuse_${verb.toLowerCase()}`,
  );

export const immutable = (table: string) => [refuse(table, 'UPDATE'), refuse(table, 'DELETE')];

export const recordMigrations = [
  sqlMigration(
    '202606010900-events',
    `CREATE TABLE IF NOT EXISTS events (
       seq BIGINT NOT NULL PRIMARY KEY,
       at DATETIME(3) NOT NULL,
       person_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
       what VARCHAR(60) NOT NULL,
       subject VARCHAR(80) NOT NULL,
       board_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
       body LONGTEXT CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL,
       previous_hash CHAR(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL UNIQUE,
       hash CHAR(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL UNIQUE,
       KEY events_what (what, seq), KEY events_person (person_id, seq))`,
    'DROP TABLE IF EXISTS events',
  ),
  ...immutable('events'),
  sqlMigration(
    '202606010902-audit-head',
    `CREATE TABLE IF NOT EXISTS audit_head (
       id TINYINT NOT NULL PRIMARY KEY,
       seq BIGINT NOT NULL,
       hash CHAR(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL)`,
    'DROP TABLE IF EXISTS audit_head',
  ),
  sqlMigration(
    '202606010903-audit-head-first',
    `INSERT IGNORE INTO audit_head (id, seq, hash) VALUES (1, 0, REPEAT('0', 64))`,
    'DELETE FROM audit_head',
  ),
  sqlMigration(
    '202606010904-outbox',
    `CREATE TABLE IF NOT EXISTS outbox (
       id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL PRIMARY KEY,
       recipient VARCHAR(200) NOT NULL,
       subject VARCHAR(200) NOT NULL,
       text_body LONGTEXT NOT NULL,
       html_body LONGTEXT NOT NULL,
       message_id VARCHAR(120) NOT NULL UNIQUE,
       state VARCHAR(10) NOT NULL,
       attempts INT NOT NULL,
       last_error LONGTEXT NULL,
       created_at DATETIME(3) NOT NULL,
       sent_at DATETIME(3) NULL,
       KEY outbox_state (state, created_at))`,
    'DROP TABLE IF EXISTS outbox',
  ),
  sqlMigration(
    '202606010905-jobs',
    `CREATE TABLE IF NOT EXISTS jobs (
       id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL PRIMARY KEY,
       kind VARCHAR(30) NOT NULL,
       payload LONGTEXT NOT NULL,
       state VARCHAR(10) NOT NULL,
       attempts INT NOT NULL,
       run_after DATETIME(3) NOT NULL,
       lease_until DATETIME(3) NULL,
       dedupe_key VARCHAR(120) CHARACTER SET ascii COLLATE ascii_bin NULL UNIQUE,
       last_error LONGTEXT NULL,
       created_at DATETIME(3) NOT NULL,
       KEY jobs_due (state, run_after))`,
    'DROP TABLE IF EXISTS jobs',
  ),
  sqlMigration(
    '202606010906-changes',
    `CREATE TABLE IF NOT EXISTS changes (
       seq BIGINT NOT NULL AUTO_INCREMENT PRIMARY KEY,
       at DATETIME(3) NOT NULL,
       what VARCHAR(60) NOT NULL,
       person_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
       board_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
       revision_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
       channel_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
       version INT NULL,
       KEY changes_at (at))`,
    'DROP TABLE IF EXISTS changes',
  ),
];
