import type { Sequelize } from 'sequelize';
import { column } from '../../platform/database';
import type { Table } from '../../platform/work';

export interface BoardRow {
  id: string;
  name: string;
  description: string;
  archived: boolean;
  createdAt: Date;
}

export interface MemberRow {
  boardId: string;
  personId: string;
  since: Date;
}

export interface RevisionRow {
  id: string;
  boardId: string;
  letter: string;
  releaseOn: string | null;
  archived: boolean;
  copiedFrom: string | null;
  /** BoardOutline as JSON. */
  outline: string | null;
  createdAt: Date;
}

export interface LinkRow {
  id: string;
  revisionId: string;
  name: string;
  archived: boolean;
  createdAt: Date;
}

interface BoardModels {
  readonly boards: Table<BoardRow>;
  readonly members: Table<MemberRow>;
  readonly revisions: Table<RevisionRow>;
  readonly links: Table<LinkRow>;
}

export function defineBoards(sequelize: Sequelize): BoardModels {
  return {
    boards: sequelize.define('boards', {
      id: column.id,
      name: column.text,
      description: column.text,
      archived: column.flag,
      createdAt: column.instant,
    }),
    members: sequelize.define('board_members', {
      boardId: { ...column.reference, primaryKey: true },
      personId: { ...column.reference, primaryKey: true },
      since: column.instant,
    }),
    revisions: sequelize.define('revisions', {
      id: column.id,
      boardId: column.reference,
      letter: column.text,
      releaseOn: column.day,
      archived: column.flag,
      copiedFrom: column.reference,
      outline: column.longText,
      createdAt: column.instant,
    }),
    links: sequelize.define('links', {
      id: column.id,
      revisionId: column.reference,
      name: column.text,
      archived: column.flag,
      createdAt: column.instant,
    }),
  };
}
