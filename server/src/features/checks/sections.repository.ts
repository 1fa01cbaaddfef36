import { createHash } from 'node:crypto';
import { Op, type Sequelize } from 'sequelize';
import { engineVersion } from '@tollgate/budget';
import type { SolvedSection } from '@tollgate/elements';
import { column } from '../../platform/database';
import type { Table, Work } from '../../platform/work';

interface SolutionRow {
  sha256: string;
  engine: string;
  solution: string;
  createdAt: Date;
}

export type SectionsRepository = ReturnType<typeof createSectionsRepository>;

/** Solved cross-sections by their content: what one thread or node has solved, the others need not. */
export function createSectionsRepository(sequelize: Sequelize) {
  const solutions: Table<SolutionRow> = sequelize.define('section_solutions', {
    sha256: { ...column.hash, primaryKey: true },
    engine: column.text,
    solution: column.longText,
    createdAt: column.instant,
  });
  return {
    async find(key: string): Promise<SolvedSection | undefined> {
      const row = await solutions.findByPk(addressOf(key));
      return row ? { key, solution: JSON.parse(row.get().solution) as SolvedSection['solution'] } : undefined;
    },

    async keep(work: Work, { key, solution }: SolvedSection): Promise<void> {
      await solutions.bulkCreate(
        [
          {
            sha256: addressOf(key),
            engine: engineVersion,
            solution: JSON.stringify(solution),
            createdAt: work.at,
          },
        ],
        { ignoreDuplicates: true, transaction: work.transaction },
      );
    },

    /** Drops what another engine solved, and what is older. */
    async sweep(before: Date): Promise<void> {
      await solutions.destroy({
        where: { [Op.or]: [{ engine: { [Op.ne]: engineVersion } }, { createdAt: { [Op.lt]: before } }] },
      });
    },
  };
}

function addressOf(key: string): string {
  return createHash('sha256').update(`${engineVersion}\n${key}`).digest('hex');
}
