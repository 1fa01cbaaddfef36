import type { Stackup } from '@tollgate/contracts';
import { sectionKey, type FieldSolution } from '@tollgate/lines';
import { fieldOf, keepSolution, solutionOf } from '../trace/field-model';
import { sectionOf, type SectionInput } from '../trace/section';
import { ofLine } from './cross-section-desk';

/** A field solution with the content it is the solution of; plain data that a database can keep. */
export interface SolvedSection {
  readonly key: string;
  readonly solution: FieldSolution;
}

/**
 * What tells a trace's section from others: the same key has the same solution. Nothing is solved for it.
 * @throws ElementError for a trace that has no section
 */
export function sectionKeyOf(stackup: Stackup | undefined, input: SectionInput): string {
  const section = sectionOf(stackup, input);
  return ofLine(() => sectionKey(fieldOf(section).field));
}

/**
 * The solution of a trace's section: the kept one, else solved now.
 * @throws ElementError for a trace that has no section
 */
export function solvedSectionOf(stackup: Stackup | undefined, input: SectionInput): SolvedSection {
  const { field } = fieldOf(sectionOf(stackup, input));
  return ofLine(() => ({ key: sectionKey(field), solution: solutionOf(field) }));
}

/** Takes in a solution that was found elsewhere, or earlier. */
export function takeInSolved({ key, solution }: SolvedSection): void {
  keepSolution(key, solution);
}
