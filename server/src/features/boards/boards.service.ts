import { randomUUID } from 'node:crypto';
import type { Board, BoardOutline, BoardSummary, Link, Revision } from '@tollgate/contracts';
import { crossingSides } from '@tollgate/geometry';
import { actorOf, problems, type Caller } from '../../platform/http';
import type { UnitOfWork, Work } from '../../platform/work';
import type { PeopleService } from '../people';
import type { BoardRow, RevisionRow } from './boards.model';
import {
  presentBoard,
  presentBoardSummary,
  presentLink,
  presentRevision,
  presentRevisionSummary,
} from './boards.presenter';
import type { BoardsRepository } from './boards.repository';
import { nextLetter } from './letters';

/** Copies what hangs on a revision (channels with their checks); given by the channels' own feature. */
export type CopyChannels = (
  work: Work,
  from: RevisionRow,
  to: RevisionRow,
  links: ReadonlyMap<string, string>,
) => Promise<void>;

/** Gives a revision the stackup of the one it comes after; given by the stackups' own feature. */
export type StartStackup = (work: Work, from: RevisionRow, to: RevisionRow) => Promise<void>;

export type BoardsService = ReturnType<typeof createBoardsService>;

interface Needs {
  readonly repository: BoardsRepository;
  readonly people: PeopleService;
  readonly unitOfWork: UnitOfWork;
  readonly copyChannels: CopyChannels;
  readonly startStackup: StartStackup;
}

