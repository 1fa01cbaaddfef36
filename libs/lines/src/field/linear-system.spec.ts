import fc from 'fast-check';
import { factorize, solve, solveTransposed } from './linear-system';

const system = fc
  .integer({ min: 1, max: 12 })
  .chain((n) =>
    fc.tuple(
      fc.array(fc.double({ min: -1, max: 1, noNaN: true }), { minLength: n * n, maxLength: n * n }),
      fc.array(fc.double({ min: -1, max: 1, noNaN: true }), { minLength: n, maxLength: n }),
    ),
  );

describe('a factorized matrix', () => {
  it('solves for itself and for its transpose, with pivots that must be exchanged', () => {
    fc.assert(
      fc.property(system, ([entries, b]) => {
        const n = b.length;
        // A shifted diagonal far from singular, so that elimination without exchange would fail.
        const a = Float64Array.from(entries, (x, k) => x + (Math.floor(k / n) === ((k % n) + 1) % n ? n : 0));
        const factors = factorize(Float64Array.from(a), n);
        const x = solve(factors, Float64Array.from(b));
        const y = solveTransposed(factors, Float64Array.from(b));
        for (let row = 0; row < n; row++) {
          let [direct, transposed] = [0, 0];
          for (let k = 0; k < n; k++) {
            direct += a[row * n + k]! * x[k]!;
            transposed += a[k * n + row]! * y[k]!;
          }
          expect(direct).toBeCloseTo(b[row]!, 9);
          expect(transposed).toBeCloseTo(b[row]!, 9);
        }
      }),
      { numRuns: 200, seed: 7 },
    );
  });
});
