/** Numbers as unevaluated sums of two doubles, 106 bits (T. J. Dekker, Numer. Math. 18, 1971). */

/** Powers of ten from 0 up, as such sums. */
export const mostPower = 60;
export const powerHigh = Float64Array.from({ length: mostPower + 1 }, (_, k) => Number(`1e${k}`));
export const powerLow = Float64Array.from({ length: mostPower + 1 }, (_, k) =>
  Number(10n ** BigInt(k) - BigInt(powerHigh[k]!)),
);

/** The rounding error of a product of two doubles: a b - product, exactly. */
export function productError(a: number, b: number, product: number): number {
  // 2^27 + 1, Veltkamp's splitter for doubles.
  const ca = 134217729 * a;
  const aHigh = ca - (ca - a);
  const aLow = a - aHigh;
  const cb = 134217729 * b;
  const bHigh = cb - (cb - b);
  const bLow = b - bHigh;
  return aLow * bLow - (product - aHigh * bHigh - aLow * bHigh - aHigh * bLow);
}
