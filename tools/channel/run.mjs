// Runs apps/channel from a bundle that is made anew only when its sources changed: a check starts in a fraction of a second.
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, renameSync, rmSync } from 'node:fs';
import { dirname, join, resolve } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';

const root = resolve(dirname(fileURLToPath(import.meta.url)), '../..');
const built = process.env.TOLLGATE_BUILD
  ? resolve(process.env.TOLLGATE_BUILD, 'channel')
  : join(root, 'dist/channel');

function sourcesIn(folder) {
  return readdirSync(folder, { withFileTypes: true, recursive: true })
    .filter((entry) => entry.isFile() && entry.name.endsWith('.ts') && !entry.name.endsWith('.spec.ts'))
    .map((entry) => join(entry.parentPath ?? entry.path, entry.name))
    .sort();
}

function stamp() {
  const hash = createHash('sha256');
  const sources = [...sourcesIn(join(root, 'libs')), ...sourcesIn(join(root, 'apps/channel'))];
  for (const file of [...sources, join(root, 'package-lock.json'), fileURLToPath(import.meta.url)]) {
    hash.update(file.slice(root.length)).update('\0').update(readFileSync(file)).update('\0');
  }
  return hash.digest('hex').slice(0, 16);
}

async function bundle(target) {
  const { build } = await import('esbuild');
  mkdirSync(built, { recursive: true });
  const unfinished = `${target}.${process.pid}.tmp`;
  await build({
    entryPoints: [join(root, 'apps/channel/src/main.ts')],
    outfile: unfinished,
    bundle: true,
    platform: 'node',
    target: 'node20',
    format: 'cjs',
    minify: true,
    tsconfig: join(root, 'tsconfig.base.json'),
    logLevel: 'warning',
  });
  // A second run at the same time finds a whole bundle or none.
  renameSync(unfinished, target);
  for (const old of readdirSync(built)) {
    const path = join(built, old);
    if (path !== target && old.startsWith('channel-') && old.endsWith('.cjs')) rmSync(path, { force: true });
  }
}

try {
  const target = join(built, `channel-${stamp()}.cjs`);
  if (!existsSync(target)) await bundle(target);
  await import(pathToFileURL(target).href);
} catch (error) {
  // 1 would say that the channel exceeds a limit.
  process.exitCode = 2;
  process.stderr.write(`The check could not be started: ${error instanceof Error ? error.message : error}\n`);
}
