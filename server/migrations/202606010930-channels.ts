import { sqlMigration } from '../src/platform/database';
import { immutable } from './202606010900-record';

const id = 'CHAR(36) CHARACTER SET ascii COLLATE ascii_bin';
const hash = 'CHAR(64) CHARACTER SET ascii COLLATE ascii_bin';

export const channelMigrations = [
  sqlMigration(
    '202606010930-mask-sets',
    `CREATE TABLE IF NOT EXISTS mask_sets (
       id ${id} NOT NULL PRIMARY KEY,
       mask_key VARCHAR(60) CHARACTER SET ascii COLLATE ascii_bin NOT NULL UNIQUE,
       archived BOOLEAN NOT NULL,
       created_at DATETIME(3) NOT NULL)`,
    'DROP TABLE IF EXISTS mask_sets',
  ),
  sqlMigration(
    '202606010931-mask-set-revisions',
    `CREATE TABLE IF NOT EXISTS mask_set_revisions (
       id ${id} NOT NULL PRIMARY KEY,
       mask_set_id ${id} NOT NULL,
       revision INT NOT NULL,
       document LONGTEXT NOT NULL,
       sha256 ${hash} NOT NULL,
       created_at DATETIME(3) NOT NULL,
       UNIQUE (mask_set_id, revision),
       FOREIGN KEY (mask_set_id) REFERENCES mask_sets (id))`,
    'DROP TABLE IF EXISTS mask_set_revisions',
  ),
  ...immutable('mask_set_revisions'),
  sqlMigration(
    '202606010932-checks',
    `CREATE TABLE IF NOT EXISTS checks (
       fingerprint ${hash} NOT NULL PRIMARY KEY,
       engine VARCHAR(20) NOT NULL,
       verdict VARCHAR(20) NOT NULL,
       worst_margin_db DOUBLE NULL,
       worst_limit_title VARCHAR(200) NULL,
       worst_limit_status VARCHAR(20) NULL,
       worst_frequency_hz DOUBLE NULL,
       weakest_standing VARCHAR(12) NOT NULL,
       view LONGBLOB NOT NULL,
       created_at DATETIME(3) NOT NULL)`,
    'DROP TABLE IF EXISTS checks',
  ),
  sqlMigration(
    '202606010933-channels',
    `CREATE TABLE IF NOT EXISTS channels (
       id ${id} NOT NULL PRIMARY KEY,
       revision_id ${id} NOT NULL,
       link_id ${id} NULL,
       name VARCHAR(200) NOT NULL,
       state VARCHAR(20) NOT NULL,
       signaling VARCHAR(12) NOT NULL,
       document LONGTEXT NOT NULL,
       version INT NOT NULL,
       fingerprint ${hash} NULL,
       verdict VARCHAR(20) NOT NULL,
       out_of_date BOOLEAN NOT NULL,
       worst_margin_db DOUBLE NULL,
       worst_limit_title VARCHAR(200) NULL,
       worst_limit_status VARCHAR(20) NULL,
       worst_frequency_hz DOUBLE NULL,
       weakest_standing VARCHAR(12) NULL,
       check_problems LONGTEXT NOT NULL,
       archived BOOLEAN NOT NULL,
       created_at DATETIME(3) NOT NULL,
       changed_at DATETIME(3) NOT NULL,
       changed_by ${id} NULL,
       KEY channels_revision (revision_id, archived),
       FOREIGN KEY (revision_id) REFERENCES revisions (id),
       FOREIGN KEY (link_id) REFERENCES links (id),
       FOREIGN KEY (fingerprint) REFERENCES checks (fingerprint))`,
    'DROP TABLE IF EXISTS channels',
  ),
  sqlMigration(
    '202606010934-channel-uses',
    `CREATE TABLE IF NOT EXISTS channel_uses (
       channel_id ${id} NOT NULL,
       kind VARCHAR(20) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
       used_id ${id} NOT NULL,
       PRIMARY KEY (channel_id, kind, used_id),
       KEY uses_used (kind, used_id),
       FOREIGN KEY (channel_id) REFERENCES channels (id))`,
    'DROP TABLE IF EXISTS channel_uses',
  ),
  sqlMigration(
    '202606010935-draft-windows',
    `CREATE TABLE IF NOT EXISTS draft_windows (
       channel_id ${id} NOT NULL,
       person_id ${id} NOT NULL,
       opened_at DATETIME(3) NOT NULL,
       base_version INT NOT NULL,
       base_document LONGTEXT NOT NULL,
       PRIMARY KEY (channel_id, person_id),
       FOREIGN KEY (channel_id) REFERENCES channels (id))`,
    'DROP TABLE IF EXISTS draft_windows',
  ),
];
