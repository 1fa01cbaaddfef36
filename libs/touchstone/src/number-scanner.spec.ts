import fc from 'fast-check';
import { NumberScanner } from './number-scanner';

const scan = (text: string): number[] => {
  const bytes = new TextEncoder().encode(`${text}\n`);
  const scanner = new NumberScanner();
  return scanner.scan(bytes, 0, bytes.length - 1, 0) < 0 ? [] : [...scanner.values.slice(0, scanner.count)];
};

describe('scanning numbers', () => {
  it('rounds every decimal as the language does, short or long, plain or with an exponent', () => {
    const digits = fc.stringMatching(/^\d{1,24}$/);
    const place = fc.nat(24);
    const exponent = fc.option(fc.integer({ min: -330, max: 330 }));
    fc.assert(
      fc.property(digits, place, exponent, (all, at, power) => {
        const token = `${all.slice(0, at)}.${all.slice(at)}${power === null ? '' : `e${power}`}`;
        fc.pre(/\d/.test(token.split('e')[0]!));
        expect(scan(token)).toEqual([Number(token)]);
      }),
      { numRuns: 20000, seed: 22 },
    );
  });
  it('gives back every double from its shortest text, and from its text of 17 digits', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true, min: 0 }), (value) => {
        expect(scan(String(value))).toEqual([value]);
        expect(scan(value.toExponential(16))).toEqual([value]);
      }),
      { numRuns: 5000, seed: 23 },
    );
  });
  it('rounds decimals that lie in the middle of two doubles, or beside it, as the language does', () => {
    fc.assert(
      fc.property(fc.bigInt({ min: 2n ** 52n, max: 2n ** 53n - 1n }), fc.nat(20), (mantissa, power) => {
        // 2 m + 1 over 2 lies between two doubles; 10^power away from a power of two it is no exact tie.
        for (const middle of [mantissa * 2n + 1n, mantissa * 2n + 1n + (mantissa % 3n) - 1n]) {
          const token = `${middle}e-${power}`;
          expect(scan(token)).toEqual([Number(token)]);
          expect(scan(`${middle}`)).toEqual([Number(middle)]);
        }
      }),
      { numRuns: 2000, seed: 24 },
    );
  });
  it('stops at a comment and takes several numbers', () => {
    expect(scan('1 -2.5\t+3e2 ! 4')).toEqual([1, -2.5, 300]);
  });
});
