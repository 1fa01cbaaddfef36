import type { ChannelElement } from '@tollgate/contracts';
import { groupDelayS, type Network, uniformReference } from '@tollgate/network';
import { buildElement } from './element';
import { lightSpeedMPerS } from './constants';
import { lineLossDb } from './line';
import { modesOfCoupledLine } from './pair';
import { traceDelayS, traceTollDb } from './trace';
import type { BuildContext } from './types';
import { viaDelayS } from './via';

/**
 * The exact toll of a kind that is a line: attenuation x length, of the odd mode for a pair (SDD).
 * @returns dB at each frequency, or undefined where the toll is that of the maximum available gain
 */
export function elementTollDb(
  element: ChannelElement,
  frequenciesHz: Float64Array,
  context: BuildContext,
): Float64Array | undefined {
  if (element.kind === 'line') return frequenciesHz.map((f) => lineLossDb(element, f));
  if (element.kind === 'coupled-line') {
    const odd = modesOfCoupledLine(element)[1];
    return frequenciesHz.map((f) => lineLossDb(odd, f));
  }
  if (element.kind === 'attenuator') return frequenciesHz.map(() => element.attenuationDb);
  if (element.kind === 'trace') return traceTollDb(element, frequenciesHz, context);
  return undefined;
}

/** One-way delay in seconds, for the grid's step and the range of "saved if ideal": by length, or by the phase of a part. */
export function elementDelayS(element: ChannelElement, context: BuildContext): number {
  const byLength = (lengthM: number, permittivity: number) =>
    (lengthM * Math.sqrt(permittivity)) / lightSpeedMPerS;
  switch (element.kind) {
    case 'line':
      return byLength(element.lengthM, element.effectivePermittivity);
    case 'coupled-line':
      return byLength(
        element.lengthM,
        Math.max(element.evenEffectivePermittivity, element.oddEffectivePermittivity),
      );
    case 'line-pair':
      return Math.max(
        byLength(element.p.lengthM, element.p.effectivePermittivity),
        byLength(element.n.lengthM, element.n.effectivePermittivity),
      );
    case 'rlgc-line':
      return element.lengthM * Math.sqrt(element.inductanceHPerM * element.capacitanceFPerM);
    case 'trace':
      return traceDelayS(element, context);
    case 'via':
      return viaDelayS(element, context);
    case 'budget-loss':
      return element.delayS ?? 0;
    case 'touchstone':
      return partDelayS(element, context);
    case 'connector':
      return element.circuit
        ? element.circuit.reduce((sum, part) => sum + elementDelayS(part, context), 0)
        : partDelayS(element, context);
    default:
      return 0;
  }
}

/** Mean group delay of the through path over the middle of the part's band, never below 0. */
function partDelayS(
  element: Extract<ChannelElement, { kind: 'touchstone' | 'connector' }>,
  context: BuildContext,
): number {
  const key = element.file ?? element.fileId;
  const part = key === undefined ? undefined : context.parts.get(key);
  const own = part?.file.network.frequenciesHz;
  if (!own || own.length < 3) return 0;
  const frequenciesHz = own.slice(Math.floor(own.length / 4), Math.ceil((own.length * 3) / 4) + 1);
  const ports = context.signaling === 'differential' ? 4 : 2;
  const { s } = buildElement(element, frequenciesHz, context);
  const network: Network = {
    ports,
    frequenciesHz,
    s,
    referenceOhm: uniformReference(ports, context.jointOhm),
  };
  const delays = groupDelayS(network, ports / 2, 0);
  const sorted = Array.from(delays)
    .filter(Number.isFinite)
    .sort((a, b) => a - b);
  return Math.max(0, sorted[Math.floor(sorted.length / 2)] ?? 0);
}
