import fc from 'fast-check';
import { FormulaError, readFormula } from '../index';

function refusal(text: string): FormulaError {
  try {
    readFormula(text);
  } catch (error) {
    if (error instanceof FormulaError) return error;
    throw error;
  }
  throw new Error(`"${text}" was accepted`);
}

describe('a formula', () => {
  it.each([
    ['1.5 + 4.6*sqrt(f) + 1.318*f', 4, 1.5 + 4.6 * 2 + 1.318 * 4],
    ['-2^2', 1, -4],
    ['2^3^2', 1, 512],
    ['2^-1', 1, 0.5],
    ['10 - 4 - 3', 1, 3],
    ['24 / 4 / 3', 1, 2],
    ['+f', 3, 3],
    ['log(exp(2))', 1, 2],
    ['log10(1000)', 1, 3],
    ['abs(-f)', 7, 7],
    ['min(f, 2, 5)', 3, 2],
    ['max(f, 2, 5)', 3, 5],
    ['1e3 + .5 + 2.', 1, 1002.5],
    ['  (1+f)\n * 2\t', 2, 6],
  ])('%s at f = %d GHz is %d', (text, f, value) => {
    expect(readFormula(text)(f)).toBeCloseTo(value, 12);
  });

  it('reads log as the natural logarithm', () => {
    expect(readFormula('log(f)')(10)).toBeCloseTo(Math.LN10, 14);
  });

  it('agrees with its own arithmetic for random sums, products and powers', () => {
    const tree = fc.letrec<{ node: [string, (f: number) => number] }>((tie) => ({
      node: fc.oneof(
        { depthSize: 'small', withCrossShrink: true },
        fc.constant<[string, (f: number) => number]>(['f', (f) => f]),
        fc.integer({ min: 0, max: 99 }).map((n): [string, (f: number) => number] => [String(n), () => n]),
        fc
          .tuple(tie('node'), tie('node'), fc.constantFrom('+', '-', '*', '/'))
          .map(([[a, ofA], [b, ofB], op]): [string, (f: number) => number] => [
            `(${a} ${op} ${b})`,
            (f) =>
              ({ '+': ofA(f) + ofB(f), '-': ofA(f) - ofB(f), '*': ofA(f) * ofB(f), '/': ofA(f) / ofB(f) })[
                op
              ],
          ]),
      ),
    })).node;
    fc.assert(
      fc.property(tree, fc.double({ min: 0.01, max: 100, noNaN: true }), ([text, of], f) => {
        fc.pre(text.length <= 500 && text.split('(').length < 30);
        expect(readFormula(text)(f)).toBe(of(f));
      }),
      { seed: 2, numRuns: 200 },
    );
  });
});

describe('a formula is refused', () => {
  it.each([
    ['2 f', 3, 'An operator is missing between "2" and "f"'],
    ['2(f)', 2, 'An operator is missing between "2" and "("'],
    ['(f)(f)', 4, 'An operator is missing between ")" and "("'],
    ['f(f)', 2, 'An operator is missing between "f" and "("'],
    ['0xff', 2, '"xff" is not known'],
    ['pi*f', 1, '"pi" is not known'],
    ['sin(f)', 1, '"sin" is not known'],
    ['1 + constructor', 5, '"constructor" is not known'],
    ['toString(f)', 1, '"toString" is not known'],
    ['f = 2', 3, '"=" has no place here'],
    ['f!', 2, '"!" has no place here'],
    ['f[1]', 2, '"[" has no place here'],
    ['f.x', 2, '"." has no place here'],
    ['"f"', 1, '""" has no place here'],
    ['1; 2', 2, '";" has no place here'],
    ['f % 2', 3, '"%" has no place here'],
    ['1 − f', 3, '"−" has no place here'],
    ['sqrt', 1, 'sqrt stands without its brackets'],
    ['sqrt + 1', 1, 'sqrt stands without its brackets'],
    ['1 + sqrt(f, 2)', 5, 'sqrt takes 1 argument, not 2'],
    ['max(f) + 1', 1, 'max takes 2 to 10 arguments, not 1'],
    ['abs(sqrt())', 5, 'sqrt takes 1 argument, not 0'],
    ['f)', 2, 'A bracket closes that was never opened'],
    ['   ', 1, 'The formula is empty'],
    ['1e999', 1, 'A number is too large to compute with'],
    ['f ** 2', 4, 'Value expected'],
    ['(1, 2)', 3, 'Parenthesis ) expected'],
    ['1 +', 4, 'Unexpected end of expression'],
  ])('%s: at character %d, %s', (text, position, reason) => {
    const error = refusal(text);
    expect(error.reason).toBe(reason);
    expect(error.position).toBe(position);
    expect(error.mend).not.toBe('');
  });

  it('with more than 500 characters, brackets over 32 deep, or more than 200 terms', () => {
    expect(refusal('f+'.repeat(250) + 'f').reason).toBe('The formula has 501 characters');
    expect(refusal('('.repeat(33) + 'f' + ')'.repeat(33)).position).toBe(33);
    expect(readFormula('('.repeat(32) + 'f' + ')'.repeat(32))(2)).toBe(2);
    expect(refusal('f+'.repeat(249) + 'f').reason).toBe('The formula has more than 200 terms');
    expect(refusal('-'.repeat(400) + 'f').reason).toBe('The formula has more than 200 terms');
  });

  it('whatever characters it has, by a typed error and nothing else', () => {
    const pieces = fc.constantFrom(...'f123.()+-*/^, ;=!"[]{}', 'sqrt', 'max', 'e', 'Infinity', 'NaN', '1e5');
    fc.assert(
      fc.property(
        fc.oneof(
          fc.string(),
          fc.array(pieces, { maxLength: 60 }).map((all) => all.join('')),
        ),
        (text) => {
          try {
            expect(typeof readFormula(text)(1)).toBe('number');
          } catch (error) {
            expect(error).toBeInstanceOf(FormulaError);
            expect((error as FormulaError).position).toBeGreaterThanOrEqual(1);
          }
        },
      ),
      { seed: 3, numRuns: 500 },
    );
  });
});
