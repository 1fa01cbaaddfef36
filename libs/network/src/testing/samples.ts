import fc from 'fast-check';
import type { Network } from '../index';
import { uniformReference } from '../index';

/** A complex number as a pair. */
export type Complex = readonly [number, number];

export const plus = (a: Complex, b: Complex): Complex => [a[0] + b[0], a[1] + b[1]];
export const minus = (a: Complex, b: Complex): Complex => [a[0] - b[0], a[1] - b[1]];
export const times = (a: Complex, b: Complex): Complex => [
  a[0] * b[0] - a[1] * b[1],
  a[0] * b[1] + a[1] * b[0],
];
export const over = (a: Complex, b: Complex): Complex => {
  const size = b[0] * b[0] + b[1] * b[1];
  return [(a[0] * b[0] + a[1] * b[1]) / size, (a[1] * b[0] - a[0] * b[1]) / size];
};
export const cosh = ([x, y]: Complex): Complex => [Math.cosh(x) * Math.cos(y), Math.sinh(x) * Math.sin(y)];
export const sinh = ([x, y]: Complex): Complex => [Math.sinh(x) * Math.cos(y), Math.cosh(x) * Math.sin(y)];

/** Two-port chain matrices A, B, C, D. */
export type Chain = readonly [Complex, Complex, Complex, Complex];
export const lineChain = (z0: number, gammaL: Complex): Chain => {
  const [ch, sh] = [cosh(gammaL), sinh(gammaL)];
  return [ch, times(sh, [z0, 0]), over(sh, [z0, 0]), ch];
};
export const seriesChain = (z: Complex): Chain => [[1, 0], z, [0, 0], [1, 0]];
export const shuntChain = (y: Complex): Chain => [[1, 0], [0, 0], y, [1, 0]];
export const chainProduct = (p: Chain, q: Chain): Chain => [
  plus(times(p[0], q[0]), times(p[1], q[2])),
  plus(times(p[0], q[1]), times(p[1], q[3])),
  plus(times(p[2], q[0]), times(p[3], q[2])),
  plus(times(p[2], q[1]), times(p[3], q[3])),
];
export const flat = (entries: readonly Complex[]): Float64Array => Float64Array.from(entries.flat());

/** One network of one point at 1 GHz. */
export function onePoint(
  ports: number,
  entries: readonly Complex[],
  referenceOhm: number | Float64Array = 50,
): Network {
  return {
    ports,
    frequenciesHz: Float64Array.of(1e9),
    s: flat(entries),
    referenceOhm: typeof referenceOhm === 'number' ? uniformReference(ports, referenceOhm) : referenceOhm,
  };
}

/** The largest difference of two lists of numbers. */
export function largestDifference(a: ArrayLike<number>, b: ArrayLike<number>): number {
  let largest = a.length === b.length ? 0 : Infinity;
  for (let k = 0; k < a.length; k++) largest = Math.max(largest, Math.abs(a[k]! - b[k]!));
  return Number.isNaN(largest) ? Infinity : largest;
}

const unit = fc.double({ min: -1, max: 1, noNaN: true });

/**
 * Random S of `ports` ports at `points` points whose Frobenius norm is at most `size` (so they are passive for size <= 1);
 * `reciprocal` makes them symmetric.
 */
export function arbitraryS(
  ports: number,
  points: number,
  size = 0.98,
  reciprocal = false,
): fc.Arbitrary<Float64Array> {
  const count = ports * ports * 2;
  return fc.array(unit, { minLength: points * count, maxLength: points * count }).map((numbers) => {
    const s = Float64Array.from(numbers);
    for (let point = 0; point < points; point++) {
      const block = s.subarray(point * count, (point + 1) * count);
      if (reciprocal) {
        for (let i = 0; i < ports; i++) {
          for (let j = 0; j < i; j++) {
            block[(i * ports + j) * 2] = block[(j * ports + i) * 2]!;
            block[(i * ports + j) * 2 + 1] = block[(j * ports + i) * 2 + 1]!;
          }
        }
      }
      const norm = Math.hypot(...block) || 1;
      block.forEach((value, k) => (block[k] = (value * size) / Math.max(1, norm)));
    }
    return s;
  });
}

/** Random references with a real part from 5 to 200 ohm; the imaginary part is 0 unless `complex`. */
export function arbitraryReference(ports: number, complex = false): fc.Arbitrary<Float64Array> {
  const re = fc.double({ min: 5, max: 200, noNaN: true });
  const im = complex ? fc.double({ min: -60, max: 60, noNaN: true }) : fc.constant(0);
  return fc
    .array(fc.tuple(re, im), { minLength: ports, maxLength: ports })
    .map((pairs) => Float64Array.from(pairs.flat()));
}
