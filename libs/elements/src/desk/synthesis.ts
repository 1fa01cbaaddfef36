import type { Stackup } from '@tollgate/contracts';
import { fieldOf, solutionOf } from '../trace/field-model';
import { sectionOf, type SectionInput } from '../trace/section';
import { ElementError } from '../types';
import { ofLine } from './cross-section-desk';

/** Which impedance is wanted: of a single trace, between the legs of a pair, or of both legs together. */
export type WantedMode = 'single' | 'differential' | 'common';

/** The impedance of a section, lossless and quasi-static. */
export function impedanceOf(stackup: Stackup | undefined, input: SectionInput, mode: WantedMode): number {
  const { modes } = ofLine(() => solutionOf(fieldOf(sectionOf(stackup, input)).field));
  if (mode === 'single') return modes.single!.z0Ohm;
  return mode === 'differential' ? 2 * modes.odd!.z0Ohm : modes.even!.z0Ohm / 2;
}

export interface Wanted {
  readonly targetOhm: number;
  readonly mode: WantedMode;
  /** The length that is looked for; the other stays. */
  readonly vary: 'widthM' | 'gapM';
}

/** A width or gap a fabricator could make, and the copper that is left at the top of an etched trace. */
const leastM = 20e-6;
const mostM = 20e-3;
const mostSteps = 60;
/** Found to a thousandth of an ohm. */
const closeOhm = 1e-3;

/**
 * The width or gap that gives an impedance: false position on its logarithm between 20 um and 20 mm, over which the impedance falls with
 * width and (between the legs) rises with gap.
 * @throws ElementError where no width or gap in that range gives it, saying what is reached
 */
export function synthesize(
  stackup: Stackup | undefined,
  input: SectionInput,
  { targetOhm, mode, vary }: Wanted,
): number {
  const missing = (lengthM: number): number =>
    impedanceOf(stackup, { ...input, [vary]: lengthM }, mode) - targetOhm;
  let [low, high] = [narrowest(stackup, input, vary), mostM];
  let [atLow, atHigh] = [missing(low), missing(high)];
  if (atLow * atHigh > 0)
    throw outOfReach(vary, targetOhm, [atLow + targetOhm, atHigh + targetOhm], [low, high]);
  let kept = 0;
  for (let k = 0; k < mostSteps; k++) {
    const [a, b] = [Math.log(low), Math.log(high)];
    const middle = Math.exp(b - (atHigh * (b - a)) / (atHigh - atLow));
    const at = missing(middle);
    if (Math.abs(at) < closeOhm) return middle;
    // An end kept twice counts half (the Illinois rule), so that both ends close in.
    if (at * atHigh > 0) {
      [high, atHigh] = [middle, at];
      if (kept === 1) atLow /= 2;
      kept = 1;
    } else {
      [low, atLow] = [middle, at];
      if (kept === -1) atHigh /= 2;
      kept = -1;
    }
  }
  return Math.sqrt(low * high);
}

/** The narrowest width that etching leaves a top of. */
function narrowest(stackup: Stackup | undefined, input: SectionInput, vary: Wanted['vary']): number {
  if (vary === 'gapM') return leastM;
  const { thicknessM, etchAngleDeg } = sectionOf(stackup, { ...input, widthM: mostM });
  const lostM = etchAngleDeg === 90 ? 0 : (2 * thicknessM) / Math.tan((etchAngleDeg * Math.PI) / 180);
  return Math.max(leastM, lostM * 1.05);
}

function outOfReach(
  vary: Wanted['vary'],
  targetOhm: number,
  reached: readonly number[],
  [fromM, toM]: readonly number[],
): ElementError {
  const [least, most] = [...reached].sort((a, b) => a - b);
  const what = vary === 'widthM' ? 'width' : 'gap';
  return new ElementError({
    path: 'targetOhm',
    message: `No ${what} from ${(fromM! * 1e6).toFixed(0)} µm to ${(toM! * 1e3).toFixed(0)} mm gives ${targetOhm} ohm: it runs from ${least!.toFixed(2)} to ${most!.toFixed(2)} ohm.`,
    mend: 'Ask for an impedance between, or change the dielectric, the copper or the other length.',
  });
}
