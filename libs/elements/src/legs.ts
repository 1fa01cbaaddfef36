/** Two-port blocks into the 4-port of a pair (near p, near n, far p, far n); entry (row, column) of a point at ((point*4 + row)*4 + column)*2. */

/** Two separate legs. `p` and `n` may be the same array. */
export function pairOfLegs(p: Float64Array, n: Float64Array, points: number): Float64Array {
  const out = new Float64Array(points * 32);
  for (let point = 0; point < points; point++) {
    const from = point * 8;
    const to = point * 32;
    for (let row = 0; row < 2; row++) {
      for (let column = 0; column < 2; column++) {
        const source = from + (row * 2 + column) * 2;
        const pAt = to + (row * 2 * 4 + column * 2) * 2;
        const nAt = to + ((row * 2 + 1) * 4 + column * 2 + 1) * 2;
        out[pAt] = p[source]!;
        out[pAt + 1] = p[source + 1]!;
        out[nAt] = n[source]!;
        out[nAt + 1] = n[source + 1]!;
      }
    }
  }
  return out;
}

/**
 * A symmetric pair from its even and odd mode two-ports, each at the reference of one conductor: the leg's own entry is
 * (even + odd)/2, the other leg's (even - odd)/2 (Bockelman and Eisenstadt, 1995, for equal legs).
 */
export function pairOfModes(even: Float64Array, odd: Float64Array, points: number): Float64Array {
  const out = new Float64Array(points * 32);
  for (let point = 0; point < points; point++) {
    for (let row = 0; row < 4; row++) {
      for (let column = 0; column < 4; column++) {
        const source = point * 8 + ((row >> 1) * 2 + (column >> 1)) * 2;
        const sign = (row & 1) === (column & 1) ? 1 : -1;
        const at = ((point * 4 + row) * 4 + column) * 2;
        out[at] = (even[source]! + sign * odd[source]!) / 2;
        out[at + 1] = (even[source + 1]! + sign * odd[source + 1]!) / 2;
      }
    }
  }
  return out;
}
