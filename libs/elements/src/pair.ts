import type { ChannelElement, ElementOf } from '@tollgate/contracts';
import { lineTwoPort } from './line';
import { pairOfLegs, pairOfModes } from './legs';
import { filled, leakyCapacitanceWriter, seriesWriter } from './two-port';

/** Kinds that are a pair by themselves. */
export type PairKind = 'coupled-line' | 'line-pair' | 'pair-series' | 'pair-shunt';

type Builder<Kind extends PairKind> = (
  element: ElementOf<Kind>,
  frequenciesHz: Float64Array,
  referenceOhm: number,
) => Float64Array;

const builders: { readonly [Kind in PairKind]: Builder<Kind> } = {
  'coupled-line': (element, frequenciesHz, reference) => {
    const [even, odd] = modesOfCoupledLine(element).map((line) =>
      lineTwoPort(line, frequenciesHz, reference),
    );
    return pairOfModes(even!, odd!, frequenciesHz.length);
  },
  'line-pair': ({ p, n }, frequenciesHz, reference) => {
    const [pLeg, nLeg] = [p, n].map((line) => lineTwoPort(line, frequenciesHz, reference));
    return pairOfLegs(pLeg!, nLeg!, frequenciesHz.length);
  },
  // The even mode meets L + M in each leg, the odd mode L - M.
  'pair-series': ({ inductanceH, mutualInductanceH }, frequenciesHz, reference) => {
    const [even, odd] = [inductanceH + mutualInductanceH, inductanceH - mutualInductanceH].map((mode) =>
      filled(seriesWriter({ inductanceH: mode }, reference), frequenciesHz),
    );
    return pairOfModes(even!, odd!, frequenciesHz.length);
  },
  // The odd mode meets the coupling twice: its middle is a virtual ground.
  'pair-shunt': (
    { capacitanceF, mutualCapacitanceF, resistanceOhm, mutualResistanceOhm },
    frequenciesHz,
    reference,
  ) => {
    const toGround = resistanceOhm === undefined ? 0 : 1 / resistanceOhm;
    const between = mutualResistanceOhm === undefined ? 0 : 2 / mutualResistanceOhm;
    const even = filled(leakyCapacitanceWriter(capacitanceF, toGround, reference), frequenciesHz);
    const odd = filled(
      leakyCapacitanceWriter(capacitanceF + 2 * mutualCapacitanceF, toGround + between, reference),
      frequenciesHz,
    );
    return pairOfModes(even, odd, frequenciesHz.length);
  },
};

export function isPair(element: ChannelElement): element is ElementOf<PairKind> {
  return element.kind in builders;
}

/** S of a pair kind, 4 ports, at `referenceOhm` a conductor. */
export function pairPort(
  element: ElementOf<PairKind>,
  frequenciesHz: Float64Array,
  referenceOhm: number,
): Float64Array {
  return (builders[element.kind] as unknown as Builder<PairKind>)(element, frequenciesHz, referenceOhm);
}

/** Even and odd mode of a coupled line as lines of one conductor. */
export function modesOfCoupledLine(element: ElementOf<'coupled-line'>) {
  const line = (
    z0Ohm: number,
    effectivePermittivity: number,
    loss: { sqrtDbPerM: number; linearDbPerM: number },
  ) => ({
    z0Ohm,
    effectivePermittivity,
    lengthM: element.lengthM,
    lossSqrtDbPerM: loss.sqrtDbPerM,
    lossLinearDbPerM: loss.linearDbPerM,
  });
  return [
    line(element.evenZ0Ohm, element.evenEffectivePermittivity, element.evenLoss),
    line(element.oddZ0Ohm, element.oddEffectivePermittivity, element.oddLoss),
  ] as const;
}
