import type { ChannelElement, CompleteChannel } from '@tollgate/contracts';
import {
  buildElement,
  elementCoverage,
  elementTollDb,
  type BuildContext,
  type BuiltElement,
} from '@tollgate/elements';
import type { Coverage } from '@tollgate/masks';
import {
  cascadeInto,
  renormalize,
  sameReference,
  through,
  tollDb,
  toMixedModeInto,
  uniformReference,
  type Network,
} from '@tollgate/network';
import canonicalize from 'canonicalize';
import type { CheckCache } from './cache';
import type { Part } from './check.types';
import { CheckAbandoned, ofElement } from './problem';
import { jointOhmOf, portsOf, referencesOf } from './references';

/** Kinds that stand once in each leg of a pair, alike and without coupling. */
const legKinds: readonly string[] = [
  ...['line', 'rlgc-line', 'series', 'shunt', 'stub', 'tee', 'pi', 'transformer', 'attenuator', 'capacitor'],
];

/**
 * A channel's elements in a row, ready to be evaluated. Where every element of a pair is two equal uncoupled legs, one
 * leg alone is built and cascaded (2 ports): its S is SDD and SCC, and the pair's four ports follow from it.
 */
export interface Chain {
  readonly channel: CompleteChannel;
  readonly context: BuildContext;
  /** Ports of the channel, and of the sections that are cascaded. */
  readonly ports: 2 | 4;
  readonly sectionPorts: 2 | 4;
  /** References of the channel, and of the sections' cascade, a pair a port. */
  readonly reference: Float64Array;
  readonly sectionReference: Float64Array;
  readonly coverage: readonly Coverage[];
  readonly cache?: CheckCache;
  /** Asked before each element is built: true ends the check. */
  readonly abandoned?: () => boolean;
}

/** @throws CheckRefused where a part contradicts its element */
export function createChain(
  channel: CompleteChannel,
  parts: ReadonlyMap<string, Part>,
  cache?: CheckCache,
  abandoned?: () => boolean,
): Chain {
  const reference = referencesOf(channel);
  const ports = portsOf(channel);
  const oneLeg = ports === 4 && channel.elements.every(({ kind }) => legKinds.includes(kind));
  const sectionReference = oneLeg
    ? Float64Array.of(...reference.subarray(0, 2), ...reference.subarray(4, 6))
    : reference;
  const signaling = oneLeg ? 'single-ended' : channel.signaling;
  const jointOhm = jointOhmOf(reference);
  const context: BuildContext = { signaling, jointOhm, stackup: channel.stackup, parts };
  const coverage = channel.elements.flatMap((element, i) =>
    ofElement(i, () => elementCoverage(element, context)),
  );
  const sectionPorts = oneLeg ? 2 : ports;
  return { channel, context, ports, sectionPorts, reference, sectionReference, coverage, cache, abandoned };
}

/** Every element on these frequencies (ascending, inside the coverage), one after the other; `cached` uses the cache. */
export function* sectionsOf(
  chain: Chain,
  frequenciesHz: Float64Array,
  cached: boolean,
): Generator<BuiltElement, void> {
  const { channel, context } = chain;
  const cache = cached ? chain.cache : undefined;
  const shared = cache ? `${cache.gridKey(frequenciesHz)} ${context.jointOhm} ${context.signaling}` : '';
  const stackup = cache ? (canonicalize(channel.stackup ?? null) ?? '') : '';
  for (const [i, element] of channel.elements.entries()) {
    if (chain.abandoned?.()) throw new CheckAbandoned();
    const key = cache ? `${shared} ${keyOf(element, context, stackup)}` : '';
    const built = cache?.get(key) ?? ofElement(i, () => buildElement(element, frequenciesHz, context));
    cache?.set(key, built);
    yield built;
  }
}

