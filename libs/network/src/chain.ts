import { cascade2Into } from './cascade2';
import { cascade4Into } from './cascade4';
import type { Network } from './network';
import { checkSameGrid, NetworkError, sameReference } from './network';
import { renormalize } from './renormalize';

/** Port counts that cascade: one near and one far, or two near (1, 2) and two far (3, 4). */
export type CascadePorts = 2 | 4;

/** Star product of sections of 2 or 4 ports on raw arrays; `out` may be an input. Returns the number of trapped points. */
export function cascadeInto(
  out: Float64Array,
  a: Float64Array,
  b: Float64Array,
  ports: CascadePorts,
  points: number,
): number {
  return ports === 2 ? cascade2Into(out, a, b, points) : cascade4Into(out, a, b, points);
}

/** The neutral element of the cascade: each near port joined to its far port. */
export function through(ports: CascadePorts, points: number): Float64Array {
  const s = new Float64Array(points * ports * ports * 2);
  const half = ports / 2;
  for (let point = 0; point < points; point++) {
    for (let port = 0; port < half; port++) {
      s[((point * ports + port) * ports + port + half) * 2] = 1;
      s[((point * ports + port + half) * ports + port) * 2] = 1;
    }
  }
  return s;
}

/** All sections in a row, near to far; sections share one real reference. None gives the through. */
export function cascadeAll(
  sections: readonly Float64Array[],
  ports: CascadePorts,
  points: number,
  out: Float64Array = new Float64Array(points * ports * ports * 2),
): Float64Array {
  const [first, second] = sections;
  if (!first || !second) {
    out.set(first ?? through(ports, points));
    return out;
  }
  cascadeInto(out, first, second, ports, points);
  for (let k = 2; k < sections.length; k++) cascadeInto(out, out, sections[k]!, ports, points);
  return out;
}

/** `prefixes[k]` is the cascade of the sections before k; it has one entry more than there are sections. */
export function prefixCascades(
  sections: readonly Float64Array[],
  ports: CascadePorts,
  points: number,
): Float64Array[] {
  const prefixes = [through(ports, points)];
  for (const section of sections) {
    const next = new Float64Array(points * ports * ports * 2);
    cascadeInto(next, prefixes[prefixes.length - 1]!, section, ports, points);
    prefixes.push(next);
  }
  return prefixes;
}

/** `suffixes[k]` is the cascade of section k and all after it; the last entry is the through. */
export function suffixCascades(
  sections: readonly Float64Array[],
  ports: CascadePorts,
  points: number,
): Float64Array[] {
  const suffixes = [through(ports, points)];
  for (let k = sections.length - 1; k >= 0; k--) {
    const next = new Float64Array(points * ports * ports * 2);
    cascadeInto(next, sections[k]!, suffixes[0]!, ports, points);
    suffixes.unshift(next);
  }
  return suffixes;
}

/** The chain without section `index`, from its prefixes and suffixes, into `out`. */
export function leaveOneOutInto(
  out: Float64Array,
  prefixes: readonly Float64Array[],
  suffixes: readonly Float64Array[],
  index: number,
  ports: CascadePorts,
  points: number,
): number {
  const before = prefixes[index];
  const after = suffixes[index + 1];
  if (!before || !after) {
    throw new NetworkError(
      `There is no section ${index} in a chain of ${prefixes.length - 1}.`,
      'Name a section from 0 up.',
    );
  }
  return cascadeInto(out, before, after, ports, points);
}

/** Refuses port counts that have no near and far half here. */
export function cascadePorts(network: Network): CascadePorts {
  if (network.ports === 2 || network.ports === 4) return network.ports;
  throw new NetworkError(
    `A cascade needs 2 or 4 ports, not ${network.ports}.`,
    'Pick the near and far ports first.',
    'ports',
  );
}

function realJoint(network: Network, ports: CascadePorts): Network {
  const reference = network.referenceOhm.slice();
  const half = ports / 2;
  for (let port = half; port < ports; port++) reference[port * 2 + 1] = 0;
  return sameReference(reference, network.referenceOhm) ? network : renormalize(network, reference);
}

/**
 * `b` behind `a`. Where the references at the joint differ or are complex, they are brought to one real value first (A2), so
 * the joint adds no reflection of its own. The result keeps the near references of `a` and the far ones of `b`.
 * @throws NetworkError where grids or port counts differ
 */
export function cascade(a: Network, b: Network): Network {
  checkSameGrid(a, b);
  const ports = cascadePorts(a);
  if (b.ports !== ports) {
    throw new NetworkError(
      `A network of ${ports} ports cannot be followed by one of ${b.ports}.`,
      'Use equal port counts.',
    );
  }
  const left = realJoint(a, ports);
  const wanted = b.referenceOhm.slice();
  wanted.set(left.referenceOhm.subarray(ports), 0);
  const right = sameReference(wanted, b.referenceOhm) ? b : renormalize(b, wanted);
  const points = a.frequenciesHz.length;
  const s = new Float64Array(left.s.length);
  cascadeInto(s, left.s, right.s, ports, points);
  const referenceOhm = b.referenceOhm.slice();
  referenceOhm.set(a.referenceOhm.subarray(0, ports), 0);
  return { ports, frequenciesHz: a.frequenciesHz, s, referenceOhm };
}
