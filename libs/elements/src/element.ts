import type { ChannelElement, ElementOf } from '@tollgate/contracts';
import { cascade2Into, cascade4Into } from '@tollgate/network';
import { budgetLossWarnings } from './budget-loss';
import { pairOfLegs } from './legs';
import { isPair, pairPort } from './pair';
import { buildPart, partCoverage, partKey } from './part';
import { buildTrace, padsInto } from './trace';
import { isTwoPort, twoPort } from './two-port';
import { ElementError, type BuildContext, type BuiltElement, type ElementCoverage } from './types';
import { buildVia } from './via';

/** Files an element needs, each with the path inside the element that names it. */
export function elementFiles(element: ChannelElement): { key: string; path: string }[] {
  if (element.kind !== 'touchstone' && element.kind !== 'connector') return [];
  if (element.kind === 'connector' && element.circuit) return [];
  const key = partKey(element);
  return key === undefined ? [] : [{ key, path: element.file !== undefined ? 'file' : 'fileId' }];
}

/**
 * Bands in which the element can answer; empty where it answers everywhere.
 * @throws ElementError where the part contradicts the element: port count, port order, references without a wave definition
 */
export function elementCoverage(element: ChannelElement, context: BuildContext): ElementCoverage[] {
  if (element.kind === 'touchstone' || (element.kind === 'connector' && !element.circuit))
    return [partCoverage(element, context)];
  return [];
}

/**
 * Scattering parameters of an element at the joint reference: 2 ports, or 4 in a differential channel, where a kind that is a
 * two-port stands once in each leg.
 * @param frequenciesHz ascending, inside the element's coverage; 0 Hz is allowed
 * @throws ElementError
 */
export function buildElement(
  element: ChannelElement,
  frequenciesHz: Float64Array,
  context: BuildContext,
): BuiltElement {
  if (element.kind === 'touchstone') return buildPart(element, frequenciesHz, context);
  if (element.kind === 'connector') {
    return element.circuit
      ? buildCircuit(element.circuit, frequenciesHz, context)
      : buildPart(element, frequenciesHz, context);
  }
  if (element.kind === 'trace') return buildTrace(element, frequenciesHz, context);
  if (element.kind === 'via') return buildVia(element, frequenciesHz, context);
  return circuitKind(element, frequenciesHz, context);
}

function circuitKind(
  element: ChannelElement,
  frequenciesHz: Float64Array,
  context: BuildContext,
): BuiltElement {
  const { signaling, jointOhm } = context;
  if (isPair(element)) return { s: pairPort(element, frequenciesHz, jointOhm), warnings: [] };
  if (isTwoPort(element)) {
    const { s: leg, trappedPoints } = twoPort(element, frequenciesHz, jointOhm);
    const trapped =
      trappedPoints + (element.kind === 'capacitor' ? padsInto(leg, element, frequenciesHz, context) : 0);
    const s = signaling === 'differential' ? pairOfLegs(leg, leg, frequenciesHz.length) : leg;
    const own = element.kind === 'budget-loss' ? budgetLossWarnings(element, frequenciesHz) : [];
    return { s, warnings: [...own, ...trappedWarnings(element.kind, trapped)] };
  }
  throw new ElementError({
    path: 'kind',
    message: `${element.kind} is not computed by this engine yet.`,
    mend: 'Describe it by a circuit kind.',
  });
}

function buildCircuit(
  circuit: NonNullable<ElementOf<'connector'>['circuit']>,
  frequenciesHz: Float64Array,
  context: BuildContext,
): BuiltElement {
  const cascadeInto = context.signaling === 'differential' ? cascade4Into : cascade2Into;
  const parts = circuit.map((part) => circuitKind(part, frequenciesHz, context));
  const [first, ...rest] = parts.map(({ s }) => s);
  let trappedPoints = 0;
  for (const next of rest) trappedPoints += cascadeInto(first!, first!, next, frequenciesHz.length);
  const inside = parts.flatMap(({ warnings }, i) => warnings.map((words) => `circuit[${i}]: ${words}`));
  return { s: first!, warnings: [...inside, ...trappedWarnings('circuit', trappedPoints)] };
}

/** The cascade takes a wave that neither leaves nor dies as not there (an open beside an open at 0 Hz); a person should know. */
function trappedWarnings(what: string, points: number): string[] {
  if (points === 0) return [];
  const where = points === 1 ? 'at 1 point' : `at ${points} points`;
  return [`Inside the ${what} a wave is trapped without loss ${where}; it is taken as not there.`];
}
