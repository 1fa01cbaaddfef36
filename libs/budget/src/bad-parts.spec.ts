import { checkChannel, readChannel, type Part } from '@tollgate/budget';
import type { FieldProblem } from '@tollgate/contracts';
import { readTouchstone } from '@tollgate/touchstone';
import {
  base,
  differential,
  expectProblem,
  line,
  problemsOf,
  withElement,
  withFormula,
  type Row,
} from '../reference/bad-documents';

const formulas: readonly Row[] = (
  [
    ['divides by zero at its start', withFormula('1/f', 0), /At f = 0 GHz.*Infinity/, /dividing by zero/],
    ['divides by zero inside', withFormula('1/(f-3)'), /At f = 3 GHz.*Infinity/, /end the segment before/],
    ['takes the root of what is negative', withFormula('sqrt(f-3)'), /At f = 1 GHz.*NaN/, /roots/],
    ['runs beyond all numbers', withFormula('10^(f^400)'), /Infinity/, /Correct the formula/],
    ['reaches for the process', withFormula('process.exit(1)'), /"process" is not known/, /A formula has f/],
    [
      'reaches for a constructor',
      withFormula('f.constructor("x")()'),
      /"\." has no place/,
      /number before or after/,
    ],
    ['calls something else', withFormula('import("fs")'), /"import" is not known/, /A formula has f/],
    ['assigns', withFormula('f=3'), /"=" has no place/, /A formula has f/],
    ['builds a list', withFormula('[1,2]'), /"\[" has no place/, /A formula has f/],
    ['multiplies without saying so', withFormula('2f'), /missing between "2" and "f"/, /2\*f/],
    ['carries a unit', withFormula('3 dB'), /"dB" is not known/, /A formula has f/],
    ['is empty', withFormula(' '), /1\.5 \+ 4\.6\*sqrt\(f\)/, /Write it out/],
    ['is too long', withFormula(`1${'+1'.repeat(300)}`), /at most 500/, /Shorten/],
  ] as const
).map(([what, document, message, mend]): Row => [
  what,
  document,
  'limits[0].segments[0].formula',
  message,
  mend,
]);

describe('bad input is refused with its path, its value and how to mend it', () => {
  it.each(formulas)('a formula that %s', (_, document, path, message, mend) => {
    expectProblem(problemsOf(document), path, message, mend);
  });
});

/** A file of some ports whose through pairs are (1, 3), (2, 4), ... */
function partOf(ports: number): Part {
  const half = ports / 2;
  const rows = [1, 1.5, 2].map((f) => {
    const matrix = Array.from({ length: ports }, (_, row) =>
      Array.from({ length: ports }, (_unused, column) =>
        Math.abs(row - column) === half ? '0.9 0' : '0.01 0',
      ).join(' '),
    );
    return `${f} ${matrix.join('\n')}`;
  });
  const text = ['# GHz S RI R 50', ...rows, ''].join('\n');
  return { sha256: String(ports), file: readTouchstone(`part.s${ports}p`, new TextEncoder().encode(text)) };
}

function refusedBy(document: unknown, part?: Part): FieldProblem[] {
  const read = readChannel(document);
  if (!read.ok) throw new Error(JSON.stringify(read.problems));
  const result = checkChannel(read.channel, new Map(part ? [['a.snp', part]] : []));
  return result.ok ? [] : result.problems;
}

describe('a part that contradicts its element is refused with the path, the value and how to mend it', () => {
  const element = { kind: 'touchstone', file: 'a.snp' };
  const pair = { ...base, ...differential };
  it.each([
    ['is not there', withElement(element), undefined, 'elements[0].file', /a\.snp/, /Supply/],
    [
      'has 4 ports where 2 are wanted',
      withElement(element),
      4,
      'elements[0].ports',
      /4 ports/,
      /\{ near, far \}/,
    ],
    [
      'has 6 ports where 4 are wanted',
      { ...pair, elements: [element] },
      6,
      'elements[0].ports',
      /6 ports/,
      /nearP/,
    ],
    [
      'has no such port',
      withElement({ ...element, ports: { near: 1, far: 9 } }),
      4,
      'elements[0].ports',
      /4 ports/,
      /from 1/,
    ],
    [
      'does not say its order',
      { ...pair, elements: [element] },
      4,
      'elements[0].portOrder',
      /through pairs/,
      /"1-3,2-4"/,
    ],
    [
      'has another order',
      { ...pair, elements: [line, { ...element, portOrder: '1-2,3-4' }] },
      4,
      'elements[1].portOrder',
      /against "1-2,3-4"/,
      /"1-3,2-4"/,
    ],
  ] as const)('%s', (_, document, ports, path, message, mend) => {
    expectProblem(refusedBy(document, ports && partOf(ports)), path, message, mend);
  });
});

describe('a mask beyond the grid', () => {
  it('is not judged there, with the ranges that are missing and the reason', () => {
    const read = readChannel(withFormula('9'));
    if (!read.ok) throw new Error(JSON.stringify(read.problems));
    const result = checkChannel(read.channel, new Map());
    if (!result.ok) throw new Error(JSON.stringify(result.problems));
    const [{ judgement }] = result.check.limits as [(typeof result.check.limits)[number]];
    expect(judgement.verdict).toBe('not-judged');
    expect(judgement.missingHz).toEqual([[2e9, 5e9]]);
    expect(judgement.reason).toMatch(/The grid ends at 2 GHz.*2 GHz to 5 GHz/);
    expect(judgement.worstRefined!.marginDb).toBeCloseTo(9, 9);
  });
});
