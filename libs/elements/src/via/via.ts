import type { Signaling, Stackup } from '@tollgate/contracts';
import type { BuildContext, BuiltElement } from '../types';
import type { Via } from './barrel';
import { flightS } from './ladder';
import { modelIn } from './model';
import { notchOf } from './notch';
import { viaProblems } from './problems';
import { scatterOf } from './scatter';

/**
 * S of a via, 2 ports or 4: its barrel cut into lines by the layers it crosses, with open stubs at the nodes where traces meet it.
 * @throws ElementError
 */
export function buildVia(via: Via, frequenciesHz: Float64Array, context: BuildContext): BuiltElement {
  const model = modelIn(via, context);
  const notchHz = notchOf(model);
  const topHz = frequenciesHz[frequenciesHz.length - 1] ?? 0;
  const warnings =
    notchHz !== null && topHz > notchHz / 2
      ? [
          `Above ${gigahertz(notchHz / 2)} the via is out of range: that is half the notch of its stub, which the model puts at ${gigahertz(notchHz)}.`,
        ]
      : [];
  return { s: scatterOf(model, frequenciesHz, context.jointOhm), warnings };
}

function gigahertz(frequencyHz: number): string {
  return `${(frequencyHz / 1e9).toFixed(2)} GHz`;
}

/**
 * One-way delay in seconds by length and permittivity, stubs left out.
 * @throws ElementError
 */
export function viaDelayS(via: Via, context: BuildContext): number {
  const { sections } = modelIn(via, context);
  return sections.through.reduce(
    (sum, { lengthM, material }) => sum + flightS(lengthM, sections.materials[material]!.dk),
    0,
  );
}

/**
 * The model's own minimum of |S21| (SDD21 of a pair), found numerically.
 * @returns Hz, or null where the via has no stub
 * @throws ElementError
 */
export function viaNotchHz(via: Via, context: BuildContext): number | null {
  return notchOf(modelIn(via, context));
}

/** What a via's model may be called, and why: never more than estimated. */
export function viaStanding(
  via: Via,
  signaling: Signaling,
  stackup: Stackup | undefined,
): { standing: 'estimated' | 'assumed'; reason: string } {
  const [first] = viaProblems(via, signaling, stackup);
  if (first) return { standing: 'assumed', reason: first.message };
  const named = (via.returnVias?.length ?? 0) > 0;
  if (!named && (signaling === 'differential' || via.pitchM !== undefined)) {
    return {
      standing: 'assumed',
      reason: 'a pair without named return vias: its return between planes is taken at the antipads',
    };
  }
  return {
    standing: 'estimated',
    reason: named
      ? 'barrel sections as lines: coaxial at planes, round wires against the return vias between them'
      : 'barrel sections as coaxial lines; no return vias are named, so the return is taken at the antipads',
  };
}
