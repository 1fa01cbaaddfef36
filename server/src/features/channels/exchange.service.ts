import type { Readable } from 'node:stream';
import type { Request } from 'express';
import { bounds, parseChannelText, type CompleteChannel } from '@tollgate/contracts';
import { readAll, refuseAnnouncedSize, type FileStore } from '../../platform/files';
import { problems, type Caller } from '../../platform/http';
import type { Work } from '../../platform/work';
import { checkName, type FilesService, type ReceivedPart } from '../files';
import { readArchive, renameParts, writeArchive } from './archive';
import type { ChannelsRepository } from './channels.repository';
import { within, type ChannelsService } from './channels.service';

export interface Export {
  readonly fileName: string;
  readonly type: string;
  readonly body: Readable | string;
}

export type ExchangeService = ReturnType<typeof createExchangeService>;

interface Needs {
  readonly channels: ChannelsService;
  readonly repository: ChannelsRepository;
  readonly files: FilesService;
  readonly store: FileStore;
}

/** Channel files in and out: alone as JSON, or with their parts as a zip. */
export function createExchangeService({ channels, repository, files, store }: Needs) {
  function read(text: string): CompleteChannel {
    const parsed = parseChannelText(text);
    if (!parsed.ok) throw problems.unprocessable(within('document', parsed.problems));
    return parsed.channel;
  }

  async function importText(
    caller: Caller,
    boardId: string,
    revisionId: string,
    request: Request,
  ): Promise<string> {
    refuseAnnouncedSize(request.headers, bounds.documentBytes);
    const channel = read((await readAll(request, bounds.documentBytes)).toString('utf8'));
    refuseMissing(channel, new Map());
    return channels.create(caller, boardId, revisionId, channel, null);
  }

  async function importArchive(
    caller: Caller,
    boardId: string,
    revisionId: string,
    request: Request,
  ): Promise<string> {
    refuseAnnouncedSize(request.headers, bounds.uploadBytes);
    const archive = await store.receive(request, bounds.uploadBytes);
    const parts = new Map<string, ReceivedPart>();
    try {
      const { text } = await readArchive(archive.path, async (name, body) => {
        const plain = name.slice(name.lastIndexOf('/') + 1);
        checkName(plain);
        parts.set(name, await files.receivePart(plain, body, `archive.${name}`));
      });
      const channel = read(text);
      refuseMissing(channel, parts);
      return await channels.create(caller, boardId, revisionId, channel, null, (work, read) =>
        place(work, boardId, read, parts),
      );
    } catch (error) {
      await Promise.all([...parts.values()].map((part) => part.received.discard()));
      throw error;
    } finally {
      await archive.discard();
    }
  }

  async function place(
    work: Work,
    boardId: string,
    channel: CompleteChannel,
    parts: ReadonlyMap<string, ReceivedPart>,
  ): Promise<CompleteChannel> {
    const ids = new Map<string, string>();
    for (const [name, part] of parts) ids.set(name, await files.keepPart(work, boardId, part));
    return renameParts(channel, (element) =>
      'file' in element && element.file ? { fileId: ids.get(folded(element.file)) } : undefined,
    );
  }

  return {
    /** All or nothing: a part that cannot be read leaves neither files nor a channel. */
    async import(caller: Caller, boardId: string, revisionId: string, request: Request): Promise<string> {
      const zipped = (request.headers['content-type'] ?? '').startsWith('application/zip');
      const id = await (zipped ? importArchive : importText)(caller, boardId, revisionId, request);
      await channels.recheck(id);
      return id;
    },

    async export(channelId: string): Promise<Export> {
      const row = (await repository.one(channelId))!;
      const channel = JSON.parse(row.document) as CompleteChannel;
      const ids = [
        ...new Set(
          channel.elements.flatMap((element) =>
            'fileId' in element && element.fileId ? [element.fileId] : [],
          ),
        ),
      ];
      const found = await files.some(row.boardId, ids);
      const base = row.name.replace(/[^\p{L}\p{N}._-]+/gu, '-').replace(/^-+|-+$/g, '') || 'channel';
      if (found.length === 0)
        return {
          fileName: `${base}.json`,
          type: 'application/json',
          body: `${JSON.stringify(channel, null, 2)}\n`,
        };
      const names = distinctNames(found);
      const document = renameParts(channel, (element) => {
        const name = 'fileId' in element && element.fileId ? names.get(element.fileId) : undefined;
        return name === undefined ? undefined : { file: `parts/${name}` };
      });
      const parts = found.map((file) => ({ name: names.get(file.id)!, body: files.content(file) }));
      return { fileName: `${base}.zip`, type: 'application/zip', body: writeArchive(document, parts) };
    },
  };
}

function folded(path: string): string {
  return path.replace(/^\.\//, '');
}

/** A part the document names must come along; a lone channel file brings none. */
function refuseMissing(channel: CompleteChannel, parts: ReadonlyMap<string, ReceivedPart>): void {
  const missing = channel.elements.flatMap((element, i) =>
    'file' in element && element.file && !parts.has(folded(element.file))
      ? [
          {
            path: `document.elements[${i}].file`,
            message: `"${element.file}" did not come along.`,
            mend: 'Import a zip with channel.json and the part in parts/, and name it parts/… in the channel file.',
          },
        ]
      : [],
  );
  if (missing.length) throw problems.unprocessable(missing);
}

/** Two files of one name get a number, so that neither overwrites the other. */
function distinctNames(found: readonly { id: string; name: string }[]): Map<string, string> {
  const taken = new Set<string>();
  return new Map(
    found.map(({ id, name }) => {
      const at = name.lastIndexOf('.');
      let chosen = name;
      for (let n = 2; taken.has(chosen); n++) chosen = `${name.slice(0, at)}-${n}${name.slice(at)}`;
      taken.add(chosen);
      return [id, chosen];
    }),
  );
}
