import type { Migration } from '../src/platform/database';
import { recordMigrations } from './202606010900-record';
import { peopleMigrations } from './202606010910-people';
import { boardMigrations } from './202606010920-boards';
import { channelMigrations } from './202606010930-channels';
import { outlineMigrations } from './202612011430-outlines';
import { stackupMigrations } from './202612011400-stackups';

/** Every step in order. A static list survives bundling; a step once released is never edited, only followed. */
export const migrations: readonly Migration[] = [
  ...recordMigrations,
  ...peopleMigrations,
  ...boardMigrations,
  ...channelMigrations,
  ...stackupMigrations,
  ...outlineMigrations,
];
