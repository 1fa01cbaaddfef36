import {
  base,
  differential,
  expectProblem,
  grid,
  line,
  problemsOf,
  withElement,
  withFormula,
  withGrid,
  withLimit,
  withLine,
  type Row,
} from '../reference/bad-documents';

const numbers: readonly Row[] = [
  [
    'a length that is no number',
    withLine({ lengthM: NaN }),
    'elements[0].lengthM',
    /finite.*NaN/,
    /finite number/,
  ],
  [
    'an infinite impedance',
    withLine({ z0Ohm: Infinity }),
    'elements[0].z0Ohm',
    /finite.*Infinity/,
    /at most 1000000/,
  ],
  [
    'a number too large',
    withLine({ lengthM: '1e999 mm' }),
    'elements[0].lengthM',
    /too large.*1e999/,
    /finite number/,
  ],
  [
    'a negative length',
    withLine({ lengthM: -1 }),
    'elements[0].lengthM',
    /at least 0; -1 is given/,
    /at least 0/,
  ],
  [
    'a negative length in text',
    withLine({ lengthM: '-3 mm' }),
    'elements[0].lengthM',
    /"-3 mm" is given/,
    /at least 0/,
  ],
  [
    'a length in ohm',
    withLine({ lengthM: '3 ohm' }),
    'elements[0].lengthM',
    /"ohm" is not a unit of length/,
    /"1 mm"/,
  ],
  ['nothing for a length', withLine({ lengthM: null }), 'elements[0].lengthM', /null is given/, /"1 mm"/],
  [
    'a permittivity below 1',
    withLine({ effectivePermittivity: 0.5 }),
    'elements[0].effectivePermittivity',
    /0\.5/,
    /least 1/,
  ],
  [
    'a negative loss',
    withLine({ lossSqrtDbPerM: -2 }),
    'elements[0].lossSqrtDbPerM',
    /-2 is given/,
    /at least 0/,
  ],
  [
    'a reference of 0 ohm',
    { ...base, referenceOhm: 0 },
    'referenceOhm',
    /; 0 is given/,
    /at least 0\.000001/,
  ],
  [
    'a reference of negative resistance',
    { ...base, referenceOhm: [[-5, 1], 50] },
    'referenceOhm[0][0]',
    /-5/,
    /at least/,
  ],
  [
    'a reactance that is no number',
    { ...base, referenceOhm: [50, [50, NaN]] },
    'referenceOhm[1][1]',
    /NaN/,
    /finite/,
  ],
  [
    'a limit that is no number',
    withLimit({
      points: [
        [1e9, 1],
        [2e9, NaN],
      ],
      interpolation: 'linear',
    }),
    'limits[0].points[1][1]',
    /finite.*NaN/,
    /finite number/,
  ],
];

const frequencies: readonly Row[] = [
  [
    'unsorted',
    withGrid({ frequenciesHz: [1e9, 3e9, 2e9] }),
    'grid.frequenciesHz[2]',
    /2000000000 is given/,
    /Sort them/,
  ],
  [
    'given twice',
    withGrid({ frequenciesHz: [1e9, 1e9] }),
    'grid.frequenciesHz[1]',
    /ascend.*1000000000/,
    /each one once/,
  ],
  ['negative', withGrid({ frequenciesHz: [-1, 1e9] }), 'grid.frequenciesHz[0]', /-1 is given/, /at least 0/],
  ['no numbers', withGrid({ frequenciesHz: [1, NaN] }), 'grid.frequenciesHz[1]', /NaN/, /finite number/],
  [
    'ending below their start',
    withGrid({ ...grid, stopHz: 1e8 }),
    'grid.stopHz',
    /100000000 is given/,
    /above the start/,
  ],
  ['of one point', withGrid({ ...grid, points: 1 }), 'grid.points', /at least 2.*; 1 is given/, /Raise/],
  ['of half a point', withGrid({ ...grid, points: 10.5 }), 'grid.points', /whole number; 10\.5/, /kind/],
  [
    'logarithmic from 0 Hz',
    withGrid({ ...grid, startHz: 0, spacing: 'log' }),
    'grid.startHz',
    /; 0 is given|0 Hz/,
    /linear/,
  ],
  [
    'of a mask unsorted',
    withLimit({
      points: [
        [2e9, 1],
        [1e9, 2],
      ],
      interpolation: 'linear',
    }),
    'limits[0].points',
    /ascend/,
    /Sort/,
  ],
  [
    'of a mask three times the same',
    withLimit({
      points: [
        [1e9, 1],
        [1e9, 2],
        [1e9, 3],
      ],
      interpolation: 'linear',
    }),
    'limits[0].points',
    /At most two/,
    /Remove/,
  ],
  [
    'of a segment the wrong way round',
    withLimit({ segments: [{ fromHz: 5e9, toHz: 1e9, formula: '1' }] }),
    'limits[0].segments[0].toHz',
    /1000000000 is given/,
    /above fromHz/,
  ],
];

