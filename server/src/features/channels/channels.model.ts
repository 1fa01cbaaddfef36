import type { Sequelize } from 'sequelize';
import type { ChannelVerdict, Signaling, Standing } from '@tollgate/contracts';
import { column } from '../../platform/database';
import type { Table } from '../../platform/work';

export interface ChannelRow {
  id: string;
  revisionId: string;
  linkId: string | null;
  name: string;
  state: 'drafting';
  signaling: Signaling;
  /** JSON of the document in SI with ids. */
  document: string;
  version: number;
  fingerprint: string | null;
  verdict: ChannelVerdict;
  outOfDate: boolean;
  worstMarginDb: number | null;
  worstLimitTitle: string | null;
  worstLimitStatus: string | null;
  worstFrequencyHz: number | null;
  weakestStanding: Standing | null;
  /** JSON of the problems that kept the document from being checked. */
  checkProblems: string;
  archived: boolean;
  createdAt: Date;
  changedAt: Date;
  changedBy: string | null;
}

export interface UseRow {
  channelId: string;
  kind: 'mask-set-revision' | 'board-file' | 'stackup-version';
  usedId: string;
}

/** A stretch of editing that becomes one event. */
export interface WindowRow {
  channelId: string;
  personId: string;
  openedAt: Date;
  baseVersion: number;
  baseDocument: string;
}

export function defineChannels(sequelize: Sequelize): {
  channels: Table<ChannelRow>;
  uses: Table<UseRow>;
  windows: Table<WindowRow>;
} {
  return {
    channels: sequelize.define('channels', {
      id: column.id,
      revisionId: column.reference,
      linkId: column.reference,
      name: column.text,
      state: column.text,
      signaling: column.text,
      document: column.longText,
      version: column.integer,
      fingerprint: column.hash,
      verdict: column.text,
      outOfDate: column.flag,
      worstMarginDb: column.real,
      worstLimitTitle: column.text,
      worstLimitStatus: column.text,
      worstFrequencyHz: column.real,
      weakestStanding: column.text,
      checkProblems: column.longText,
      archived: column.flag,
      createdAt: column.instant,
      changedAt: column.instant,
      changedBy: column.reference,
    }),
    uses: sequelize.define('channel_uses', {
      channelId: { ...column.reference, primaryKey: true },
      kind: { ...column.text, primaryKey: true },
      usedId: { ...column.reference, primaryKey: true },
    }),
    windows: sequelize.define('draft_windows', {
      channelId: { ...column.reference, primaryKey: true },
      personId: { ...column.reference, primaryKey: true },
      openedAt: column.instant,
      baseVersion: column.integer,
      baseDocument: column.longText,
    }),
  };
}
