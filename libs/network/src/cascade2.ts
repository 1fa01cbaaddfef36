/**
 * Cascade of two-ports, point by point, by the Redheffer star product (formula A4; R. Redheffer, J. Math. Phys. 41,
 * 1962): never through ABCD, which loses S11 on lossy channels. Equal real reference at the joint.
 *
 * A wave that a joint traps without loss (1 - S22A S11B = 0) is reached from no port of passive parts: it
 * contributes nothing.
 *
 * @param out 8 numbers a point; may be `a` or `b`
 * @returns how many points had such a trapped wave
 */
export function cascade2Into(out: Float64Array, a: Float64Array, b: Float64Array, points: number): number {
  let trapped = 0;
  const end = points * 8;
  // `k | n` is k + n, since k is a multiple of 8: a sum would be checked for overflow at each of the 24 accesses.
  for (let k = 0; k < end; k += 8) {
    const a12r = a[k | 2]!;
    const a12i = a[k | 3]!;
    const a21r = a[k | 4]!;
    const a21i = a[k | 5]!;
    const a22r = a[k | 6]!;
    const a22i = a[k | 7]!;
    const b11r = b[k]!;
    const b11i = b[k | 1]!;
    const b12r = b[k | 2]!;
    const b12i = b[k | 3]!;
    const b21r = b[k | 4]!;
    const b21i = b[k | 5]!;
    // 1 - S22A S11B = dr - j di
    const dr = 1 - a22r * b11r + a22i * b11i;
    const di = a22r * b11i + a22i * b11r;
    const size = dr * dr + di * di;
    let scale = 1 / size;
    // So close to a trapped, lossless wave the joint carries nothing. A literal: a name would be looked up at every point.
    if (size < 1e-30) {
      scale = 0;
      trapped++;
    }
    const ir = dr * scale;
    const ii = di * scale;
    // u = S21A / d, v = S12B / d
    const ur = a21r * ir - a21i * ii;
    const ui = a21r * ii + a21i * ir;
    const vr = b12r * ir - b12i * ii;
    const vi = b12r * ii + b12i * ir;
    // p = S12A S11B, q = S21B S22A
    const pr = a12r * b11r - a12i * b11i;
    const pi = a12r * b11i + a12i * b11r;
    const qr = b21r * a22r - b21i * a22i;
    const qi = b21r * a22i + b21i * a22r;
    const s22r = b[k | 6]! + qr * vr - qi * vi;
    const s22i = b[k | 7]! + qr * vi + qi * vr;
    out[k] = a[k]! + pr * ur - pi * ui;
    out[k | 1] = a[k | 1]! + pr * ui + pi * ur;
    out[k | 2] = a12r * vr - a12i * vi;
    out[k | 3] = a12r * vi + a12i * vr;
    out[k | 4] = b21r * ur - b21i * ui;
    out[k | 5] = b21r * ui + b21i * ur;
    out[k | 6] = s22r;
    out[k | 7] = s22i;
  }
  return trapped;
}
