/** A matrix as the product of a lower and an upper triangle, its rows exchanged. */
export interface Factors {
  readonly n: number;
  readonly lu: Float64Array;
  /** Row k of the factors is row rows[k] of the matrix. */
  readonly rows: Int32Array;
}

/** Gauss elimination with row exchanges; `a` (n x n, row by row) is overwritten and kept. */
export function factorize(a: Float64Array, n: number): Factors {
  const rows = Int32Array.from({ length: n }, (_, k) => k);
  for (let k = 0; k < n; k++) {
    let pivot = k;
    for (let row = k + 1; row < n; row++) {
      if (Math.abs(a[row * n + k]!) > Math.abs(a[pivot * n + k]!)) pivot = row;
    }
    if (pivot !== k) exchange(a, rows, n, k, pivot);
    const inverse = 1 / a[k * n + k]!;
    for (let row = k + 1; row < n; row++) {
      const to = row * n;
      const factor = a[to + k]! * inverse;
      a[to + k] = factor;
      if (factor === 0) continue;
      for (let column = k + 1, from = k * n; column < n; column++) {
        a[to + column] = a[to + column]! - factor * a[from + column]!;
      }
    }
  }
  return { n, lu: a, rows };
}

function exchange(a: Float64Array, rows: Int32Array, n: number, one: number, other: number): void {
  const row = a.slice(one * n, (one + 1) * n);
  a.copyWithin(one * n, other * n, (other + 1) * n);
  a.set(row, other * n);
  [rows[one], rows[other]] = [rows[other]!, rows[one]!];
}

/** x of A x = b. */
export function solve({ n, lu, rows }: Factors, b: Float64Array): Float64Array {
  const x = new Float64Array(n);
  for (let row = 0; row < n; row++) {
    let sum = b[rows[row]!]!;
    for (let column = 0; column < row; column++) sum -= lu[row * n + column]! * x[column]!;
    x[row] = sum;
  }
  for (let row = n - 1; row >= 0; row--) {
    let sum = x[row]!;
    for (let column = row + 1; column < n; column++) sum -= lu[row * n + column]! * x[column]!;
    x[row] = sum / lu[row * n + row]!;
  }
  return x;
}

/** y of A-transposed y = c. */
export function solveTransposed({ n, lu, rows }: Factors, c: Float64Array): Float64Array {
  const z = Float64Array.from(c);
  for (let row = 0; row < n; row++) {
    z[row] = z[row]! / lu[row * n + row]!;
    for (let column = row + 1; column < n; column++) z[column] = z[column]! - lu[row * n + column]! * z[row]!;
  }
  const y = new Float64Array(n);
  for (let row = n - 1; row >= 0; row--) {
    for (let column = 0; column < row; column++) z[column] = z[column]! - lu[row * n + column]! * z[row]!;
    y[rows[row]!] = z[row]!;
  }
  return y;
}
