import { createHash, randomUUID, type Hash } from 'node:crypto';
import { createReadStream, type ReadStream } from 'node:fs';
import { mkdir, open, readdir, rename, rm, stat, type FileHandle } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { once } from 'node:events';
import { finished } from 'node:stream/promises';
import type { Readable } from 'node:stream';
import { problems } from '../http/problem';

/** A body received whole into tmp and not yet kept. One of `keep` and `discard` must follow. */
export interface ReceivedFile {
  readonly sha256: string;
  readonly sizeBytes: number;
  /** Where it waits. */
  readonly path: string;
  /** Moves it to its place by content; done inside the unit of work that writes its row. */
  keep(): Promise<void>;
  discard(): Promise<void>;
}

/** Files by SHA-256 below the data directory: `files/ab/cdef...`, with derived forms beside them by suffix. */
export class FileStore {
  constructor(private readonly directory: string) {}

  async prepare(): Promise<void> {
    await mkdir(join(this.directory, 'tmp'), { recursive: true, mode: 0o700 });
    await mkdir(join(this.directory, 'files'), { recursive: true, mode: 0o700 });
  }

  pathOf(sha256: string, suffix = ''): string {
    return join(this.directory, 'files', sha256.slice(0, 2), `${sha256.slice(2)}${suffix}`);
  }

  read(sha256: string): ReadStream {
    return createReadStream(this.pathOf(sha256));
  }

  /**
   * Streams a body through limit, hash and reader into tmp; a refusal, an error of the reader or an abort removes it
   * at once.
   */
  async receive(
    body: Readable,
    limitBytes: number,
    onChunk?: (chunk: Buffer) => void,
  ): Promise<ReceivedFile> {
    const path = join(this.directory, 'tmp', randomUUID());
    const handle = await open(path, 'wx', 0o600);
    const hash = createHash('sha256');
    try {
      const sizeBytes = await pour(body, handle, hash, limitBytes, onChunk);
      await handle.sync();
      await handle.close();
      return this.received(path, hash.digest('hex'), sizeBytes);
    } catch (error) {
      await handle.close().catch(() => undefined);
      await rm(path, { force: true });
      throw error;
    }
  }

  /** Writes a derived form (parsed data) so that a reader never sees half of it. */
  async writeBeside(sha256: string, suffix: string, bytes: Uint8Array): Promise<void> {
    const path = join(this.directory, 'tmp', randomUUID());
    const handle = await open(path, 'wx', 0o600);
    await handle.writeFile(bytes);
    await handle.sync();
    await handle.close();
    await this.moveInto(path, this.pathOf(sha256, suffix));
  }

  /** Removes what was received and neither kept nor discarded before `before`. */
  async sweep(before: Date): Promise<number> {
    const folder = join(this.directory, 'tmp');
    let removed = 0;
    for (const name of await readdir(folder)) {
      const path = join(folder, name);
      const facts = await stat(path).catch(() => undefined);
      if (!facts || facts.mtime >= before) continue;
      await rm(path, { force: true });
      removed += 1;
    }
    return removed;
  }

  private received(path: string, sha256: string, sizeBytes: number): ReceivedFile {
    let kept: Promise<void> | undefined;
    return {
      sha256,
      sizeBytes,
      path,
      // A unit of work may be tried again after a deadlock: the file moves once.
      keep: () => (kept ??= this.moveInto(path, this.pathOf(sha256))),
      discard: () => rm(path, { force: true }),
    };
  }

  private async moveInto(from: string, to: string): Promise<void> {
    await mkdir(dirname(to), { recursive: true, mode: 0o700 });
    await rename(from, to);
    // The rename is durable once its folder is.
    const folder = await open(dirname(to), 'r');
    await folder.sync();
    await folder.close();
  }
}

async function pour(
  body: Readable,
  handle: FileHandle,
  hash: Hash,
  limitBytes: number,
  onChunk?: (chunk: Buffer) => void,
): Promise<number> {
  let size = 0;
  const ended = finished(body, { writable: false });
  // `finished` reports an abort that the loop below may miss; its rejection is taken up at the end.
  ended.catch(() => undefined);
  for await (const chunk of body as AsyncIterable<Buffer>) {
    size += chunk.length;
    if (size > limitBytes) throw problems.tooLarge(`The content is larger than ${megabytes(limitBytes)}.`);
    hash.update(chunk);
    onChunk?.(chunk);
    await handle.write(chunk);
  }
  await ended;
  return size;
}

/** Refuses by the announced size, before anything is read. */
export function refuseAnnouncedSize(headers: { 'content-length'?: string }, limitBytes: number): void {
  const announced = Number(headers['content-length'] ?? 0);
  if (announced > limitBytes) throw problems.tooLarge(`The content is larger than ${megabytes(limitBytes)}.`);
}

function megabytes(bytes: number): string {
  return `${Math.round(bytes / 1024 / 1024)} MB`;
}

/** Reads a small body whole. */
export async function readAll(body: Readable, limitBytes: number): Promise<Buffer> {
  const chunks: Buffer[] = [];
  let size = 0;
  body.on('data', (chunk: Buffer) => {
    size += chunk.length;
    if (size > limitBytes)
      body.destroy(problems.tooLarge(`The content is larger than ${megabytes(limitBytes)}.`));
    else chunks.push(chunk);
  });
  await once(body, 'end');
  return Buffer.concat(chunks);
}
