import type { Sequelize } from 'sequelize';
import { column } from '../../platform/database';
import type { Table } from '../../platform/work';

export interface FileRow {
  sha256: string;
  sizeBytes: number;
  mediaType: string;
  state: 'kept';
  createdAt: Date;
}

export interface BoardFileRow {
  id: string;
  boardId: string;
  sha256: string;
  name: string;
  /** JSON of PartSummary. */
  summary: string;
  addedBy: string | null;
  addedAt: Date;
}

export function defineFiles(sequelize: Sequelize): {
  files: Table<FileRow>;
  boardFiles: Table<BoardFileRow>;
} {
  return {
    files: sequelize.define('files', {
      sha256: { ...column.hash, primaryKey: true },
      sizeBytes: column.big,
      mediaType: column.text,
      state: column.text,
      createdAt: column.instant,
    }),
    boardFiles: sequelize.define('board_files', {
      id: column.id,
      boardId: column.reference,
      sha256: column.hash,
      name: column.text,
      summary: column.longText,
      addedBy: column.reference,
      addedAt: column.instant,
    }),
  };
}
