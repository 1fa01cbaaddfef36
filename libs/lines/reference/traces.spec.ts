import { readFileSync } from 'node:fs';
import { describeWith, isThere, referenceData } from '../../../test/support/needs';
import type { Dielectric } from '../src/dielectric';
import type { ModeName } from '../src/models';
import { lineOfField } from '../src/field/line-of-field';
import type { FieldSection } from '../src/field/section';
import { solveSection } from '../src/field/solve';
import { share } from '../src/field/testing/sections';

/** Cross-sections and their finite-element solution, beside the checkout. */
const traces = referenceData('traces.json');

interface ReferenceMode {
  readonly z0_ohm: number;
  readonly eps_eff: number;
  readonly alpha_c_smooth_db_per_m: Readonly<Record<string, number>>;
  readonly alpha_d_db_per_m_tand0p02: Readonly<Record<string, number>>;
}
interface ReferenceCase {
  readonly id: string;
  readonly geometry: Readonly<Record<string, number>> & { readonly kind: string };
  readonly modes: Partial<Record<ModeName, ReferenceMode>>;
}

function sectionOf({ geometry: g }: ReferenceCase): FieldSection {
  const dk = g['er']!;
  const heightM = g['h_m']!;
  const [widthM, thicknessM] = [g['w_m']!, g['t_m']!];
  const aboveM = g['h2_m'] === undefined ? (g['cover_m'] ?? 0) : thicknessM + g['h2_m'];
  return {
    sheets: [{ thicknessM: heightM + aboveM, dk }],
    planeAbove: g.kind === 'stripline',
    trace: { widthM, thicknessM },
    traceAtM: heightM,
    ...(g['s_m'] === undefined ? {} : { gapM: g['s_m'] }),
    ...(g['mask_t_m'] === undefined ? {} : { mask: { thicknessM: g['mask_t_m'], dk: g['er_mask']! } }),
  };
}

const lossy = ({ dk }: { dk: number }): Dielectric => ({ dk, df: 0.02, atHz: 1e10, dispersion: 'constant' });

describeWith(traces, 'cross-sections of a finite-element solution, by the field solution', () => {
  const cases = isThere(traces)
    ? (JSON.parse(readFileSync(traces.path, 'utf8')) as { cases: ReferenceCase[] }).cases
    : [];
  it.each(cases.map((one) => [one.id, one] as const))('%s', (_, wanted) => {
    const section = sectionOf(wanted);
    const solution = solveSection(section);
    const mask = section.mask && lossy(section.mask);
    const materials = { sheets: section.sheets.map(lossy), mask, conductor: { conductivitySPerM: 5.8e7 } };
    const line = lineOfField(solution, section, materials, Float64Array.of(1e10));
    expect(Object.keys(solution.modes)).toEqual(Object.keys(wanted.modes));
    for (const [name, reference] of Object.entries(wanted.modes)) {
      const { z0Ohm, effectivePermittivity } = solution.modes[name as ModeName]!;
      const { conductorLossDbPerM, dielectricLossDbPerM } = line.modes[name as ModeName]!;
      expect(share(z0Ohm, reference.z0_ohm)).toBeLessThan(5e-4);
      expect(share(effectivePermittivity, reference.eps_eff)).toBeLessThan(1e-3);
      expect(share(conductorLossDbPerM[0]!, reference.alpha_c_smooth_db_per_m['1e+10']!)).toBeLessThan(2e-3);
      expect(share(dielectricLossDbPerM[0]!, reference.alpha_d_db_per_m_tand0p02['1e+10']!)).toBeLessThan(
        3e-3,
      );
    }
  });
});
