import { Op, type Sequelize, type Transaction } from 'sequelize';
import type { Role } from '@tollgate/contracts';
import type { Work } from '../../platform/work';
import { definePeople, type PersonRow, type TokenRow } from './people.model';

export interface StoredPerson extends PersonRow {
  roles: Role[];
}

export type PeopleRepository = ReturnType<typeof createPeopleRepository>;

export function createPeopleRepository(sequelize: Sequelize) {
  const { people, roles, tokens } = definePeople(sequelize);

  async function withRoles(rows: readonly PersonRow[], transaction?: Transaction): Promise<StoredPerson[]> {
    if (rows.length === 0) return [];
    const held = await roles.findAll({ where: { personId: rows.map((row) => row.id) }, transaction });
    return rows.map((row) => ({
      ...row,
      active: Boolean(row.active),
      roles: held
        .map((entry) => entry.get())
        .flatMap((entry) => (entry.personId === row.id ? [entry.role] : [])),
    }));
  }

  async function one(
    where: Partial<PersonRow>,
    transaction?: Transaction,
  ): Promise<StoredPerson | undefined> {
    const row = await people.findOne({ where, transaction });
    return row ? (await withRoles([row.get()], transaction))[0] : undefined;
  }

  return {
    byId: (id: string, transaction?: Transaction) => one({ id }, transaction),
    byEmail: (email: string, transaction?: Transaction) => one({ email }, transaction),
    count: () => people.count(),

    async all(): Promise<StoredPerson[]> {
      const rows = await people.findAll({ order: [['name', 'ASC']] });
      return withRoles(rows.map((row) => row.get()));
    },

    async insert(work: Work, person: StoredPerson): Promise<void> {
      const { roles: held, ...row } = person;
      await people.create(row, { transaction: work.transaction });
      await roles.bulkCreate(
        held.map((role) => ({ personId: person.id, role })),
        { transaction: work.transaction },
      );
    },

    async update(work: Work, id: string, change: Partial<PersonRow>): Promise<void> {
      await people.update(change, { where: { id }, transaction: work.transaction });
    },

    async setRoles(work: Work, id: string, held: readonly Role[]): Promise<void> {
      await roles.destroy({ where: { personId: id }, transaction: work.transaction });
      await roles.bulkCreate(
        held.map((role) => ({ personId: id, role })),
        { transaction: work.transaction },
      );
    },

    /** How many active administrators there are besides one person; the last cannot be lost. */
    async otherAdministrators(work: Work, id: string): Promise<number> {
      const holders = await roles.findAll({
        where: { role: 'administrator', personId: { [Op.ne]: id } },
        transaction: work.transaction,
      });
      const ids = holders.map((holder) => holder.get().personId);
      return ids.length === 0
        ? 0
        : people.count({ where: { id: ids, active: true }, transaction: work.transaction });
    },

    async insertToken(work: Work, token: TokenRow): Promise<void> {
      await tokens.create(token, { transaction: work.transaction });
    },

    /** An unused, unexpired token, locked so that it is used once. */
    async openToken(work: Work, hash: string): Promise<TokenRow | undefined> {
      const row = await tokens.findOne({
        where: { hash, usedAt: null, expiresAt: { [Op.gt]: work.at } },
        transaction: work.transaction,
        lock: work.transaction.LOCK.UPDATE,
      });
      return row?.get();
    },

    /** Uses up a token and, with it, every other open one of the person. */
    async closeTokens(work: Work, token: TokenRow): Promise<void> {
      const where = token.personId ? { personId: token.personId, usedAt: null } : { hash: token.hash };
      await tokens.update({ usedAt: work.at }, { where, transaction: work.transaction });
    },
  };
}
