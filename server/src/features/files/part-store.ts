import { readFile } from 'node:fs/promises';
import { deserialize, serialize } from 'node:v8';
import { readTouchstone, type TouchstoneFile } from '@tollgate/touchstone';
import type { FileStore } from '../../platform/files';

/** Raised when the parsed form changes; an older one is made anew from the file itself. */
const parsedForm = 1;
const suffix = `.part${parsedForm}`;

/** The parsed form of a Touchstone file, in binary beside the file, so that no check parses text. */
export async function keepParsed(store: FileStore, sha256: string, file: TouchstoneFile): Promise<void> {
  await store.writeBeside(sha256, suffix, serialize(file));
}

/** Reads the parsed form; where it is missing it is made from the file. */
export async function readParsed(store: FileStore, sha256: string, name: string): Promise<TouchstoneFile> {
  try {
    return deserialize(await readFile(store.pathOf(sha256, suffix))) as TouchstoneFile;
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== 'ENOENT') throw error;
  }
  const file = readTouchstone(name, await readFile(store.pathOf(sha256)));
  await keepParsed(store, sha256, file);
  return file;
}
