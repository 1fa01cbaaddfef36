import { execFileSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { dirname, join, relative } from 'node:path';
import { fileURLToPath } from 'node:url';
import ts from 'typescript';

export const root = join(dirname(fileURLToPath(import.meta.url)), '../..');

export interface SourceFile {
  /** Path from the root, with forward slashes. */
  readonly path: string;
  readonly text: string;
  /** Module names as written in imports, exports and dynamic imports. */
  readonly imports: readonly string[];
}

/** Every file git knows or would know (not ignored). */
export function repositoryFiles(): string[] {
  const listed = execFileSync('git', ['ls-files', '--cached', '--others', '--exclude-standard'], {
    cwd: root,
    encoding: 'utf8',
  });
  return listed.split('\n').filter(Boolean);
}

/** All TypeScript and .mjs sources with what they import, read by the compiler's own scanner. */
export function sourceFiles(): SourceFile[] {
  return repositoryFiles()
    .filter((path) => /\.(ts|mjs)$/.test(path))
    .flatMap((path) => {
      const text = readIfThere(join(root, path));
      if (text === undefined) return [];
      const imports = ts.preProcessFile(text, true, true).importedFiles.map((file) => file.fileName);
      return [{ path, text, imports }];
    });
}

/** The source a relative or aliased import means; undefined for packages. */
export function resolveImport(
  from: SourceFile,
  name: string,
  known: ReadonlyMap<string, SourceFile>,
): string | undefined {
  const alias = /^@tollgate\/([^/]+)$/.exec(name);
  if (alias) return `libs/${alias[1]}/src/index.ts`;
  if (!name.startsWith('.')) return undefined;
  const target = relative(root, join(root, dirname(from.path), name));
  return [target, `${target}.ts`, `${target}/index.ts`].find((path) => known.has(path));
}

function readIfThere(path: string): string | undefined {
  try {
    return readFileSync(path, 'utf8');
  } catch (error) {
    // A file removed from the work tree and not yet from the index is simply not there.
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return undefined;
    throw error;
  }
}
