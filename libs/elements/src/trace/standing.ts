import type { ElementOf, Stackup, Standing } from '@tollgate/contracts';
import { LineError } from '@tollgate/lines';
import { ElementError } from '../types';
import { isCopper } from './layers';
import { solveTrace } from './field-model';
import { sectionOf } from './section';

/** What a trace's model may be called, and why. */
export function traceStanding(
  trace: ElementOf<'trace'>,
  stackup: Stackup | undefined,
): { standing: Standing; reason: string } {
  const copper = stackup?.layers?.find((layer) => isCopper(layer) && layer.name === trace.layer);
  if (isCopper(copper) && copper.roughness === undefined) {
    return { standing: 'assumed', reason: 'the roughness of its copper is not given' };
  }
  try {
    const { standing, source } = solveTrace(sectionOf(stackup, trace), new Float64Array(0));
    return { standing, reason: source };
  } catch (error) {
    if (error instanceof ElementError || error instanceof LineError) {
      return { standing: 'assumed', reason: error.message };
    }
    throw error;
  }
}
