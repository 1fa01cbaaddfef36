import { Op, QueryTypes, type Sequelize, type Transaction } from 'sequelize';
import type { Work } from '../../platform/work';
import { defineChannels, type ChannelRow, type UseRow, type WindowRow } from './channels.model';

/** A channel with the names that its lists and pages show. */
export interface PlacedChannel extends ChannelRow {
  boardId: string;
  boardName: string;
  revisionLetter: string;
  changedByName: string | null;
  open: boolean;
}

export type ChannelsRepository = ReturnType<typeof createChannelsRepository>;

const placedColumns = `c.id, c.revision_id AS revisionId, c.link_id AS linkId, c.name, c.state, c.signaling, c.version, c.fingerprint, c.verdict,
  c.out_of_date AS outOfDate, c.worst_margin_db AS worstMarginDb, c.worst_limit_title AS worstLimitTitle, c.worst_limit_status AS worstLimitStatus,
  c.worst_frequency_hz AS worstFrequencyHz, c.weakest_standing AS weakestStanding, c.check_problems AS checkProblems, c.archived,
  c.created_at AS createdAt, c.changed_at AS changedAt, c.changed_by AS changedBy, p.name AS changedByName,
  b.id AS boardId, b.name AS boardName, r.letter AS revisionLetter, (NOT r.archived AND NOT b.archived) AS open`;
const placedTables = `channels c JOIN revisions r ON r.id = c.revision_id JOIN boards b ON b.id = r.board_id LEFT JOIN people p ON p.id = c.changed_by`;

export function createChannelsRepository(sequelize: Sequelize) {
  const { channels, uses, windows } = defineChannels(sequelize);

  async function placed(
    select: string,
    where: string,
    replacements: Record<string, unknown>,
    transaction?: Transaction,
  ): Promise<PlacedChannel[]> {
    const rows = await sequelize.query<PlacedChannel>(
      `SELECT ${select} FROM ${placedTables} WHERE ${where} ORDER BY c.name`,
      {
        replacements,
        type: QueryTypes.SELECT,
        transaction,
      },
    );
    return rows.map((row) => ({
      ...row,
      outOfDate: Boolean(row.outOfDate),
      archived: Boolean(row.archived),
      open: Boolean(row.open),
    }));
  }

  return {
    async boardOf(id: string): Promise<string | null> {
      const [row] = await sequelize.query<{ boardId: string }>(
        'SELECT r.board_id AS boardId FROM channels c JOIN revisions r ON r.id = c.revision_id WHERE c.id = :id',
        { replacements: { id }, type: QueryTypes.SELECT },
      );
      return row?.boardId ?? null;
    },

    async isLinkOf(linkId: string, revisionId: string): Promise<boolean> {
      const rows = await sequelize.query(
        'SELECT 1 FROM links WHERE id = :linkId AND revision_id = :revisionId',
        {
          replacements: { linkId, revisionId },
          type: QueryTypes.SELECT,
        },
      );
      return rows.length > 0;
    },

    /** Without the documents. */
    ofRevision: (revisionId: string) =>
      placed(`${placedColumns}, '' AS document`, 'c.revision_id = :revisionId', { revisionId }),

    async one(id: string, transaction?: Transaction): Promise<PlacedChannel | undefined> {
      return (await placed(`${placedColumns}, c.document`, 'c.id = :id', { id }, transaction))[0];
    },

    /** The row as it is now, kept from others until the unit of work ends. */
    async locked(work: Work, id: string): Promise<ChannelRow> {
      const row = await channels.findByPk(id, {
        transaction: work.transaction,
        lock: work.transaction.LOCK.UPDATE,
      });
      return row!.get();
    },

    async rowsOf(revisionId: string, transaction: Transaction): Promise<ChannelRow[]> {
      const rows = await channels.findAll({ where: { revisionId, archived: false }, transaction });
      return rows.map((row) => row.get());
    },

    /** The documents of what is not archived, by name. */
    async drawn(revisionId: string): Promise<Pick<ChannelRow, 'id' | 'name' | 'document'>[]> {
      const rows = await channels.findAll({
        attributes: ['id', 'name', 'document'],
        where: { revisionId, archived: false },
        order: [['name', 'ASC']],
      });
      return rows.map((row) => row.get());
    },

    async outOfDate(): Promise<string[]> {
      const rows = await channels.findAll({ attributes: ['id'], where: { outOfDate: true } });
      return rows.map((row) => row.get().id);
    },

    insert: (work: Work, row: ChannelRow) => channels.create(row, { transaction: work.transaction }),
    update: (work: Work, id: string, change: Partial<ChannelRow>) =>
      channels.update(change, { where: { id }, transaction: work.transaction }),

    async setUses(work: Work, channelId: string, used: readonly Omit<UseRow, 'channelId'>[]): Promise<void> {
      await uses.destroy({ where: { channelId }, transaction: work.transaction });
      await uses.bulkCreate(
        used.map((use) => ({ channelId, ...use })),
        { transaction: work.transaction, ignoreDuplicates: true },
      );
    },

    async copyUses(work: Work, from: string, to: string): Promise<void> {
      const rows = await uses.findAll({ where: { channelId: from }, transaction: work.transaction });
      await uses.bulkCreate(
        rows.map((row) => ({ ...row.get(), channelId: to })),
        { transaction: work.transaction },
      );
    },

    async window(work: Work, channelId: string, personId: string): Promise<WindowRow | undefined> {
      return (
        await windows.findOne({ where: { channelId, personId }, transaction: work.transaction })
      )?.get();
    },

    async otherWindows(work: Work, channelId: string, personId: string): Promise<WindowRow[]> {
      const rows = await windows.findAll({
        where: { channelId, personId: { [Op.ne]: personId } },
        transaction: work.transaction,
      });
      return rows.map((row) => row.get());
    },

    openWindow: (work: Work, row: WindowRow) => windows.create(row, { transaction: work.transaction }),
    closeWindow: (work: Work, { channelId, personId }: WindowRow) =>
      windows.destroy({ where: { channelId, personId }, transaction: work.transaction }),
  };
}
