import { existsSync } from 'node:fs';
import { join, resolve } from 'node:path';

/**
 * What a spec needs beside the checkout. Absent, its tests are named as skipped and counted so, never as passed. A Debian
 * package is brought by `npm test` where it may install; under TOLLGATE_REQUIRE_ALL=1, as .ci/run sets it, its absence fails.
 */
export interface Need {
  /** As a reader would look for it. */
  readonly what: string;
  readonly path: string;
  readonly kind: 'package' | 'folder';
}

/** Debian's own Python: a package of Debian is not seen by another one on the PATH. */
export const debianPython = '/usr/bin/python3';
export const scikitRf: Need = {
  what: "Debian's python3-scikit-rf",
  path: '/usr/lib/python3/dist-packages/skrf',
  kind: 'package',
};
export const ngspice: Need = { what: "Debian's ngspice", path: '/usr/bin/ngspice', kind: 'package' };
export const atlc: Need = { what: "Debian's atlc", path: '/usr/bin/atlc', kind: 'package' };

/** Reference data that may lie beside the checkout; no part of it. */
export const referenceFolder =
  process.env['TOLLGATE_REFERENCE'] ?? resolve(__dirname, '../../../shared/reference');

/** Something of the reference folder, by its path inside. */
export function referenceData(...inside: string[]): Need {
  return {
    what: `reference/${inside.join('/')} beside the checkout`,
    path: join(referenceFolder, ...inside),
    kind: 'folder',
  };
}

export function isThere(need: Need): boolean {
  return existsSync(need.path);
}

/** `describe` of tests that need something. Where a folder is absent they are one skipped test that names it. */
export function describeWith(need: Need, name: string, tests: () => void): void {
  if (isThere(need)) {
    describe(name, tests);
  } else if (need.kind === 'folder') {
    describe.skip(name, () => it(`need ${need.what}`, () => undefined));
  } else if (process.env['TOLLGATE_REQUIRE_ALL'] === '1') {
    describe(name, () => {
      it(`need ${need.what}`, () => {
        throw new Error(`${need.what} is missing and everything is required: there is no ${need.path}.`);
      });
    });
  } else {
    describe.skip(name, tests);
  }
}
