import {
  channelFormat,
  newElement,
  type ChannelFile,
  type Signaling,
  type StackupVersion,
} from '@tollgate/contracts';

/** What a new channel starts from: one line, no limit yet, on the revision's newest stackup where it has one. */
export function startDocument(
  name: string,
  signaling: Signaling,
  newest: StackupVersion | undefined,
): ChannelFile {
  const kind = signaling === 'differential' ? 'coupled-line' : 'line';
  return {
    format: channelFormat,
    name,
    signaling,
    referenceOhm: 50,
    symbolRateBd: 25.78125e9,
    elements: [newElement(kind, signaling)],
    limits: [],
    ...(newest ? { stackup: newest.document, library: { stackupVersion: newest.id } } : {}),
  };
}
