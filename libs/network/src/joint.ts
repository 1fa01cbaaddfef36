/** A second pivot below this share of the first means a wave that the joint traps without loss. */
const trappedShare = 1e-15;

const m = new Float64Array(8);
const r = new Float64Array(16);

function loadJoint(a: Float64Array, b: Float64Array, k: number): void {
  for (let i = 0; i < 2; i++) {
    for (let j = 0; j < 2; j++) {
      let re = i === j ? 1 : 0;
      let im = 0;
      for (let n = 0; n < 2; n++) {
        const p = k + ((i + 2) * 4 + n + 2) * 2;
        const q = k + (n * 4 + j) * 2;
        re -= a[p]! * b[q]! - a[p + 1]! * b[q + 1]!;
        im -= a[p]! * b[q + 1]! + a[p + 1]! * b[q]!;
      }
      m[(i * 2 + j) * 2] = re;
      m[(i * 2 + j) * 2 + 1] = im;
    }
    for (let j = 0; j < 4; j++) {
      let re = 0;
      let im = 0;
      if (j < 2) {
        re = a[k + ((i + 2) * 4 + j) * 2]!;
        im = a[k + ((i + 2) * 4 + j) * 2 + 1]!;
      } else {
        for (let n = 0; n < 2; n++) {
          const p = k + ((i + 2) * 4 + n + 2) * 2;
          const q = k + (n * 4 + j) * 2;
          re += a[p]! * b[q]! - a[p + 1]! * b[q + 1]!;
          im += a[p]! * b[q + 1]! + a[p + 1]! * b[q]!;
        }
      }
      r[(i * 4 + j) * 2] = re;
      r[(i * 4 + j) * 2 + 1] = im;
    }
  }
}

function largestPivot(): number {
  let best = 0;
  for (let e = 1; e < 4; e++) {
    if (Math.hypot(m[e * 2]!, m[e * 2 + 1]!) > Math.hypot(m[best * 2]!, m[best * 2 + 1]!)) best = e;
  }
  return best;
}

/**
 * y = (1 - S22A S11B)^-1 [S21A, S22A S12B] of the 2 + 2 ports beginning at `k`, by elimination with complete pivoting. A vanishing
 * pivot is a wave trapped at the joint, which passive parts neither feed nor hear: its part of y is 0.
 * @param out 16 numbers: 2 rows, 4 columns
 * @returns 1 where such a wave was met, else 0
 */
export function solveJoint4(out: Float64Array, a: Float64Array, b: Float64Array, k: number): number {
  loadJoint(a, b, k);
  out.fill(0, 0, 16);
  const pivot = largestPivot();
  const row = pivot >> 1;
  const column = pivot & 1;
  const pr = m[pivot * 2]!;
  const pi = m[pivot * 2 + 1]!;
  const pivotSize = pr * pr + pi * pi;
  if (pivotSize < trappedShare * trappedShare) return 1;
  const across = row * 2 + (1 - column);
  const below = (1 - row) * 2 + column;
  const opposite = (1 - row) * 2 + (1 - column);
  // factor = m[below] / pivot
  const fr = (m[below * 2]! * pr + m[below * 2 + 1]! * pi) / pivotSize;
  const fi = (m[below * 2 + 1]! * pr - m[below * 2]! * pi) / pivotSize;
  const sr = m[opposite * 2]! - (fr * m[across * 2]! - fi * m[across * 2 + 1]!);
  const si = m[opposite * 2 + 1]! - (fr * m[across * 2 + 1]! + fi * m[across * 2]!);
  const secondSize = sr * sr + si * si;
  const trapped = secondSize < trappedShare * trappedShare * Math.max(1, pivotSize);
  for (let j = 0; j < 4; j++) {
    const top = (row * 4 + j) * 2;
    const other = ((1 - row) * 4 + j) * 2;
    let yr = 0;
    let yi = 0;
    if (!trapped) {
      const tr = r[other]! - (fr * r[top]! - fi * r[top + 1]!);
      const ti = r[other + 1]! - (fr * r[top + 1]! + fi * r[top]!);
      yr = (tr * sr + ti * si) / secondSize;
      yi = (ti * sr - tr * si) / secondSize;
    }
    const qr = r[top]! - (m[across * 2]! * yr - m[across * 2 + 1]! * yi);
    const qi = r[top + 1]! - (m[across * 2]! * yi + m[across * 2 + 1]! * yr);
    out[(column * 4 + j) * 2] = (qr * pr + qi * pi) / pivotSize;
    out[(column * 4 + j) * 2 + 1] = (qi * pr - qr * pi) / pivotSize;
    out[((1 - column) * 4 + j) * 2] = yr;
    out[((1 - column) * 4 + j) * 2 + 1] = yi;
  }
  return trapped ? 1 : 0;
}
