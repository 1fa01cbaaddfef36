import { solveJoint4 } from './joint';

/** Determinants below this share of the joint matrix's size go to the careful solution. */
const nearSingular = 1e-24;
/** What the careful solution of one joint hands back: X = M^-1 R, 2 x 4 complex. */
const careful = new Float64Array(16);

/**
 * Cascade of 2 + 2 ports (1, 2 near; 3, 4 far), point by point: the star product with 2 x 2 blocks (formula A4), written
 * out so that every number stays in a register or on the stack. Equal real reference at the joined ports.
 *
 * @param out 32 numbers a point; may be `a` or `b`
 * @returns how many points had a wave trapped without loss at the joint (it contributes nothing)
 */
export function cascade4Into(out: Float64Array, a: Float64Array, b: Float64Array, points: number): number {
  let trapped = 0;
  const end = points * 32;
  for (let k = 0; k < end; k += 32) {
    // Joint: M = 1 - S22A S11B acts on y, the waves from a to b.
    const a33r = a[k + 20]!;
    const a33i = a[k + 21]!;
    const a34r = a[k + 22]!;
    const a34i = a[k + 23]!;
    const a43r = a[k + 28]!;
    const a43i = a[k + 29]!;
    const a44r = a[k + 30]!;
    const a44i = a[k + 31]!;
    const b11r = b[k]!;
    const b11i = b[k + 1]!;
    const b12r = b[k + 2]!;
    const b12i = b[k + 3]!;
    const b21r = b[k + 8]!;
    const b21i = b[k + 9]!;
    const b22r = b[k + 10]!;
    const b22i = b[k + 11]!;
    const m00r = 1 - (a33r * b11r - a33i * b11i) - (a34r * b21r - a34i * b21i);
    const m00i = -(a33r * b11i + a33i * b11r) - (a34r * b21i + a34i * b21r);
    const m01r = -(a33r * b12r - a33i * b12i) - (a34r * b22r - a34i * b22i);
    const m01i = -(a33r * b12i + a33i * b12r) - (a34r * b22i + a34i * b22r);
    const m10r = -(a43r * b11r - a43i * b11i) - (a44r * b21r - a44i * b21i);
    const m10i = -(a43r * b11i + a43i * b11r) - (a44r * b21i + a44i * b21r);
    const m11r = 1 - (a43r * b12r - a43i * b12i) - (a44r * b22r - a44i * b22i);
    const m11i = -(a43r * b12i + a43i * b12r) - (a44r * b22i + a44i * b22r);
    const detr = m00r * m11r - m00i * m11i - (m01r * m10r - m01i * m10i);
    const deti = m00r * m11i + m00i * m11r - (m01r * m10i + m01i * m10r);
    const size = detr * detr + deti * deti;
    const scale = 1 / size;
    const er = detr * scale;
    const ei = -deti * scale;
    const n00r = m11r * er - m11i * ei;
    const n00i = m11r * ei + m11i * er;
    const n01r = m01i * ei - m01r * er;
    const n01i = -(m01r * ei + m01i * er);
    const n10r = m10i * ei - m10r * er;
    const n10i = -(m10r * ei + m10i * er);
    const n11r = m00r * er - m00i * ei;
    const n11i = m00r * ei + m00i * er;
    // Right sides: columns 0, 1 = S21A; columns 2, 3 = S22A S12B.
    const r00r = a[k + 16]!;
    const r00i = a[k + 17]!;
    const r01r = a[k + 18]!;
    const r01i = a[k + 19]!;
    const r10r = a[k + 24]!;
    const r10i = a[k + 25]!;
    const r11r = a[k + 26]!;
    const r11i = a[k + 27]!;
    const b13r = b[k + 4]!;
    const b13i = b[k + 5]!;
    const b14r = b[k + 6]!;
    const b14i = b[k + 7]!;
    const b23r = b[k + 12]!;
    const b23i = b[k + 13]!;
    const b24r = b[k + 14]!;
    const b24i = b[k + 15]!;
    const r02r = a33r * b13r - a33i * b13i + (a34r * b23r - a34i * b23i);
    const r02i = a33r * b13i + a33i * b13r + (a34r * b23i + a34i * b23r);
    const r03r = a33r * b14r - a33i * b14i + (a34r * b24r - a34i * b24i);
    const r03i = a33r * b14i + a33i * b14r + (a34r * b24i + a34i * b24r);
    const r12r = a43r * b13r - a43i * b13i + (a44r * b23r - a44i * b23i);
    const r12i = a43r * b13i + a43i * b13r + (a44r * b23i + a44i * b23r);
    const r13r = a43r * b14r - a43i * b14i + (a44r * b24r - a44i * b24i);
    const r13i = a43r * b14i + a43i * b14r + (a44r * b24i + a44i * b24r);
    // y = the waves from a to b.
    let y00r = n00r * r00r - n00i * r00i + (n01r * r10r - n01i * r10i);
    let y00i = n00r * r00i + n00i * r00r + (n01r * r10i + n01i * r10r);
    let y10r = n10r * r00r - n10i * r00i + (n11r * r10r - n11i * r10i);
    let y10i = n10r * r00i + n10i * r00r + (n11r * r10i + n11i * r10r);
    let y01r = n00r * r01r - n00i * r01i + (n01r * r11r - n01i * r11i);
    let y01i = n00r * r01i + n00i * r01r + (n01r * r11i + n01i * r11r);
    let y11r = n10r * r01r - n10i * r01i + (n11r * r11r - n11i * r11i);
    let y11i = n10r * r01i + n10i * r01r + (n11r * r11i + n11i * r11r);
    let y02r = n00r * r02r - n00i * r02i + (n01r * r12r - n01i * r12i);
    let y02i = n00r * r02i + n00i * r02r + (n01r * r12i + n01i * r12r);
    let y12r = n10r * r02r - n10i * r02i + (n11r * r12r - n11i * r12i);
    let y12i = n10r * r02i + n10i * r02r + (n11r * r12i + n11i * r12r);
    let y03r = n00r * r03r - n00i * r03i + (n01r * r13r - n01i * r13i);
    let y03i = n00r * r03i + n00i * r03r + (n01r * r13i + n01i * r13r);
    let y13r = n10r * r03r - n10i * r03i + (n11r * r13r - n11i * r13i);
    let y13i = n10r * r03i + n10i * r03r + (n11r * r13i + n11i * r13r);
    if (!(size > nearSingular)) {
      trapped += solveJoint4(careful, a, b, k);
      y00r = careful[0]!;
      y00i = careful[1]!;
      y01r = careful[2]!;
      y01i = careful[3]!;
      y02r = careful[4]!;
      y02i = careful[5]!;
      y03r = careful[6]!;
      y03i = careful[7]!;
      y10r = careful[8]!;
      y10i = careful[9]!;
      y11r = careful[10]!;
      y11i = careful[11]!;
      y12r = careful[12]!;
      y12i = careful[13]!;
      y13r = careful[14]!;
      y13i = careful[15]!;
    }
    // z = the waves from b back to a: S11B y, and S12B for the far columns.
    const z00r = b11r * y00r - b11i * y00i + (b12r * y10r - b12i * y10i);
    const z00i = b11r * y00i + b11i * y00r + (b12r * y10i + b12i * y10r);
    const z10r = b21r * y00r - b21i * y00i + (b22r * y10r - b22i * y10i);
    const z10i = b21r * y00i + b21i * y00r + (b22r * y10i + b22i * y10r);
    const z01r = b11r * y01r - b11i * y01i + (b12r * y11r - b12i * y11i);
    const z01i = b11r * y01i + b11i * y01r + (b12r * y11i + b12i * y11r);
    const z11r = b21r * y01r - b21i * y01i + (b22r * y11r - b22i * y11i);
    const z11i = b21r * y01i + b21i * y01r + (b22r * y11i + b22i * y11r);
    const z02r = b13r + (b11r * y02r - b11i * y02i) + (b12r * y12r - b12i * y12i);
    const z02i = b13i + (b11r * y02i + b11i * y02r) + (b12r * y12i + b12i * y12r);
    const z12r = b23r + (b21r * y02r - b21i * y02i) + (b22r * y12r - b22i * y12i);
    const z12i = b23i + (b21r * y02i + b21i * y02r) + (b22r * y12i + b22i * y12r);
    const z03r = b14r + (b11r * y03r - b11i * y03i) + (b12r * y13r - b12i * y13i);
    const z03i = b14i + (b11r * y03i + b11i * y03r) + (b12r * y13i + b12i * y13r);
    const z13r = b24r + (b21r * y03r - b21i * y03i) + (b22r * y13r - b22i * y13i);
    const z13i = b24i + (b21r * y03i + b21i * y03r) + (b22r * y13i + b22i * y13r);
    const a13r = a[k + 4]!;
    const a13i = a[k + 5]!;
    const a14r = a[k + 6]!;
    const a14i = a[k + 7]!;
    out[k] = a[k]! + (a13r * z00r - a13i * z00i) + (a14r * z10r - a14i * z10i);
    out[k + 1] = a[k + 1]! + (a13r * z00i + a13i * z00r) + (a14r * z10i + a14i * z10r);
    out[k + 2] = a[k + 2]! + (a13r * z01r - a13i * z01i) + (a14r * z11r - a14i * z11i);
    out[k + 3] = a[k + 3]! + (a13r * z01i + a13i * z01r) + (a14r * z11i + a14i * z11r);
    out[k + 4] = a13r * z02r - a13i * z02i + (a14r * z12r - a14i * z12i);
    out[k + 5] = a13r * z02i + a13i * z02r + (a14r * z12i + a14i * z12r);
    out[k + 6] = a13r * z03r - a13i * z03i + (a14r * z13r - a14i * z13i);
    out[k + 7] = a13r * z03i + a13i * z03r + (a14r * z13i + a14i * z13r);
    const a23r = a[k + 12]!;
    const a23i = a[k + 13]!;
    const a24r = a[k + 14]!;
    const a24i = a[k + 15]!;
    out[k + 8] = a[k + 8]! + (a23r * z00r - a23i * z00i) + (a24r * z10r - a24i * z10i);
    out[k + 9] = a[k + 9]! + (a23r * z00i + a23i * z00r) + (a24r * z10i + a24i * z10r);
    out[k + 10] = a[k + 10]! + (a23r * z01r - a23i * z01i) + (a24r * z11r - a24i * z11i);
    out[k + 11] = a[k + 11]! + (a23r * z01i + a23i * z01r) + (a24r * z11i + a24i * z11r);
    out[k + 12] = a23r * z02r - a23i * z02i + (a24r * z12r - a24i * z12i);
    out[k + 13] = a23r * z02i + a23i * z02r + (a24r * z12i + a24i * z12r);
    out[k + 14] = a23r * z03r - a23i * z03i + (a24r * z13r - a24i * z13i);
    out[k + 15] = a23r * z03i + a23i * z03r + (a24r * z13i + a24i * z13r);
    const b31r = b[k + 16]!;
    const b31i = b[k + 17]!;
    const b32r = b[k + 18]!;
    const b32i = b[k + 19]!;
    out[k + 16] = b31r * y00r - b31i * y00i + (b32r * y10r - b32i * y10i);
    out[k + 17] = b31r * y00i + b31i * y00r + (b32r * y10i + b32i * y10r);
    out[k + 18] = b31r * y01r - b31i * y01i + (b32r * y11r - b32i * y11i);
    out[k + 19] = b31r * y01i + b31i * y01r + (b32r * y11i + b32i * y11r);
    out[k + 20] = b[k + 20]! + (b31r * y02r - b31i * y02i) + (b32r * y12r - b32i * y12i);
    out[k + 21] = b[k + 21]! + (b31r * y02i + b31i * y02r) + (b32r * y12i + b32i * y12r);
    out[k + 22] = b[k + 22]! + (b31r * y03r - b31i * y03i) + (b32r * y13r - b32i * y13i);
    out[k + 23] = b[k + 23]! + (b31r * y03i + b31i * y03r) + (b32r * y13i + b32i * y13r);
    const b41r = b[k + 24]!;
    const b41i = b[k + 25]!;
    const b42r = b[k + 26]!;
    const b42i = b[k + 27]!;
    out[k + 24] = b41r * y00r - b41i * y00i + (b42r * y10r - b42i * y10i);
    out[k + 25] = b41r * y00i + b41i * y00r + (b42r * y10i + b42i * y10r);
    out[k + 26] = b41r * y01r - b41i * y01i + (b42r * y11r - b42i * y11i);
    out[k + 27] = b41r * y01i + b41i * y01r + (b42r * y11i + b42i * y11r);
    out[k + 28] = b[k + 28]! + (b41r * y02r - b41i * y02i) + (b42r * y12r - b42i * y12i);
    out[k + 29] = b[k + 29]! + (b41r * y02i + b41i * y02r) + (b42r * y12i + b42i * y12r);
    out[k + 30] = b[k + 30]! + (b41r * y03r - b41i * y03i) + (b42r * y13r - b42i * y13i);
    out[k + 31] = b[k + 31]! + (b41r * y03i + b41i * y03r) + (b42r * y13i + b42i * y13r);
  }
  return trapped;
}
