import canonicalize from 'canonicalize';
import type { CompleteChannel } from '@tollgate/contracts';
import { elementFiles } from '@tollgate/elements';
import { engineVersion } from './version';

/** Browsers and Node both have it, but the language's own library does not declare it. */
declare const TextEncoder: new () => { encode(text: string): Uint8Array };

/**
 * The bytes whose SHA-256 is a check's fingerprint: RFC 8785 JSON of the engine's version and the channel after defaults
 * and units, without what cannot change a result (name, labels, notes, places on the plan, library references); a part
 * stands there by the SHA-256 of its bytes, so command line and server come to the same.
 * @throws Error where a part is missing
 */
export function canonicalBytes(
  channel: CompleteChannel,
  parts: ReadonlyMap<string, { readonly sha256: string }>,
): Uint8Array {
  const text = canonicalize({ engine: engineVersion, channel: bareChannel(channel, parts) });
  return new TextEncoder().encode(text ?? '');
}

function bareChannel(
  channel: CompleteChannel,
  parts: ReadonlyMap<string, { readonly sha256: string }>,
): Record<string, unknown> {
  const bare = without(channel, ['name', 'notes', 'library']);
  bare['elements'] = channel.elements.map((element) => {
    const kept = without(element, ['label', 'notes', 'plan', 'file', 'fileId']);
    const shas = elementFiles(element).map(({ key }) => {
      const part = parts.get(key);
      if (!part) throw new Error(`The part ${key} of element ${element.id} is not at hand.`);
      return part.sha256;
    });
    return shas.length ? { ...kept, part: shas } : kept;
  });
  bare['limits'] = channel.limits.map((limit) => without(limit, ['notes']));
  return bare;
}

function without(from: object, names: readonly string[]): Record<string, unknown> {
  return Object.fromEntries(Object.entries(from).filter(([name]) => !names.includes(name)));
}
