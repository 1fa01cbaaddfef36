import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { dirname, join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { ensureMariadb, startDatabase } from '../database/mariadb.mjs';
import { ensurePackages } from '../start/packages.mjs';

/** `npm run audit`: verifies the chain of events without a running server; starts the private database where it is down. */
const root = join(dirname(fileURLToPath(import.meta.url)), '../..');
const dataDirectory = resolve(process.env.INIT_CWD ?? root, process.env.TOLLGATE_DATA || '.data');
const folder = join(dataDirectory, 'mariadb');

if (!existsSync(folder)) {
  console.error(`There is no database in ${dataDirectory}. Name the data directory with TOLLGATE_DATA.`);
  process.exit(1);
}
ensurePackages(root);
ensureMariadb();
const { buildServerOnly } = await import('../build/build.mjs');
const out = resolve(root, process.env.TOLLGATE_BUILD || 'dist');
await buildServerOnly(out);
const wasUp = existsSync(join(dataDirectory, 'run.json'));
const database = await startDatabase(folder);
const { status } = spawnSync(process.execPath, [join(out, 'server/verify.mjs')], {
  stdio: 'inherit',
  env: { ...process.env, TOLLGATE_DATA: dataDirectory, TOLLGATE_DB: JSON.stringify(database.access) },
});
if (!wasUp) await database.stop();
process.exit(status ?? 1);
