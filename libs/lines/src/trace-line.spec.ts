import { readFileSync } from 'node:fs';
import { describeWith, referenceData } from '../../../test/support/needs';
import type { Dielectric, LineMode, SolvedLine, TraceLine } from './index';
import { LineError, solveLine } from './index';

const laminate = (dk: number, df = 0, dispersion: Dielectric['dispersion'] = 'constant'): Dielectric => ({
  dk,
  df,
  atHz: 1e9,
  dispersion,
});
const copper = { conductivitySPerM: 5.8e7 };
const share = (value: number, reference: number): number => Math.abs(value / reference - 1);
const mode = (solved: SolvedLine, name: 'single' | 'even' | 'odd'): LineMode => solved.modes[name]!;

describe('a stripline of a board (w 0.15, b 0.4, t 0.0175 mm, 3.7, 0.008, 12.890625 GHz)', () => {
  const line: TraceLine = {
    section: { widthM: 0.15e-3, thicknessM: 17.5e-6, belowM: 191.25e-6, aboveM: 191.25e-6 },
    conductor: copper,
    below: laminate(3.7, 0.008),
  };
  const at = Float64Array.of(12.890625e9);
  const perInch = (dbPerM: number): number => dbPerM * 0.0254;

  it('has the impedance and the losses of the worked example', () => {
    const single = mode(solveLine(line, at), 'single');
    expect(single.z0Ohm).toBeCloseTo(54.5445, 3);
    expect(single.effectivePermittivity).toBeCloseTo(3.7, 12);
    expect(share(perInch(single.conductorLossDbPerM[0]!), 0.31)).toBeLessThan(0.002);
    expect(perInch(single.dielectricLossDbPerM[0]!)).toBeCloseTo(0.4586, 3);
  });
  it('loses as much more as worked on cannonball foil of Rz 3 um on every face', () => {
    const foil = { model: 'cannonball', rzM: 3e-6 } as const;
    const rough = solveLine({ ...line, conductor: { ...copper, roughness: { foot: foil, top: foil } } }, at);
    const single = mode(rough, 'single');
    const total = perInch(single.conductorLossDbPerM[0]! + single.dielectricLossDbPerM[0]!);
    expect(Math.abs(total - 1.0088)).toBeLessThan(0.002);
  });
  it.each([
    ['width', { widthM: 0.165e-3 }, -4.319],
    ['thickness', { thicknessM: 19.25e-6, belowM: 190.375e-6, aboveM: 190.375e-6 }, -0.849],
    ['spacing', { belowM: 211.25e-6, aboveM: 211.25e-6 }, 5.163],
  ])('changes impedance with 10 %% more %s as worked', (_, change, percent) => {
    const changed = solveLine({ ...line, section: { ...line.section, ...change } }, at);
    const ratio = mode(changed, 'single').z0Ohm / mode(solveLine(line, at), 'single').z0Ohm;
    expect(Math.abs((ratio - 1) * 100 - percent)).toBeLessThan(0.002);
  });
  it('tends to the resistance of its copper at 0 Hz, and stays finite there', () => {
    const single = mode(solveLine(line, Float64Array.of(0, 1)), 'single');
    const direct = 1 / (5.8e7 * 0.15e-3 * 17.5e-6);
    expect(single.seriesOhmPerM[0]).toBeCloseTo(direct, 9);
    expect(single.seriesOhmPerM[1]).toBe(0);
    expect(single.shuntSPerM.slice(0, 2).every((x) => x === 0)).toBe(true);
    expect(share(single.seriesOhmPerM[2]!, direct)).toBeLessThan(1e-9);
  });
  it('has a resistance that never falls with frequency', () => {
    const f = Float64Array.from({ length: 200 }, (_, k) => 10 ** (3 + k / 25));
    const r = mode(solveLine(line, f), 'single').seriesOhmPerM;
    for (let k = 1; k < f.length; k++) expect(r[k * 2]).toBeGreaterThanOrEqual(r[k * 2 - 2]!);
  });
});

describe('the copper of 0.15 mm by 35 um', () => {
  it('has 3.2841 ohm/m at 0 Hz', () => {
    const line: TraceLine = {
      section: { widthM: 0.15e-3, thicknessM: 35e-6, belowM: 0.2e-3 },
      conductor: copper,
      below: laminate(4.3),
    };
    expect(mode(solveLine(line, Float64Array.of(0)), 'single').seriesOhmPerM[0]).toBeCloseTo(3.2841, 4);
  });
});

describe('a microstrip (w 0.36, h 0.2, t 0.035 mm, 4.3)', () => {
  const line: TraceLine = {
    section: { widthM: 0.36e-3, thicknessM: 35e-6, belowM: 0.2e-3 },
    conductor: copper,
    below: laminate(4.3, 0.02),
  };
  const z0 = (change: Partial<TraceLine['section']>, dk = 4.3): number =>
    mode(
      solveLine(
        { ...line, section: { ...line.section, ...change }, below: laminate(dk) },
        Float64Array.of(1e9),
      ),
      'single',
    ).z0Ohm;
  it.each([
    ['width', { widthM: 0.396e-3 }, 4.3, -5.257],
    ['height', { belowM: 0.22e-3 }, 4.3, 5.728],
    ['thickness', { thicknessM: 38.5e-6 }, 4.3, -0.352],
    ['permittivity by 5 %%', {}, 4.515, -2.112],
  ])('changes impedance with more %s as worked', (_, change, dk, percent) => {
    expect(Math.abs((z0(change, dk) / z0({}) - 1) * 100 - percent)).toBeLessThan(0.002);
  });
  it('has the permittivity as given where it is said to be quasi-static, whatever the frequencies', () => {
    const low = mode(solveLine(line, Float64Array.of(1e6)), 'single');
    const high = mode(solveLine(line, Float64Array.of(3e10)), 'single');
    expect(low.effectivePermittivity).toBe(high.effectivePermittivity);
  });
  it('warns where the dispersion formula ends', () => {
    const thick = { ...line, section: { ...line.section, belowM: 1.5e-3, widthM: 2.8e-3 } };
    expect(solveLine(thick, Float64Array.of(3e10)).cautions.join()).toMatch(/published range/);
  });
});

