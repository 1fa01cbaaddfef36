import { sqlMigration } from '../src/platform/database';
import { immutable } from './202606010900-record';

const id = 'CHAR(36) CHARACTER SET ascii COLLATE ascii_bin';
const hash = 'CHAR(64) CHARACTER SET ascii COLLATE ascii_bin';

export const boardMigrations = [
  sqlMigration(
    '202606010920-boards',
    `CREATE TABLE IF NOT EXISTS boards (
       id ${id} NOT NULL PRIMARY KEY,
       name VARCHAR(80) NOT NULL,
       description VARCHAR(500) NOT NULL,
       archived BOOLEAN NOT NULL,
       created_at DATETIME(3) NOT NULL)`,
    'DROP TABLE IF EXISTS boards',
  ),
  sqlMigration(
    '202606010921-board-members',
    `CREATE TABLE IF NOT EXISTS board_members (
       board_id ${id} NOT NULL,
       person_id ${id} NOT NULL,
       since DATETIME(3) NOT NULL,
       PRIMARY KEY (board_id, person_id),
       KEY members_person (person_id),
       FOREIGN KEY (board_id) REFERENCES boards (id),
       FOREIGN KEY (person_id) REFERENCES people (id))`,
    'DROP TABLE IF EXISTS board_members',
  ),
  sqlMigration(
    '202606010922-revisions',
    `CREATE TABLE IF NOT EXISTS revisions (
       id ${id} NOT NULL PRIMARY KEY,
       board_id ${id} NOT NULL,
       letter VARCHAR(5) NOT NULL,
       release_on DATE NULL,
       archived BOOLEAN NOT NULL,
       copied_from ${id} NULL,
       created_at DATETIME(3) NOT NULL,
       UNIQUE (board_id, letter),
       FOREIGN KEY (board_id) REFERENCES boards (id))`,
    'DROP TABLE IF EXISTS revisions',
  ),
  sqlMigration(
    '202606010923-stackup-versions',
    `CREATE TABLE IF NOT EXISTS stackup_versions (
       id ${id} NOT NULL PRIMARY KEY,
       revision_id ${id} NOT NULL,
       number INT NOT NULL,
       document LONGTEXT NOT NULL,
       sha256 ${hash} NOT NULL,
       created_at DATETIME(3) NOT NULL,
       UNIQUE (revision_id, number),
       FOREIGN KEY (revision_id) REFERENCES revisions (id))`,
    'DROP TABLE IF EXISTS stackup_versions',
  ),
  ...immutable('stackup_versions'),
  sqlMigration(
    '202606010924-links',
    `CREATE TABLE IF NOT EXISTS links (
       id ${id} NOT NULL PRIMARY KEY,
       revision_id ${id} NOT NULL,
       name VARCHAR(80) NOT NULL,
       archived BOOLEAN NOT NULL,
       created_at DATETIME(3) NOT NULL,
       FOREIGN KEY (revision_id) REFERENCES revisions (id))`,
    'DROP TABLE IF EXISTS links',
  ),
  sqlMigration(
    '202606010925-files',
    `CREATE TABLE IF NOT EXISTS files (
       sha256 ${hash} NOT NULL PRIMARY KEY,
       size_bytes BIGINT NOT NULL,
       media_type VARCHAR(100) NOT NULL,
       state VARCHAR(10) NOT NULL,
       created_at DATETIME(3) NOT NULL)`,
    'DROP TABLE IF EXISTS files',
  ),
  sqlMigration(
    '202606010926-board-files',
    `CREATE TABLE IF NOT EXISTS board_files (
       id ${id} NOT NULL PRIMARY KEY,
       board_id ${id} NOT NULL,
       sha256 ${hash} NOT NULL,
       name VARCHAR(200) NOT NULL,
       summary LONGTEXT NOT NULL,
       added_by ${id} NULL,
       added_at DATETIME(3) NOT NULL,
       UNIQUE (board_id, sha256, name),
       FOREIGN KEY (board_id) REFERENCES boards (id),
       FOREIGN KEY (sha256) REFERENCES files (sha256))`,
    'DROP TABLE IF EXISTS board_files',
  ),
];
