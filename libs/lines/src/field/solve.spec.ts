import {
  cohnPair,
  exactStripline,
  solveLine,
  thickMicrostripPermittivity,
  thickAirMicrostrip,
  wheelerStripline,
} from '../index';
import type { FieldSection } from './section';
import { solveSection } from './solve';
import { copperLossDbPerM, outer, share, strip, um } from './testing/sections';

/** Cross-sections and what a finite-element solution of ours gave for them (Z0, ee, conductor loss dB/m at 10 GHz, smooth). */
const finiteElements: [string, FieldSection, Record<string, [number, number, number]>][] = [
  ['a strip line', strip(125 * um, 17.5 * um, 150 * um, 150 * um, 3.6), { single: [52.9183, 3.6, 12.8504] }],
  [
    'an off-centre strip line',
    strip(120 * um, 15 * um, 100 * um, 250 * um, 3.3),
    { single: [54.5956, 3.3, 13.8273] },
  ],
  ['a microstrip', outer(200 * um, 35 * um, 100 * um, 4.2), { single: [46.2303, 3.0368, 10.555] }],
  [
    'an embedded microstrip',
    { ...outer(150 * um, 17.5 * um, 120 * um, 3.8), sheets: [{ thicknessM: 220 * um, dk: 3.8 }] },
    { single: [57.0471, 3.4464, 11.2723] },
  ],
  [
    'a strip line pair',
    strip(100 * um, 17.5 * um, 150 * um, 150 * um, 3.6, 150 * um),
    { even: [64.2211, 3.6, 12.9234], odd: [51.9453, 3.6, 14.8233] },
  ],
  [
    'a microstrip pair',
    outer(150 * um, 35 * um, 100 * um, 4.2, 150 * um),
    { even: [59.8286, 3.1881, 10.9993], odd: [47.015, 2.6093, 11.0328] },
  ],
  [
    'a microstrip pair under solder mask',
    { ...outer(120 * um, 35 * um, 100 * um, 3.8, 120 * um), mask: { thicknessM: 20 * um, dk: 3.4 } },
    { even: [68.4362, 3.1466, 11.0787], odd: [47.3873, 2.745, 12.4626] },
  ],
];

describe('the field solution against finite elements', () => {
  it.each(finiteElements)(
    'of %s: Z0 to 0.05 %%, permittivity to 0.1 %%, copper loss to 0.2 %%',
    (_, section, modes) => {
      const solution = solveSection(section);
      for (const [name, [z0Ohm, ee, loss]] of Object.entries(modes)) {
        const mode = solution.modes[name as 'single']!;
        expect(share(mode.z0Ohm, z0Ohm)).toBeLessThan(5e-4);
        expect(share(mode.effectivePermittivity, ee)).toBeLessThan(1e-3);
        expect(share(copperLossDbPerM(mode), loss)).toBeLessThan(2e-3);
        expect(share(mode.z0Ohm, z0Ohm)).toBeLessThan(Math.max(solution.error.z0, 2.5e-4));
      }
    },
  );

  it('is homogeneous of degree one in its permittivities: fillings and air make up the whole', () => {
    const [, section] = finiteElements[6]!;
    const doubled = solveSection({
      ...section,
      sheets: section.sheets.map((sheet) => ({ ...sheet, dk: sheet.dk * 1.01 })),
      mask: { ...section.mask!, dk: section.mask!.dk * 1.01 },
    });
    const { odd } = solveSection(section).modes;
    const predicted = odd!.effectivePermittivity + 0.01 * (odd!.filling[0]! * 3.8 + odd!.filling[1]! * 3.4);
    expect(share(doubled.modes.odd!.effectivePermittivity, predicted)).toBeLessThan(2e-5);
  });
});

describe('the field solution against exact solutions of thin strips', () => {
  const thin = 1e-9;
  it.each([0.2, 0.5, 1, 2])('is Cohn 1955 for a strip of w/b %p to 0.1 %%', (w) => {
    const b = 300 * um;
    const { single } = solveSection(strip(w * b, thin, (b - thin) / 2, (b - thin) / 2, 1)).modes;
    expect(share(single!.z0Ohm, exactStripline(w))).toBeLessThan(1e-3);
  });
  it.each([
    [0.3, 0.3],
    [0.5, 0.2],
    [0.35, 0.5],
  ])('is Cohn 1955 for strips of w/b %p, s/b %p to 0.1 %%', (w, s) => {
    const b = 300 * um;
    const { even, odd } = solveSection(strip(w * b, thin, (b - thin) / 2, (b - thin) / 2, 1, s * b)).modes;
    const exact = cohnPair(w, s);
    expect(share(even!.z0Ohm, exact.even)).toBeLessThan(1e-3);
    expect(share(odd!.z0Ohm, exact.odd)).toBeLessThan(1e-3);
  });
});