describe('a trapezoid', () => {
  it('stands as the rectangle of its mean width, whichever way its foot looks', () => {
    const section = { widthM: 0.12e-3, thicknessM: 35e-6, belowM: 0.15e-3, aboveM: 0.15e-3 };
    const solve = (extra: object): number =>
      mode(
        solveLine(
          { section: { ...section, ...extra }, conductor: copper, below: laminate(4) },
          Float64Array.of(1e9),
        ),
        'single',
      ).z0Ohm;
    const mean = 0.12e-3 - 35e-6 / Math.tan((60 * Math.PI) / 180);
    expect(solve({ etchAngleDeg: 60 })).toBeCloseTo(solve({ widthM: mean }), 12);
    expect(solve({ etchAngleDeg: 60, foot: 'up' })).toBeCloseTo(solve({ etchAngleDeg: 60 }), 12);
  });
});

describe('what no listed form covers is refused', () => {
  const f = Float64Array.of(1e9);
  const base = { conductor: copper, below: laminate(4) };
  it.each([
    [
      'a pair off centre',
      { widthM: 1e-4, thicknessM: 2e-5, belowM: 1e-4, aboveM: 2e-4, gapM: 1e-4 },
      /off centre/,
    ],
    ['a microstrip far too wide', { widthM: 0.05, thicknessM: 2e-5, belowM: 1e-4 }, /outside 0.01 to 100/],
    [
      'a pair of microstrips too far apart',
      { widthM: 1e-4, thicknessM: 2e-5, belowM: 1e-4, gapM: 2e-3 },
      /Gap over height/,
    ],
    ['a negative width', { widthM: -1e-4, thicknessM: 2e-5, belowM: 1e-4 }, /not above zero/],
    [
      'a trapezoid without a top',
      { widthM: 4e-5, thicknessM: 3e-5, belowM: 1e-4, etchAngleDeg: 45 },
      /no top left/,
    ],
  ])('%s', (_, section, reason) => {
    expect(() => solveLine({ ...base, section }, f)).toThrow(LineError);
    expect(() => solveLine({ ...base, section }, f)).toThrow(reason);
  });
  it('a permittivity below 1', () => {
    const section = { widthM: 1e-4, thicknessM: 2e-5, belowM: 1e-4, aboveM: 1e-4 };
    expect(() => solveLine({ ...base, section, below: laminate(0.5) }, f)).toThrow(/permittivity is 0.5/);
  });
});

interface SolvedCase {
  id: string;
  geometry: { w_m: number; t_m: number; h_m: number; h2_m?: number; s_m?: number; er: number };
  modes: Record<
    string,
    {
      z0_ohm: number;
      eps_eff: number;
      alpha_c_smooth_db_per_m: Record<string, number>;
      alpha_d_db_per_m_tand0p02: Record<string, number>;
    }
  >;
}

/** Seven cross-sections of a finite-element solution, where the reference folder is present. */
const solvedSections = referenceData('traces.json');

describeWith(solvedSections, 'cross-sections of a finite-element solution', () => {
  const { cases } = JSON.parse(readFileSync(solvedSections.path, 'utf8')) as { cases: SolvedCase[] };
  const solve = (id: string): { solved: SolvedLine; wanted: SolvedCase } => {
    const wanted = cases.find((one) => one.id === id)!;
    const g = wanted.geometry;
    const section = { widthM: g.w_m, thicknessM: g.t_m, belowM: g.h_m, aboveM: g.h2_m, gapM: g.s_m };
    const f = Float64Array.of(1e9, 1e10);
    return { solved: solveLine({ section, conductor: copper, below: laminate(g.er, 0.02) }, f), wanted };
  };
  // Impedance, permittivity, conductor loss and dielectric loss: the share by which each may differ.
  it.each([
    ['SL1', 0.0002, 1e-9, 0.0011, 1e-6],
    ['SL3', 0.0219, 1e-9, 0.002, 1e-6],
    ['MS1', 0.0019, 0.0016, 0.011, 0.0014],
    ['CS1', 0.013, 1e-9, 0.0284, 1e-6],
    ['CM1', 0.0184, 0.0181, 0.0271, 0.0114],
  ])('%s agrees within %d, %d, %d, %d', (id, z, ee, conductor, dielectric) => {
    const { solved, wanted } = solve(id);
    for (const [name, reference] of Object.entries(wanted.modes)) {
      const own = solved.modes[name as 'single']!;
      expect(share(own.z0Ohm, reference.z0_ohm)).toBeLessThan(z);
      expect(share(own.effectivePermittivity, reference.eps_eff)).toBeLessThan(ee);
      expect(share(own.conductorLossDbPerM[0]!, reference.alpha_c_smooth_db_per_m['1e+09']!)).toBeLessThan(
        conductor,
      );
      expect(share(own.dielectricLossDbPerM[0]!, reference.alpha_d_db_per_m_tand0p02['1e+09']!)).toBeLessThan(
        dielectric,
      );
    }
  });
});
