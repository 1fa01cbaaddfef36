import type { Conductor, WallShares } from './conductor';
import { internalImpedance, wallShares } from './conductor';
import { speedOfLight } from './constants';
import type { CrossSection, Rectangle, SectionKind } from './cross-section';
import { rectangleOf, sectionKind } from './cross-section';
import type { Dielectric } from './dielectric';
import { permittivity } from './dielectric';
import { lineModeOf, type LineMode, type Propagation } from './line-constants';
import { disperseMicrostrip } from './microstrip';
import type { LineModel, ModeName } from './models';
import { modelOf } from './models';

/** A trace, or a symmetric pair, with its materials. */
export interface TraceLine {
  readonly section: CrossSection;
  readonly conductor: Conductor;
  /** Between the trace and the plane below. */
  readonly below: Dielectric;
  /** Between the trace and the plane above; the same as below where absent. Not used for a microstrip. */
  readonly above?: Dielectric;
}

export interface SolvedLine {
  readonly kind: SectionKind;
  readonly modes: Partial<Record<ModeName, LineMode>>;
  /** The publication the model comes from. */
  readonly source: string;
  /** A single line is estimated by a closed form; a pair is assumed, for no form of proven accuracy exists. */
  readonly standing: 'estimated' | 'assumed';
  /** What a person should know, in sentences. */
  readonly cautions: readonly string[];
}

/** Frequency times height, over c0, up to which the dispersion of a microstrip is published. */
const dispersionLimit = 0.13;

/**
 * Line constants of a trace over frequency by published closed forms: Wheeler (stripline), Hammerstad and Jensen with the dispersion of
 * Kirschning and Jansen (microstrip), Cohn and Kirschning and Jansen (pairs, with terms for thickness).
 *
 * @throws LineError where no listed form covers the section
 */
export function solveLine(line: TraceLine, frequenciesHz: Float64Array): SolvedLine {
  const kind = sectionKind(line.section);
  const rectangle = rectangleOf(line.section);
  const model = modelOf(kind, rectangle, line.below.dk);
  const cautions = [...model.cautions];
  const modes: Partial<Record<ModeName, LineMode>> = {};
  for (const mode of model.modes) {
    modes[mode] = solveMode({ line, kind, rectangle, model, mode }, frequenciesHz);
  }
  const topHz = frequenciesHz[frequenciesHz.length - 1] ?? 0;
  if (kind === 'microstrip' && (topHz * rectangle.belowM) / speedOfLight > dispersionLimit) {
    cautions.push(
      `Above ${((dispersionLimit * speedOfLight) / rectangle.belowM).toPrecision(3)} Hz the dispersion formula leaves its published range.`,
    );
  }
  if (line.below.dispersion === 'constant' || line.above?.dispersion === 'constant') {
    cautions.push('A constant permittivity with losses is not causal.');
  }
  return {
    kind,
    modes,
    source: model.source,
    standing: model.modes.length > 1 ? 'assumed' : 'estimated',
    cautions,
  };
}

interface Job {
  readonly line: TraceLine;
  readonly kind: SectionKind;
  readonly rectangle: Rectangle;
  readonly model: LineModel;
  readonly mode: ModeName;
}

function solveMode(job: Job, frequenciesHz: Float64Array): LineMode {
  const { line, kind, rectangle, model, mode } = job;
  const above = line.above ?? line.below;
  const airOhm = model.airOhm(rectangle, mode);
  const given = model.permittivity(rectangle, mode, line.below.dk, above.dk);
  const shares: WallShares = wallShares(rectangle, (r) => model.airOhm(r, mode));
  const inner = internalImpedance(
    line.conductor,
    rectangle,
    line.section.foot ?? 'down',
    shares,
    frequenciesHz,
  );
  const filling = fillingOf(job, frequenciesHz);
  const heightMm = rectangle.belowM * 1e3;
  const disperse = (k: number, { effectivePermittivity, z0Ohm }: Propagation): Propagation =>
    disperseMicrostrip(
      rectangle.widthM / rectangle.belowM,
      filling.below[k * 2]!,
      (frequenciesHz[k]! / 1e9) * heightMm,
      effectivePermittivity,
      z0Ohm,
    );
  return lineModeOf(
    {
      airOhm,
      givenPermittivity: given,
      permittivity: filling.ee,
      internal: inner,
      ...(kind === 'microstrip' ? { disperse } : {}),
    },
    frequenciesHz,
  );
}

/**
 * Complex effective permittivity (ee', ee'') at each frequency: ee'' is the sum over dielectrics of d ee/d er times er'', first order in the
 * loss. The closed form is evaluated at three permittivities that span the band and interpolated by the parabola through them.
 */
function fillingOf(job: Job, frequenciesHz: Float64Array): { ee: Float64Array; below: Float64Array } {
  const { line, kind, rectangle, model, mode } = job;
  const below = permittivity(line.below, frequenciesHz);
  const pairsTogether = kind === 'stripline' || kind === 'stripline-pair';
  const ee = new Float64Array(below.length);
  if (pairsTogether) {
    // Linear in both permittivities.
    const above = line.above ? permittivity(line.above, frequenciesHz) : below;
    const ofBelow = model.permittivity(rectangle, mode, 1, 0);
    for (let k = 0; k < ee.length; k++) ee[k] = ofBelow * below[k]! + (1 - ofBelow) * above[k]!;
    return { ee, below };
  }
  const at = (er: number): number => model.permittivity(rectangle, mode, er, 1);
  let low = line.below.dk;
  let high = line.below.dk;
  for (let k = 0; k < below.length; k += 2) {
    low = Math.min(low, below[k]!);
    high = Math.max(high, below[k]!);
  }
  const middle = (low + high) / 2;
  const half = Math.max((high - low) / 2, 1e-4 * middle);
  const [a, b, c] = [at(Math.max(1, middle - half)), at(middle), at(middle + half)];
  const slope = (c - a) / (2 * half);
  const bend = (a + c - 2 * b) / (2 * half * half);
  for (let k = 0; k < ee.length; k += 2) {
    const x = below[k]! - middle;
    ee[k] = b + slope * x + bend * x * x;
    ee[k + 1] = (slope + 2 * bend * x) * below[k + 1]!;
  }
  return { ee, below };
}
