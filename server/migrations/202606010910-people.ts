import { sqlMigration } from '../src/platform/database';

const id = 'CHAR(36) CHARACTER SET ascii COLLATE ascii_bin';

export const peopleMigrations = [
  sqlMigration(
    '202606010910-people',
    `CREATE TABLE IF NOT EXISTS people (
       id ${id} NOT NULL PRIMARY KEY,
       name VARCHAR(100) NOT NULL,
       email VARCHAR(200) CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL UNIQUE,
       password_hash VARCHAR(255) CHARACTER SET ascii COLLATE ascii_bin NULL,
       active BOOLEAN NOT NULL,
       created_at DATETIME(3) NOT NULL,
       last_sign_in_at DATETIME(3) NULL)`,
    'DROP TABLE IF EXISTS people',
  ),
  sqlMigration(
    '202606010911-person-roles',
    `CREATE TABLE IF NOT EXISTS person_roles (
       person_id ${id} NOT NULL,
       role VARCHAR(20) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
       PRIMARY KEY (person_id, role),
       FOREIGN KEY (person_id) REFERENCES people (id))`,
    'DROP TABLE IF EXISTS person_roles',
  ),
  sqlMigration(
    '202606010912-sessions',
    `CREATE TABLE IF NOT EXISTS sessions (
       sid VARCHAR(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL PRIMARY KEY,
       expires DATETIME(3) NULL,
       data LONGTEXT NULL,
       person_id ${id} NULL,
       created_at DATETIME(3) NULL,
       updated_at DATETIME(3) NULL,
       KEY sessions_person (person_id), KEY sessions_expires (expires))`,
    'DROP TABLE IF EXISTS sessions',
  ),
  sqlMigration(
    '202606010913-tokens',
    `CREATE TABLE IF NOT EXISTS tokens (
       hash CHAR(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL PRIMARY KEY,
       purpose VARCHAR(20) NOT NULL,
       person_id ${id} NULL,
       expires_at DATETIME(3) NOT NULL,
       used_at DATETIME(3) NULL,
       created_at DATETIME(3) NOT NULL,
       KEY tokens_person (person_id))`,
    'DROP TABLE IF EXISTS tokens',
  ),
  sqlMigration(
    '202606010914-failed-attempts',
    `CREATE TABLE IF NOT EXISTS failed_attempts (
       id BIGINT NOT NULL AUTO_INCREMENT PRIMARY KEY,
       purpose VARCHAR(20) NOT NULL,
       account CHAR(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
       address VARCHAR(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
       at DATETIME(3) NOT NULL,
       KEY failed_address (purpose, address, at))`,
    'DROP TABLE IF EXISTS failed_attempts',
  ),
];
