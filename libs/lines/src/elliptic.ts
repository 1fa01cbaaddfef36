/**
 * K(k')/K(k), the ratio of complete elliptic integrals of the first kind, from k and its complement k' = sqrt(1 - k^2), both given so that
 * neither loses digits near 0 or 1. By the arithmetic-geometric mean: K(k) = pi/(2 agm(1, k')) (Abramowitz and Stegun 17.6).
 */
export function ellipticRatio(k: number, complement: number): number {
  return mean(complement) / mean(k);
}

/** agm(1, b). */
function mean(b: number): number {
  let x = 1;
  let y = b;
  while (Math.abs(x - y) > 1e-16 * x) {
    const next = (x + y) / 2;
    y = Math.sqrt(x * y);
    if (next === x) break;
    x = next;
  }
  return x;
}
