import { QueryTypes, type Sequelize, type Transaction } from 'sequelize';
import type { Work } from '../../platform/work';
import { defineStackups, type StackupRow } from './stackups.model';

/** A version with where it stands and who made it. */
export interface PlacedStackup extends StackupRow {
  boardId: string;
  boardName: string;
  revisionLetter: string;
  createdByName: string | null;
}

/** A draft of a revision, and the hash of the stackup version it follows. */
export interface DraftStackup {
  channelId: string;
  followsSha256: string | null;
}

export type StackupsRepository = ReturnType<typeof createStackupsRepository>;

const placedColumns = `v.id, v.revision_id AS revisionId, v.number, v.kind, v.why, v.document, v.sha256, v.created_at AS createdAt,
  v.created_by AS createdBy, p.name AS createdByName, b.id AS boardId, b.name AS boardName, r.letter AS revisionLetter`;
const placedTables = `stackup_versions v JOIN revisions r ON r.id = v.revision_id JOIN boards b ON b.id = r.board_id
  LEFT JOIN people p ON p.id = v.created_by`;

export function createStackupsRepository(sequelize: Sequelize) {
  const stackups = defineStackups(sequelize);

  const placed = (where: string, replacements: Record<string, unknown>, transaction?: Transaction) =>
    sequelize.query<PlacedStackup>(`SELECT ${placedColumns} FROM ${placedTables} WHERE ${where}`, {
      replacements,
      type: QueryTypes.SELECT,
      transaction,
    });

  return {
    async boardOf(id: string): Promise<string | null> {
      return (await placed('v.id = :id', { id }))[0]?.boardId ?? null;
    },

    /** Newest first. */
    ofRevision: (revisionId: string) =>
      placed('v.revision_id = :revisionId ORDER BY v.number DESC', { revisionId }),

    async one(id: string, transaction?: Transaction): Promise<PlacedStackup | undefined> {
      return (await placed('v.id = :id', { id }, transaction))[0];
    },

    async newest(revisionId: string, transaction?: Transaction): Promise<PlacedStackup | undefined> {
      const where = 'v.revision_id = :revisionId ORDER BY v.number DESC LIMIT 1';
      return (await placed(where, { revisionId }, transaction))[0];
    },

    /** The newest version of every revision of the boards a person is a member of. */
    newestOfPerson: (personId: string) =>
      placed(
        `b.id IN (SELECT board_id FROM board_members WHERE person_id = :personId) AND NOT b.archived
         AND v.number = (SELECT MAX(n.number) FROM stackup_versions n WHERE n.revision_id = v.revision_id)
         ORDER BY b.name, r.created_at DESC`,
        { personId },
      ),

    /** Keeps others from making a version of this revision until the unit of work ends. */
    async hold(work: Work, revisionId: string): Promise<void> {
      await sequelize.query('SELECT id FROM revisions WHERE id = :revisionId FOR UPDATE', {
        replacements: { revisionId },
        type: QueryTypes.SELECT,
        transaction: work.transaction,
      });
    },

    insert: (work: Work, row: StackupRow) => stackups.create(row, { transaction: work.transaction }),

    drafts: (revisionId: string, transaction?: Transaction) =>
      sequelize.query<DraftStackup>(
        `SELECT c.id AS channelId, v.sha256 AS followsSha256 FROM channels c
         LEFT JOIN channel_uses u ON u.channel_id = c.id AND u.kind = 'stackup-version'
         LEFT JOIN stackup_versions v ON v.id = u.used_id WHERE c.revision_id = :revisionId AND NOT c.archived`,
        { replacements: { revisionId }, type: QueryTypes.SELECT, transaction },
      ),

    /** The verdicts of a revision's drafts are of an earlier stackup. */
    async outdateDrafts(work: Work, revisionId: string): Promise<void> {
      await sequelize.query(
        'UPDATE channels SET out_of_date = TRUE WHERE revision_id = :revisionId AND NOT archived',
        { replacements: { revisionId }, type: QueryTypes.UPDATE, transaction: work.transaction },
      );
    },
  };
}