/** What an element's S depends on; how it is named, trusted or placed does not enter. */
function keyOf(element: ChannelElement, { parts }: BuildContext, stackup: string): string {
  const { id: _id, label: _label, notes: _notes, plan: _plan, source: _source, ...rest } = element;
  const { allotmentDb: _allotment, standing: _standing, ...model } = rest;
  const part =
    'file' in element || 'fileId' in element
      ? (parts.get(element.file ?? element.fileId ?? '')?.sha256 ?? '')
      : '';
  const onStackup = ['trace', 'via', 'capacitor'].includes(element.kind);
  return `${canonicalize(model)} ${part} ${onStackup ? stackup : ''}`;
}

/** A channel on some frequencies, and what its elements had to say beside their S. */
export interface Evaluation {
  readonly network: Network;
  readonly facts: readonly Omit<BuiltElement, 's'>[];
  /** Points at which a joint traps a wave without loss. */
  readonly trappedPoints: number;
}

/**
 * The elements in a row, at the channel's references and with its ports. One section is held at a time: a channel of 500
 * elements on the largest grid would fill gigabytes.
 */
export function evaluateChain(chain: Chain, frequenciesHz: Float64Array, cached: boolean): Evaluation {
  const points = frequenciesHz.length;
  const s = through(chain.sectionPorts, points);
  const facts: Omit<BuiltElement, 's'>[] = [];
  let trappedPoints = 0;
  for (const { s: section, ...fact } of sectionsOf(chain, frequenciesHz, cached)) {
    trappedPoints += cascadeInto(s, s, section, chain.sectionPorts, points);
    facts.push(fact);
  }
  const sections = atReference(chain, s, frequenciesHz, chain.sectionReference);
  const network = chain.ports === chain.sectionPorts ? sections : bothLegs(sections, chain.reference);
  return { network, facts, trappedPoints };
}

/** A cascade of sections, renormalised once from the joint to `reference`. */
export function atReference(
  chain: Chain,
  s: Float64Array,
  frequenciesHz: Float64Array,
  reference: Float64Array,
): Network {
  const referenceOhm = uniformReference(chain.sectionPorts, chain.context.jointOhm);
  const network = { ports: chain.sectionPorts, frequenciesHz, s, referenceOhm };
  return sameReference(referenceOhm, reference) ? network : renormalize(network, reference);
}

/** Two equal legs without coupling: ports 1, 3 are the p leg and 2, 4 the n leg. */
function bothLegs(leg: Network, referenceOhm: Float64Array): Network {
  const points = leg.frequenciesHz.length;
  const s = new Float64Array(points * 32);
  for (let point = 0; point < points; point++) {
    for (let entry = 0; entry < 4; entry++) {
      const from = point * 8 + entry * 2;
      const p = point * 32 + (entry >> 1) * 16 + (entry & 1) * 4;
      s[p] = s[p + 10] = leg.s[from]!;
      s[p + 1] = s[p + 11] = leg.s[from + 1]!;
    }
  }
  return { ports: 4, frequenciesHz: leg.frequenciesHz, s, referenceOhm };
}

/**
 * Toll of element `index` at the frequencies its section was built on, dB, at least 0: exact where the kind has it, else
 * -10 log10 of the maximum available gain, of SDD for a pair.
 */
export function tollOfSection(
  chain: Chain,
  index: number,
  section: Float64Array,
  frequenciesHz: Float64Array,
): Float64Array {
  const element = chain.channel.elements[index]!;
  const exact = ofElement(index, () => elementTollDb(element, frequenciesHz, chain.context));
  if (exact) return exact;
  const points = frequenciesHz.length;
  const twoPort = chain.sectionPorts === 2 ? section : differentialOf(section, points);
  return tollDb(twoPort, points).map((toll) => Math.max(0, toll));
}

function differentialOf(s: Float64Array, points: number): Float64Array {
  const mixed = new Float64Array(s.length);
  toMixedModeInto(mixed, s, points);
  const out = new Float64Array(points * 8);
  for (let point = 0; point < points; point++) {
    out.set(mixed.subarray(point * 32, point * 32 + 4), point * 8);
    out.set(mixed.subarray(point * 32 + 8, point * 32 + 12), point * 8 + 4);
  }
  return out;
}
