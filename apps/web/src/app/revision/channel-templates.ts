import { channelFormat, newElement, type ChannelFile, type Signaling } from '@tollgate/contracts';

/** What a new channel starts from: one line, no limit yet. */
export function startDocument(name: string, signaling: Signaling): ChannelFile {
  const kind = signaling === 'differential' ? 'coupled-line' : 'line';
  return {
    format: channelFormat,
    name,
    signaling,
    referenceOhm: 50,
    symbolRateBd: 25.78125e9,
    elements: [newElement(kind, signaling)],
    limits: [],
  };
}
