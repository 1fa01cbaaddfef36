import fc from 'fast-check';
import { cascadeInto, sToTInto, through, tToSInto, type ChainConvention } from './index';
import { arbitraryS, largestDifference } from './testing/samples';

const points = 2;
const conventions = ['a', 'b', 'c'] as const;
const runs = { numRuns: 200, seed: 371 };

/** Random networks through which something passes both ways. */
const passing = (ports: 2 | 4): fc.Arbitrary<Float64Array> =>
  arbitraryS(ports, points).map((s) => through(ports, points).map((value, k) => 0.6 * value + 0.35 * s[k]!));

function chainOf(s: Float64Array, ports: 2 | 4, convention: ChainConvention, count = points): Float64Array {
  const t = new Float64Array(s.length);
  sToTInto(t, s, ports, count, convention);
  return t;
}

/** Plain product of square complex matrices, point by point. */
function product(a: Float64Array, b: Float64Array, size: number): Float64Array {
  const out = new Float64Array(a.length);
  for (let entry = 0; entry < a.length / 2; entry++) {
    const point = Math.floor(entry / (size * size)) * size * size;
    const [row, column] = [Math.floor((entry - point) / size), (entry - point) % size];
    for (let k = 0; k < size; k++) {
      const p = (point + row * size + k) * 2;
      const q = (point + k * size + column) * 2;
      out[entry * 2]! += a[p]! * b[q]! - a[p + 1]! * b[q + 1]!;
      out[entry * 2 + 1]! += a[p]! * b[q + 1]! + a[p + 1]! * b[q]!;
    }
  }
  return out;
}

describe('chain scattering of a worked two-port (formula A3, after Frickey 1994)', () => {
  const s = Float64Array.of(
    ...[0.126288, 0.092519, 0.191875, -0.825897],
    ...[0.191875, -0.825897, 0.121736, -0.06399],
  );
  const t11 = [0.189847, -0.851209];
  const t12 = [-0.07258, 0.169773];
  const t21 = [-0.106002, -0.122771];
  const t22 = [0.266893, 1.148799];

  it('has the printed entries, and the second convention has them exchanged', () => {
    expect(largestDifference(chainOf(s, 2, 'a', 1), [...t11, ...t12, ...t21, ...t22])).toBeLessThan(3e-6);
    expect(largestDifference(chainOf(s, 2, 'b', 1), [...t22, ...t21, ...t12, ...t11])).toBeLessThan(3e-6);
  });
  it('has in the third convention those of the two-port turned round: (1/S12) [[-dS, S22], [-S11, 1]]', () => {
    const turned = Float64Array.of(...s.slice(6, 8), ...s.slice(4, 6), ...s.slice(2, 4), ...s.slice(0, 2));
    expect(chainOf(s, 2, 'c', 1)).toEqual(chainOf(turned, 2, 'a', 1));
  });
});

describe.each([2, 4] as const)('chain scattering of %i ports', (ports) => {
  it.each(conventions)('in convention %s and back is identity', (convention) => {
    fc.assert(
      fc.property(passing(ports), (s) => {
        const back = new Float64Array(s.length);
        tToSInto(back, chainOf(s, ports, convention), ports, points, convention);
        expect(largestDifference(back, s)).toBeLessThan(1e-12);
      }),
      runs,
    );
  });
  it.each(conventions)('in convention %s multiplies to the cascade, in its own order', (convention) => {
    fc.assert(
      fc.property(passing(ports), passing(ports), (left, right) => {
        const [l, r] = [chainOf(left, ports, convention), chainOf(right, ports, convention)];
        const both = convention === 'c' ? product(r, l, ports) : product(l, r, ports);
        const s = new Float64Array(left.length);
        tToSInto(s, both, ports, points, convention);
        const cascade = new Float64Array(left.length);
        cascadeInto(cascade, left, right, ports, points);
        expect(largestDifference(s, cascade)).toBeLessThan(1e-11);
      }),
      runs,
    );
  });
  it('is not the scattering matrix: the product of two scattering matrices is far from the cascade', () => {
    fc.assert(
      fc.property(passing(ports), passing(ports), (left, right) => {
        const cascade = new Float64Array(left.length);
        cascadeInto(cascade, left, right, ports, points);
        expect(largestDifference(product(left, right, ports), cascade)).toBeGreaterThan(0.01);
      }),
      runs,
    );
  });
  it('is refused where nothing passes, naming the point', () => {
    const closed = new Float64Array(ports * ports * 2);
    for (const convention of conventions) expect(() => chainOf(closed, ports, convention, 1)).toThrow(/pass/);
  });
});
