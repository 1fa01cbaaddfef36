import { createHash, randomUUID } from 'node:crypto';
import canonicalize from 'canonicalize';
import { QueryTypes, type Sequelize } from 'sequelize';
import type { Limit, MaskSet } from '@tollgate/contracts';
import { column } from '../../platform/database';
import type { Table, Work } from '../../platform/work';

/** The content of a mask-set revision as it is stored, for ever. */
export type MaskDocument = Omit<MaskSet, 'id' | 'revision' | 'revisionId' | 'key'>;

interface SetRow {
  id: string;
  maskKey: string;
  archived: boolean;
  createdAt: Date;
}

interface RevisionRow {
  id: string;
  maskSetId: string;
  revision: number;
  document: string;
  sha256: string;
  createdAt: Date;
}

export type MasksRepository = ReturnType<typeof createMasksRepository>;

export function createMasksRepository(sequelize: Sequelize) {
  const sets: Table<SetRow> = sequelize.define('mask_sets', {
    id: column.id,
    maskKey: column.text,
    archived: column.flag,
    createdAt: column.instant,
  });
  const revisions: Table<RevisionRow> = sequelize.define('mask_set_revisions', {
    id: column.id,
    maskSetId: column.reference,
    revision: column.integer,
    document: column.longText,
    sha256: column.hash,
    createdAt: column.instant,
  });

  return {
    /** The latest revision of each set that is not archived. */
    async latest(): Promise<MaskSet[]> {
      const rows = await sequelize.query<{
        id: string;
        maskKey: string;
        revision: number;
        revisionId: string;
        document: string;
      }>(
        `SELECT s.id, s.mask_key AS maskKey, r.revision, r.id AS revisionId, r.document FROM mask_sets s
         JOIN mask_set_revisions r ON r.mask_set_id = s.id
         WHERE NOT s.archived AND r.revision = (SELECT MAX(revision) FROM mask_set_revisions WHERE mask_set_id = s.id)
         ORDER BY s.mask_key`,
        { type: QueryTypes.SELECT },
      );
      return rows.map((row) => ({
        id: row.id,
        key: row.maskKey,
        revision: Number(row.revision),
        revisionId: row.revisionId,
        ...(JSON.parse(row.document) as MaskDocument),
      }));
    },

    /** Limits of named revisions, whichever are there. */
    async limitsOf(revisionIds: readonly string[]): Promise<Map<string, readonly Limit[]>> {
      const rows =
        revisionIds.length === 0 ? [] : await revisions.findAll({ where: { id: [...revisionIds] } });
      return new Map(
        rows.map((row) => [row.get().id, (JSON.parse(row.get().document) as MaskDocument).limits]),
      );
    },

    /** Adds a set, or a further revision where the content differs; returns whether anything was written. */
    async put(work: Work, key: string, document: MaskDocument): Promise<boolean> {
      const sha256 = createHash('sha256').update(canonicalize(document)!).digest('hex');
      const known = await sets.findOne({ where: { maskKey: key }, transaction: work.transaction });
      const id = known?.get().id ?? randomUUID();
      if (!known)
        await sets.create(
          { id, maskKey: key, archived: false, createdAt: work.at },
          { transaction: work.transaction },
        );
      const last = await revisions.findOne({
        where: { maskSetId: id },
        order: [['revision', 'DESC']],
        transaction: work.transaction,
      });
      if (last?.get().sha256 === sha256) return false;
      const revision = (last?.get().revision ?? 0) + 1;
      await revisions.create(
        {
          id: randomUUID(),
          maskSetId: id,
          revision,
          document: JSON.stringify(document),
          sha256,
          createdAt: work.at,
        },
        { transaction: work.transaction },
      );
      work.event({
        what: 'mask-set.revised',
        subject: id,
        to: { key, revision, sha256 },
        detail: `${document.title}, revision ${revision}`,
      });
      return true;
    },
  };
}
