import fc from 'fast-check';
import { dbPerNeper, lightSpeedMPerS } from './constants';
import { lineInto, linePhaseRad } from './line';

const s = new Float64Array(8);
const oneHertz = Float64Array.of(1);

/** S21 of a matched line that turns by about `rad` and loses `neper`, and what it is by the language's own functions. */
function passAt(rad: number, neper: number) {
  const line = {
    z0Ohm: 50,
    lengthM: 1,
    effectivePermittivity: ((rad * lightSpeedMPerS) / (2 * Math.PI)) ** 2,
    lossSqrtDbPerM: 0,
    lossLinearDbPerM: neper * dbPerNeper * 1e9,
  };
  lineInto(s, line, oneHertz, 50);
  const size = Math.exp(-line.lossLinearDbPerM / (dbPerNeper * 1e9));
  const phase = linePhaseRad(line, 1);
  return { re: s[4]!, im: s[5]!, size, wantedRe: size * Math.cos(phase), wantedIm: -size * Math.sin(phase) };
}

describe('one pass of a line', () => {
  const angle = fc.oneof(
    fc.double({ min: 0, max: 10, noNaN: true }),
    fc.double({ min: 0, max: 2e5, noNaN: true }),
    fc.integer({ min: 0, max: 4000 }).map((k) => (k * Math.PI) / 128),
  );
  const loss = fc.oneof(
    fc.double({ min: 0, max: 1e-3, noNaN: true }),
    fc.double({ min: 0, max: 60, noNaN: true }),
  );

  it('is e^(-a - jp) to the last digits, near and far, however lossy', () => {
    fc.assert(
      fc.property(angle, loss, (rad, neper) => {
        const { re, im, size, wantedRe, wantedIm } = passAt(rad, neper);
        expect(Math.abs(re - wantedRe)).toBeLessThanOrEqual(6e-16 * size);
        expect(Math.abs(im - wantedIm)).toBeLessThanOrEqual(6e-16 * size);
      }),
      { numRuns: 5000, seed: 11 },
    );
  });

  it('is exactly one where nothing turns or is lost', () => {
    const { re, im } = passAt(0, 0);
    expect(re).toBe(1);
    expect(Math.abs(im)).toBe(0);
  });

  it('keeps the sine of a small angle to its own last digits', () => {
    for (const rad of [1e-9, 1e-4, 3e-3, 0.012, 0.0124]) {
      const { im, wantedIm } = passAt(rad, 0);
      expect(Math.abs(im / wantedIm - 1)).toBeLessThan(2e-15);
    }
  });
});

describe('a lossless line at any impedance', () => {
  it('loses nothing: |S11|^2 + |S21|^2 = 1', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 5, max: 500, noNaN: true }),
        fc.double({ min: 1, max: 12, noNaN: true }),
        (z0Ohm, effectivePermittivity) => {
          const line = { z0Ohm, lengthM: 0.1, effectivePermittivity, lossSqrtDbPerM: 0, lossLinearDbPerM: 0 };
          const frequenciesHz = Float64Array.from({ length: 50 }, (_unused, k) => k * 1e9);
          const out = new Float64Array(400);
          lineInto(out, line, frequenciesHz, 50);
          for (let at = 0; at < 400; at += 8) {
            const power = out[at]! ** 2 + out[at + 1]! ** 2 + out[at + 4]! ** 2 + out[at + 5]! ** 2;
            expect(Math.abs(power - 1)).toBeLessThan(4e-15);
          }
        },
      ),
      { numRuns: 200, seed: 12 },
    );
  });
});
