import { compileMask, limitAt, limitProblems, outlineOf, rangesOf, type Mask } from './index';

function maskOf(limit: Parameters<typeof compileMask>[0]): Mask {
  const compiled = compileMask(limit, 'limits[0]');
  if (!compiled.ok) throw new Error(JSON.stringify(compiled.problems));
  return compiled.mask;
}

/** Formulas and check values of IEEE Std 802.3: 69B.4.3, 93.9.2 and 83E.1 (standards sheet D1 to D3). */
const amax = '8.685889638*(2.0e-5*sqrt(f*1e9) + 1.1e-10*f*1e9 + 3.2e-20*(f*1e9)^2 - 1.2e-30*(f*1e9)^3)';
const annex69B = [
  { fromHz: 0.05e9, toHz: 6e9, formula: `${amax} + 0.8 + 0.2*f` },
  { fromHz: 6e9, toHz: 15e9, formula: `${amax} + 0.8 + 0.2*f + 10*(f - 6)` },
];
const clause93 = [
  { fromHz: 0.05e9, toHz: 12.890625e9, formula: '1.5 + 4.6*sqrt(f) + 1.318*f' },
  { fromHz: 12.890625e9, toHz: 25.78125e9, formula: '-12.71 + 3.7*f' },
];
const annex83E = [
  { fromHz: 0.01e9, toHz: 14e9, formula: '1.076*(0.075 + 0.537*sqrt(f) + 0.566*f)' },
  { fromHz: 14e9, toHz: 18.75e9, formula: '1.076*(-18 + 2*f)' },
];

describe('published insertion loss limits at their check points', () => {
  const rows = [
    [
      '69B.4.3',
      annex69B,
      [0.05, 2.0868],
      [1, 7.7164],
      [5.15625, 25.1928],
      [6, 28.9436],
      [8, 58.0335],
      [10.3125, 91.6098],
    ],
    [
      '93.9.2',
      clause93,
      [0.05, 2.5945],
      [1, 7.418],
      [5, 18.3759],
      [12.890625, 34.9853],
      [20, 61.29],
      [25.78125, 82.6806],
    ],
    [
      '83E.1',
      annex83E,
      [0.01, 0.1446],
      [1, 1.2675],
      [10, 7.9981],
      [12.890625, 10.0058],
      [14, 10.76],
      [18.75, 20.982],
    ],
  ] as const;
  it.each(rows)('%s', (_, segments, ...points) => {
    const mask = maskOf({ segments: [...segments] });
    for (const [ghz, db] of points) expect(limitAt(mask, 'max', ghz * 1e9)).toBeCloseTo(db, 4);
  });
});

