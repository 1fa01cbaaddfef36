import type { ElementOf, Signaling, Stackup } from '@tollgate/contracts';
import { LineError, permittivity, shapeOf, type LineMode, type ModeName } from '@tollgate/lines';
import { cascade4Into } from '@tollgate/network';
import { dbPerNeper, lightSpeedMPerS } from '../constants';
import { pairOfLegs, pairOfModes } from '../legs';
import { immittanceLineInto } from '../rlgc';
import { writeSymmetric } from '../symmetric';
import {
  ElementError,
  type BuildContext,
  type BuiltElement,
  type ElementProblem,
  type LineFacts,
} from '../types';
import { legLengths } from './legs-of-path';
import { fieldOf, solveTrace } from './field-model';
import { sectionOf, type TraceSection } from './section';

type Trace = ElementOf<'trace'>;

/** What can be said of a trace before it is built: its layer, planes, width, gap and lengths. */
export function traceProblems(
  trace: Trace,
  signaling: Signaling,
  stackup: Stackup | undefined,
): ElementProblem[] {
  const problems: ElementProblem[] = [];
  if (signaling === 'differential' && trace.gapM === undefined) {
    problems.push({
      path: 'gapM',
      message: 'A trace of a differential channel is a pair, and has no gap.',
      mend: 'Give gapM, edge to edge.',
    });
  }
  if (signaling === 'single-ended') {
    for (const field of ['gapM', 'lengthNM'] as const) {
      if (trace[field] === undefined) continue;
      problems.push({
        path: field,
        message: `${field} belongs to a pair; the channel is single-ended.`,
        mend: `Leave ${field} out, or change the signaling.`,
      });
    }
  }
  const found = problemOf(() => {
    const { pM, nM } = legLengths(trace);
    if (pM < 0 || nM < 0) {
      throw new ElementError({
        path: 'path',
        message: `The inner leg of the pair would have a length of ${Math.min(pM, nM)} m.`,
        mend: 'Use longer pieces between the bends, or a narrower pair.',
      });
    }
    const { field, materials } = fieldOf(sectionOf(stackup, trace));
    shapeOf(field);
    for (const material of [...materials.sheets, ...(materials.mask ? [materials.mask] : [])]) {
      permittivity(material, nowhere);
    }
  });
  return found ? [...problems, found] : problems;
}

function problemOf(run: () => void): ElementProblem | undefined {
  try {
    run();
    return undefined;
  } catch (error) {
    if (error instanceof ElementError) return error.problem;
    if (error instanceof LineError) return problemOfLine(error);
    throw error;
  }
}

/** No frequency: what is asked then is whether there is a model at all. */
const nowhere = new Float64Array(0);

const ownFields: readonly string[] = ['widthM', 'gapM', 'lengthM', 'path'];

/** A complaint about the section, told of the trace: what it doesn't name itself belongs to its layer. */
function problemOfLine({ at, reason, mend }: LineError): ElementProblem {
  if (at === 'etchAngleDeg') return { path: 'widthM', message: reason, mend };
  return { path: ownFields.includes(at) ? at : 'layer', message: reason, mend };
}

/** Runs what may meet a section without a model. */
export function ofLine<Result>(run: () => Result): Result {
  try {
    return run();
  } catch (error) {
    if (error instanceof LineError) throw new ElementError(problemOfLine(error));
    throw error;
  }
}

/**
 * S of a trace, single or a pair: a uniform line for each mode, a pair coupled over the shorter leg's length; what the longer
 * leg has more runs alone at the far end.
 * @throws ElementError
 */
