import { kernelOf } from './kernel';
import { meshOf } from './mesh';
import { airCharges, chargeOf } from './moments';
import { outlineOf } from './outline';
import { shapeOf, type FieldSection } from './section';
import { solveSection } from './solve';
import { copperLossDbPerM, outer, share, strip, um } from './testing/sections';

describe('the mesh', () => {
  const square = { widthM: 125 * um, thicknessM: 17.5 * um };
  const etched = { widthM: 180 * um, thicknessM: 35 * um, etchAngleDeg: 62 };
  const mask = { thicknessM: 22 * um, dk: 3.4 };
  const varied: [string, FieldSection][] = [
    ['a strip line', strip(125 * um, 17.5 * um, 150 * um, 150 * um, 3.6)],
    ['an etched microstrip', { ...outer(1, 1, 90 * um, 4.4), trace: etched }],
    ['a tight etched pair', { ...outer(1, 1, 110 * um, 3.1, 70 * um), trace: etched }],
    ['a masked trace', { ...outer(300 * um, 50 * um, 75 * um, 3.9), mask }],
    ['a pair whose coats of mask meet', { ...outer(300 * um, 43 * um, 99 * um, 4, 26 * um), mask }],
    ['an etched pair whose coats nearly meet', { ...outer(1, 1, 99 * um, 4, 46 * um), trace: etched, mask }],
    [
      'a pair across two dielectrics between planes',
      {
        sheets: [
          { thicknessM: 110 * um, dk: 4.1 },
          { thicknessM: 60 * um, dk: 3.2 },
          { thicknessM: 90 * um, dk: 4.1 },
        ],
        planeAbove: true,
        trace: { ...square, foot: 'up', etchAngleDeg: 70 },
        traceAtM: 100 * um,
        gapM: 140 * um,
      },
    ],
    [
      'a buried trace far wider than its height',
      { ...outer(2e-3, 12 * um, 60 * um, 4), sheets: [{ thicknessM: 90 * um, dk: 4 }] },
    ],
  ];

  it.each(varied)(
    'of %s says how far off it is: within a tenth of a percent, and within its estimate',
    (_, section) => {
      const [standard, reference] = [1, 2.5].map((finer) => solveSection(section, finer));
      for (const [name, exact] of Object.entries(reference!.modes)) {
        const mode = standard!.modes[name as 'single']!;
        const [z0, ee] = [
          share(mode.z0Ohm, exact.z0Ohm),
          share(mode.effectivePermittivity, exact.effectivePermittivity),
        ];
        expect(z0).toBeLessThan(Math.min(1e-3, standard!.error.z0));
        expect(ee).toBeLessThan(Math.min(2e-3, standard!.error.permittivity + 1e-12));
        expect(share(copperLossDbPerM(mode), copperLossDbPerM(exact))).toBeLessThan(2e-3);
      }
      expect(standard!.error.z0).toBeLessThan(4e-3);
    },
  );

  const section = strip(125 * um, 17.5 * um, 150 * um, 150 * um, 1);
  const chargeWith = (copper: number) => {
    const mesh = meshOf(outlineOf(shapeOf(section)), { copper, between: copper, open: 2 * copper });
    return chargeOf(mesh, airCharges(mesh, kernelOf(mesh), 1));
  };
  it('converges: each finer one errs less', () => {
    const exact = chargeWith(48);
    const errors = [6, 9, 14, 20].map((copper) => share(chargeWith(copper), exact));
    errors.slice(1).forEach((error, k) => expect(error).toBeLessThan(errors[k]!));
    expect(errors[0]).toBeLessThan(2e-3);
  });
});

describe('the walls', () => {
  it('recede as the impedance in air says when the section itself is moved', () => {
    const section = outer(200 * um, 35 * um, 100 * um, 1);
    const by = 0.2 * um;
    const air = (change: Partial<FieldSection>) =>
      solveSection({ ...section, ...change }).modes.single!.airOhm;
    const { shares } = solveSection(section).modes.single!;
    const slope = (out: Partial<FieldSection>, back: Partial<FieldSection>) =>
      (air(out) - air(back)) / (2 * by);
    const thick = (d: number) => ({ trace: { ...section.trace, thicknessM: 35 * um - d } });
    const narrow = (d: number) => ({ trace: { ...section.trace, widthM: 200 * um - 2 * d } });
    expect(share(shares.upper, slope(thick(by), thick(-by)))).toBeLessThan(5e-3);
    expect(share(shares.sides, slope(narrow(by), narrow(-by)))).toBeLessThan(5e-3);
    const raised = (d: number) => ({ traceAtM: 100 * um + d, sheets: [{ thicknessM: 100 * um + d, dk: 1 }] });
    expect(share(shares.planeBelow, slope(raised(by), raised(-by)))).toBeLessThan(5e-3);
    expect(shares.planeAbove).toBe(0);
  });
});