describe('the field solution against closed forms at their stated accuracy', () => {
  it.each([
    [0.2, 0.05],
    [0.5, 0.1],
    [1, 0.1],
    [0.5, 0.2],
  ])('is Wheeler 1978 for w/b %p, t/b %p to 0.5 %%', (w, t) => {
    const b = 400 * um;
    const half = (b - t * b) / 2;
    const { single } = solveSection(strip(w * b, t * b, half, half, 1)).modes;
    expect(share(single!.z0Ohm, wheelerStripline(w, t))).toBeLessThan(5e-3);
  });
  it.each([
    [1, 4.3, 0.1],
    [1.89, 4.3, 0.1],
    [2, 3.66, 0.05],
    [0.5, 4.3, 0.2],
  ])('is Hammerstad and Jensen 1980 for w/h %p, er %p, t/h %p to 0.4 %% and 0.8 %%', (u, er, t) => {
    const h = 200 * um;
    const { single } = solveSection(outer(u * h, t * h, h, er)).modes;
    const ee = thickMicrostripPermittivity(u, t, er);
    expect(share(single!.z0Ohm, thickAirMicrostrip(u, t) / Math.sqrt(ee))).toBeLessThan(4e-3);
    expect(share(single!.effectivePermittivity, ee)).toBeLessThan(8e-3);
  });
  it('meets the boundary elements of formulas B7 for thick pairs (t/b 0.1)', () => {
    const b = 300 * um;
    const half = 0.45 * b;
    const { even, odd } = solveSection(strip(0.5 * b, 0.1 * b, half, half, 1, 0.2 * b)).modes;
    expect(share(even!.z0Ohm, 99.483)).toBeLessThan(2e-3);
    expect(share(odd!.z0Ohm, 60.674)).toBeLessThan(2e-3);
  });
  it('gives an off-centre strip what two half lines miss by 2 %', () => {
    const section = strip(120 * um, 15 * um, 100 * um, 250 * um, 3.3);
    const closed = solveLine(
      {
        section: { widthM: 120 * um, thicknessM: 15 * um, belowM: 100 * um, aboveM: 250 * um },
        conductor: { conductivitySPerM: 5.8e7 },
        below: { dk: 3.3, df: 0, atHz: 1e9, dispersion: 'constant' },
      },
      new Float64Array(0),
    );
    const off = share(solveSection(section).modes.single!.z0Ohm, closed.modes.single!.z0Ohm);
    expect(off).toBeGreaterThan(0.01);
    expect(off).toBeLessThan(0.03);
  });
});

describe('a section of another shape', () => {
  it('narrower at its top has a higher impedance, whichever way the foot looks in the middle of a strip line', () => {
    const square = strip(125 * um, 17.5 * um, 150 * um, 150 * um, 3.6);
    const down = { ...square, trace: { ...square.trace, etchAngleDeg: 60 } };
    const up = { ...down, trace: { ...down.trace, foot: 'up' as const } };
    const [a, b, c] = [square, down, up].map((each) => solveSection(each).modes.single!.z0Ohm);
    expect(b!).toBeGreaterThan(a! * 1.02);
    expect(share(b!, c!)).toBeLessThan(1e-4);
  });
  it('with mask that fills the gap of a tight pair is solved', () => {
    const tight = {
      ...outer(120 * um, 35 * um, 100 * um, 3.8, 30 * um),
      mask: { thicknessM: 20 * um, dk: 3.4 },
    };
    const bare = outer(120 * um, 35 * um, 100 * um, 3.8, 30 * um);
    const [masked, open] = [tight, bare].map((each) => solveSection(each).modes.odd!);
    expect(masked!.effectivePermittivity).toBeGreaterThan(open!.effectivePermittivity + 0.3);
    expect(masked!.effectivePermittivity).toBeLessThan(3.8);
  });
  it('with mask passes smoothly from two coats to one as its gap closes', () => {
    const odd = (gapM: number) =>
      solveSection({
        ...outer(300 * um, 43 * um, 99 * um, 4, gapM),
        mask: { thicknessM: 23 * um, dk: 3.4 },
      }).modes.odd!.z0Ohm;
    expect(share(odd(46.1 * um), odd(45.9 * um))).toBeLessThan(2e-3);
    expect(odd(46.1 * um)).toBeGreaterThan(odd(45.9 * um));
  });
  it('of two sheets of one permittivity is that of one sheet', () => {
    const one = strip(125 * um, 17.5 * um, 150 * um, 150 * um, 3.6);
    const two = {
      ...one,
      sheets: [
        { thicknessM: 150 * um, dk: 3.6 },
        { thicknessM: 167.5 * um, dk: 3.6 },
      ],
    };
    const { single } = solveSection(two).modes;
    expect(share(single!.z0Ohm, solveSection(one).modes.single!.z0Ohm)).toBeLessThan(1e-6);
    expect(single!.filling[0]! + single!.filling[1]!).toBeCloseTo(1, 6);
  });
  it('far from its neighbour is alone', () => {
    const pair = solveSection(outer(200 * um, 35 * um, 100 * um, 4.2, 5e-3)).modes;
    const { single } = solveSection(outer(200 * um, 35 * um, 100 * um, 4.2)).modes;
    expect(share(pair.even!.z0Ohm, single!.z0Ohm)).toBeLessThan(2e-3);
    expect(share(pair.odd!.z0Ohm, single!.z0Ohm)).toBeLessThan(2e-3);
  });
});

describe('a section is refused', () => {
  const good = outer(200 * um, 35 * um, 100 * um, 4.2);
  it.each([
    ['without a dielectric', { ...good, sheets: [] }, 'sheets'],
    ['with a permittivity below 1', { ...good, sheets: [{ thicknessM: 100 * um, dk: 0.9 }] }, 'dk'],
    ['with a gap of zero', { ...good, gapM: 0 }, 'gapM'],
    ['with a trace in the air', { ...good, traceAtM: 150 * um }, 'belowM'],
    ['through the plane above', { ...good, planeAbove: true }, 'thicknessM'],
    ['etched away', { ...good, trace: { ...good.trace, etchAngleDeg: 15 } }, 'etchAngleDeg'],
    [
      'with mask over a buried trace',
      { ...good, traceAtM: 50 * um, mask: { thicknessM: 20 * um, dk: 3.4 } },
      'mask',
    ],
  ])('%s', (_, section, at) => {
    expect(() => solveSection(section)).toThrow(expect.objectContaining({ at, name: 'LineError' }));
  });
});
