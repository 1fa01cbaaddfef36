import { spawnSync } from 'node:child_process';
import { chmodSync, cpSync, existsSync, mkdirSync, mkdtempSync, readdirSync, rmSync } from 'node:fs';
import { dirname, join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { ensureMariadb, startDatabase } from '../database/mariadb.mjs';
import { ensurePackages } from '../start/packages.mjs';
import { unpack } from './archive.mjs';
import { readRows } from './rows.mjs';

/** `npm run restore -- FILE`: a data directory from a backup; TOLLGATE_DATA must be empty or not yet there. */
const root = join(dirname(fileURLToPath(import.meta.url)), '../..');
const base = process.env.INIT_CWD ?? root;
const dataDirectory = resolve(base, process.env.TOLLGATE_DATA || '.data');
const out = resolve(root, process.env.TOLLGATE_BUILD || 'dist');

function runEntry(name, access) {
  const { status, stdout, stderr } = spawnSync(process.execPath, [join(out, 'server', `${name}.mjs`)], {
    encoding: 'utf8',
    env: { ...process.env, TOLLGATE_DATA: dataDirectory, TOLLGATE_DB: JSON.stringify(access) },
  });
  if (status !== 0) throw new Error(`${stdout}${stderr}`.trim());
  return stdout.trim();
}

async function fill(stage) {
  const database = await startDatabase(join(dataDirectory, 'mariadb'));
  try {
    runEntry('migrate', database.access);
    const rows = await readRows(database.access, join(stage, 'database.jsonl'));
    cpSync(join(stage, 'data'), dataDirectory, { recursive: true });
    console.log(`${rows} rows restored into ${dataDirectory}\n${runEntry('verify', database.access)}`);
  } finally {
    await database.stop();
  }
}

async function main() {
  const [name] = process.argv.slice(2);
  if (!name) throw new Error('Name the backup: npm run restore -- FILE');
  if (existsSync(dataDirectory) && readdirSync(dataDirectory).length > 0)
    throw new Error(`${dataDirectory} is not empty. Name an empty data directory with TOLLGATE_DATA.`);
  ensurePackages(root);
  ensureMariadb();
  const { buildServerOnly } = await import('../build/build.mjs');
  await buildServerOnly(out);
  mkdirSync(dirname(dataDirectory), { recursive: true });
  const stage = mkdtempSync(join(dirname(dataDirectory), '.restore-'));
  try {
    await unpack(resolve(base, name), stage);
    mkdirSync(dataDirectory, { recursive: true, mode: 0o700 });
    chmodSync(dataDirectory, 0o700);
    await fill(stage).catch((error) => {
      // Half a record must not be taken for a whole one.
      rmSync(dataDirectory, { recursive: true, force: true });
      throw error;
    });
  } finally {
    rmSync(stage, { recursive: true, force: true });
  }
}

main().catch((error) => {
  console.error(error.message);
  process.exit(1);
});
