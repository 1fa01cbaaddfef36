import { kindDescription, type ChannelElement } from '@tollgate/contracts';
import { formatQuantity } from '@tollgate/quantities';

type Branch = {
  readonly resistanceOhm?: number;
  readonly inductanceH?: number;
  readonly capacitanceF?: number;
};

const length = (value: number | undefined) =>
  value === undefined ? '' : formatQuantity(value, 'length', { digits: 4 });
const ohms = (value: number) => formatQuantity(value, 'resistance', { digits: 4 });

function branch({ resistanceOhm, inductanceH, capacitanceF }: Branch): string {
  return [
    resistanceOhm === undefined ? '' : ohms(resistanceOhm),
    inductanceH === undefined ? '' : formatQuantity(inductanceH, 'inductance', { digits: 4 }),
    capacitanceF === undefined ? '' : formatQuantity(capacitanceF, 'capacitance', { digits: 4 }),
  ]
    .filter(Boolean)
    .join(' + ');
}

/** The values that tell an element from its like, in a few words: "50 ohm, 20 mm". */
export function mainValues(element: ChannelElement): string {
  switch (element.kind) {
    case 'line':
      return `${ohms(element.z0Ohm)}, ${length(element.lengthM)}`;
    case 'stub':
      return `${length(element.lengthM)}, ${element.end}`;
    case 'rlgc-line':
      return length(element.lengthM);
    case 'coupled-line':
      return `${ohms(2 * element.oddZ0Ohm)} diff., ${length(element.lengthM)}`;
    case 'line-pair':
      return `p ${length(element.p.lengthM)}, n ${length(element.n.lengthM)}`;
    case 'series':
    case 'shunt':
    case 'pair-series':
      return branch(element);
    case 'pair-shunt':
      return branch(element);
    case 'tee':
      return `shunt ${branch(element.shunt)}`;
    case 'pi':
      return `series ${branch(element.series)}`;
    case 'transformer':
      return `${element.turnsRatio} : 1`;
    case 'attenuator':
      return formatQuantity(element.attenuationDb, 'loss', { digits: 4 });
    case 'budget-loss':
      return `${formatQuantity(element.lossDb, 'loss', { digits: 4 })} at ${formatQuantity(element.atHz, 'frequency', { digits: 4 })}`;
    case 'capacitor':
      return formatQuantity(element.capacitanceF, 'capacitance', { digits: 4 });
    case 'connector':
    case 'touchstone':
      return partWords(element);
    case 'trace':
      return [element.layer, length(element.widthM), length(element.lengthM)].filter(Boolean).join(', ');
    case 'via':
      return `${element.fromLayer} to ${element.toLayer}`;
  }
}

function partWords(element: Extract<ChannelElement, { kind: 'connector' | 'touchstone' }>): string {
  if (element.kind === 'connector' && element.circuit) {
    const count = element.circuit.length;
    return `${count} circuit ${count === 1 ? 'element' : 'elements'}`;
  }
  return element.fileId || element.file
    ? element.reversed
      ? 'from a file, reversed'
      : 'from a file'
    : 'no file yet';
}

/** What a person called it, else its kind. */
export function nameOf(element: ChannelElement): string {
  return element.label ?? kindDescription(element.kind).title;
}

/** `T1, via near the switch` for sentences. */
export function callOf(element: ChannelElement & { id: string }): string {
  return `${element.id}, ${nameOf(element)}`;
}
