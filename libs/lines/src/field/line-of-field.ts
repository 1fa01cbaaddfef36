import { internalImpedance, type Conductor } from '../conductor';
import { speedOfLight } from '../constants';
import { fitWidebandDebye, permittivity, type Dielectric } from '../dielectric';
import { lineModeOf, type LineMode, type Propagation } from '../line-constants';
import { disperseMicrostrip, microstripPermittivity } from '../microstrip';
import type { ModeName } from '../models';
import { sameHeightM, shapeOf, type FieldSection } from './section';
import type { FieldMode, FieldSolution } from './solve';

/** What a section is made of, sheet by sheet. */
export interface SectionMaterials {
  readonly sheets: readonly Dielectric[];
  readonly mask?: Dielectric;
  readonly conductor: Conductor;
}

export interface FieldLine {
  readonly modes: Partial<Record<ModeName, LineMode>>;
  readonly cautions: readonly string[];
}

/** Frequency times height, over c0, up to which the dispersion of a microstrip is published. */
const dispersionLimit = 0.13;

/**
 * Line constants over frequency from a solved section, without solving again: the effective permittivity follows the dielectrics by their
 * filling, copper by its walls, and a microstrip disperses by the ratios of formula B2 at its height, the single line's on both modes of
 * a pair. Strip line has no dispersion but the dielectrics' own; that of a buried microstrip is left out.
 *
 * Fillings are taken at the permittivities solved with, first order in their change and in the loss: with Df up to 0.03 that is within 0.02 % in
 * permittivity from 1 GHz to 50 GHz and 0.1 % down to 10 kHz, within 1 % in loss.
 */
export function lineOfField(
  solution: FieldSolution,
  section: FieldSection,
  materials: SectionMaterials,
  frequenciesHz: Float64Array,
): FieldLine {
  const { lowerWidthM, upperWidthM } = shapeOf(section);
  const rectangle = {
    widthM: (lowerWidthM + upperWidthM) / 2,
    thicknessM: section.trace.thicknessM,
    belowM: section.traceAtM,
    aboveM: Infinity,
    gapM: section.gapM ?? Infinity,
  };
  const dielectrics = [...materials.sheets, ...(materials.mask ? [materials.mask] : [])];
  const curves = dielectrics.map((material) => permittivity(material, frequenciesHz));
  const dispersion = dispersionOf(section, rectangle.widthM, frequenciesHz);
  const modes: Partial<Record<ModeName, LineMode>> = {};
  for (const [name, mode] of Object.entries(solution.modes) as [ModeName, FieldMode][]) {
    const { foot = 'down' } = section.trace;
    const internal = internalImpedance(materials.conductor, rectangle, foot, mode.shares, frequenciesHz);
    modes[name] = lineModeOf(
      {
        airOhm: mode.airOhm,
        givenPermittivity: mode.effectivePermittivity,
        permittivity: filled(mode, dielectrics, curves, frequenciesHz.length),
        internal,
        ...(dispersion.disperse ? { disperse: dispersion.disperse } : {}),
      },
      frequenciesHz,
    );
  }
  return { modes, cautions: [...dielectricCautions(dielectrics), ...dispersion.cautions] };
}

/** A fit this far off its points, relative, is worth a word. */
const worthTelling = { dk: 0.01, df: 0.1 };

function dielectricCautions(dielectrics: readonly Dielectric[]): string[] {
  const cautions = new Set<string>();
  for (const material of dielectrics) {
    if (material.dispersion === 'constant' && material.df > 0) {
      cautions.add('A constant permittivity with losses is not causal.');
    }
    if (!material.furtherPoints?.length) continue;
    const { dk, df } = fitWidebandDebye(material).worst;
    if (dk < worthTelling.dk && df < worthTelling.df) continue;
    const [offDk, offDf] = [dk, df].map((off) => `${(off * 100).toFixed(1)} %`);
    cautions.add(
      `The points of a dielectric lie on no one model: it misses them by up to ${offDk} in Dk, ${offDf} in Df.`,
    );
  }
  return [...cautions];
}

/** Complex effective permittivity at each frequency, pairs (ee', ee''). */
function filled(
  { effectivePermittivity, filling }: FieldMode,
  dielectrics: readonly Dielectric[],
  curves: readonly Float64Array[],
  count: number,
): Float64Array {
  const out = new Float64Array(count * 2);
  for (let k = 0; k < count; k++) {
    let re = effectivePermittivity;
    let im = 0;
    for (let i = 0; i < curves.length; i++) {
      re += filling[i]! * (curves[i]![k * 2]! - dielectrics[i]!.dk);
      im += filling[i]! * curves[i]![k * 2 + 1]!;
    }
    out[k * 2] = re;
    out[k * 2 + 1] = im;
  }
  return out;
}

function isOuter(section: FieldSection): boolean {
  return !section.planeAbove && Math.abs(section.traceAtM - shapeOf(section).heightM) < sameHeightM;
}

/** The frequency to which a microstrip's dispersion is published; null for a section that has none. */
export function dispersionLimitHz(section: FieldSection): number | null {
  return isOuter(section) ? (dispersionLimit * speedOfLight) / section.traceAtM : null;
}

interface Dispersion {
  readonly disperse?: (k: number, quasiStatic: Propagation) => Propagation;
  readonly cautions: readonly string[];
}

/** Below this permittivity the formulas have no meaning, and nothing disperses. */
const leastPermittivity = 1.1;

/** A buried microstrip rises less than one on top: from here on, relative, what is left out is told. */
const buriedRise = 0.01;

function buriedCaution(rise: number): string {
  const percent = (rise * 100).toFixed(1);
  return `The dispersion of a buried microstrip is left out: up to ${percent} % in effective permittivity at the highest frequency.`;
}

/** Sheets under the trace are capacitances in series. */
function permittivityUnder({ sheets, traceAtM }: FieldSection): number {
  let elastance = 0;
  let lowM = 0;
  for (const { thicknessM, dk } of sheets) {
    elastance += Math.max(Math.min(traceAtM - lowM, thicknessM), 0) / dk;
    lowM += thicknessM;
  }
  return traceAtM / elastance;
}

function dispersionOf(section: FieldSection, widthM: number, frequenciesHz: Float64Array): Dispersion {
  const heightM = section.traceAtM;
  const er = permittivityUnder(section);
  if (section.planeAbove || er < leastPermittivity) return { cautions: [] };
  const u = widthM / heightM;
  const closed = microstripPermittivity(u, er);
  const topHz = frequenciesHz[frequenciesHz.length - 1] ?? 0;
  if (!isOuter(section)) {
    const most = disperseMicrostrip(u, er, (topHz / 1e9) * (heightM * 1e3), closed, 1).effectivePermittivity;
    const rise = most / closed - 1;
    return { cautions: rise > buriedRise ? [buriedCaution(rise)] : [] };
  }
  const disperse = (k: number, { effectivePermittivity, z0Ohm }: Propagation): Propagation => {
    const fn = (frequenciesHz[k]! / 1e9) * (heightM * 1e3);
    const dispersed = disperseMicrostrip(u, er, fn, closed, 1);
    return {
      effectivePermittivity: (effectivePermittivity * dispersed.effectivePermittivity) / closed,
      z0Ohm: z0Ohm * dispersed.z0Ohm,
    };
  };
  const limitHz = dispersionLimitHz(section);
  const cautions =
    limitHz !== null && topHz > limitHz
      ? [`Above ${limitHz.toPrecision(3)} Hz the dispersion formula leaves its published range.`]
      : [];
  return { disperse, cautions };
}
