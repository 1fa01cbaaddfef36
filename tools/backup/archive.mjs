import { execFileSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { createReadStream, existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { pipeline } from 'node:stream/promises';

/**
 * The archive: a compressed tar of manifest.json, database.jsonl and data/ (files and secrets of the data directory). The
 * manifest names each of them with its SHA-256; an archive that differs from its manifest is refused whole.
 */
const format = 'tollgate.backup/1';
/** What belongs to a running product, not to its record. */
const leftOut = new Set(['mariadb', 'run.json', 'server.log', 'tmp']);

export async function sha256Of(path) {
  const hash = createHash('sha256');
  await pipeline(createReadStream(path), hash);
  return hash.digest('hex');
}

/** Paths below a folder, relative to it, of plain files. */
function filesBelow(folder, prefix = '') {
  return readdirSync(join(folder, prefix), { withFileTypes: true }).flatMap((entry) => {
    const path = prefix ? `${prefix}/${entry.name}` : entry.name;
    if (entry.isDirectory()) return filesBelow(folder, path);
    return entry.isFile() ? [path] : [];
  });
}

/** What of a data directory goes into its backup. */
export function keptFiles(dataDirectory) {
  return filesBelow(dataDirectory).filter((path) => !leftOut.has(path.split('/')[0]));
}

/** Packs `stage` (database.jsonl and data/) into `archive`. */
export async function pack(stage, archive) {
  const files = {};
  for (const path of filesBelow(stage).sort()) files[path] = await sha256Of(join(stage, path));
  writeFileSync(join(stage, 'manifest.json'), JSON.stringify({ format, files }), { mode: 0o600 });
  execFileSync('tar', ['-czf', archive, '-C', stage, 'manifest.json', 'database.jsonl', 'data'], {
    stdio: ['ignore', 'ignore', 'pipe'],
  });
}

/** Unpacks `archive` into `stage` and holds it against its manifest; throws where one byte differs. */
export async function unpack(archive, stage) {
  if (!existsSync(archive)) throw new Error(`There is no file ${archive}.`);
  const broken = (why) => new Error(`${archive} is not a whole backup: ${why}. Use another copy of it.`);
  try {
    execFileSync('tar', ['-xzf', archive, '-C', stage, '--no-same-owner'], {
      stdio: ['ignore', 'ignore', 'pipe'],
    });
  } catch (error) {
    throw broken(
      String(error.stderr ?? error.message)
        .trim()
        .split('\n')[0],
    );
  }
  if (!existsSync(join(stage, 'manifest.json'))) throw broken('it has no manifest');
  const manifest = JSON.parse(readFileSync(join(stage, 'manifest.json'), 'utf8'));
  if (manifest.format !== format) throw broken(`its format is ${manifest.format}, not ${format}`);
  const found = new Set(filesBelow(stage).filter((path) => path !== 'manifest.json'));
  for (const [path, sha256] of Object.entries(manifest.files)) {
    if (!found.delete(path)) throw broken(`${path} is missing`);
    if ((await sha256Of(join(stage, path))) !== sha256) throw broken(`${path} has another checksum`);
  }
  if (found.size > 0) throw broken(`${[...found][0]} is not in its manifest`);
}
