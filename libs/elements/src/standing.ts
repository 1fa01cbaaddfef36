import {
  standings,
  type ChannelElement,
  type Source,
  type Standing,
  type Stackup,
} from '@tollgate/contracts';
import { traceStanding } from './trace';
import { viaStanding } from './via';

/** The standing the kind allows, lowered (never raised) by what the element states; and why. */
export function elementStanding(
  element: ChannelElement,
  stackup?: Stackup,
): { standing: Standing; reason: string } {
  const allowed = allowedStanding(element, stackup);
  const stated = element.standing;
  if (stated === undefined || standings.indexOf(stated) < standings.indexOf(allowed.standing)) return allowed;
  return stated === allowed.standing ? allowed : { standing: stated, reason: 'lowered by the engineer' };
}

function allowedStanding(element: ChannelElement, stackup?: Stackup): { standing: Standing; reason: string } {
  switch (element.kind) {
    case 'trace':
      return traceStanding(element, stackup);
    case 'via':
      return viaStanding(element, element.pitchM === undefined ? 'single-ended' : 'differential', stackup);
    case 'budget-loss':
      return { standing: 'assumed', reason: 'a placeholder for a part that is not known' };
    case 'touchstone':
      return fileStanding(element);
    case 'connector':
      return element.circuit ? circuitStanding(element) : fileStanding(element);
    default:
      return circuitStanding(element);
  }
}

function fileStanding(element: ChannelElement): { standing: Standing; reason: string } {
  const dated =
    hasText(element.source) && typeof element.source === 'object' && element.source.date !== undefined;
  if (!dated) return { standing: 'assumed', reason: 'the file has no source and date' };
  return element.standing === 'measured'
    ? { standing: 'measured', reason: 'a dated measurement' }
    : { standing: 'supplied', reason: 'a dated file of its maker' };
}

function circuitStanding(element: ChannelElement): { standing: Standing; reason: string } {
  return hasText(element.source)
    ? { standing: 'estimated', reason: 'a circuit from a named source' }
    : { standing: 'assumed', reason: 'a circuit without a named source' };
}

function hasText(source: Source | undefined): boolean {
  return typeof source === 'string' || source?.text !== undefined;
}
