/** A pivot below this share of the largest one counts as zero. */
const zeroShare = 1e-15;

/**
 * Solves A X = B for complex square A by elimination with complete pivoting, in place. Where A is singular the components
 * it leaves open are set to 0 (a wave that nothing feeds).
 *
 * @param a size x size complex, row-major pairs; destroyed
 * @param b size x columns complex, row-major pairs; replaced by X
 * @param order scratch of `size` integers
 * @returns the number of vanishing pivots: 0 for a regular matrix
 */
export function solveInPlace(
  a: Float64Array,
  b: Float64Array,
  size: number,
  columns: number,
  order: Int32Array,
): number {
  let largest = 0;
  let rank = size;
  for (let k = 0; k < size; k++) order[k] = k;
  for (let k = 0; k < size; k++) {
    const pivot = findPivot(a, size, k);
    const magnitude = Math.hypot(a[pivot * 2]!, a[pivot * 2 + 1]!);
    if (k === 0) largest = magnitude;
    if (magnitude === 0 || magnitude < zeroShare * largest) {
      rank = k;
      break;
    }
    const row = Math.floor(pivot / size);
    const column = pivot % size;
    if (row !== k) {
      swapRows(a, size, row, k);
      swapRows(b, columns, row, k);
    }
    if (column !== k) {
      swapColumns(a, size, column, k);
      const kept = order[k]!;
      order[k] = order[column]!;
      order[column] = kept;
    }
    eliminate(a, b, size, columns, k);
  }
  backSubstitute(a, b, size, columns, rank);
  restoreOrder(b, size, columns, order);
  return size - rank;
}

function findPivot(a: Float64Array, size: number, from: number): number {
  let best = from * size + from;
  let bestSize = -1;
  for (let row = from; row < size; row++) {
    for (let column = from; column < size; column++) {
      const at = row * size + column;
      const magnitude = a[at * 2]! * a[at * 2]! + a[at * 2 + 1]! * a[at * 2 + 1]!;
      if (magnitude > bestSize) {
        best = at;
        bestSize = magnitude;
      }
    }
  }
  return best;
}

function swapRows(a: Float64Array, columns: number, p: number, q: number): void {
  for (let j = 0; j < columns * 2; j++) {
    const kept = a[p * columns * 2 + j]!;
    a[p * columns * 2 + j] = a[q * columns * 2 + j]!;
    a[q * columns * 2 + j] = kept;
  }
}

function swapColumns(a: Float64Array, size: number, p: number, q: number): void {
  for (let i = 0; i < size; i++) {
    for (let part = 0; part < 2; part++) {
      const kept = a[(i * size + p) * 2 + part]!;
      a[(i * size + p) * 2 + part] = a[(i * size + q) * 2 + part]!;
      a[(i * size + q) * 2 + part] = kept;
    }
  }
}

function eliminate(a: Float64Array, b: Float64Array, size: number, columns: number, k: number): void {
  const pr = a[(k * size + k) * 2]!;
  const pi = a[(k * size + k) * 2 + 1]!;
  const scale = 1 / (pr * pr + pi * pi);
  for (let i = k + 1; i < size; i++) {
    const ar = a[(i * size + k) * 2]!;
    const ai = a[(i * size + k) * 2 + 1]!;
    if (ar === 0 && ai === 0) continue;
    const fr = (ar * pr + ai * pi) * scale;
    const fi = (ai * pr - ar * pi) * scale;
    subtractRow(a, size, i, k, k + 1, fr, fi);
    subtractRow(b, columns, i, k, 0, fr, fi);
  }
}

function subtractRow(
  a: Float64Array,
  columns: number,
  i: number,
  k: number,
  from: number,
  fr: number,
  fi: number,
): void {
  for (let j = from; j < columns; j++) {
    const source = (k * columns + j) * 2;
    const target = (i * columns + j) * 2;
    const xr = a[source]!;
    const xi = a[source + 1]!;
    a[target] = a[target]! - (fr * xr - fi * xi);
    a[target + 1] = a[target + 1]! - (fr * xi + fi * xr);
  }
}

function backSubstitute(a: Float64Array, b: Float64Array, size: number, columns: number, rank: number): void {
  b.fill(0, rank * columns * 2, size * columns * 2);
  for (let k = rank - 1; k >= 0; k--) {
    for (let i = k + 1; i < rank; i++) {
      subtractRow(b, columns, k, i, 0, a[(k * size + i) * 2]!, a[(k * size + i) * 2 + 1]!);
    }
    const pr = a[(k * size + k) * 2]!;
    const pi = a[(k * size + k) * 2 + 1]!;
    const scale = 1 / (pr * pr + pi * pi);
    for (let j = 0; j < columns; j++) {
      const at = (k * columns + j) * 2;
      const xr = b[at]!;
      const xi = b[at + 1]!;
      b[at] = (xr * pr + xi * pi) * scale;
      b[at + 1] = (xi * pr - xr * pi) * scale;
    }
  }
}

function restoreOrder(b: Float64Array, size: number, columns: number, order: Int32Array): void {
  for (let k = 0; k < size; k++) {
    while (order[k] !== k) {
      const goal = order[k]!;
      swapRows(b, columns, k, goal);
      order[k] = order[goal]!;
      order[goal] = goal;
    }
  }
}
