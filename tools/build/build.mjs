import { execFile } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { basename, dirname, join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { promisify } from 'node:util';

const root = join(dirname(fileURLToPath(import.meta.url)), '../..');

function filesBelow(folder) {
  if (!existsSync(folder)) return [];
  return readdirSync(folder, { withFileTypes: true, recursive: true })
    .filter((entry) => entry.isFile())
    .map((entry) => join(entry.parentPath ?? entry.path, entry.name))
    .filter((path) => !path.endsWith('.spec.ts') && !path.includes('/reference/'))
    .sort();
}

/** Hash of everything a part is built from. */
function stampOf(folders) {
  const hash = createHash('sha256');
  for (const name of [
    'package-lock.json',
    'angular.json',
    'tsconfig.base.json',
    'apps/web/tsconfig.app.json',
  ])
    hash.update(readFileSync(join(root, name)));
  for (const path of folders.flatMap((folder) => filesBelow(join(root, folder))))
    hash.update(path.slice(root.length)).update(readFileSync(path));
  return hash.digest('hex');
}

async function unlessSame(out, name, folders, build) {
  const file = join(out, `${name}.stamp`);
  const stamp = stampOf(folders);
  if (existsSync(file) && readFileSync(file, 'utf8') === stamp && existsSync(join(out, name))) return false;
  rmSync(file, { force: true });
  await build();
  writeFileSync(file, stamp);
  return true;
}

/** The server and its worker threads as bundles; packages stay outside, but for those that load slowly from many files. */
async function buildServer(out) {
  const { build } = await import('esbuild');
  const { dependencies } = JSON.parse(readFileSync(join(root, 'package.json'), 'utf8'));
  const workers = filesBelow(join(root, 'server/src')).filter((path) => path.endsWith('.worker.ts'));
  const entries = [
    ...['main', 'verify', 'migrate'].map((name) => join(root, `server/src/${name}.ts`)),
    ...workers,
  ];
  await build({
    entryPoints: Object.fromEntries(entries.map((path) => [basename(path, '.ts'), path])),
    outdir: join(out, 'server'),
    outExtension: { '.js': '.mjs' },
    bundle: true,
    platform: 'node',
    format: 'esm',
    target: 'node20',
    sourcemap: true,
    tsconfig: join(root, 'tsconfig.base.json'),
    external: Object.keys(dependencies).filter(
      (name) => !['mathjs', 'canonicalize', 'zod', 'fast-json-patch'].includes(name),
    ),
    banner: {
      js: "import { createRequire as requireOf } from 'node:module'; const require = requireOf(import.meta.url);",
    },
    logLevel: 'warning',
  });
}

async function buildClient(out) {
  const ng = join(root, 'node_modules/@angular/cli/bin/ng.js');
  const run = promisify(execFile)(
    process.execPath,
    [ng, 'build', '--configuration', 'production', '--output-path', join(out, 'web')],
    {
      cwd: root,
      env: { ...process.env, NG_CLI_ANALYTICS: 'false', CI: '1' },
      maxBuffer: 64 * 1024 * 1024,
    },
  );
  await run.catch((error) => {
    throw new Error(`The client does not build:\n${error.stdout}${error.stderr}`);
  });
}

/** The server alone, for commands that need no client. */
export async function buildServerOnly(out) {
  mkdirSync(out, { recursive: true });
  await unlessSame(out, 'server', ['server', 'libs', 'tools/build'], () => buildServer(out));
}

/** Builds what has changed since the last time into `out`: out/server and out/web/browser. */
export async function buildAll(out) {
  mkdirSync(out, { recursive: true });
  const server = buildServerOnly(out);
  const client = unlessSame(out, 'web', ['apps/web', 'libs'], () => {
    console.log('Building the client (about half a minute)');
    return buildClient(out);
  });
  await Promise.all([server, client]);
}

if (import.meta.url === pathToFileURL(process.argv[1]).href) {
  const at = process.argv.indexOf('--out');
  await buildAll(join(root, at > 0 ? process.argv[at + 1] : 'dist'));
}
