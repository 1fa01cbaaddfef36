import { complexDivide, complexMultiply } from '@tollgate/network';
import { carryBack, type Ladder } from './ladder';
import type { Medium } from './medium';

/** One mode of a via: what leads from near to far, and the open stubs at both ends, each from its node outward. */
export interface ThroughAndStubs {
  readonly through: Ladder;
  readonly nearStub: Ladder;
  readonly farStub: Ladder;
}

/** Two states for the through ladder: columns of its chain matrix, (A, C) and (B, D). */
const path = new Float64Array(8);
const near = new Float64Array(4);
const far = new Float64Array(4);
const product = new Float64Array(8);
const work = new Float64Array(4);

/**
 * S between equal real references, at every frequency. An open stub is a shunt admittance Y = C/A of its chain matrix, which is
 * infinite at a quarter wave; the chain (A, 0; C, A) is the same shunt times A and always finite. With M' = A_near A_far M,
 * S21 = 2 A_near A_far/(A' + B'/R + C' R + D') (Frickey, 1994): exactly 0 where a stub shorts the node.
 */
export function throughAndStubs(parts: ThroughAndStubs, medium: Medium, referenceOhm: number): Float64Array {
  const points = medium.frequenciesHz.length;
  const out = new Float64Array(points * 8);
  for (let point = 0; point < points; point++) {
    path.fill(0);
    path[0] = 1;
    path[6] = 1;
    carryBack(path, parts.through, medium, point);
    near.fill(0);
    near[0] = 1;
    carryBack(near, parts.nearStub, medium, point);
    far.fill(0);
    far[0] = 1;
    carryBack(far, parts.farStub, medium, point);
    join();
    scatterInto(out, point * 8, referenceOhm);
  }
  return out;
}

/** product = (A, 0; C, A)near x path x (A, 0; C, A)far, as A, B, C, D. */
function join(): void {
  // path x far: its first column mixes both, its second is scaled.
  times(product, 0, path, 0, far, 0, path, 4, far, 2);
  times(product, 4, path, 2, far, 0, path, 6, far, 2);
  complexMultiply(product, 2, path[4]!, path[5]!, far[0]!, far[1]!);
  complexMultiply(product, 6, path[6]!, path[7]!, far[0]!, far[1]!);
  // near x that: the lower row first, the upper is still needed for it.
  times(work, 0, near, 2, product, 0, near, 0, product, 4);
  times(work, 2, near, 2, product, 2, near, 0, product, 6);
  complexMultiply(product, 0, near[0]!, near[1]!, product[0]!, product[1]!);
  complexMultiply(product, 2, near[0]!, near[1]!, product[2]!, product[3]!);
  product[4] = work[0]!;
  product[5] = work[1]!;
  product[6] = work[2]!;
  product[7] = work[3]!;
}

/** out = a b + c d. */
function times(
  out: Float64Array,
  at: number,
  a: Float64Array,
  ai: number,
  b: Float64Array,
  bi: number,
  c: Float64Array,
  ci: number,
  d: Float64Array,
  di: number,
): void {
  const re = a[ai]! * b[bi]! - a[ai + 1]! * b[bi + 1]! + c[ci]! * d[di]! - c[ci + 1]! * d[di + 1]!;
  const im = a[ai]! * b[bi + 1]! + a[ai + 1]! * b[bi]! + c[ci]! * d[di + 1]! + c[ci + 1]! * d[di]!;
  out[at] = re;
  out[at + 1] = im;
}

function scatterInto(out: Float64Array, at: number, referenceOhm: number): void {
  const bRe = product[2]! / referenceOhm;
  const bIm = product[3]! / referenceOhm;
  const cRe = product[4]! * referenceOhm;
  const cIm = product[5]! * referenceOhm;
  const sumRe = product[0]! + bRe + cRe + product[6]!;
  const sumIm = product[1]! + bIm + cIm + product[7]!;
  if (sumRe === 0 && sumIm === 0) {
    // Both nodes shorted by lossless stubs, and a half wave trapped between them.
    out[at] = -1;
    out[at + 6] = -1;
    return;
  }
  const reRe = bRe - cRe;
  const reIm = bIm - cIm;
  const skewRe = product[0]! - product[6]!;
  const skewIm = product[1]! - product[7]!;
  complexDivide(out, at, reRe + skewRe, reIm + skewIm, sumRe, sumIm);
  complexDivide(out, at + 6, reRe - skewRe, reIm - skewIm, sumRe, sumIm);
  complexMultiply(work, 0, near[0]!, near[1]!, far[0]!, far[1]!);
  complexDivide(out, at + 2, 2 * work[0]!, 2 * work[1]!, sumRe, sumIm);
  out[at + 4] = out[at + 2]!;
  out[at + 5] = out[at + 3]!;
}
