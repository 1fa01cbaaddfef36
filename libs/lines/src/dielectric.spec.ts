import { fitWidebandDebye, LineError, permittivity, type Dielectric, type DielectricPoint } from './index';

const share = (value: number, reference: number) => Math.abs(value / reference - 1);
/** The worked material of formulas B12 (4.2, 0.02 at 1 GHz) where others of its points are given. */
const worked: readonly DielectricPoint[] = [
  { dk: 4.2, df: 0.02, atHz: 1e9 },
  { dk: 4.56964, df: 0.018382, atHz: 1e6 },
  { dk: 4.32321, df: 0.019441, atHz: 1e8 },
  { dk: 4.07679, df: 0.020486, atHz: 1e10 },
];
const through = ([first, ...furtherPoints]: readonly DielectricPoint[]): Dielectric => ({
  ...first!,
  dispersion: 'wideband-debye',
  furtherPoints,
});

describe('a wideband Debye model', () => {
  it('goes through its one point exactly', () => {
    const { atInfinity, scale, worst } = fitWidebandDebye(through(worked.slice(0, 1)));
    expect(atInfinity).toBeCloseTo(3.830365, 6);
    expect(scale).toBeCloseTo(0.05351, 6);
    expect(worst.dk).toBeLessThan(1e-12);
    expect(worst.df).toBeLessThan(1e-12);
  });
  it('is found again from any of its points, and from all of them', () => {
    for (const points of [worked.slice(1), worked.slice(2), worked]) {
      const { atInfinity, scale, worst } = fitWidebandDebye(through(points));
      expect(share(atInfinity, 3.830365)).toBeLessThan(1e-4);
      expect(share(scale, 0.05351)).toBeLessThan(1e-4);
      expect(Math.max(worst.dk, worst.df)).toBeLessThan(1e-4);
    }
  });
  it('is the least-squares best of points that lie on none: any other errs more', () => {
    const points = [
      { dk: 3.71, df: 0.0041, atHz: 1e9 },
      { dk: 3.66, df: 0.0052, atHz: 1e10 },
      { dk: 3.62, df: 0.0047, atHz: 2e10 },
    ];
    const fit = fitWidebandDebye(through(points));
    const cost = (atInfinity: number, scale: number) =>
      points.reduce((sum, { dk, df, atHz }) => {
        const re = Math.log(Math.hypot(1e12, atHz) / Math.hypot(1e3, atHz));
        const im = Math.atan2(atHz, 1e12) - Math.atan2(atHz, 1e3);
        return sum + ((atInfinity + scale * re) / dk - 1) ** 2 + ((-scale * im) / (dk * df) - 1) ** 2;
      }, 0);
    const best = cost(fit.atInfinity, fit.scale);
    for (const [a, s] of [
      [1e-3, 0],
      [-1e-3, 0],
      [0, 1e-4],
      [0, -1e-4],
      [1e-3, -1e-4],
    ] as const) {
      expect(cost(fit.atInfinity + a, fit.scale + s)).toBeGreaterThan(best);
    }
    expect(fit.worst.df).toBeGreaterThan(0.05);
    expect(fit.worst.df).toBeLessThan(0.3);
    expect(fit.worst.dk).toBeLessThan(0.02);
  });
  it('gives the curve that its points were taken from', () => {
    const at = Float64Array.of(5e9, 2e10);
    const curve = permittivity(through(worked.slice(1)), at);
    expect(share(curve[0]!, 4.11388)).toBeLessThan(1e-5);
    expect(share(curve[1]! / curve[0]!, 0.020367)).toBeLessThan(1e-4);
    expect(share(curve[2]!, 4.03971)).toBeLessThan(1e-5);
  });
  it('without loss is constant, and causal so', () => {
    const curve = permittivity(through([{ dk: 3.5, df: 0, atHz: 1e9 }]), Float64Array.of(1e6, 1e11));
    expect([...curve]).toEqual([3.5, 0, 3.5, 0]);
  });
});

describe('a material is refused', () => {
  it.each<[string, Dielectric, string]>([
    [
      'whose points rise with frequency',
      through([
        { dk: 3.5, df: 1e-4, atHz: 1e9 },
        { dk: 4.5, df: 1e-4, atHz: 1e10 },
      ]),
      'furtherPoints',
    ],
    [
      'that is constant at two frequencies',
      { ...worked[0]!, dispersion: 'constant', furtherPoints: worked.slice(1) },
      'dielectric.furtherPoints',
    ],
    [
      'with a further point below 1',
      through([worked[0]!, { dk: 0.5, df: 0.01, atHz: 1e10 }]),
      'dielectric.furtherPoints[0].dk',
    ],
    [
      'with a further point at no frequency',
      through([worked[0]!, { dk: 4, df: 0.01, atHz: 0 }]),
      'dielectric.furtherPoints[0].atHz',
    ],
  ])('%s', (_, material, at) => {
    const curve = () => permittivity(material, Float64Array.of(1e9));
    expect(curve).toThrow(LineError);
    expect(curve).toThrow(expect.objectContaining({ at }));
  });
});
