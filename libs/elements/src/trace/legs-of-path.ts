import type { ElementOf } from '@tollgate/contracts';
import { pairLengthsM, polylineLengthM } from '@tollgate/geometry';
import { ElementError } from '../types';

export interface LegLengths {
  readonly pM: number;
  readonly nM: number;
}

/**
 * Lengths of a trace's legs in metres; both the same for a single trace. A typed length goes before the path; along a path
 * each leg's length follows from the bends.
 * @throws ElementError for a path no pair can follow
 */
export function legLengths(trace: ElementOf<'trace'>): LegLengths {
  const { lengthM, lengthNM, path, gapM, widthM } = trace;
  if (lengthM !== undefined) return { pM: lengthM, nM: lengthNM ?? lengthM };
  if (path === undefined) return { pM: 0, nM: 0 };
  if (gapM === undefined) {
    const alongM = polylineLengthM(path);
    return { pM: alongM, nM: alongM };
  }
  try {
    const { pM, nM } = pairLengthsM(path, widthM + gapM);
    return { pM, nM: lengthNM ?? nM };
  } catch (error) {
    if (!(error instanceof RangeError)) throw error;
    throw new ElementError({ path: 'path', message: error.message, mend: 'Split the turn into two.' });
  }
}
