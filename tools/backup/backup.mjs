import {
  chmodSync,
  copyFileSync,
  existsSync,
  mkdirSync,
  mkdtempSync,
  readFileSync,
  renameSync,
  rmSync,
} from 'node:fs';
import { dirname, join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { ensureMariadb, isAlive, startDatabase } from '../database/mariadb.mjs';
import { ensurePackages } from '../start/packages.mjs';
import { keptFiles, pack, sha256Of } from './archive.mjs';
import { writeRows } from './rows.mjs';

/** `npm run backup -- FILE`: the whole record of a data directory as one archive, beside a running product or without it. */
const root = join(dirname(fileURLToPath(import.meta.url)), '../..');
const base = process.env.INIT_CWD ?? root;
const dataDirectory = resolve(base, process.env.TOLLGATE_DATA || '.data');

function isRunning() {
  const file = join(dataDirectory, 'run.json');
  return existsSync(file) && isAlive(JSON.parse(readFileSync(file, 'utf8')).pid);
}

async function main() {
  const [name] = process.argv.slice(2);
  if (!name) throw new Error('Name the file to write: npm run backup -- FILE');
  const archive = resolve(base, name);
  if (existsSync(archive)) throw new Error(`${archive} is there already. Name a new file.`);
  if (!existsSync(join(dataDirectory, 'mariadb')))
    throw new Error(`There is no database in ${dataDirectory}. Name the data directory with TOLLGATE_DATA.`);
  ensurePackages(root);
  ensureMariadb();
  const stage = mkdtempSync(join(dirname(archive), '.backup-'));
  const wasRunning = isRunning();
  const database = await startDatabase(join(dataDirectory, 'mariadb'));
  try {
    // Rows first: a file named by a row is already in its place then, and files are never altered.
    const rows = await writeRows(database.access, join(stage, 'database.jsonl'));
    const files = keptFiles(dataDirectory);
    mkdirSync(join(stage, 'data'));
    for (const path of files) {
      mkdirSync(dirname(join(stage, 'data', path)), { recursive: true });
      copyFileSync(join(dataDirectory, path), join(stage, 'data', path));
    }
    await pack(stage, `${stage}.part`);
    chmodSync(`${stage}.part`, 0o600);
    renameSync(`${stage}.part`, archive);
    console.log(`${rows} rows and ${files.length} files in ${archive}\nSHA-256 ${await sha256Of(archive)}`);
    console.log('It holds secrets and the record of people: keep it as safe as the data directory.');
  } finally {
    rmSync(stage, { recursive: true, force: true });
    rmSync(`${stage}.part`, { force: true });
    if (!wasRunning) await database.stop();
  }
}

main().catch((error) => {
  console.error(error.message);
  process.exit(1);
});
