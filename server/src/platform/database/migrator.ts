import { QueryTypes, type QueryInterface, type Sequelize } from 'sequelize';
import { SequelizeStorage, Umzug } from 'umzug';

/** One step of the schema: one DDL statement each way, because MariaDB commits each by itself. */
export interface Migration {
  readonly name: string;
  up(database: QueryInterface): Promise<unknown>;
  down(database: QueryInterface): Promise<unknown>;
}

/** A step written as the two statements it runs. */
export function sqlMigration(name: string, up: string, down: string): Migration {
  return {
    name,
    up: (database) => database.sequelize.query(up),
    down: (database) => database.sequelize.query(down),
  };
}

function umzugOf(sequelize: Sequelize, migrations: readonly Migration[]) {
  return new Umzug({
    migrations: migrations.map((step) => ({
      name: step.name,
      up: ({ context }: { context: QueryInterface }) => step.up(context),
      down: ({ context }: { context: QueryInterface }) => step.down(context),
    })),
    context: sequelize.getQueryInterface(),
    storage: new SequelizeStorage({ sequelize, tableName: 'migrations' }),
    logger: undefined,
  });
}

/** Runs what is not yet run, alone on this database whatever else starts at the same time. */
export async function migrateUp(sequelize: Sequelize, migrations: readonly Migration[]): Promise<string[]> {
  return alone(sequelize, async () => (await umzugOf(sequelize, migrations).up()).map((step) => step.name));
}

/** Takes everything back; for tests and for a step back by hand. */
export async function migrateDown(sequelize: Sequelize, migrations: readonly Migration[]): Promise<string[]> {
  return alone(sequelize, async () =>
    (await umzugOf(sequelize, migrations).down({ to: 0 })).map((step) => step.name),
  );
}

async function alone<Result>(sequelize: Sequelize, run: () => Promise<Result>): Promise<Result> {
  const lock = `tollgate-migrate-${sequelize.getDatabaseName()}`.slice(0, 64);
  // A named lock belongs to one connection: the transaction holds that connection while the steps run on others.
  return sequelize.transaction(async (transaction) => {
    const [row] = await sequelize.query<{ held: number | null }>('SELECT GET_LOCK(:lock, 60) AS held', {
      replacements: { lock },
      type: QueryTypes.SELECT,
      transaction,
    });
    if (Number(row?.held) !== 1)
      throw new Error('Another process is migrating this database; it did not finish within a minute.');
    try {
      return await run();
    } finally {
      await sequelize.query('SELECT RELEASE_LOCK(:lock)', {
        replacements: { lock },
        type: QueryTypes.SELECT,
        transaction,
      });
    }
  });
}