export function createBoardsService({ repository, people, unitOfWork, copyChannels, startStackup }: Needs) {
  async function summaries(rows: readonly RevisionRow[]) {
    const ids = rows.map((row) => row.id);
    const [tallies, worsts] = await Promise.all([repository.tallies(ids), repository.worst(ids)]);
    return rows.map((row) => presentRevisionSummary(row, tallies, worsts));
  }

  async function readBoard(boardId: string, caller: Caller): Promise<Board> {
    const [board, revisions, members] = await Promise.all([
      repository.board(boardId),
      repository.revisionsOf([boardId]),
      repository.members(boardId),
    ]);
    return presentBoard(board!, await summaries(revisions), members, caller.roles);
  }

  async function readRevision(revisionId: string, caller: Caller): Promise<Revision> {
    const row = (await repository.revision(revisionId))!;
    const [board, links, siblings] = await Promise.all([
      repository.board(row.boardId),
      repository.linksOf(row.id),
      repository.revisionsOf([row.boardId]),
    ]);
    return presentRevision(row, board!, links, siblings, caller.roles);
  }

  async function openBoard(work: Work, boardId: string): Promise<BoardRow> {
    const board = (await repository.board(boardId, work.transaction))!;
    if (board.archived)
      throw problems.conflict(`${board.name} is archived; take it out of the archive first.`);
    return board;
  }

  async function copyInto(work: Work, from: RevisionRow, to: RevisionRow): Promise<void> {
    const twins = new Map<string, string>();
    for (const link of await repository.linksOf(from.id, work.transaction)) {
      const id = randomUUID();
      twins.set(link.id, id);
      await repository.insertLink(work, { ...link, id, revisionId: to.id, createdAt: work.at });
    }
    await copyChannels(work, from, to, twins);
  }

  return {
    readBoard,
    readRevision,

    async list(caller: Caller): Promise<BoardSummary[]> {
      const boards = await repository.boardsOf(caller.id);
      const revisions = await repository.revisionsOf(boards.map((board) => board.id));
      const latest = boards.flatMap((board) =>
        revisions.filter((row) => row.boardId === board.id && !row.archived).slice(-1),
      );
      const told = await summaries(latest);
      return boards.map((board) =>
        presentBoardSummary(
          board,
          told.find((each) => latest.some((row) => row.id === each.id && row.boardId === board.id)) ?? null,
        ),
      );
    },

    /** A board starts with its maker as a member and a revision A. */
    async create(caller: Caller, input: { name: string; description: string }): Promise<Board> {
      const id = randomUUID();
      await unitOfWork(actorOf(caller), async (work) => {
        await repository.insertBoard(work, { id, ...input, archived: false, createdAt: work.at });
        await repository.addMember(work, id, caller.id);
        await repository.insertRevision(work, {
          id: randomUUID(),
          boardId: id,
          letter: 'A',
          releaseOn: null,
          archived: false,
          copiedFrom: null,
          outline: null,
          createdAt: work.at,
        });
        work.event({
          what: 'board.created',
          subject: id,
          boardId: id,
          to: input,
          detail: `Board ${input.name} created`,
        });
        work.change({ what: 'board.created', boardId: id });
      });
      return readBoard(id, caller);
    },

    async change(
      caller: Caller,
      boardId: string,
      change: Partial<Pick<BoardRow, 'name' | 'description' | 'archived'>>,
    ): Promise<Board> {
      await unitOfWork(actorOf(caller), async (work) => {
        const before = (await repository.board(boardId, work.transaction))!;
        await repository.updateBoard(work, boardId, change);
        const { name, description, archived } = before;
        work.event({
          what: 'board.changed',
          subject: boardId,
          boardId,
          from: { name, description, archived },
          to: change,
          detail: `Board ${name} changed`,
        });
        work.change({ what: 'board.changed', boardId });
      });
      return readBoard(boardId, caller);
    },

    async addMember(caller: Caller, boardId: string, personId: string): Promise<Board> {
      const person = await people.byId(personId);
      if (!person?.active) throw problems.notFound('This person');
      await unitOfWork(actorOf(caller), async (work) => {
        await repository.addMember(work, boardId, personId);
        work.event({
          what: 'board.member-added',
          subject: boardId,
          boardId,
          to: personId,
          detail: `${person.name} became a member`,
        });
        work.change({ what: 'board.member-added', boardId });
      });
      return readBoard(boardId, caller);
    },

    async removeMember(caller: Caller, boardId: string, personId: string): Promise<void> {
      await unitOfWork(actorOf(caller), async (work) => {
        const members = await repository.members(boardId);
        const leaving = members.find((member) => member.personId === personId);
        if (!leaving) throw problems.notFound('This member');
        if (members.length === 1)
          throw problems.conflict('A board keeps at least one member; add someone else first.');
        await repository.removeMember(work, boardId, personId);
        work.event({
          what: 'board.member-removed',
          subject: boardId,
          boardId,
          from: personId,
          detail: `${leaving.name} is no longer a member`,
        });
        work.change({ what: 'board.member-removed', boardId });
      });
    },

    async createRevision(
      caller: Caller,
      boardId: string,
      input: { letter?: string; releaseOn?: string; copyFrom?: string },
    ): Promise<Revision> {
      const id = randomUUID();
      await unitOfWork(actorOf(caller), async (work) => {
        await openBoard(work, boardId);
        const siblings = await repository.revisionsOf([boardId], work.transaction);
        const letter = input.letter ?? nextLetter(siblings.map((row) => row.letter));
        if (siblings.some((row) => row.letter === letter)) {
          throw problems.conflict(`Revision ${letter} exists already.`, [
            { path: 'letter', message: `Revision ${letter} exists already.` },
          ]);
        }
        const source = siblings.find((row) => row.id === input.copyFrom);
        const before = source ?? siblings.at(-1);
        if (input.copyFrom && !source)
          throw problems.unprocessable([
            { path: 'copyFrom', message: 'This revision is not of this board.' },
          ]);
        const row = {
          id,
          boardId,
          letter,
          releaseOn: input.releaseOn ?? null,
          archived: false,
          copiedFrom: source?.id ?? null,
          outline: before?.outline ?? null,
          createdAt: work.at,
        };
        await repository.insertRevision(work, row);
        if (before) await startStackup(work, before, row);
        if (source) await copyInto(work, source, row);
        work.event({
          what: 'revision.created',
          subject: id,
          boardId,
          to: { letter, copyFrom: source?.letter ?? null },
          detail: `Revision ${letter} created`,
        });
        work.change({ what: 'revision.created', boardId, revisionId: id });
      });
      return readRevision(id, caller);
    },

    async changeRevision(
      caller: Caller,
      revisionId: string,
      boardId: string,
      { outline, ...rest }: { releaseOn?: string | null; archived?: boolean; outline?: BoardOutline | null },
    ): Promise<Revision> {
      if (outline) refuseCrossing(outline);
      const drawn = outline === undefined ? {} : { outline: outline && JSON.stringify(outline) };
      const change = { ...rest, ...drawn };
      await unitOfWork(actorOf(caller), async (work) => {
        const before = (await repository.revision(revisionId, work.transaction))!;
        await repository.updateRevision(work, revisionId, change);
        const { releaseOn, archived } = before;
        work.event({
          what: 'revision.changed',
          subject: revisionId,
          boardId,
          from: { releaseOn, archived, ...(outline === undefined ? {} : { outline: before.outline }) },
          to: change,
          detail: `Revision ${before.letter} changed`,
        });
        work.change({ what: 'revision.changed', boardId, revisionId });
      });
      return readRevision(revisionId, caller);
    },

    async createLink(caller: Caller, revisionId: string, boardId: string, name: string): Promise<Link> {
      const row = { id: randomUUID(), revisionId, name, archived: false, createdAt: new Date() };
      await unitOfWork(actorOf(caller), async (work) => {
        await repository.insertLink(work, { ...row, createdAt: work.at });
        work.event({
          what: 'link.created',
          subject: row.id,
          boardId,
          to: { name },
          detail: `Link ${name} created`,
        });
        work.change({ what: 'link.created', boardId, revisionId });
      });
      return presentLink(row);
    },

    async changeLink(
      caller: Caller,
      linkId: string,
      boardId: string,
      change: { name?: string; archived?: boolean },
    ): Promise<Link> {
      await unitOfWork(actorOf(caller), async (work) => {
        const before = (await repository.link(linkId, work.transaction))!;
        await repository.updateLink(work, linkId, change);
        work.event({
          what: 'link.changed',
          subject: linkId,
          boardId,
          from: { name: before.name, archived: before.archived },
          to: change,
          detail: `Link ${before.name} changed`,
        });
        work.change({ what: 'link.changed', boardId, revisionId: before.revisionId });
      });
      return presentLink((await repository.link(linkId))!);
    },
  };
}

function refuseCrossing({ cornersM }: BoardOutline): void {
  const sides = crossingSides(cornersM);
  if (!sides) return;
  const [one, other] = sides.map((side) => side + 1);
  throw problems.unprocessable([
    {
      path: 'outline.cornersM',
      message: `The outline crosses itself: the side from corner ${one} meets the side from corner ${other}.`,
    },
  ]);
}
