import { promisify } from 'node:util';
import { deflateRaw, inflateRaw } from 'node:zlib';
import { QueryTypes, type Sequelize } from 'sequelize';
import { column } from '../../platform/database';
import type { Table, Work } from '../../platform/work';
import type { CheckOutcome } from './check-task';

interface CheckRow {
  fingerprint: string;
  engine: string;
  verdict: string;
  worstMarginDb: number | null;
  worstLimitTitle: string | null;
  worstLimitStatus: string | null;
  worstFrequencyHz: number | null;
  weakestStanding: string;
  view: Buffer;
  createdAt: Date;
}

const pack = promisify<Buffer, Buffer>(deflateRaw);
const unpack = promisify<Buffer, Buffer>(inflateRaw);

export type ChecksRepository = ReturnType<typeof createChecksRepository>;

export function createChecksRepository(sequelize: Sequelize) {
  const checks: Table<CheckRow> = sequelize.define('checks', {
    fingerprint: { ...column.hash, primaryKey: true },
    engine: column.text,
    verdict: column.text,
    worstMarginDb: column.real,
    worstLimitTitle: column.text,
    worstLimitStatus: column.text,
    worstFrequencyHz: column.real,
    weakestStanding: column.text,
    view: column.bytes,
    createdAt: column.instant,
  });

  return {
    /** The same inputs give the same bytes: a check that is there is not written again. */
    async keep(work: Work, outcome: CheckOutcome): Promise<void> {
      if (await checks.count({ where: { fingerprint: outcome.fingerprint }, transaction: work.transaction }))
        return;
      const view = await pack(Buffer.from(outcome.json, 'utf8'));
      await checks.bulkCreate(
        [
          {
            fingerprint: outcome.fingerprint,
            engine: outcome.engine,
            ...outcome.summary,
            view,
            createdAt: work.at,
          },
        ],
        { ignoreDuplicates: true, transaction: work.transaction },
      );
    },

    async viewJson(fingerprint: string): Promise<string | undefined> {
      const row = await checks.findByPk(fingerprint);
      return row ? (await unpack(row.get().view)).toString('utf8') : undefined;
    },

    /** Drops checks of before that nothing points to. */
    async sweep(before: Date): Promise<void> {
      await sequelize.query(
        'DELETE FROM checks WHERE created_at < :before AND fingerprint NOT IN (SELECT fingerprint FROM channels WHERE fingerprint IS NOT NULL)',
        { replacements: { before }, type: QueryTypes.DELETE },
      );
    },
  };
}
