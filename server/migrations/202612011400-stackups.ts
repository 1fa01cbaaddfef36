import { sqlMigration } from '../src/platform/database';

const id = 'CHAR(36) CHARACTER SET ascii COLLATE ascii_bin';
const hash = 'CHAR(64) CHARACTER SET ascii COLLATE ascii_bin';

const addColumn = (number: number, name: string, type: string) =>
  sqlMigration(
    `20261201140${number}-stackup-versions-${name.replace('_', '-')}`,
    `ALTER TABLE stackup_versions ADD COLUMN IF NOT EXISTS ${name} ${type}`,
    `ALTER TABLE stackup_versions DROP COLUMN IF EXISTS ${name}`,
  );

export const stackupMigrations = [
  addColumn(0, 'kind', "VARCHAR(20) CHARACTER SET ascii COLLATE ascii_bin NOT NULL DEFAULT 'design'"),
  addColumn(1, 'why', "VARCHAR(500) NOT NULL DEFAULT ''"),
  addColumn(2, 'created_by', `${id} NULL`),
  // Solved cross-sections by the hash of engine version and section: a cache, dropped when the engine changes.
  sqlMigration(
    '202612011403-section-solutions',
    `CREATE TABLE IF NOT EXISTS section_solutions (
       sha256 ${hash} NOT NULL PRIMARY KEY,
       engine VARCHAR(20) NOT NULL,
       solution LONGTEXT NOT NULL,
       created_at DATETIME(3) NOT NULL)`,
    'DROP TABLE IF EXISTS section_solutions',
  ),
];
