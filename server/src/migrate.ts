import { availableParallelism } from 'node:os';
import { migrations } from '../migrations';
import { readConfig } from './platform/config/config';
import { connectDatabase, migrateUp } from './platform/database';

/** Brings the schema of the configured database up to this release and ends; a restore runs it before it fills the tables. */
async function main(): Promise<void> {
  const config = readConfig(process.env, availableParallelism());
  const sequelize = connectDatabase(config.database, 2);
  await migrateUp(sequelize, migrations);
  await sequelize.close();
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
  process.exit(1);
});
