/**
 * Largest singular value of a complex square matrix (row-major pairs): the square root of the largest eigenvalue of S^H S, by
 * cyclic Jacobi rotations on that Hermitian matrix (Golub and Van Loan, Matrix Computations, 8.5), which always converge.
 */
export function largestSingularValue(s: ArrayLike<number>, size: number, at = 0): number {
  if (size === 1) return Math.hypot(s[at]!, s[at + 1]!);
  const h = gram(s, size, at);
  if (size === 2) return Math.sqrt(largestOfTwo(h));
  return Math.sqrt(Math.max(0, largestEigenvalue(h, size)));
}

/** S^H S, row-major pairs. */
function gram(s: ArrayLike<number>, size: number, at: number): Float64Array {
  const h = new Float64Array(size * size * 2);
  for (let i = 0; i < size; i++) {
    for (let j = i; j < size; j++) {
      let re = 0;
      let im = 0;
      for (let k = 0; k < size; k++) {
        const p = at + (k * size + i) * 2;
        const q = at + (k * size + j) * 2;
        re += s[p]! * s[q]! + s[p + 1]! * s[q + 1]!;
        im += s[p]! * s[q + 1]! - s[p + 1]! * s[q]!;
      }
      h[(i * size + j) * 2] = re;
      h[(i * size + j) * 2 + 1] = im;
      h[(j * size + i) * 2] = re;
      h[(j * size + i) * 2 + 1] = -im;
    }
  }
  return h;
}

function largestOfTwo(h: Float64Array): number {
  const mean = (h[0]! + h[6]!) / 2;
  return mean + Math.hypot((h[0]! - h[6]!) / 2, h[2]!, h[3]!);
}

const mostSweeps = 30;

function largestEigenvalue(h: Float64Array, size: number): number {
  for (let sweep = 0; sweep < mostSweeps; sweep++) {
    let beside = 0;
    let diagonal = 0;
    for (let p = 0; p < size; p++) {
      diagonal += h[(p * size + p) * 2]! ** 2;
      for (let q = p + 1; q < size; q++) {
        beside += h[(p * size + q) * 2]! ** 2 + h[(p * size + q) * 2 + 1]! ** 2;
        rotate(h, size, p, q);
      }
    }
    if (beside <= 1e-32 * diagonal) break;
  }
  let largest = 0;
  for (let p = 0; p < size; p++) largest = Math.max(largest, h[(p * size + p) * 2]!);
  return largest;
}

/** One unitary rotation that makes entry (p, q) vanish. */
function rotate(h: Float64Array, size: number, p: number, q: number): void {
  const re = h[(p * size + q) * 2]!;
  const im = h[(p * size + q) * 2 + 1]!;
  const beside = Math.hypot(re, im);
  if (beside === 0) return;
  const hp = h[(p * size + p) * 2]!;
  const hq = h[(q * size + q) * 2]!;
  const theta = (hq - hp) / (2 * beside);
  const t = (theta >= 0 ? 1 : -1) / (Math.abs(theta) + Math.hypot(theta, 1));
  const c = 1 / Math.hypot(t, 1);
  const sine = t * c;
  // Phase of the entry; column q is turned by it so that the rotation is real.
  const er = re / beside;
  const ei = im / beside;
  for (let k = 0; k < size; k++) {
    if (k === p || k === q) continue;
    const kp = (k * size + p) * 2;
    const kq = (k * size + q) * 2;
    const pr = h[kp]!;
    const pi = h[kp + 1]!;
    // h[k][q] conj(e)
    const qr = h[kq]! * er + h[kq + 1]! * ei;
    const qi = h[kq + 1]! * er - h[kq]! * ei;
    setPair(h, size, k, p, c * pr - sine * qr, c * pi - sine * qi);
    const nr = sine * pr + c * qr;
    const ni = sine * pi + c * qi;
    setPair(h, size, k, q, nr * er - ni * ei, nr * ei + ni * er);
  }
  h[(p * size + p) * 2] = hp - t * beside;
  h[(q * size + q) * 2] = hq + t * beside;
  setPair(h, size, p, q, 0, 0);
}

function setPair(h: Float64Array, size: number, row: number, column: number, re: number, im: number): void {
  h[(row * size + column) * 2] = re;
  h[(row * size + column) * 2 + 1] = im;
  h[(column * size + row) * 2] = re;
  h[(column * size + row) * 2 + 1] = -im;
}
