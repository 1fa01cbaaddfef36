import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { basename, join, resolve } from 'node:path';
import { checkChannel, partsNeeded, readChannel, type Check, type Part } from '@tollgate/budget';
import { readTouchstone } from '@tollgate/touchstone';

const root = resolve(__dirname, '../../..');
/** Reference data that may lie beside the repository. */
export const sharedReference = process.env['TOLLGATE_REFERENCE'] ?? resolve(root, '../shared/reference');
export const ownReference = join(root, 'libs/budget/reference');

export type Pairs = [number, number][][][];

export interface ReferenceCase {
  readonly channel: unknown;
  readonly expected: {
    readonly s?: Pairs;
    readonly mixedMode?: Pairs;
    readonly tollDb?: [number, number][];
    readonly limits?: {
      readonly id: string;
      readonly holds: boolean;
      readonly worst: { readonly frequencyHz: number; readonly marginDb: number };
      readonly exceedsHz: [number, number][];
      readonly worstBetweenSamples?: { readonly frequencyHz: number; readonly marginDb: number };
    }[];
  };
  readonly toleranceAbs?: number | null;
  readonly toleranceDb?: number;
}

/** Names of the channel cases in a folder; none where there is no folder. */
export function casesIn(folder: string): string[] {
  if (!existsSync(folder)) return [];
  return readdirSync(folder).filter((name) => /^[a-z0-9-]+\.json$/.test(name) && !name.startsWith('q'));
}

export function readCase(folder: string, name: string): ReferenceCase {
  return JSON.parse(readFileSync(join(folder, name), 'utf8')) as ReferenceCase;
}

export function readPart(path: string): Part {
  const bytes = readFileSync(path);
  const sha256 = createHash('sha256').update(bytes).digest('hex');
  return { sha256, file: readTouchstone(basename(path), bytes) };
}

/** Reads and checks a channel whose parts lie in one of these folders; fails with what was refused. */
export function checkDocument(document: unknown, folders: readonly string[] = []): Check {
  const read = readChannel(document);
  if (!read.ok) throw new Error(JSON.stringify(read.problems));
  const parts = new Map<string, Part>();
  for (const { key } of partsNeeded(read.channel)) {
    const path = folders.map((folder) => join(folder, key)).find((file) => existsSync(file));
    if (!path) throw new Error(`There is no ${key}.`);
    parts.set(key, readPart(path));
  }
  const result = checkChannel(read.channel, parts);
  if (!result.ok) throw new Error(JSON.stringify(result.problems));
  return result.check;
}
