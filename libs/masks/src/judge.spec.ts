import { judge, legs, lossy, subjectOf, uniform } from './testing/subjects';

const grid = uniform(1e8, 1e8, 200);
/** 3 dB at 10 GHz, straight in frequency. */
const ramp = lossy((f) => (3 * f) / 1e10);

describe('a limit on insertion loss', () => {
  it('holds with its worst margin on the grid and between its points', () => {
    const limit = { segments: [{ fromHz: 1e9, toHz: 10.05e9, formula: '1 + 0.3*f' }] };
    const result = judge(limit, subjectOf(ramp, { grid }));
    expect(result).toMatchObject({ verdict: 'holds', holds: true, reason: '', exceedsHz: [], missingHz: [] });
    expect(result.worst!.marginDb).toBeCloseTo(1, 9);
    expect(result.worstRefined!.marginDb).toBeCloseTo(1, 9);
    expect(result.referenceOhm).toBe(50);
  });

  it('is read at the end of its range even where no grid point lies there', () => {
    const result = judge(
      { segments: [{ fromHz: 1e9, toHz: 10.05e9, formula: '3.01' }] },
      subjectOf(ramp, { grid }),
    );
    expect(result.worst).toMatchObject({ frequencyHz: 1e10 });
    expect(result.worst!.marginDb).toBeCloseTo(0.01, 9);
    expect(result.worstRefined!.frequencyHz).toBe(10.05e9);
    expect(result.worstRefined!.marginDb).toBeCloseTo(-0.005, 9);
    expect(result).toMatchObject({ verdict: 'exceeds', holds: false, exceedsHz: [] });
  });

  it('names each range of grid points that exceed, and none outside the limit', () => {
    const waves = lossy((f) => (f % 2e9 < 0.95e9 ? 1 : 2));
    const limit = { segments: [{ fromHz: 3e9, toHz: 6.5e9, formula: '1.5' }] };
    const result = judge(limit, subjectOf(waves, { grid }));
    expect(result.exceedsHz).toEqual([
      [3e9, 3.9e9],
      [5e9, 5.9e9],
    ]);
  });

  it('holds where its margin is zero but for rounding', () => {
    const result = judge(
      { atHz: 5e9, db: 3 },
      subjectOf(
        lossy(() => 3),
        { grid },
      ),
    );
    expect(result.verdict).toBe('holds');
  });

  it('finds a notch between two grid points to 1e-4 dB', () => {
    const notch = lossy((f) => 1 + 4 / (1 + ((f - 5.0317e9) / 4e7) ** 2));
    const result = judge(
      { segments: [{ fromHz: 1e9, toHz: 2e10, formula: '4' }] },
      subjectOf(notch, { grid }),
    );
    expect(result.worst!.marginDb).toBeGreaterThan(0);
    expect(result.worstRefined!.marginDb).toBeCloseTo(-1, 4);
    expect(Math.abs(result.worstRefined!.frequencyHz - 5.0317e9)).toBeLessThan(1e6);
    expect(result.verdict).toBe('exceeds');
  });

  it('finds the worst of many ripples without evaluating each to the end', () => {
    const ripple = lossy((f) => f / 1e10 + 0.3 * Math.sin((2 * Math.PI * f) / 0.73e9));
    const subject = subjectOf(ripple, { grid });
    const result = judge({ segments: [{ fromHz: 1e8, toHz: 2e10, formula: '3' }] }, subject);
    const fine = uniform(1e8, 1e5, 199_001).reduce(
      (least, f) => Math.min(least, 3 - f / 1e10 - 0.3 * Math.sin((2 * Math.PI * f) / 0.73e9)),
      Infinity,
    );
    expect(Math.abs(result.worstRefined!.marginDb! - fine)).toBeLessThan(1e-4);
    expect(subject.asked.reduce((sum, list) => sum + list.length, 0)).toBeLessThan(200);
  });

  it('counts both sides of a step, the stricter one at the step itself', () => {
    const points: [number, number][] = [
      [1e9, 2],
      [5.05e9, 2],
      [5.05e9, 1.5],
      [1e10, 4],
    ];
    const result = judge({ points, interpolation: 'linear' }, subjectOf(ramp, { grid }));
    expect(result.worstRefined!.frequencyHz).toBe(5.05e9);
    expect(result.worstRefined!.marginDb).toBeCloseTo(1.5 - 1.515, 9);
    expect(result.worst!.marginDb).toBeGreaterThan(result.worstRefined!.marginDb!);
  });

  it('at one frequency off the grid has a refined margin and none on the grid', () => {
    const result = judge({ atHz: 5.05e9, db: 2 }, subjectOf(ramp, { grid }));
    expect(result.worst).toBeNull();
    expect(result.worstRefined!.frequencyHz).toBe(5.05e9);
    expect(result.worstRefined!.marginDb).toBeCloseTo(2 - 1.515, 9);
    expect(result.verdict).toBe('holds');
  });

  it('exceeds with a margin of null where nothing is transmitted', () => {
    const blocked = lossy((f) => (f === 5e9 ? Infinity : 1));
    const result = judge(
      { segments: [{ fromHz: 1e9, toHz: 2e10, formula: '3' }] },
      subjectOf(blocked, { grid }),
    );
    expect(result).toMatchObject({ verdict: 'exceeds', worst: { frequencyHz: 5e9, marginDb: null } });
    expect(result.exceedsHz).toEqual([[5e9, 5e9]]);
    expect(result.valueDb[49]).toBeNull();
  });
});

