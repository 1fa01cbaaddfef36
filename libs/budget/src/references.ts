import type { ChannelFile } from '@tollgate/contracts';
import { uniformReference } from '@tollgate/network';

/** Elements are joined at this where the channel has no real reference of its own, ohm. */
const usualOhm = 50;

export function portsOf(channel: Pick<ChannelFile, 'signaling'>): 2 | 4 {
  return channel.signaling === 'differential' ? 4 : 2;
}

/** The channel's references as pairs (real, imaginary), one a port. */
export function referencesOf(channel: Pick<ChannelFile, 'signaling' | 'referenceOhm'>): Float64Array {
  const { referenceOhm } = channel;
  if (typeof referenceOhm === 'number') return uniformReference(portsOf(channel), referenceOhm);
  return Float64Array.from(referenceOhm.flatMap((port) => (typeof port === 'number' ? [port, 0] : port)));
}

/** The one real reference at which all elements are built and joined: the channel's first real one. */
export function jointOhmOf(reference: Float64Array): number {
  for (let k = 0; k < reference.length; k += 2) if (reference[k + 1] === 0) return reference[k]!;
  return usualOhm;
}