const shapes: readonly Row[] = [
  [
    'references of another number of ports',
    { ...base, referenceOhm: [50, 50, 50, 50] },
    'referenceOhm',
    /2 ports; 4/,
    /or 2/,
  ],
  [
    'references that differ on p and n',
    { ...base, ...differential, referenceOhm: [50, 45, 50, 50] },
    'referenceOhm[1]',
    /near end/,
    /same/,
  ],
  [
    'a pair in a single-ended channel',
    withElement({ kind: 'line-pair', p: line, n: line }),
    'elements[0].p.kind',
    /not a field/,
    /Remove/,
  ],
  ['no elements', { ...base, elements: [] }, 'elements', /at least one/, /Add/],
  [
    'an unknown kind',
    withElement({ kind: 'wire' }),
    'elements[0].kind',
    /not one of.*"wire"/,
    /as the message says/,
  ],
  [
    'an unknown field',
    withLine({ lengthMm: 3 }),
    'elements[0].lengthMm',
    /"lengthMm" is not a field/,
    /spelling/,
  ],
  [
    'an id given twice',
    {
      ...base,
      elements: [
        { ...line, id: 'a' },
        { ...line, id: 'a' },
      ],
    },
    'elements[1].id',
    /"a"/,
    /another id/,
  ],
  ['a branch of nothing', withElement({ kind: 'series' }), 'elements[0]', /no part/, /resistanceOhm/],
  [
    'a stub without its load',
    withLine({ kind: 'stub', end: 'load' }),
    'elements[0].load',
    /exactly where/,
    /Give the load/,
  ],
  [
    'a coupling above the inductance',
    withElement({ kind: 'pair-series', inductanceH: 1e-9, mutualInductanceH: 2e-9 }, differential),
    'elements[0].mutualInductanceH',
    /2e-9 is given/,
    /no more than/,
  ],
  [
    'a trace without a stackup',
    withElement({ kind: 'trace', layer: 'L1', widthM: 1e-4, lengthM: 0.1 }),
    'elements[0].layer',
    /L1/,
    /copper layer/,
  ],
  [
    'a limit given twice',
    withLimit({ segments: [{ fromHz: 1, toHz: 2, formula: '1' }], atHz: 1e9, db: 3 }),
    'limits[0]',
    /2 ways/,
    /one of/,
  ],
  ['a limit not given', withLimit({}), 'limits[0]', /0 ways/, /one of/],
  ['a frequency without its limit', withLimit({ atHz: 1e9 }), 'limits[0].db', /both/, /missing/],
];

describe('bad input is refused with its path, its value and how to mend it', () => {
  it.each(numbers)('%s', (_, document, path, message, mend) => {
    expectProblem(problemsOf(document), path, message, mend);
  });
  it.each(frequencies)('frequencies %s', (_, document, path, message, mend) => {
    expectProblem(problemsOf(document), path, message, mend);
  });
  it.each(shapes)('%s', (_, document, path, message, mend) => {
    expectProblem(problemsOf(document), path, message, mend);
  });
  it('and nothing is wrong with the document that all of these spoil', () => {
    expect(problemsOf(base)).toEqual([]);
    expect(problemsOf(withFormula('1 + f'))).toEqual([]);
  });
});
