import fc from 'fast-check';
import { turnInto } from './turn';

const out = new Float64Array(2);

describe('cosine and sine together', () => {
  it('are those of the language to the last digits, near and far', () => {
    const angle = fc.oneof(
      fc.double({ min: -10, max: 10, noNaN: true }),
      fc.double({ min: -9e5, max: 9e5, noNaN: true }),
      fc.double({ min: 2e6, max: 1e12, noNaN: true }),
      fc.integer({ min: -4000, max: 4000 }).map((k) => (k * Math.PI) / 4),
    );
    fc.assert(
      fc.property(angle, (rad) => {
        turnInto(out, rad);
        expect(Math.abs(out[0]! - Math.cos(rad))).toBeLessThan(5e-16);
        expect(Math.abs(out[1]! - Math.sin(rad))).toBeLessThan(5e-16);
      }),
      { numRuns: 5000, seed: 11 },
    );
  });

  it('are exact at nothing, and no number for no number', () => {
    turnInto(out, 0);
    expect([...out]).toEqual([1, 0]);
    turnInto(out, Infinity);
    expect(out[0]).toBeNaN();
  });
});