describe('a limit at a reference of its own', () => {
  it('is judged on S renormalised to it', () => {
    const through = lossy(() => 0);
    const at50 = judge(
      { quantity: 'return-loss-near', sense: 'min', atHz: 5e9, db: 14 },
      subjectOf(through, { grid }),
    );
    expect(at50.worstRefined!.marginDb).toBeNull();
    expect(at50.verdict).toBe('holds');
    // 3 dB of a pad matched in 50 ohm, seen from 75: S by power waves, computed from its T network.
    const pad = judge(
      { quantity: 'return-loss-near', sense: 'min', atHz: 5e9, db: 0, referenceOhm: 75 },
      subjectOf(
        lossy(() => 3),
        { grid },
      ),
    );
    const k = 10 ** (-3 / 10);
    const input = (50 * (1 + k * 0.2)) / (1 - k * 0.2);
    expect(pad.worstRefined!.marginDb).toBeCloseTo(
      -20 * Math.log10(Math.abs((input - 75) / (input + 75))),
      9,
    );
    expect(pad.referenceOhm).toBe(75);
  });

  it('of a pair is the differential value, twice the legs by default', () => {
    const pair = subjectOf(
      legs(
        lossy(() => 3),
        lossy(() => 3),
      ),
      { grid },
    );
    expect(judge({ atHz: 5e9, db: 4 }, pair).referenceOhm).toBe(100);
    const at85 = judge(
      { quantity: 'return-loss-near', sense: 'min', atHz: 5e9, db: 0, referenceOhm: 85 },
      pair,
    );
    const one = judge(
      { quantity: 'return-loss-near', sense: 'min', atHz: 5e9, db: 0, referenceOhm: 42.5 },
      subjectOf(
        lossy(() => 3),
        { grid },
      ),
    );
    expect(at85.worstRefined!.marginDb).toBeCloseTo(one.worstRefined!.marginDb!, 9);
    expect(at85.referenceOhm).toBe(85);
  });
});

describe('a pair', () => {
  /** Skew check of formulas A6: |SDD21| = cos(theta/2), |SCD21| = sin(theta/2) for a leg late by theta. */
  const skewed = subjectOf(
    legs(
      lossy(() => 0, 100e-12),
      lossy(() => 0, 105e-12),
    ),
    { grid },
  );

  it('with a late leg loses by the cosine and converts by the sine of half the phase', () => {
    const theta = 2 * Math.PI * 5e9 * 5e-12;
    const sdd = judge({ atHz: 5e9, db: 0 }, skewed);
    expect(sdd.worstRefined!.marginDb).toBeCloseTo(20 * Math.log10(Math.cos(theta / 2)), 9);
    const scd = judge(
      { quantity: 'mode-conversion', parameter: 'SCD21', sense: 'min', atHz: 5e9, db: 0 },
      skewed,
    );
    expect(scd.worstRefined!.marginDb).toBeCloseTo(-20 * Math.log10(Math.sin(theta / 2)), 9);
    expect(scd.verdict).toBe('holds');
  });

  it('shows its skew and its delay in seconds', () => {
    const skew = judge(
      { quantity: 'pair-skew', segments: [{ fromHz: 1e9, toHz: 2e10, formula: '6e-12' }] },
      skewed,
    );
    expect(skew.worstRefined!.marginDb).toBeCloseTo(1e-12, 16);
    const delay = judge({ quantity: 'delay', atHz: 5e9, db: 100e-12 }, skewed);
    expect(delay.worstRefined!.marginDb).toBeCloseTo(-2.5e-12, 16);
    expect(delay.verdict).toBe('exceeds');
  });

  it('without asymmetry is not judged on conversion', () => {
    const even = subjectOf(
      legs(
        lossy(() => 1),
        lossy(() => 1),
      ),
      { grid },
    );
    const result = judge(
      { quantity: 'mode-conversion', parameter: 'SCD21', sense: 'min', atHz: 5e9, db: 20 },
      even,
    );
    expect(result.verdict).toBe('not-judged');
    expect(result.reason).toContain('no asymmetry');
    const common = judge(
      { quantity: 'mode-conversion', parameter: 'SCC21', sense: 'max', atHz: 5e9, db: 2 },
      even,
    );
    expect(common.verdict).toBe('holds');
  });
});

