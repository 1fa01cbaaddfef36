import { refuseNoPath } from './abcd';
import { addBlock, invertBlock, makeBlocks, multiplyBlock, putBlock, takeBlock } from './blocks';
import type { CascadePorts } from './chain';

/**
 * The three chain scattering matrices in use (formula A3). `a`: [b near; a near] = T [a far; b far]. `b`: [a near; b near] =
 * T [b far; a far], the same entries with rows and columns exchanged. Both multiply near to far, T1 T2 T3. `c`: [b far; a far] =
 * T [a near; b near], which is `a` of the network turned round and multiplies far to near, T3 T2 T1.
 */
export type ChainConvention = 'a' | 'b' | 'c';

/**
 * Chain scattering; in convention `a`, with blocks of 1 or 2 ports, T = [[S12 - S11 S21^-1 S22, S11 S21^-1], [-S21^-1 S22, S21^-1]].
 *
 * The cascade does not go through T, which loses what lies far below its largest entry.
 * @throws NetworkError where nothing passes from near to far (`c`: from far to near)
 */
export function sToTInto(
  out: Float64Array,
  s: Float64Array,
  ports: CascadePorts,
  points: number,
  convention: ChainConvention = 'a',
): void {
  const n = ports / 2;
  const [near, far] = convention === 'c' ? ([1, 0] as const) : ([0, 1] as const);
  const [first, last] = convention === 'b' ? ([1, 0] as const) : ([0, 1] as const);
  const [s11, s12, s21, s22, inverse, left, work] = makeBlocks(7, n) as Seven;
  for (let point = 0; point < points; point++) {
    const at = point * ports * ports * 2;
    takeBlock(s11, s, at, n, near, near);
    takeBlock(s12, s, at, n, near, far);
    takeBlock(s21, s, at, n, far, near);
    takeBlock(s22, s, at, n, far, far);
    if (!invertBlock(inverse, s21, n)) refuseNoPath(point);
    multiplyBlock(left, s11, inverse, n);
    multiplyBlock(work, left, s22, n);
    addBlock(work, s12, work, -1);
    putBlock(out, work, at, n, first, first);
    putBlock(out, left, at, n, first, last);
    multiplyBlock(work, inverse, s22, n);
    for (let k = 0; k < work.length; k++) work[k] = -work[k]!;
    putBlock(out, work, at, n, last, first);
    putBlock(out, inverse, at, n, last, last);
  }
}
type Seven = [
  Float64Array,
  Float64Array,
  Float64Array,
  Float64Array,
  Float64Array,
  Float64Array,
  Float64Array,
];

/**
 * Back from chain scattering (A3): S21 = T22^-1, S11 = T12 T22^-1, S22 = -T22^-1 T21, S12 = T11 - T12 T22^-1 T21.
 * @throws NetworkError where T22 is singular
 */
export function tToSInto(
  out: Float64Array,
  t: Float64Array,
  ports: CascadePorts,
  points: number,
  convention: ChainConvention = 'a',
): void {
  const n = ports / 2;
  const [near, far] = convention === 'c' ? ([1, 0] as const) : ([0, 1] as const);
  const [first, last] = convention === 'b' ? ([1, 0] as const) : ([0, 1] as const);
  const [t11, t12, t21, t22, inverse, left, work] = makeBlocks(7, n) as Seven;
  for (let point = 0; point < points; point++) {
    const at = point * ports * ports * 2;
    takeBlock(t11, t, at, n, first, first);
    takeBlock(t12, t, at, n, first, last);
    takeBlock(t21, t, at, n, last, first);
    takeBlock(t22, t, at, n, last, last);
    if (!invertBlock(inverse, t22, n)) refuseNoPath(point);
    multiplyBlock(left, t12, inverse, n);
    multiplyBlock(work, left, t21, n);
    addBlock(work, t11, work, -1);
    putBlock(out, left, at, n, near, near);
    putBlock(out, work, at, n, near, far);
    multiplyBlock(work, inverse, t21, n);
    for (let k = 0; k < work.length; k++) work[k] = -work[k]!;
    putBlock(out, inverse, at, n, far, near);
    putBlock(out, work, at, n, far, far);
  }
}
