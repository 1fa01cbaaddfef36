import { refuseNoPath } from './abcd';
import { addBlock, invertBlock, makeBlocks, multiplyBlock, putBlock, takeBlock } from './blocks';

/**
 * Block ABCD of 2 + 2 ports to power-wave S (A1 in block form), complex and unequal references allowed.
 * [V near; I near] = [A B; C D] [V far; I far], I far out of the far ports.
 *
 * From a = (V + Z I)/(2 sqrt R) and b = (V - Z* I)/(2 sqrt R) with currents into the ports:
 * M = A Z2 + B + Z1 (C Z2 + D); I far = M^-1 (2 sqrt R1 a1 - 2 (A + Z1 C) sqrt R2 a2).
 *
 * @param abcd 4 x 4 row-major pairs, 32 numbers a point; may be `out`
 * @param referenceOhm four pairs
 */
export function abcdToS4Into(
  out: Float64Array,
  abcd: Float64Array,
  points: number,
  referenceOhm: Float64Array,
): void {
  const [a, b, c, d, e, m, inverse, far, work, other] = makeBlocks(10, 2) as Ten;
  const z = referenceOhm;
  const root = Array.from({ length: 4 }, (_, port) => Math.sqrt(z[port * 2]!));
  for (let point = 0; point < points; point++) {
    const at = point * 32;
    takeBlock(a, abcd, at, 2, 0, 0);
    takeBlock(b, abcd, at, 2, 0, 1);
    takeBlock(c, abcd, at, 2, 1, 0);
    takeBlock(d, abcd, at, 2, 1, 1);
    // e = A + Z1 C, m = e Z2 + B + Z1 D
    scaleRows(work, c, z, 0, 1);
    addBlock(e, a, work, 1);
    scaleColumns(m, e, z, 4);
    addBlock(m, m, b, 1);
    scaleRows(work, d, z, 0, 1);
    addBlock(m, m, work, 1);
    if (!invertBlock(inverse, m, 2)) refuseNoPath(point);
    // Stimulus a1: I far = 2 M^-1 sqrt R1, V far = Z2 I far, b2 = (Z2 + Z2*) I far/(2 sqrt R2) = sqrt R2 I far
    for (let i = 0; i < 2; i++) {
      for (let k = 0; k < 4; k++) far[i * 4 + k] = 2 * inverse[i * 4 + k]! * root[k >> 1]! * root[2 + i]!;
    }
    putBlock(out, far, at, 2, 1, 0);
    nearWaves(work, other, { a, b, c, d, z, root }, inverse, null);
    putBlock(out, work, at, 2, 0, 0);
    // Stimulus a2: I far = -2 M^-1 e sqrt R2, V far = Z2 I far + 2 sqrt R2 a2
    multiplyBlock(far, inverse, e, 2);
    nearWaves(work, other, { a, b, c, d, z, root }, far, a);
    putBlock(out, work, at, 2, 0, 1);
    // b2 = (V + Z2* I)/(2 sqrt R2) = sqrt R2 I far + a2
    for (let i = 0; i < 2; i++) {
      for (let k = 0; k < 4; k++) far[i * 4 + k] = -2 * far[i * 4 + k]! * root[2 + (k >> 1)]! * root[2 + i]!;
      far[i * 6] = far[i * 6]! + 1;
    }
    putBlock(out, far, at, 2, 1, 1);
  }
}
type Ten = [
  ...[Float64Array, Float64Array, Float64Array, Float64Array, Float64Array],
  ...[Float64Array, Float64Array, Float64Array, Float64Array, Float64Array],
];

interface Chain4 {
  readonly a: Float64Array;
  readonly b: Float64Array;
  readonly c: Float64Array;
  readonly d: Float64Array;
  readonly z: Float64Array;
  readonly root: readonly number[];
}

/**
 * Waves leaving the near ports, b1 = (V1 - Z1* I1)/(2 sqrt R1) with V1 - Z1* I1 = (A - Z1* C) V2 + (B - Z1* D) I2.
 * `current` is I far but for its factor: 2 sqrt R1 for near stimulus (`direct` null), -2 sqrt R2 for far stimulus.
 */
function nearWaves(
  out: Float64Array,
  work: Float64Array,
  chain: Chain4,
  current: Float64Array,
  direct: Float64Array | null,
): void {
  const { a, b, c, d, z, root } = chain;
  const sign = direct ? -1 : 1;
  for (let i = 0; i < 2; i++) {
    for (let j = 0; j < 2; j++) {
      // p = A - Z1* C, q = B - Z1* D
      const k = (i * 2 + j) * 2;
      const [zr, zi] = [z[i * 2]!, z[i * 2 + 1]!];
      const pr = a[k]! - (zr * c[k]! + zi * c[k + 1]!);
      const pi = a[k + 1]! - (zr * c[k + 1]! - zi * c[k]!);
      const qr = b[k]! - (zr * d[k]! + zi * d[k + 1]!);
      const qi = b[k + 1]! - (zr * d[k + 1]! - zi * d[k]!);
      const [fr, fi] = [z[4 + j * 2]!, z[4 + j * 2 + 1]!];
      work[k] = pr * fr - pi * fi + qr;
      work[k + 1] = pr * fi + pi * fr + qi;
    }
  }
  multiplyBlock(out, work, current, 2);
  for (let i = 0; i < 2; i++) {
    for (let j = 0; j < 2; j++) {
      const k = (i * 2 + j) * 2;
      const stimulus = root[direct ? 2 + j : j]!;
      const scale = stimulus / root[i]!;
      let re = sign * out[k]!;
      let im = sign * out[k + 1]!;
      if (direct) {
        const [zr, zi] = [z[i * 2]!, z[i * 2 + 1]!];
        re += a[k]! - (zr * c[k]! + zi * c[k + 1]!);
        im += a[k + 1]! - (zr * c[k + 1]! - zi * c[k]!);
      }
      out[k] = re * scale;
      out[k + 1] = im * scale;
    }
  }
}

