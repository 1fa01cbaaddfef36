import type { ElementOf, Stackup } from '@tollgate/contracts';
import { cascade2Into } from '@tollgate/network';
import { ElementError, type BuildContext, type ElementProblem } from '../types';
import { fieldOf } from './field-model';
import { ofLine, singleTrace } from './trace';
import { sectionOf } from './section';
import { shapeOf } from '@tollgate/lines';

type Capacitor = ElementOf<'capacitor'>;

/** What can be said of a capacitor's pads before they are solved; paths inside the element. */
export function padProblems({ pads }: Capacitor, stackup: Stackup | undefined): ElementProblem[] {
  if (!pads) return [];
  try {
    ofLine(() => shapeOf(fieldOf(sectionOf(stackup, pads)).field));
    return [];
  } catch (error) {
    if (!(error instanceof ElementError)) throw error;
    return [{ ...error.problem, path: `pads.${error.problem.path}` }];
  }
}

/** Puts the pads, as short wide traces, before and behind the body of a capacitor (one leg). Returns trapped points. */
export function padsInto(
  body: Float64Array,
  { pads }: Capacitor,
  frequenciesHz: Float64Array,
  context: BuildContext,
): number {
  if (!pads) return 0;
  const points = frequenciesHz.length;
  const pad = singleTrace(sectionOf(context.stackup, pads), pads.lengthM, frequenciesHz, context.jointOhm);
  const near = cascade2Into(body, pad, body, points);
  return near + cascade2Into(body, body, pad, points);
}
