/** Small complex blocks (row-major pairs, `n` x `n`) in caller-given arrays; for the 1 + 1 and 2 + 2 port formulas. */

/** out = a b; `out` must be neither. */
export function multiplyBlock(out: Float64Array, a: Float64Array, b: Float64Array, n: number): void {
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      let re = 0;
      let im = 0;
      for (let k = 0; k < n; k++) {
        const p = (i * n + k) * 2;
        const q = (k * n + j) * 2;
        re += a[p]! * b[q]! - a[p + 1]! * b[q + 1]!;
        im += a[p]! * b[q + 1]! + a[p + 1]! * b[q]!;
      }
      out[(i * n + j) * 2] = re;
      out[(i * n + j) * 2 + 1] = im;
    }
  }
}

/** out = a + sign b. */
export function addBlock(out: Float64Array, a: Float64Array, b: Float64Array, sign: 1 | -1): void {
  for (let k = 0; k < out.length; k++) out[k] = a[k]! + sign * b[k]!;
}

/** out = 1 + sign a. */
export function onePlusBlock(out: Float64Array, a: Float64Array, sign: 1 | -1, n: number): void {
  for (let k = 0; k < out.length; k++) out[k] = sign * a[k]!;
  for (let i = 0; i < n; i++) out[(i * n + i) * 2] = out[(i * n + i) * 2]! + 1;
}

/**
 * out = a^-1 for n = 1 or 2.
 * @returns false where a is singular (out is then not written)
 */
export function invertBlock(out: Float64Array, a: Float64Array, n: number): boolean {
  if (n === 1) return putRatio(out, 0, 1, 0, a[0]!, a[1]!);
  const re = a[0]! * a[6]! - a[1]! * a[7]! - (a[2]! * a[4]! - a[3]! * a[5]!);
  const im = a[0]! * a[7]! + a[1]! * a[6]! - (a[2]! * a[5]! + a[3]! * a[4]!);
  if (re === 0 && im === 0) return false;
  putRatio(out, 0, a[6]!, a[7]!, re, im);
  putRatio(out, 2, -a[2]!, -a[3]!, re, im);
  putRatio(out, 4, -a[4]!, -a[5]!, re, im);
  return putRatio(out, 6, a[0]!, a[1]!, re, im);
}

function putRatio(
  out: Float64Array,
  at: number,
  aRe: number,
  aIm: number,
  bRe: number,
  bIm: number,
): boolean {
  const size = bRe * bRe + bIm * bIm;
  if (size === 0) return false;
  const re = (aRe * bRe + aIm * bIm) / size;
  out[at + 1] = (aIm * bRe - aRe * bIm) / size;
  out[at] = re;
  return true;
}

/** Copies block (row, column) of a matrix of 2n x 2n blocks at `at` of `s` into `out`. */
export function takeBlock(
  out: Float64Array,
  s: Float64Array,
  at: number,
  n: number,
  row: 0 | 1,
  column: 0 | 1,
): void {
  for (let i = 0; i < n; i++) {
    const from = at + ((row * n + i) * 2 * n + column * n) * 2;
    for (let j = 0; j < n * 2; j++) out[i * n * 2 + j] = s[from + j]!;
  }
}

/** Writes `block` as block (row, column) of a matrix of 2n x 2n at `at` of `s`. */
export function putBlock(
  s: Float64Array,
  block: Float64Array,
  at: number,
  n: number,
  row: 0 | 1,
  column: 0 | 1,
): void {
  for (let i = 0; i < n; i++) {
    const to = at + ((row * n + i) * 2 * n + column * n) * 2;
    for (let j = 0; j < n * 2; j++) s[to + j] = block[i * n * 2 + j]!;
  }
}

/** `count` zero blocks of n x n. */
export function makeBlocks(count: number, n: number): Float64Array[] {
  return Array.from({ length: count }, () => new Float64Array(n * n * 2));
}
