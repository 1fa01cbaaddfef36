/** A reciprocal, symmetric two-port. */
export function writeSymmetric(
  out: Float64Array,
  at: number,
  rRe: number,
  rIm: number,
  tRe: number,
  tIm: number,
): void {
  out[at] = rRe;
  out[at + 1] = rIm;
  out[at + 2] = tRe;
  out[at + 3] = tIm;
  out[at + 4] = tRe;
  out[at + 5] = tIm;
  out[at + 6] = rRe;
  out[at + 7] = rIm;
}
