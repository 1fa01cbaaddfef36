import { QueryTypes, type Sequelize, type Transaction } from 'sequelize';
import type { Work } from '../../platform/work';
import { defineFiles, type BoardFileRow, type FileRow } from './files.model';

export interface ListedFile extends BoardFileRow {
  sizeBytes: number;
  addedByName: string | null;
}

export type FilesRepository = ReturnType<typeof createFilesRepository>;

export function createFilesRepository(sequelize: Sequelize) {
  const { files, boardFiles } = defineFiles(sequelize);

  async function list(
    where: string,
    replacements: Record<string, unknown>,
    transaction?: Transaction,
  ): Promise<ListedFile[]> {
    const rows = await sequelize.query<ListedFile>(
      `SELECT b.id, b.board_id AS boardId, b.sha256, b.name, b.summary, b.added_by AS addedBy, b.added_at AS addedAt,
         f.size_bytes AS sizeBytes, p.name AS addedByName
       FROM board_files b JOIN files f ON f.sha256 = b.sha256 LEFT JOIN people p ON p.id = b.added_by
       WHERE ${where} ORDER BY b.name, b.added_at`,
      { replacements, type: QueryTypes.SELECT, transaction },
    );
    return rows.map((row) => ({ ...row, sizeBytes: Number(row.sizeBytes), addedAt: new Date(row.addedAt) }));
  }

  return {
    ofBoard: (boardId: string) => list('b.board_id = :boardId', { boardId }),

    async one(boardId: string, id: string): Promise<ListedFile | undefined> {
      return (await list('b.board_id = :boardId AND b.id = :id', { boardId, id }))[0];
    },

    /** Those of the named files that are this board's. */
    async some(boardId: string, ids: readonly string[]): Promise<ListedFile[]> {
      return ids.length === 0
        ? []
        : list('b.board_id = :boardId AND b.id IN (:ids)', { boardId, ids: [...ids] });
    },

    async twin(work: Work, boardId: string, sha256: string, name: string): Promise<ListedFile | undefined> {
      return (
        await list(
          'b.board_id = :boardId AND b.sha256 = :sha256 AND b.name = :name',
          { boardId, sha256, name },
          work.transaction,
        )
      )[0];
    },

    async insert(work: Work, file: FileRow, entry: BoardFileRow): Promise<void> {
      await files.bulkCreate([file], { ignoreDuplicates: true, transaction: work.transaction });
      await boardFiles.create(entry, { transaction: work.transaction });
    },

    hashesOf: async (): Promise<string[]> =>
      (await files.findAll({ attributes: ['sha256'] })).map((row) => row.get().sha256),
  };
}
