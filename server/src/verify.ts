import { availableParallelism } from 'node:os';
import { readConfig } from './platform/config/config';
import { connectDatabase } from './platform/database';
import { verifyChain } from './platform/work';

/** Verifies the audit chain of the configured database; exit 0 where it is sound, 1 with the row named where it is not. */
async function main(): Promise<number> {
  const config = readConfig(process.env, availableParallelism());
  const sequelize = connectDatabase(config.database, 1);
  const verdict = await verifyChain(sequelize);
  await sequelize.close();
  const words = verdict.sound
    ? `The audit chain is sound: ${verdict.events} events, head ${verdict.head.hash}`
    : `The audit chain is broken at event ${verdict.fault!.seq}: ${verdict.fault!.reason}`;
  process.stdout.write(`${words}\n`);
  return verdict.sound ? 0 : 1;
}

main().then(
  (code) => process.exit(code),
  (error: unknown) => {
    process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
    process.exit(1);
  },
);
