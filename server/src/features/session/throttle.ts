import { createHash } from 'node:crypto';
import { Op, type Model, type ModelStatic, type Sequelize } from 'sequelize';
import type { Clock } from '../../platform/clock';
import { column } from '../../platform/database';
import { problems } from '../../platform/http';

const windowMs = 15 * 60 * 1000;
const mostPerAccount = 10;
const mostPerAddress = 100;

interface AttemptRow {
  id?: number;
  purpose: string;
  account: string;
  address: string;
  at: Date;
}

export type Throttle = ReturnType<typeof createThrottle>;

/** Counts failures in MariaDB, so that every node sees them: 10 in 15 minutes per account and address, 100 per address. */
export function createThrottle(sequelize: Sequelize, clock: Clock) {
  const attempts: ModelStatic<Model<AttemptRow, AttemptRow>> = sequelize.define('failed_attempts', {
    id: { ...column.big, primaryKey: true, autoIncrement: true },
    purpose: column.text,
    account: column.hash,
    address: column.text,
    at: column.instant,
  });

  return {
    /** Refuses with Retry-After where too many have failed. */
    async admit(purpose: string, account: string, address: string): Promise<void> {
      const since = new Date(clock.now().getTime() - windowMs);
      const rows = await attempts.findAll({
        where: { purpose, address, at: { [Op.gt]: since } },
        order: [['at', 'ASC']],
      });
      const all = rows.map((row) => row.get());
      const own = all.filter((row) => row.account === hashed(account));
      const full = own.length >= mostPerAccount ? own : all.length >= mostPerAddress ? all : undefined;
      if (full) throw problems.tooMany((full[0]!.at.getTime() + windowMs - clock.now().getTime()) / 1000);
    },

    async failed(purpose: string, account: string, address: string): Promise<void> {
      await attempts.create({ purpose, account: hashed(account), address, at: clock.now() });
    },

    async forget(purpose: string, account: string, address: string): Promise<void> {
      await attempts.destroy({ where: { purpose, account: hashed(account), address } });
    },

    async sweep(): Promise<void> {
      await attempts.destroy({ where: { at: { [Op.lt]: new Date(clock.now().getTime() - windowMs) } } });
    },
  };
}

/** Addresses people mistype are no business of the table. */
function hashed(account: string): string {
  return createHash('sha256').update(account.toLowerCase()).digest('hex');
}
