import type { Stackup } from '@tollgate/contracts';
import { LineError, type LineMode, type ModeName, speedOfLight } from '@tollgate/lines';
import { estimateLine } from '../trace/estimate';
import { fieldOf, fieldSource, solutionOf, solveTrace } from '../trace/field-model';
import { sectionOf, type SectionInput, type TraceSection } from '../trace/section';
import { ElementError } from '../types';
import { drawingOf, type SectionDrawing } from './drawing';
import { doubtsOf } from './doubts';

/** A mode at one frequency; impedance and permittivity lossless and quasi-static, Dk as given. */
export interface ModeFacts {
  readonly z0Ohm: number;
  readonly effectivePermittivity: number;
  readonly delaySPerM: number;
  readonly conductorLossDbPerM: number;
  readonly dielectricLossDbPerM: number;
}

export type ModesFacts = Partial<Record<ModeName, ModeFacts>>;

/** The published closed form beside the field solution, or why there is none. */
export type ClosedForm =
  | { readonly modes: ModesFacts; readonly source: string; readonly cautions: readonly string[] }
  | { readonly refused: string };

/** What the desk says of a trace or pair on a layer of a stackup. */
export interface CrossSectionFacts {
  readonly modes: ModesFacts;
  readonly source: string;
  /** Of a pair: 2 x odd and even/2. */
  readonly differentialOhm?: number;
  readonly commonOhm?: number;
  readonly closedForm: ClosedForm;
  readonly solver: {
    readonly unknowns: number;
    readonly errorZ0: number;
    readonly errorPermittivity: number;
  };
  readonly planes: TraceSection['planes'];
  readonly drawing: SectionDrawing;
  readonly cautions: readonly string[];
}

/**
 * Impedance, delay and loss of a cross-section at one frequency: the field solution, its closed form beside it, and a drawing.
 * @throws ElementError with the field of the input at fault
 */
export function crossSectionOf(
  stackup: Stackup | undefined,
  input: SectionInput,
  frequencyHz: number,
): CrossSectionFacts {
  const section = sectionOf(stackup, input);
  const at = Float64Array.of(frequencyHz);
  const { model, solution } = ofLine(() => ({
    model: solveTrace(section, at),
    solution: solutionOf(fieldOf(section).field),
  }));
  const modes = factsOf(model.modes);
  const { even, odd } = modes;
  return {
    modes,
    source: fieldSource,
    ...(even && odd ? { differentialOhm: 2 * odd.z0Ohm, commonOhm: even.z0Ohm / 2 } : {}),
    closedForm: closedFormOf(section, at),
    solver: {
      unknowns: solution.unknowns,
      errorZ0: solution.error.z0,
      errorPermittivity: solution.error.permittivity,
    },
    planes: section.planes,
    drawing: drawingOf(section),
    cautions: [...section.warnings, ...model.cautions, ...doubtsOf(section)],
  };
}

function closedFormOf(section: TraceSection, at: Float64Array): ClosedForm {
  try {
    const { modes, source, cautions } = estimateLine(section, at);
    return { modes: factsOf(modes), source, cautions };
  } catch (error) {
    if (error instanceof LineError) return { refused: error.reason };
    throw error;
  }
}

function factsOf(modes: Partial<Record<ModeName, LineMode>>): ModesFacts {
  const told = Object.entries(modes).map(([name, mode]): [string, ModeFacts] => [
    name,
    {
      z0Ohm: mode.z0Ohm,
      effectivePermittivity: mode.effectivePermittivity,
      delaySPerM: Math.sqrt(mode.effectivePermittivity) / speedOfLight,
      conductorLossDbPerM: mode.conductorLossDbPerM[0]!,
      dielectricLossDbPerM: mode.dielectricLossDbPerM[0]!,
    },
  ]);
  return Object.fromEntries(told);
}

const ownFields: readonly string[] = ['widthM', 'gapM'];

/** A section without a model, told of the input's fields; what is none of them belongs to the layer. */
export function ofLine<Result>(run: () => Result): Result {
  try {
    return run();
  } catch (error) {
    if (!(error instanceof LineError)) throw error;
    const path = error.at === 'etchAngleDeg' ? 'widthM' : ownFields.includes(error.at) ? error.at : 'layer';
    throw new ElementError({ path, message: error.reason, mend: error.mend });
  }
}