export function buildTrace(trace: Trace, frequenciesHz: Float64Array, context: BuildContext): BuiltElement {
  const section = sectionOf(context.stackup, trace);
  const { modes, cautions } = ofLine(() => solveTrace(section, frequenciesHz));
  const warnings = [...section.warnings, ...cautions];
  const line = factsOf(modes);
  const { pM, nM } = legLengths(trace);
  const uniform = (mode: LineMode, lengthM: number) =>
    uniformLine(mode, lengthM, frequenciesHz, context.jointOhm);
  if (modes.single) return { s: uniform(modes.single, pM), warnings, line };
  const sharedM = Math.min(pM, nM);
  const points = frequenciesHz.length;
  const s = pairOfModes(uniform(modes.even!, sharedM), uniform(modes.odd!, sharedM), points);
  if (pM !== nM) {
    const alone = ofLine(() => solveTrace({ ...section, gapM: undefined }, frequenciesHz)).modes.single!;
    const legs = [pM, nM].map((lengthM) => uniform(alone, lengthM - sharedM));
    cascade4Into(s, s, pairOfLegs(legs[0]!, legs[1]!, points), points);
  }
  return { s, warnings, line };
}

/**
 * S of a single trace of a section and a length.
 * @throws ElementError
 */
export function singleTrace(
  section: TraceSection,
  lengthM: number,
  frequenciesHz: Float64Array,
  jointOhm: number,
): Float64Array {
  const { modes } = ofLine(() => solveTrace(section, frequenciesHz));
  return uniformLine(modes.single!, lengthM, frequenciesHz, jointOhm);
}

function uniformLine(
  { seriesOhmPerM: z, shuntSPerM: y }: LineMode,
  lengthM: number,
  frequenciesHz: Float64Array,
  jointOhm: number,
): Float64Array {
  const out = new Float64Array(frequenciesHz.length * 8);
  for (let point = 0, k = 0; point < frequenciesHz.length; point++, k += 2) {
    if (lengthM === 0) writeSymmetric(out, point * 8, 0, 0, 1, 0);
    else immittanceLineInto(out, point * 8, z[k]!, z[k + 1]!, y[k]!, y[k + 1]!, lengthM, jointOhm);
  }
  return out;
}

function factsOf(modes: Partial<Record<ModeName, LineMode>>): LineFacts {
  const told = Object.entries(modes).map(([name, mode]) => {
    const { z0Ohm, effectivePermittivity, conductorLossDbPerM, dielectricLossDbPerM } = mode;
    return [
      name,
      {
        z0Ohm,
        effectivePermittivity,
        conductorLossDbPerM: Array.from(conductorLossDbPerM),
        dielectricLossDbPerM: Array.from(dielectricLossDbPerM),
      },
    ];
  });
  return Object.fromEntries(told) as LineFacts;
}

/** Attenuation x length in dB, of the odd mode for a pair; undefined where the legs differ and the toll is no line's. */
export function traceTollDb(
  trace: Trace,
  frequenciesHz: Float64Array,
  context: BuildContext,
): Float64Array | undefined {
  const { pM, nM } = legLengths(trace);
  if (pM !== nM) return undefined;
  const { modes } = ofLine(() => solveTrace(sectionOf(context.stackup, trace), frequenciesHz));
  const { seriesOhmPerM: z, shuntSPerM: y } = (modes.single ?? modes.odd)!;
  return frequenciesHz.map((_, point) => {
    const k = point * 2;
    const re = z[k]! * y[k]! - z[k + 1]! * y[k + 1]!;
    const im = z[k]! * y[k + 1]! + z[k + 1]! * y[k]!;
    // Re sqrt(re + j im), by the form that loses no digits where re is negative: a low-loss line.
    const size = Math.hypot(re, im);
    const alpha = re >= 0 ? Math.sqrt((size + re) / 2) : Math.abs(im) / Math.sqrt(2 * (size - re));
    return alpha * pM * dbPerNeper;
  });
}

/** One-way delay in seconds of the slower mode along the longer leg. */
export function traceDelayS(trace: Trace, context: BuildContext): number {
  const { modes } = ofLine(() => solveTrace(sectionOf(context.stackup, trace), new Float64Array(0)));
  const slowest = Math.max(...Object.values(modes).map((mode) => mode.effectivePermittivity));
  const { pM, nM } = legLengths(trace);
  return (Math.max(pM, nM) * Math.sqrt(slowest)) / lightSpeedMPerS;
}
