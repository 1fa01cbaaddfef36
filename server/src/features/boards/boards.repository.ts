import { QueryTypes, type Sequelize, type Transaction } from 'sequelize';
import type { Member, Role } from '@tollgate/contracts';
import type { Work } from '../../platform/work';
import { defineBoards, type BoardRow, type LinkRow, type RevisionRow } from './boards.model';

/** Where a revision's channels stand, counted by the database. */
export interface RevisionTally {
  revisionId: string;
  channels: number;
  holds: number;
  exceeds: number;
  notJudged: number;
  notChecked: number;
}

export interface WorstChannel {
  revisionId: string;
  channelId: string;
  channelName: string;
  marginDb: number;
  limitTitle: string;
}

export type BoardsRepository = ReturnType<typeof createBoardsRepository>;

export function createBoardsRepository(sequelize: Sequelize) {
  const { boards, members, revisions, links } = defineBoards(sequelize);

  async function boardOf(sql: string, id: string): Promise<string | null> {
    const [row] = await sequelize.query<{ boardId: string }>(sql, {
      replacements: { id },
      type: QueryTypes.SELECT,
    });
    return row?.boardId ?? null;
  }

  return {
    isMember: async (personId: string, boardId: string) =>
      (await members.count({ where: { personId, boardId } })) > 0,
    boardOfRevision: (id: string) => boardOf('SELECT board_id AS boardId FROM revisions WHERE id = :id', id),
    boardOfLink: (id: string) =>
      boardOf(
        'SELECT r.board_id AS boardId FROM links l JOIN revisions r ON r.id = l.revision_id WHERE l.id = :id',
        id,
      ),

    async boardsOf(personId: string): Promise<BoardRow[]> {
      const mine = await members.findAll({ where: { personId } });
      const rows = await boards.findAll({
        where: { id: mine.map((row) => row.get().boardId) },
        order: [['name', 'ASC']],
      });
      return rows.map((row) => plainBoard(row.get()));
    },

    async board(id: string, transaction?: Transaction): Promise<BoardRow | undefined> {
      const row = await boards.findByPk(id, { transaction });
      return row ? plainBoard(row.get()) : undefined;
    },

    async members(boardId: string): Promise<Member[]> {
      const rows = await sequelize.query<{
        personId: string;
        name: string;
        since: Date;
        roles: string | null;
      }>(
        `SELECT m.person_id AS personId, p.name, m.since, GROUP_CONCAT(r.role ORDER BY r.role) AS roles
         FROM board_members m JOIN people p ON p.id = m.person_id LEFT JOIN person_roles r ON r.person_id = p.id
         WHERE m.board_id = :boardId GROUP BY m.person_id, p.name, m.since ORDER BY p.name`,
        { replacements: { boardId }, type: QueryTypes.SELECT },
      );
      return rows.map((row) => ({
        personId: row.personId,
        name: row.name,
        roles: (row.roles?.split(',') ?? []) as Role[],
        since: new Date(row.since).toISOString(),
      }));
    },

    async revisionsOf(boardIds: readonly string[], transaction?: Transaction): Promise<RevisionRow[]> {
      const rows = await revisions.findAll({
        where: { boardId: [...boardIds] },
        order: [
          ['createdAt', 'ASC'],
          ['letter', 'ASC'],
        ],
        transaction,
      });
      return rows.map((row) => ({ ...row.get(), archived: Boolean(row.get().archived) }));
    },

    async revision(id: string, transaction?: Transaction): Promise<RevisionRow | undefined> {
      const row = await revisions.findByPk(id, { transaction });
      return row ? { ...row.get(), archived: Boolean(row.get().archived) } : undefined;
    },

    async linksOf(revisionId: string, transaction?: Transaction): Promise<LinkRow[]> {
      const rows = await links.findAll({ where: { revisionId }, order: [['name', 'ASC']], transaction });
      return rows.map((row) => ({ ...row.get(), archived: Boolean(row.get().archived) }));
    },

    async link(id: string, transaction?: Transaction): Promise<LinkRow | undefined> {
      const row = await links.findByPk(id, { transaction });
      return row ? { ...row.get(), archived: Boolean(row.get().archived) } : undefined;
    },

    async tallies(revisionIds: readonly string[]): Promise<RevisionTally[]> {
      if (revisionIds.length === 0) return [];
      const rows = await sequelize.query<RevisionTally>(
        `SELECT revision_id AS revisionId, COUNT(*) AS channels,
           SUM(verdict = 'holds' AND NOT out_of_date) AS holds, SUM(verdict = 'exceeds' AND NOT out_of_date) AS exceeds,
           SUM(verdict = 'not-judged' AND NOT out_of_date) AS notJudged, SUM(verdict = 'not-checked' OR out_of_date) AS notChecked
         FROM channels WHERE revision_id IN (:ids) AND NOT archived GROUP BY revision_id`,
        { replacements: { ids: [...revisionIds] }, type: QueryTypes.SELECT },
      );
      return rows.map((row) => ({
        revisionId: row.revisionId,
        channels: Number(row.channels),
        holds: Number(row.holds),
        exceeds: Number(row.exceeds),
        notJudged: Number(row.notJudged),
        notChecked: Number(row.notChecked),
      }));
    },

    async worst(revisionIds: readonly string[]): Promise<WorstChannel[]> {
      if (revisionIds.length === 0) return [];
      return sequelize.query<WorstChannel>(
        `SELECT revisionId, channelId, channelName, marginDb, limitTitle FROM (
           SELECT revision_id AS revisionId, id AS channelId, name AS channelName, worst_margin_db AS marginDb, worst_limit_title AS limitTitle,
             ROW_NUMBER() OVER (PARTITION BY revision_id ORDER BY worst_margin_db, name) AS place
           FROM channels WHERE revision_id IN (:ids) AND NOT archived AND NOT out_of_date AND worst_margin_db IS NOT NULL) ranked
         WHERE place = 1`,
        { replacements: { ids: [...revisionIds] }, type: QueryTypes.SELECT },
      );
    },

    insertBoard: (work: Work, row: BoardRow) => boards.create(row, { transaction: work.transaction }),
    updateBoard: (work: Work, id: string, change: Partial<BoardRow>) =>
      boards.update(change, { where: { id }, transaction: work.transaction }),
    addMember: (work: Work, boardId: string, personId: string) =>
      members.bulkCreate([{ boardId, personId, since: work.at }], {
        ignoreDuplicates: true,
        transaction: work.transaction,
      }),
    removeMember: (work: Work, boardId: string, personId: string) =>
      members.destroy({ where: { boardId, personId }, transaction: work.transaction }),
    insertRevision: (work: Work, row: RevisionRow) =>
      revisions.create(row, { transaction: work.transaction }),
    updateRevision: (work: Work, id: string, change: Partial<RevisionRow>) =>
      revisions.update(change, { where: { id }, transaction: work.transaction }),
    insertLink: (work: Work, row: LinkRow) => links.create(row, { transaction: work.transaction }),
    updateLink: (work: Work, id: string, change: Partial<LinkRow>) =>
      links.update(change, { where: { id }, transaction: work.transaction }),
  };
}

function plainBoard(row: BoardRow): BoardRow {
  return { ...row, archived: Boolean(row.archived) };
}
