/** Solves a x = b by elimination with row exchanges; both are overwritten, b becomes x. */
export function solveDense(a: Float64Array, b: Float64Array, n: number): void {
  for (let k = 0; k < n; k++) {
    let pivot = k;
    for (let row = k + 1; row < n; row++) {
      if (Math.abs(a[row * n + k]!) > Math.abs(a[pivot * n + k]!)) pivot = row;
    }
    if (pivot !== k) {
      for (let column = k; column < n; column++) {
        const held = a[k * n + column]!;
        a[k * n + column] = a[pivot * n + column]!;
        a[pivot * n + column] = held;
      }
      const held = b[k]!;
      b[k] = b[pivot]!;
      b[pivot] = held;
    }
    const inverse = 1 / a[k * n + k]!;
    for (let row = k + 1; row < n; row++) {
      const factor = a[row * n + k]! * inverse;
      if (factor === 0) continue;
      for (let column = k + 1; column < n; column++) {
        a[row * n + column] = a[row * n + column]! - factor * a[k * n + column]!;
      }
      b[row] = b[row]! - factor * b[k]!;
    }
  }
  for (let row = n - 1; row >= 0; row--) {
    let sum = b[row]!;
    for (let column = row + 1; column < n; column++) sum -= a[row * n + column]! * b[column]!;
    b[row] = sum / a[row * n + row]!;
  }
}
