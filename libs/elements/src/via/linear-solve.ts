/**
 * Solves A X = B for real, dense A by elimination with row pivoting, in place.
 * @param a n x n, row by row; destroyed
 * @param b n x columns, row by row; holds X afterwards
 * @throws RangeError where A is singular to working accuracy
 */
export function solveInPlace(a: Float64Array, b: Float64Array, n: number, columns: number): void {
  for (let k = 0; k < n; k++) {
    let pivot = k;
    for (let row = k + 1; row < n; row++) {
      if (Math.abs(a[row * n + k]!) > Math.abs(a[pivot * n + k]!)) pivot = row;
    }
    if (!(Math.abs(a[pivot * n + k]!) > 0)) throw new RangeError('The section has no solution.');
    if (pivot !== k) {
      swapRows(a, n, k, pivot);
      swapRows(b, columns, k, pivot);
    }
    const diagonal = a[k * n + k]!;
    for (let row = k + 1; row < n; row++) {
      const factor = a[row * n + k]! / diagonal;
      if (factor === 0) continue;
      for (let i = k + 1; i < n; i++) a[row * n + i]! -= factor * a[k * n + i]!;
      for (let i = 0; i < columns; i++) b[row * columns + i]! -= factor * b[k * columns + i]!;
    }
  }
  for (let row = n - 1; row >= 0; row--) {
    for (let i = 0; i < columns; i++) {
      let sum = b[row * columns + i]!;
      for (let k = row + 1; k < n; k++) sum -= a[row * n + k]! * b[k * columns + i]!;
      b[row * columns + i] = sum / a[row * n + row]!;
    }
  }
}

function swapRows(m: Float64Array, width: number, one: number, other: number): void {
  for (let i = 0; i < width; i++) {
    const held = m[one * width + i]!;
    m[one * width + i] = m[other * width + i]!;
    m[other * width + i] = held;
  }
}