describe('a limit is not judged', () => {
  const limit = { segments: [{ fromHz: 1e9, toHz: 25.78125e9, formula: '10 + f' }] };

  it('beyond a part, with margins over what it covers and the missing range', () => {
    const parts = [{ fromHz: 0, toHz: 1e10, what: 'msl100.s2p (P1)' }];
    const covered = uniform(1e8, 1e8, 100);
    const result = judge(limit, subjectOf(ramp, { grid: covered, gridHz: [1e8, 25.78125e9], parts }));
    expect(result).toMatchObject({ verdict: 'not-judged', holds: false, missingHz: [[1e10, 25.78125e9]] });
    expect(result.reason).toBe(
      'msl100.s2p (P1) ends at 10 GHz: the limit is not covered at 10 GHz to 25.78125 GHz.',
    );
    expect(result.worst!.marginDb).toBeCloseTo(10.7, 9);
    expect(result.worstRefined!.marginDb).toBeCloseTo(10.7, 9);
  });

  it('beyond the grid, below and above', () => {
    const result = judge(limit, subjectOf(ramp, { grid: uniform(2e9, 1e9, 9) }));
    expect(result.missingHz).toEqual([
      [1e9, 2e9],
      [1e10, 25.78125e9],
    ]);
    expect(result.reason).toContain('The grid starts at 2 GHz; The grid ends at 10 GHz');
  });

  it('where nothing of it is covered, without a margin', () => {
    const result = judge({ atHz: 30e9, db: 3 }, subjectOf(ramp, { grid }));
    expect(result).toMatchObject({
      verdict: 'not-judged',
      worst: null,
      worstRefined: null,
      missingHz: [[30e9, 30e9]],
    });
  });

  it('but a range end that rounding puts beyond the grid is', () => {
    const rounded = uniform(1e8, 1e8, 100).map((f) => f * (1 - 1e-13));
    const result = judge(
      { segments: [{ fromHz: 1e8, toHz: 1e10, formula: '4' }] },
      subjectOf(ramp, { grid: rounded }),
    );
    expect(result).toMatchObject({ verdict: 'holds', missingHz: [] });
  });

  it("where its test points are not the channel's, however they are spaced or cased", () => {
    const own = { grid, from: 'TP0', to: 'tp5' };
    expect(judge({ atHz: 5e9, db: 3, from: 'TP0a', to: 'TP5' }, subjectOf(ramp, own))).toMatchObject({
      verdict: 'not-judged',
      reason: "The limit is stated from TP0a, the channel from TP0: its test points are not the channel's.",
    });
    expect(judge({ atHz: 5e9, db: 3, from: ' tp0', to: 'TP5' }, subjectOf(ramp, own)).verdict).toBe('holds');
    expect(judge({ atHz: 5e9, db: 3, from: 'TP0a' }, subjectOf(ramp, { grid })).verdict).toBe('holds');
  });
});

describe('a limit on a fit', () => {
  const fit = { basis: 'line', fromHz: 1e9, toHz: 6e9 } as const;
  const rippled = lossy((f) => 1 + f / 1e9 + 0.2 * Math.cos((2 * Math.PI * f) / 1e9));

  it('is taken on 10 MHz samples whatever the grid', () => {
    const coarse = judge(
      { quantity: 'fitted-attenuation', fit, atHz: 5e9, db: 7 },
      subjectOf(rippled, { grid: uniform(1e9, 1e9, 10) }),
    );
    const dense = judge(
      { quantity: 'fitted-attenuation', fit, atHz: 5e9, db: 7 },
      subjectOf(rippled, { grid }),
    );
    expect(coarse.worstRefined!.marginDb).toBe(dense.worstRefined!.marginDb);
    expect(coarse.worstRefined!.marginDb).toBeCloseTo(1, 2);
  });

  it('leaves a signed deviation', () => {
    const within = (formula: string) => [{ fromHz: 1e9, toHz: 6e9, formula }];
    const limit = { quantity: 'insertion-loss-deviation', fit } as const;
    const subject = subjectOf(rippled, { grid });
    const above = judge({ ...limit, sense: 'max', segments: within('0.1') }, subject);
    expect(above.worstRefined!.marginDb).toBeCloseTo(-0.1, 1);
    const below = judge({ ...limit, sense: 'min', segments: within('-0.3') }, subject);
    expect(below.verdict).toBe('holds');
  });

  it('is not judged where the parts do not reach its range', () => {
    const parts = [{ fromHz: 2e9, toHz: 2e10, what: 'cable.s4p (P2)' }];
    const result = judge(
      { quantity: 'fitted-attenuation', fit, atHz: 5e9, db: 7 },
      subjectOf(rippled, { grid: uniform(2e9, 1e8, 100), parts }),
    );
    expect(result).toMatchObject({ verdict: 'not-judged', missingHz: [[1e9, 2e9]] });
    expect(result.reason).toBe('cable.s4p (P2) starts at 2 GHz: the fit is not covered at 1 GHz to 2 GHz.');
  });
});
