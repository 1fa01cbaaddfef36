import type { ElementOf, PortPicks } from '@tollgate/contracts';
import {
  interpolate,
  NetworkError,
  pickPorts,
  portsOfOrder,
  renormalize,
  reorderPorts,
  reversePorts,
  testPortOrder,
  type Network,
} from '@tollgate/network';
import { networkOfFile, TouchstoneError } from '@tollgate/touchstone';
import { pairOfLegs } from './legs';
import { factsOfFile, partWarnings, samplingOf } from './part-facts';
import {
  ElementError,
  type BuildContext,
  type BuiltElement,
  type ElementCoverage,
  type ElementPart,
} from './types';

export type PartElement = ElementOf<'touchstone'> | ElementOf<'connector'>;

/** A wanted frequency this close (relative) to an end of the band is that end. */
const endTolerance = 1e-9;

export function partKey(element: PartElement): string | undefined {
  return element.file ?? element.fileId;
}

function partOf(element: PartElement, context: BuildContext): ElementPart {
  const key = partKey(element);
  const part = key === undefined ? undefined : context.parts.get(key);
  if (part) return part;
  throw new ElementError({
    path: element.file ? 'file' : 'fileId',
    message: 'The part is not at hand.',
    mend: 'Name a Touchstone file that is there.',
  });
}

/** Ports picked and put in order, at the file's own reference; what the element says is held against what the data say. */
function ordered(element: PartElement, part: ElementPart, context: BuildContext): Network {
  const network = usable(element, part);
  const picked = element.ports
    ? pickPorts(network, picksOf(element.ports, network.ports, context))
    : inOrder(element, network, context);
  return element.reversed ? reversePorts(picked) : picked;
}

function usable(element: PartElement, part: ElementPart): Network {
  try {
    return networkOfFile(part.file, element.waves);
  } catch (error) {
    if (!(error instanceof TouchstoneError)) throw error;
    throw new ElementError({ path: 'waves', message: error.reason, mend: error.mend });
  }
}

function picksOf(picks: PortPicks, ports: number, { signaling }: BuildContext): number[] {
  const pair = 'nearP' in picks;
  if (pair && signaling === 'single-ended') throw wrongPicks('A single-ended channel picks { near, far }.');
  const order = pair ? [picks.nearP, picks.nearN, picks.farP, picks.farN] : [picks.near, picks.far];
  if (order.some((port) => port > ports)) throw wrongPicks(`The file has ${ports} ports.`);
  if (new Set(order).size !== order.length) throw wrongPicks('Each port is picked once.');
  return order.map((port) => port - 1);
}

function wrongPicks(message: string): ElementError {
  return new ElementError({ path: 'ports', message, mend: 'Name ports of the file, counted from 1.' });
}

function inOrder(element: PartElement, network: Network, { signaling }: BuildContext): Network {
  if (network.ports === 2) return network;
  if (network.ports === 4 && signaling === 'differential')
    return reorderPorts(network, checkedOrder(element, network));
  throw new ElementError({
    path: 'ports',
    message: `The file has ${network.ports} ports; a ${signaling} channel needs ${signaling === 'differential' ? '4 or 2' : '2'}.`,
    mend:
      signaling === 'differential'
        ? 'Pick ports with { nearP, nearN, farP, farN }.'
        : 'Pick ports with { near, far }.',
  });
}

/** The stated order, if the data do not speak against it over their lowest decade. */
function checkedOrder(element: PartElement, network: Network): number[] {
  const { likely } = testPortOrder(network);
  const stated = element.portOrder;
  if (!stated) {
    throw new ElementError({
      path: 'portOrder',
      message: 'A file of 4 ports does not say which ports are through pairs.',
      mend: likely ? `The data speak for "${likely}".` : 'Name the order; the data do not tell.',
    });
  }
  if (likely && likely !== stated) {
    throw new ElementError({
      path: 'portOrder',
      message: `The data speak against "${stated}".`,
      mend: `The likely order is "${likely}".`,
    });
  }
  if (!likely && !element.portOrderConfirmed) {
    throw new ElementError({
      path: 'portOrder',
      message: `The data do not tell whether the order is "${stated}".`,
      mend: 'Look at the part, then confirm with portOrderConfirmed: true.',
    });
  }
  return portsOfOrder(stated);
}

/** Where the part can answer. */
export function partCoverage(element: PartElement, context: BuildContext): ElementCoverage {
  const part = partOf(element, context);
  ordered(element, part, context);
  const frequencies = part.file.network.frequenciesHz;
  return {
    fromHz: element.below === 'to-dc' ? 0 : frequencies[0]!,
    toHz: frequencies[frequencies.length - 1]!,
    what: element.id ? `${part.file.fileName} (${element.id})` : part.file.fileName,
  };
}

/** S of a part on the wanted frequencies, renormalised from the file's own reference. */
export function buildPart(
  element: PartElement,
  frequenciesHz: Float64Array,
  context: BuildContext,
): BuiltElement {
  const part = partOf(element, context);
  const own = ordered(element, part, context);
  const result = interpolated(element, own, frequenciesHz);
  const { s } = renormalize(result.network, context.jointOhm);
  const legs = context.signaling === 'differential' && own.ports === 2;
  const facts = {
    ...factsOfFile(part),
    ...samplingOf(own),
    portOrder: orderWords(element),
    reversed: element.reversed ?? false,
    interpolationErrorAbs: result.error.maxAbs,
    ...(result.extendedHz ? { extendedHz: [...result.extendedHz] as [number, number] } : {}),
  };
  return {
    s: legs ? pairOfLegs(s, s, frequenciesHz.length) : s,
    warnings: [...result.warnings, ...partWarnings(facts)],
    part: facts,
  };
}

function orderWords({ portOrder, ports }: PartElement): string {
  if (!ports) return portOrder ?? '1-2';
  return 'nearP' in ports
    ? `near ${ports.nearP}, ${ports.nearN}; far ${ports.farP}, ${ports.farN}`
    : `near ${ports.near}, far ${ports.far}`;
}

function interpolated(element: PartElement, network: Network, frequenciesHz: Float64Array) {
  const within = clipped(frequenciesHz, network.frequenciesHz);
  try {
    return interpolate(network, within, { method: element.interpolation, below: element.below });
  } catch (error) {
    if (!(error instanceof NetworkError)) throw error;
    const path = sideOf(element, network, within);
    throw new ElementError({ path, message: error.reason, mend: error.mend });
  }
}

/** The field that says what happens beyond the end that is asked for. */
function sideOf({ below }: PartElement, { frequenciesHz: data }: Network, wanted: Float64Array) {
  const above = wanted[wanted.length - 1]! > data[data.length - 1]!;
  const refusedBelow = below === 'refuse' && wanted[0]! < data[0]!;
  return above && !refusedBelow ? 'above' : 'below';
}

/** A grid's end computed by another route may miss the band's end by a rounding: it is that end. */
function clipped(wanted: Float64Array, data: Float64Array): Float64Array {
  const [first, last] = [data[0]!, data[data.length - 1]!];
  const isFirst = (f: number) => f < first && first - f <= first * endTolerance;
  const isLast = (f: number) => f > last && f - last <= last * endTolerance;
  if (!wanted.some((f) => isFirst(f) || isLast(f))) return wanted;
  return wanted.map((f) => (isFirst(f) ? first : isLast(f) ? last : f));
}