/** out = diag(Z) a; `from` is the place of the first reference. */
function scaleRows(
  out: Float64Array,
  a: Float64Array,
  z: Float64Array,
  from: number,
  conjugate: 1 | -1,
): void {
  for (let k = 0; k < 8; k += 2) scalePair(out, a, k, z, from + (k >> 2) * 2, conjugate);
}

/** out = a diag(Z). */
function scaleColumns(out: Float64Array, a: Float64Array, z: Float64Array, from: number): void {
  for (let k = 0; k < 8; k += 2) scalePair(out, a, k, z, from + ((k >> 1) & 1) * 2, 1);
}

function scalePair(
  out: Float64Array,
  a: Float64Array,
  k: number,
  z: Float64Array,
  at: number,
  conjugate: 1 | -1,
): void {
  const re = z[at]!;
  const im = conjugate * z[at + 1]!;
  const ar = a[k]!;
  const ai = a[k + 1]!;
  out[k] = ar * re - ai * im;
  out[k + 1] = ar * im + ai * re;
}

/**
 * Power-wave S of 2 + 2 ports to block ABCD. With V = (Z* a + Z b)/sqrt R and I = (a - b)/sqrt R:
 * a1 = S21^-1 (b2 - S22 a2), b1 = S11 a1 + S12 a2.
 * @throws NetworkError where S21 is singular
 */
export function sToAbcd4Into(
  out: Float64Array,
  s: Float64Array,
  points: number,
  referenceOhm: Float64Array,
): void {
  const [s11, s12, s21, s22, inverse, a1, b1, work, v, i1] = makeBlocks(10, 2) as Ten;
  const z = referenceOhm;
  const root = Array.from({ length: 4 }, (_, port) => Math.sqrt(z[port * 2]!));
  for (let point = 0; point < points; point++) {
    const at = point * 32;
    takeBlock(s11, s, at, 2, 0, 0);
    takeBlock(s12, s, at, 2, 0, 1);
    takeBlock(s21, s, at, 2, 1, 0);
    takeBlock(s22, s, at, 2, 1, 1);
    if (!invertBlock(inverse, s21, 2)) refuseNoPath(point);
    for (const column of [0, 1] as const) {
      // Column 0: V far = 1, I far = 0; column 1: I far (outwards) = 1, V far = 0. a2 and b2 are diagonal.
      for (let i = 0; i < 2; i++) {
        const half = 1 / (2 * root[2 + i]!);
        const [zr, zi] = [z[4 + i * 2]!, z[5 + i * 2]!];
        far[i * 4] = column === 0 ? half : -zr * half;
        far[i * 4 + 1] = column === 0 ? 0 : -zi * half;
        far[i * 4 + 2] = column === 0 ? half : zr * half;
        far[i * 4 + 3] = column === 0 ? 0 : -zi * half;
      }
      for (let k = 0; k < 8; k += 2) {
        const j = (k >> 1) & 1;
        const [ar, ai, br, bi] = [far[j * 4]!, far[j * 4 + 1]!, far[j * 4 + 2]!, far[j * 4 + 3]!];
        const onDiagonal = k === 0 || k === 6;
        work[k] = (onDiagonal ? br : 0) - (s22[k]! * ar - s22[k + 1]! * ai);
        work[k + 1] = (onDiagonal ? bi : 0) - (s22[k]! * ai + s22[k + 1]! * ar);
        v[k] = s12[k]! * ar - s12[k + 1]! * ai;
        v[k + 1] = s12[k]! * ai + s12[k + 1]! * ar;
      }
      multiplyBlock(a1, inverse, work, 2);
      multiplyBlock(b1, s11, a1, 2);
      addBlock(b1, b1, v, 1);
      voltageAndCurrent(v, i1, a1, b1, z, root);
      putBlock(out, v, at, 2, 0, column);
      putBlock(out, i1, at, 2, 1, column);
    }
  }
}
const far = new Float64Array(8);

function voltageAndCurrent(
  v: Float64Array,
  i1: Float64Array,
  a1: Float64Array,
  b1: Float64Array,
  z: Float64Array,
  root: readonly number[],
): void {
  for (let k = 0; k < 8; k += 2) {
    const i = k >> 2;
    const scale = 1 / root[i]!;
    const [zr, zi] = [z[i * 2]!, z[i * 2 + 1]!];
    const [ar, ai, br, bi] = [a1[k]!, a1[k + 1]!, b1[k]!, b1[k + 1]!];
    v[k] = (zr * ar + zi * ai + (zr * br - zi * bi)) * scale;
    v[k + 1] = (zr * ai - zi * ar + (zr * bi + zi * br)) * scale;
    i1[k] = (ar - br) * scale;
    i1[k + 1] = (ai - bi) * scale;
  }
}
