import { resolveImport, sourceFiles, type SourceFile } from './sources';

const files = new Map(sourceFiles().map((file) => [file.path, file]));

/** A part and the parts of ours it may import, besides itself. */
const mayImport: readonly [part: string, allowed: readonly string[]][] = [
  ['libs/quantities/', []],
  ['libs/geometry/', []],
  ['libs/network/', []],
  ['libs/contracts/', ['libs/quantities/']],
  ['libs/touchstone/', ['libs/network/']],
  ['libs/lines/', ['libs/network/']],
  [
    'libs/elements/',
    ['libs/network/', 'libs/lines/', 'libs/touchstone/', 'libs/geometry/', 'libs/contracts/'],
  ],
  ['libs/masks/', ['libs/network/', 'libs/contracts/']],
  ['libs/budget/', ['libs/']],
  ['apps/web/', ['libs/contracts/', 'libs/quantities/', 'libs/geometry/']],
  ['apps/channel/', ['libs/contracts/', 'libs/budget/', 'libs/touchstone/']],
  ['server/', ['libs/']],
];

function ownImports(file: SourceFile): string[] {
  return file.imports.flatMap((name) => resolveImport(file, name, files) ?? []);
}

/** A spec or a reference script may look anywhere; the law binds what ships. */
function ships(path: string): boolean {
  return !path.endsWith('.spec.ts') && !path.includes('/reference/') && !path.includes('/testing/');
}

describe('imports', () => {
  it.each(mayImport)('of %s stay within %j', (part, allowed) => {
    const strays = [...files.values()]
      .filter((file) => file.path.startsWith(part) && ships(file.path))
      .flatMap((file) =>
        ownImports(file)
          .filter(
            (target) => !target.startsWith(part) && !allowed.some((prefix) => target.startsWith(prefix)),
          )
          .map((target) => `${file.path} -> ${target}`),
      );
    expect(strays).toEqual([]);
  });

  it('enter a library by its index only', () => {
    const strays = [...files.values()].flatMap((file) =>
      ownImports(file)
        .filter((target) => {
          const lib = /^libs\/[^/]+\//.exec(target)?.[0];
          if (lib === undefined || file.path.startsWith(lib) || target === `${lib}src/index.ts`) return false;
          // What a library offers to tests alone stands in its testing folder.
          return !(file.path.startsWith('test/') && target.startsWith(`${lib}src/testing/`));
        })
        .map((target) => `${file.path} -> ${target}`),
    );
    expect(strays).toEqual([]);
  });

  it('of libraries name no Node built-in', () => {
    const strays = [...files.values()]
      .filter((file) => file.path.startsWith('libs/') && ships(file.path))
      .flatMap((file) =>
        file.imports.filter((name) => name.startsWith('node:')).map((name) => `${file.path}: ${name}`),
      );
    expect(strays).toEqual([]);
  });

  it('know mathjs in libs/masks only', () => {
    const users = [...files.values()].filter(
      (file) => file.imports.some((name) => name.startsWith('mathjs')) && ships(file.path),
    );
    expect(users.filter((file) => !file.path.startsWith('libs/masks/')).map((file) => file.path)).toEqual([]);
  });

  it('form no cycle', () => {
    expect(findCycle()).toEqual([]);
  });
});

function findCycle(): string[] {
  const done = new Set<string>();
  const trail: string[] = [];
  const visit = (path: string): string[] => {
    if (done.has(path)) return [];
    const at = trail.indexOf(path);
    if (at >= 0) return [...trail.slice(at), path];
    trail.push(path);
    for (const target of ownImports(files.get(path)!)) {
      const cycle = files.has(target) ? visit(target) : [];
      if (cycle.length) return cycle;
    }
    trail.pop();
    done.add(path);
    return [];
  };
  for (const path of files.keys()) {
    const cycle = visit(path);
    if (cycle.length) return cycle;
  }
  return [];
}
