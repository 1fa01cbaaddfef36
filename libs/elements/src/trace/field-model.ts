import {
  lineOfField,
  sectionKey,
  solveSection,
  type FieldSection,
  type FieldSolution,
  type SectionMaterials,
} from '@tollgate/lines';
import { sameMaterial } from './material';
import type { Sheet, TraceSection } from './section';
import type { TraceModel } from './model';

export const fieldSource = 'field solution of the cross-section, method of moments';

/** Sections kept: a board has a few dozen; this many take under a megabyte. */
const mostKept = 500;
const solutions = new Map<string, FieldSolution>();

/** The section solved once by its content; the oldest of many is let go. */
export function solutionOf(section: FieldSection): FieldSolution {
  const key = sectionKey(section);
  const known = solutions.get(key);
  if (known) return known;
  const solution = solveSection(section);
  keepSolution(key, solution);
  return solution;
}

/** Puts a solution found elsewhere, or earlier, in its place: one that a database keeps. */
export function keepSolution(key: string, solution: FieldSolution): void {
  if (solutions.size >= mostKept) {
    const [oldest] = solutions.keys();
    solutions.delete(oldest!);
  }
  solutions.set(key, solution);
}

/**
 * A trace's line by its field solution: standing *solved*.
 * @throws LineError for a section that is none
 */
export function solveTrace(section: TraceSection, frequenciesHz: Float64Array): TraceModel {
  const { field, materials } = fieldOf(section);
  const { modes, cautions } = lineOfField(solutionOf(field), field, materials, frequenciesHz);
  return { modes, standing: 'solved', source: fieldSource, cautions };
}

/** The section as the field solution takes it; sheets of one material side by side are one. */
export function fieldOf(section: TraceSection): { field: FieldSection; materials: SectionMaterials } {
  const { widthM, thicknessM, etchAngleDeg, foot, gapM, mask, planeAbove, traceAtM } = section;
  const sheets = merged(section.sheets);
  const field: FieldSection = {
    sheets: sheets.map(({ thicknessM: height, material }) => ({ thicknessM: height, dk: material.dk })),
    planeAbove,
    trace: { widthM, thicknessM, etchAngleDeg, foot },
    traceAtM,
    ...(gapM === undefined ? {} : { gapM }),
    ...(mask ? { mask: { thicknessM: mask.thicknessM, dk: mask.material.dk } } : {}),
  };
  return {
    field,
    materials: {
      sheets: sheets.map(({ material }) => material),
      mask: mask?.material,
      conductor: section.conductor,
    },
  };
}

function merged(sheets: readonly Sheet[]): Sheet[] {
  const out: Sheet[] = [];
  for (const sheet of sheets) {
    const last = out.at(-1);
    if (last && sameMaterial(last.material, sheet.material)) {
      out[out.length - 1] = { ...last, thicknessM: last.thicknessM + sheet.thicknessM };
    } else {
      out.push(sheet);
    }
  }
  return out;
}
