import fc from 'fast-check';
import { largestSingularValue } from './index';
import { arbitraryS } from './testing/samples';

/** |S x| for a complex vector x, over |x|. */
function stretch(s: Float64Array, size: number, x: readonly number[]): number {
  let out = 0;
  for (let i = 0; i < size; i++) {
    let re = 0;
    let im = 0;
    for (let j = 0; j < size; j++) {
      const k = (i * size + j) * 2;
      re += s[k]! * x[j * 2]! - s[k + 1]! * x[j * 2 + 1]!;
      im += s[k]! * x[j * 2 + 1]! + s[k + 1]! * x[j * 2]!;
    }
    out += re * re + im * im;
  }
  return Math.sqrt(out) / Math.hypot(...x);
}

describe('the largest singular value', () => {
  it('is the size of the largest entry of a diagonal matrix, complex or not', () => {
    const s = new Float64Array(18);
    s.set([0.3, 0.4], 0);
    s.set([0, -0.9], 8);
    s.set([0.2, 0], 16);
    expect(largestSingularValue(s, 3)).toBeCloseTo(0.9, 15);
  });
  it('is the sum of the entries of a matrix of equal entries', () => {
    for (const size of [2, 3, 4, 8]) {
      const s = new Float64Array(size * size * 2).map((_, k) => (k % 2 === 0 ? 0.03 : 0.04));
      expect(largestSingularValue(s, size)).toBeCloseTo(size * 0.05, 13);
    }
  });
  it.each([1, 2, 3, 4, 6])('stretches no vector of %i ports less than any vector is stretched', (size) => {
    const vector = fc.array(fc.double({ min: -1, max: 1, noNaN: true }), {
      minLength: size * 2,
      maxLength: size * 2,
    });
    fc.assert(
      fc.property(arbitraryS(size, 1, 3), vector, (s, x) => {
        fc.pre(Math.hypot(...x) > 1e-3);
        expect(stretch(s, size, x)).toBeLessThanOrEqual(largestSingularValue(s, size) * (1 + 1e-12) + 1e-150);
      }),
      { numRuns: 200, seed: 1 },
    );
  });
  it('is kept by a rotation of the ports (mixed mode of a random pair is tested beside it)', () => {
    fc.assert(
      fc.property(arbitraryS(3, 1, 2), (s) => {
        const turned = new Float64Array(18);
        for (let i = 0; i < 3; i++) {
          for (let j = 0; j < 3; j++) {
            turned.set(
              s.subarray((i * 3 + j) * 2, (i * 3 + j) * 2 + 2),
              (((i + 1) % 3) * 3 + ((j + 1) % 3)) * 2,
            );
          }
        }
        expect(largestSingularValue(turned, 3)).toBeCloseTo(largestSingularValue(s, 3), 12);
      }),
      { numRuns: 200, seed: 2 },
    );
  });
});
