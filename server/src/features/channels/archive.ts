import { basename } from 'node:path';
import type { Readable } from 'node:stream';
import { promisify } from 'node:util';
import { bounds, type ChannelElement, type CompleteChannel } from '@tollgate/contracts';
import { open as openZip, type Entry, type ZipFile } from 'yauzl';
import { ZipFile as ZipWriter } from 'yazl';
import { readAll } from '../../platform/files';
import { problems } from '../../platform/http';

const documentName = 'channel.json';
const partsFolder = 'parts/';
const mostEntries = 200;

export interface ReadArchive {
  readonly text: string;
}

const opened = promisify<
  string,
  { lazyEntries: boolean; autoClose: boolean; validateEntrySizes: boolean },
  ZipFile
>(openZip);

/**
 * Reads a channel archive: channel.json, and what lies in parts/. Each part is handed on as a stream of known size; names that
 * leave the folder, too many or too large entries are refused before anything of them is read.
 */
export async function readArchive(
  path: string,
  onPart: (name: string, body: Readable) => Promise<void>,
): Promise<ReadArchive> {
  const zip = await opened(path, { lazyEntries: true, autoClose: false, validateEntrySizes: true }).catch(
    (error: Error) => {
      throw refusal(`The archive cannot be read: ${error.message}.`);
    },
  );
  try {
    return await readEntries(zip, onPart);
  } finally {
    zip.close();
  }
}

async function readEntries(
  zip: ZipFile,
  onPart: (name: string, body: Readable) => Promise<void>,
): Promise<ReadArchive> {
  if (zip.entryCount > mostEntries)
    throw refusal(`The archive has ${zip.entryCount} entries; at most ${mostEntries} are read.`);
  let text: string | undefined;
  let total = 0;
  for await (const entry of entriesOf(zip)) {
    total += entry.uncompressedSize;
    if (total > bounds.uploadBytes) throw problems.tooLarge('The archive unpacks to more than 64 MB.');
    if (entry.fileName.endsWith('/')) continue;
    const body = await streamOf(zip, entry);
    if (entry.fileName === documentName) text = (await readAll(body, bounds.documentBytes)).toString('utf8');
    else if (isPart(entry.fileName)) await onPart(entry.fileName, body);
    else
      throw refusal(
        `"${entry.fileName.slice(0, 80)}" does not belong in a channel archive: it holds ${documentName} and ${partsFolder}.`,
      );
  }
  if (text === undefined) throw refusal(`The archive has no ${documentName}.`);
  return { text };
}

async function* entriesOf(zip: ZipFile): AsyncGenerator<Entry> {
  for (let i = 0; i < zip.entryCount; i++) {
    yield await new Promise<Entry>((resolve, reject) => {
      zip.once('entry', resolve);
      zip.once('error', (error: Error) => reject(refusal(`The archive cannot be read: ${error.message}.`)));
      zip.readEntry();
    });
    zip.removeAllListeners('entry');
    zip.removeAllListeners('error');
  }
}

function streamOf(zip: ZipFile, entry: Entry): Promise<Readable> {
  return new Promise((resolve, reject) => {
    zip.openReadStream(entry, (error, stream) =>
      error ? reject(refusal(`"${entry.fileName}" cannot be read: ${error.message}.`)) : resolve(stream),
    );
  });
}

/** Directly in parts/, a plain name. */
function isPart(name: string): boolean {
  return (
    name.startsWith(partsFolder) && basename(name) === name.slice(partsFolder.length) && !name.includes('\\')
  );
}

function refusal(message: string) {
  return problems.unprocessable([{ path: 'archive', message }], message);
}

/** A channel and its parts as one zip, streamed. */
export function writeArchive(
  document: unknown,
  parts: readonly { name: string; body: Readable }[],
): Readable {
  const zip = new ZipWriter();
  zip.addBuffer(Buffer.from(`${JSON.stringify(document, null, 2)}\n`, 'utf8'), documentName);
  for (const part of parts) zip.addReadStream(part.body, `${partsFolder}${part.name}`);
  zip.end();
  return zip.outputStream as Readable;
}

/** Replaces the name of each part: `file` by `fileId` on the way in, the other way round on the way out. */
export function renameParts(
  channel: CompleteChannel,
  rename: (element: ChannelElement, index: number) => { file?: string; fileId?: string } | undefined,
): CompleteChannel {
  const elements = channel.elements.map((element, index) => {
    if (element.kind !== 'touchstone' && element.kind !== 'connector') return element;
    const named = rename(element, index);
    if (!named) return element;
    const { file: _file, fileId: _fileId, ...rest } = element;
    return { ...rest, ...named };
  });
  return { ...channel, elements: elements };
}
