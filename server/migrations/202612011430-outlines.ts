import { sqlMigration } from '../src/platform/database';

export const outlineMigrations = [
  sqlMigration(
    '202612011430-revision-outline',
    'ALTER TABLE revisions ADD COLUMN IF NOT EXISTS outline LONGTEXT NULL',
    'ALTER TABLE revisions DROP COLUMN IF EXISTS outline',
  ),
];
