import type { ElementOf } from '@tollgate/contracts';
import { writeSymmetric } from './symmetric';
import type { PointWriter } from './types';

type Placeholder = ElementOf<'budget-loss'>;

/** What passes a placeholder: loss that falls to 0 with sqrt(f) or f. */
function transmissionAt({ lossDb, atHz, shape }: Placeholder, frequencyHz: number): number {
  const ratio = frequencyHz / atHz;
  return 10 ** ((-lossDb * (shape === 'sqrt' ? Math.sqrt(ratio) : ratio)) / 20);
}

/** What may come back: no more than is not let through. */
function roomAt(transmission: number): number {
  return Math.sqrt(Math.max(0, 1 - transmission * transmission));
}

function wantedReflection({ returnLossDb }: Placeholder): number {
  return returnLossDb === undefined ? 0 : 10 ** (-returnLossDb / 20);
}

/**
 * A placeholder, matched, or with a stated return loss. The reflection is taken in quadrature to the transmission, which keeps it
 * passive as long as the power it returns is not more than what the loss leaves; where it would be, less is returned.
 */
export function budgetLossWriter(element: Placeholder): PointWriter {
  const wanted = wantedReflection(element);
  return (out, at, f) => {
    const transmission = transmissionAt(element, f);
    const reflection = Math.min(wanted, roomAt(transmission));
    const angle = -2 * Math.PI * f * (element.delayS ?? 0);
    const cos = Math.cos(angle);
    const sin = Math.sin(angle);
    writeSymmetric(out, at, -reflection * sin, reflection * cos, transmission * cos, transmission * sin);
  };
}

/** Says up to where the loss, which falls to 0, leaves no room for the return loss that was asked for. */
export function budgetLossWarnings(element: Placeholder, frequenciesHz: Float64Array): string[] {
  const wanted = wantedReflection(element);
  // The loss rises with frequency, so that the points without room are the lowest.
  const short = frequenciesHz.filter((f) => roomAt(transmissionAt(element, f)) < wanted);
  const last = short[short.length - 1];
  if (last === undefined) return [];
  const where =
    short.length === frequenciesHz.length
      ? 'in the whole band'
      : `up to ${Number((last / 1e9).toPrecision(4))} GHz`;
  return [
    `The loss leaves no room for a return loss of ${element.returnLossDb} dB ${where}: a passive part would return less there, and less is taken.`,
  ];
}
