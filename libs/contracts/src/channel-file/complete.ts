import type { ChannelElement, ChannelFile } from './channel-file';
import { kindDescription } from './kinds';
import type { Limit } from './limits';

/** A channel file in which every element and limit has its id. */
export type CompleteChannel = Omit<ChannelFile, 'elements' | 'limits'> & {
  elements: (ChannelElement & { id: string })[];
  limits: (Limit & { id: string })[];
};

/**
 * Gives each element and limit without an id the next free one of its kind (T1, V1, limit-1), in document order,
 * so that the same file always gets the same ids.
 */
export function withIds(file: ChannelFile): CompleteChannel {
  const elementIds = new Set(file.elements.flatMap((element) => element.id ?? []));
  const limitIds = new Set(file.limits.flatMap((limit) => limit.id ?? []));
  return {
    ...file,
    elements: file.elements.map((element) => ({
      ...element,
      id: element.id ?? freeId(kindDescription(element.kind).prefix, elementIds),
    })),
    limits: file.limits.map((limit) => ({ ...limit, id: limit.id ?? freeId('limit-', limitIds) })),
  };
}

/** The first `prefix` + number that is not taken; it is taken from then on. */
export function freeId(prefix: string, taken: Set<string>): string {
  let number = 1;
  while (taken.has(`${prefix}${number}`)) number += 1;
  const id = `${prefix}${number}`;
  taken.add(id);
  return id;
}

/** Nyquist frequency: half the symbol rate, whatever the modulation. */
export function nyquistHz(file: Pick<ChannelFile, 'symbolRateBd'>): number | undefined {
  return file.symbolRateBd === undefined ? undefined : file.symbolRateBd / 2;
}

/** Where the ledger is read: as given, else Nyquist, else the highest single-frequency limit. */
export function evaluationHz(
  file: Pick<ChannelFile, 'symbolRateBd' | 'evaluationHz' | 'limits'>,
): number | undefined {
  const single = file.limits.flatMap((limit) => limit.atHz ?? []);
  return file.evaluationHz ?? nyquistHz(file) ?? (single.length ? Math.max(...single) : undefined);
}
