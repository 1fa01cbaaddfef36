import type { Model, ModelStatic, Sequelize } from 'sequelize';
import { column } from '../database';

export interface EventRow {
  seq: number;
  at: Date;
  personId: string | null;
  what: string;
  subject: string;
  boardId: string | null;
  body: string;
  previousHash: string;
  hash: string;
}

export interface OutboxRow {
  id: string;
  recipient: string;
  subject: string;
  textBody: string;
  htmlBody: string;
  messageId: string;
  state: 'waiting' | 'sent' | 'failed';
  attempts: number;
  lastError: string | null;
  createdAt: Date;
  sentAt: Date | null;
}

export interface JobRow {
  id: string;
  kind: string;
  payload: string;
  state: 'waiting' | 'running' | 'done' | 'failed';
  attempts: number;
  runAfter: Date;
  leaseUntil: Date | null;
  dedupeKey: string | null;
  lastError: string | null;
  createdAt: Date;
}

export interface ChangeRow {
  seq?: number;
  at: Date;
  what: string;
  personId: string | null;
  boardId: string | null;
  revisionId: string | null;
  channelId: string | null;
  version: number | null;
}

export type Table<Row extends object> = ModelStatic<Model<Row, Partial<Row>>>;

export interface WorkModels {
  readonly events: Table<EventRow>;
  readonly outbox: Table<OutboxRow>;
  readonly jobs: Table<JobRow>;
  readonly changes: Table<ChangeRow>;
}

export function defineWorkModels(sequelize: Sequelize): WorkModels {
  return {
    events: sequelize.define('events', {
      seq: { ...column.big, primaryKey: true },
      at: column.instant,
      personId: column.reference,
      what: column.text,
      subject: column.text,
      boardId: column.reference,
      body: column.longText,
      previousHash: column.hash,
      hash: column.hash,
    }),
    outbox: sequelize.define('outbox', {
      id: column.id,
      recipient: column.text,
      subject: column.text,
      textBody: column.longText,
      htmlBody: column.longText,
      messageId: column.text,
      state: column.text,
      attempts: column.integer,
      lastError: column.longText,
      createdAt: column.instant,
      sentAt: column.instant,
    }),
    jobs: sequelize.define('jobs', {
      id: column.id,
      kind: column.text,
      payload: column.longText,
      state: column.text,
      attempts: column.integer,
      runAfter: column.instant,
      leaseUntil: column.instant,
      dedupeKey: column.text,
      lastError: column.longText,
      createdAt: column.instant,
    }),
    changes: sequelize.define('changes', {
      seq: { ...column.big, primaryKey: true, autoIncrement: true },
      at: column.instant,
      what: column.text,
      personId: column.reference,
      boardId: column.reference,
      revisionId: column.reference,
      channelId: column.reference,
      version: column.integer,
    }),
  };
}
