// Runs apps/channel from a bundle that is made anew only when its sources changed, and from the machine code of the run before: a
// check starts in a fraction of a second.
import { createHash } from 'node:crypto';
import {
  existsSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  renameSync,
  rmSync,
  statSync,
  writeFileSync,
} from 'node:fs';
import { createRequire } from 'node:module';
import { dirname, join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { Script } from 'node:vm';

const root = resolve(dirname(fileURLToPath(import.meta.url)), '../..');
const built = process.env.TOLLGATE_BUILD
  ? resolve(process.env.TOLLGATE_BUILD, 'channel')
  : join(root, 'dist/channel');

/** Names, sizes and times of change: a tenth of the time that reading every source takes. */
function stamp() {
  const hash = createHash('sha256');
  const folders = ['libs', 'apps/channel'].map((folder) => join(root, folder));
  const sources = folders.flatMap((folder) =>
    readdirSync(folder, { recursive: true })
      .filter((name) => name.endsWith('.ts') && !name.endsWith('.spec.ts'))
      .map((name) => join(folder, name)),
  );
  for (const file of [...sources.sort(), join(root, 'package-lock.json'), fileURLToPath(import.meta.url)]) {
    const { size, mtimeMs } = statSync(file);
    hash.update(`${file.slice(root.length)} ${size} ${mtimeMs}\n`);
  }
  return hash.digest('hex').slice(0, 16);
}

async function bundle(target) {
  const { build } = await import('esbuild');
  mkdirSync(built, { recursive: true });
  const unfinished = unfinishedOf(target);
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
    if (path !== target && /^channel-.*\.(cjs|code)$/.test(old)) rmSync(path, { force: true });
  }
}

function unfinishedOf(path) {
  return `${path}.${process.pid}.tmp`;
}

/** Runs the bundle as a module. V8 takes the code it kept only where its version and flags are the same, else compiles anew. */
function run(target) {
  const kept = target.replace(/cjs$/, 'code');
  const cachedData = existsSync(kept) ? readFileSync(kept) : undefined;
  const source = `(function (require) {${readFileSync(target, 'utf8')}\n})`;
  const script = new Script(source, { filename: target, cachedData });
  script.runInThisContext()(createRequire(target));
  if (cachedData && !script.cachedDataRejected) return;
  // After the run, so that it holds what the run has compiled.
  try {
    writeFileSync(unfinishedOf(kept), script.createCachedData());
    renameSync(unfinishedOf(kept), kept);
  } catch (error) {
    // The check is done and told; where the folder cannot be written, the next one starts a little later.
    if (!['EACCES', 'EROFS', 'ENOSPC', 'EPERM'].includes(error.code)) throw error;
  }
}

try {
  const target = join(built, `channel-${stamp()}.cjs`);
  if (!existsSync(target)) await bundle(target);
  run(target);
} catch (error) {
  // 1 would say that the channel exceeds a limit.
  process.exitCode = 2;
  process.stderr.write(`The check could not be started: ${error instanceof Error ? error.message : error}\n`);
}
