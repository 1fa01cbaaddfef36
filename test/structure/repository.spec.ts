import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { repositoryFiles, root, sourceFiles } from './sources';

const files = repositoryFiles();
const manifest = JSON.parse(readFileSync(join(root, 'package.json'), 'utf8')) as {
  dependencies: Record<string, string>;
  scripts: Record<string, string>;
};

describe('the repository', () => {
  it('keeps its top level to what DEVELOPERS.md lists', () => {
    const top = new Set(files.map((path) => path.split('/')[0]!));
    const allowed =
      /^(README\.md|DEVELOPERS\.md|package(-lock)?\.json|angular\.json|apps|libs|server|test|tools|tsconfig[^/]*\.json|[a-z]+\.config\.mjs|\..+)$/;
    expect([...top].filter((name) => !allowed.test(name))).toEqual([]);
  });

  it('records no download address in the lock file', () => {
    const lock = readFileSync(join(root, 'package-lock.json'), 'utf8');
    expect(lock).not.toContain('"resolved"');
  });

  it('uses each package it depends on', () => {
    const imported = new Set(sourceFiles().flatMap((file) => file.imports));
    const text = [
      ...files
        .filter((path) => /\.(scss|json|mjs)$/.test(path) && !path.startsWith('package'))
        .map((path) => readFileSync(join(root, path), 'utf8')),
      ...sourceFiles().map((file) => file.text),
    ].join('\n');
    // The compiler emits imports of these two; nobody writes them.
    const byTheCompiler = new Set(['tslib', '@angular/compiler']);
    const unused = Object.keys(manifest.dependencies).filter(
      (name) =>
        !byTheCompiler.has(name) &&
        ![...imported].some((used) => used === name || used.startsWith(`${name}/`)) &&
        !text.includes(`${name}/`),
    );
    expect(unused).toEqual([]);
  });

  it('names only scripts that are there', () => {
    const named = Object.values(manifest.scripts).flatMap(
      (script) => script.match(/(tools|test)\/[\w./-]+\.(mjs|ts)/g) ?? [],
    );
    expect(named.filter((path) => !files.includes(path))).toEqual([]);
  });

  it('keeps code files within 400 lines', () => {
    const long = sourceFiles()
      .map((file) => [file.path, file.text.split('\n').length - 1] as const)
      .filter(([, lines]) => lines > 400);
    expect(long).toEqual([]);
  });
});