describe('a mask', () => {
  it('takes the stricter side where two segments meet', () => {
    const mask = maskOf({ segments: clause93 });
    expect(mask.pieces[0]!.valueAt(12.890625e9)).toBeCloseTo(35.0055, 4);
    expect(limitAt(mask, 'max', 12.890625e9)).toBeCloseTo(34.9853, 4);
    expect(limitAt(mask, 'min', 12.890625e9)).toBeCloseTo(35.0055, 4);
  });

  it('has no value outside its range or in a gap', () => {
    const mask = maskOf({ segments: [annex83E[0]!, { fromHz: 16e9, toHz: 18e9, formula: '20' }] });
    expect(limitAt(mask, 'max', 9e6)).toBeNull();
    expect(limitAt(mask, 'max', 15e9)).toBeNull();
    expect(rangesOf(mask)).toEqual([
      [1e7, 14e9],
      [16e9, 18e9],
    ]);
  });

  it('joins points linear in frequency or in its logarithm, as it is told', () => {
    const points: [number, number][] = [
      [1e9, 2],
      [4e9, 8],
    ];
    expect(limitAt(maskOf({ points, interpolation: 'linear' }), 'max', 2e9)).toBeCloseTo(4, 12);
    expect(limitAt(maskOf({ points, interpolation: 'log' }), 'max', 2e9)).toBeCloseTo(5, 12);
  });

  it('steps where two points share a frequency', () => {
    const mask = maskOf({
      points: [
        [1e9, 12],
        [3e9, 10],
        [3e9, 6],
        [9e9, 3],
      ],
      interpolation: 'linear',
    });
    expect(limitAt(mask, 'min', 3e9)).toBe(10);
    expect(limitAt(mask, 'max', 3e9)).toBe(6);
    expect(outlineOf(mask)).toEqual([
      [
        [1e9, 12],
        [3e9, 10],
        [3e9, 6],
        [9e9, 3],
      ],
    ]);
  });

  it('of one value has one frequency', () => {
    const mask = maskOf({ atHz: 5e9, db: 3 });
    expect(limitAt(mask, 'max', 5e9)).toBe(3);
    expect(limitAt(mask, 'max', 5.001e9)).toBeNull();
    expect(outlineOf(mask)).toEqual([[[5e9, 3]]]);
  });

  it('is drawn with its ends, a step as two points, and gaps as lines of their own', () => {
    const [one] = outlineOf(maskOf({ segments: clause93 }));
    expect(one![0]).toEqual([0.05e9, limitAt(maskOf({ segments: clause93 }), 'max', 0.05e9)]);
    expect(one!.filter(([f]) => f === 12.890625e9)).toHaveLength(2);
    expect(one!.at(-1)![0]).toBe(25.78125e9);
    expect(one!.every(([f], k) => k === 0 || f >= one![k - 1]![0])).toBe(true);
    const gap = [
      { ...annex83E[0]!, toHz: 2e9 },
      { ...annex83E[0]!, fromHz: 3e9 },
    ];
    expect(outlineOf(maskOf({ segments: gap }))).toHaveLength(2);
  });
});

describe('a mask is refused', () => {
  it.each([
    ['1/(f - 2)', 'At f = 2 GHz the formula has no finite value (Infinity).'],
    ['sqrt(f - 3)', 'At f = 1 GHz the formula has no finite value (NaN).'],
    ['log(0*f)', 'At f = 1 GHz the formula has no finite value (-Infinity).'],
    ['2 f', 'An operator is missing between "2" and "f" (character 3).'],
  ])('where a formula is %s', (formula, message) => {
    const compiled = compileMask({ segments: [{ fromHz: 1e9, toHz: 3e9, formula }] }, 'limits[4]');
    expect(compiled).toMatchObject({
      ok: false,
      problems: [{ path: 'limits[4].segments[0].formula', message }],
    });
  });

  it('where points in the logarithm of frequency start at 0 Hz, or all share one', () => {
    const zero = compileMask(
      {
        points: [
          [0, 1],
          [1e9, 2],
        ],
        interpolation: 'log',
      },
      'limits[0]',
    );
    expect(zero).toMatchObject({ ok: false, problems: [{ path: 'limits[0].points[0][0]' }] });
    const one = compileMask(
      {
        points: [
          [1e9, 1],
          [1e9, 2],
        ],
        interpolation: 'linear',
      },
      'limits[0]',
    );
    expect(one).toMatchObject({ ok: false, problems: [{ path: 'limits[0].points' }] });
  });

  it('where its quantity is of pairs and the channel is single-ended, or its fit is too short', () => {
    const limit = { title: 'x', quantity: 'pair-skew', sense: 'max', atHz: 1e9, db: 1 } as const;
    expect(limitProblems(limit, 'single-ended', 'limits[1]')[0]!.path).toBe('limits[1].quantity');
    expect(limitProblems(limit, 'differential', 'limits[1]')).toEqual([]);
    const fit = { basis: 'line', fromHz: 1e9, toHz: 1.02e9 } as const;
    const fitted = { ...limit, quantity: 'fitted-attenuation', fit } as const;
    expect(limitProblems(fitted, 'differential', 'limits[1]')[0]!.path).toBe('limits[1].fit.toHz');
  });
});
