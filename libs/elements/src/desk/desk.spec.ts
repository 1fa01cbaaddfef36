import { parseChannelFile, type Stackup } from '@tollgate/contracts';
import { crossSectionOf, impedanceOf, sensitivitiesOf, synthesize } from './index';

const dielectric = (name: string, thicknessM: number, more = {}) => ({
  ...{ kind: 'dielectric', name, thicknessM, dk: 3.6, df: 0.004, atHz: 1e10, dispersion: 'wideband-debye' },
  ...more,
});
const copper = (name: string, role: string, more = {}) => ({
  kind: 'copper',
  name,
  role,
  thicknessM: 17.5e-6,
  ...more,
});

function stackupOf(layers: object[]): Stackup {
  const parsed = parseChannelFile({
    ...{ format: 'tollgate.channel/1', name: 'Desk', signaling: 'single-ended', referenceOhm: 50 },
    stackup: { layers },
    elements: [{ kind: 'line', z0Ohm: 50, lengthM: 0.1, effectivePermittivity: 4 }],
    limits: [],
  });
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.problems));
  return parsed.channel.stackup!;
}

const board = stackupOf([
  { kind: 'soldermask', name: 'SM', thicknessM: 20e-6, dk: 3.4, df: 0.02, atHz: 1e9, dispersion: 'constant' },
  copper('L1', 'signal', { thicknessM: 35e-6, etchAngleDeg: 75 }),
  dielectric('D1', 100e-6),
  copper('L2', 'plane'),
  dielectric('D2', 150e-6),
  copper('L3', 'signal'),
  dielectric('D3', 150e-6),
  copper('L4', 'plane'),
]);

describe('the cross-section desk', () => {
  it('tells impedance, delay and loss of a strip line, and the closed form beside it within 0.5 %', () => {
    const facts = crossSectionOf(board, { layer: 'L3', widthM: 125e-6 }, 1e10);
    const single = facts.modes.single!;
    expect(single.z0Ohm).toBeCloseTo(52.92, 1);
    expect(single.delaySPerM).toBeCloseTo(Math.sqrt(3.6) / 299792458, 14);
    expect(single.conductorLossDbPerM).toBeGreaterThan(12);
    if ('refused' in facts.closedForm) throw new Error(facts.closedForm.refused);
    expect(facts.closedForm.modes.single!.z0Ohm / single.z0Ohm).toBeCloseTo(1, 2);
    expect(facts.solver.errorZ0).toBeLessThan(3e-3);
    expect(facts.planes).toEqual({ above: 'L2', below: 'L4' });
  });

  it('solves what no closed form covers, and says why there is none', () => {
    const facts = crossSectionOf(board, { layer: 'L1', widthM: 120e-6, gapM: 120e-6 }, 1e10);
    expect(facts.closedForm).toEqual({ refused: expect.stringContaining('solder mask') });
    expect(facts.differentialOhm).toBeCloseTo(2 * facts.modes.odd!.z0Ohm, 9);
    expect(facts.commonOhm).toBeCloseTo(facts.modes.even!.z0Ohm / 2, 9);
    expect(facts.drawing.traces).toHaveLength(2);
    expect(facts.drawing.mask).toMatchObject({ layer: 'SM' });
    const [lowerLeft, , , upperLeft] = facts.drawing.traces[1]!;
    expect(upperLeft![0] - lowerLeft![0]).toBeCloseTo(35e-6 / Math.tan((75 * Math.PI) / 180), 12);
  });

  it('doubts what is possible and unlikely, and refuses none of it', () => {
    const odd = stackupOf([
      copper('S', 'signal'),
      dielectric('D1', 1e-6, { dk: 10, df: 0 }),
      copper('P', 'plane'),
    ]);
    const { cautions } = crossSectionOf(odd, { layer: 'S', widthM: 100e-6 }, 1e9);
    expect(cautions.join(' ')).toMatch(/ceramic.*no loss.*only 1 µm.*wider than 50/s);
  });
});

describe('synthesis', () => {
  it.each([40, 50, 75])('finds the width for %p ohm', (targetOhm) => {
    const widthM = synthesize(
      board,
      { layer: 'L3', widthM: 1e-4 },
      { targetOhm, mode: 'single', vary: 'widthM' },
    );
    expect(impedanceOf(board, { layer: 'L3', widthM }, 'single')).toBeCloseTo(targetOhm, 2);
  });

  it('finds width and gap of a pair', () => {
    const pair = { layer: 'L1', widthM: 1e-4, gapM: 120e-6 };
    const wanted = { targetOhm: 100, mode: 'differential' as const };
    const widthM = synthesize(board, pair, { ...wanted, vary: 'widthM' });
    expect(impedanceOf(board, { ...pair, widthM }, 'differential')).toBeCloseTo(100, 2);
    const gapM = synthesize(board, { ...pair, widthM: 1.2e-4 }, { ...wanted, targetOhm: 95, vary: 'gapM' });
    expect(impedanceOf(board, { ...pair, widthM: 1.2e-4, gapM }, 'differential')).toBeCloseTo(95, 2);
  });

  it('refuses an impedance out of reach, saying what is reached', () => {
    const far = { targetOhm: 400, mode: 'single' as const, vary: 'widthM' as const };
    expect(() => synthesize(board, { layer: 'L3', widthM: 1e-4 }, far)).toThrow(
      expect.objectContaining({
        problem: expect.objectContaining({
          path: 'targetOhm',
          message: expect.stringMatching(/runs from .* ohm/),
        }),
      }),
    );
  });
});

describe('sensitivities', () => {
  it('are those of the closed form within a few percent, and sum to none in lengths', () => {
    const all = sensitivitiesOf(board, { layer: 'L3', widthM: 125e-6 }, 'single');
    const of = (name: string) => all.filter((each) => each.of === name);
    expect(of('width')[0]!.relative).toBeCloseTo(-0.43, 1);
    expect(of('dk').reduce((sum, { relative }) => sum + relative, 0)).toBeCloseTo(-0.5, 3);
    // An impedance knows no scale: all lengths together leave it as it is.
    const lengths = all.filter((each) => each.of !== 'dk').reduce((sum, { relative }) => sum + relative, 0);
    expect(Math.abs(lengths)).toBeLessThan(2e-3);
    expect(all.map(({ layer }) => layer)).not.toContain('D1');
  });
});
