import { randomUUID } from 'node:crypto';
import type { IncomingMessage } from 'node:http';
import type { Readable } from 'node:stream';
import { bounds, type BoardFile } from '@tollgate/contracts';
import { createTouchstoneReader, TouchstoneError, type TouchstoneFile } from '@tollgate/touchstone';
import { refuseAnnouncedSize, type FileStore, type ReceivedFile } from '../../platform/files';
import { actorOf, problems, type Caller } from '../../platform/http';
import type { UnitOfWork, Work } from '../../platform/work';
import type { FilesRepository, ListedFile } from './files.repository';
import { keepParsed } from './part-store';
import { summarise, type PartSummary } from './part-summary';

/** A part that was read whole and waits in tmp for the unit of work that keeps it. */
export interface ReceivedPart {
  readonly name: string;
  readonly received: ReceivedFile;
  readonly file: TouchstoneFile;
}

export type FilesService = ReturnType<typeof createFilesService>;

interface Needs {
  readonly repository: FilesRepository;
  readonly store: FileStore;
  readonly unitOfWork: UnitOfWork;
}

export function createFilesService({ repository, store, unitOfWork }: Needs) {
  /** Streams a part through the reader into tmp; a part that cannot be read leaves nothing behind. */
  async function receivePart(name: string, body: Readable, field: string): Promise<ReceivedPart> {
    const reader = createTouchstoneReader(name);
    let received: ReceivedFile | undefined;
    try {
      received = await store.receive(body, bounds.uploadBytes, (chunk) => reader.push(chunk));
      return { name, received, file: reader.finish() };
    } catch (error) {
      await received?.discard();
      throw error instanceof TouchstoneError ? unreadable(error, field) : error;
    }
  }

  /** Makes a received part the board's own inside a unit of work; the same bytes under the same name stay one file. */
  async function keepPart(work: Work, boardId: string, part: ReceivedPart): Promise<string> {
    const { sha256, sizeBytes } = part.received;
    const twin = await repository.twin(work, boardId, sha256, part.name);
    if (twin) {
      await part.received.discard();
      return twin.id;
    }
    await part.received.keep();
    await keepParsed(store, sha256, part.file);
    const id = randomUUID();
    await repository.insert(
      work,
      { sha256, sizeBytes, mediaType: 'text/plain', state: 'kept', createdAt: work.at },
      {
        id,
        boardId,
        sha256,
        name: part.name,
        summary: JSON.stringify(summarise(part.file)),
        addedBy: work.actor.personId,
        addedAt: work.at,
      },
    );
    work.event({
      what: 'file.added',
      subject: id,
      boardId,
      to: { name: part.name, sha256 },
      detail: `${part.name} added`,
    });
    work.change({ what: 'file.added', boardId });
    return id;
  }

  async function one(boardId: string, id: string): Promise<ListedFile> {
    const file = await repository.one(boardId, id);
    if (!file) throw problems.notFound('This file');
    return file;
  }

  return {
    receivePart,
    keepPart,
    one,
    some: (boardId: string, ids: readonly string[]) => repository.some(boardId, ids),
    list: async (boardId: string) => (await repository.ofBoard(boardId)).map(presentFile),

    async upload(
      caller: Caller,
      boardId: string,
      name: string,
      request: IncomingMessage,
    ): Promise<BoardFile> {
      checkName(name);
      refuseAnnouncedSize(request.headers, bounds.uploadBytes);
      const part = await receivePart(name, request, 'file');
      const id = await unitOfWork(actorOf(caller), (work) => keepPart(work, boardId, part)).catch(
        async (error: unknown) => {
          await part.received.discard();
          throw error;
        },
      );
      return presentFile(await one(boardId, id));
    },

    content: (file: ListedFile): Readable => store.read(file.sha256),
  };
}

/** A name is shown and offered for saving, never used as a path. */
export function checkName(name: string): void {
  if (!/^[^/\\\u0000-\u001f]+\.(s\d{1,3}p|ts)$/i.test(name)) {
    throw problems.unprocessable([
      {
        path: 'name',
        message: `"${name}" is not the name of a Touchstone file.`,
        mend: 'Upload a file that ends in .s1p to .s64p, or in .ts.',
      },
    ]);
  }
}

function unreadable(error: TouchstoneError, field: string) {
  const where = error.line > 0 ? `Line ${error.line}: ` : '';
  return problems.unprocessable(
    [{ path: field, message: `${where}${error.reason}`, mend: error.mend }],
    error.message,
  );
}

export function presentFile(row: ListedFile): BoardFile {
  const summary = JSON.parse(row.summary) as PartSummary;
  return {
    id: row.id,
    name: row.name,
    sha256: row.sha256,
    sizeBytes: row.sizeBytes,
    ...summary,
    addedAt: row.addedAt.toISOString(),
    addedBy: row.addedByName ?? 'Tollgate',
  };
}
