import { createHash, randomUUID } from 'node:crypto';
import canonicalize from 'canonicalize';
import {
  parseStackup,
  stackupProblems,
  type CompleteStackup,
  type FieldProblem,
  type StackupKind,
  type StackupSource,
  type StackupVersion,
  type StackupVersions,
} from '@tollgate/contracts';
import { actorOf, problems, type Caller } from '../../platform/http';
import type { UnitOfWork, Work } from '../../platform/work';
import type { BoardsRepository, RevisionRow } from '../boards';
import { documentOf, presentSource, presentVersion, presentVersions } from './stackups.presenter';
import type { StackupsRepository } from './stackups.repository';

export interface NewVersion {
  readonly document: CompleteStackup;
  readonly kind: StackupKind;
  readonly why: string;
}

export type StackupsService = ReturnType<typeof createStackupsService>;

interface Needs {
  readonly repository: StackupsRepository;
  readonly boards: BoardsRepository;
  readonly unitOfWork: UnitOfWork;
}

export function createStackupsService({ repository, boards, unitOfWork }: Needs) {
  /** Refuses what is archived. */
  async function openRevision(revisionId: string): Promise<RevisionRow> {
    const revision = (await boards.revision(revisionId))!;
    const board = (await boards.board(revision.boardId))!;
    if (revision.archived || board.archived) {
      const name = revision.archived ? `Revision ${revision.letter}` : board.name;
      throw problems.conflict(`${name} is archived; take it out of the archive first.`);
    }
    return revision;
  }

  async function insert(work: Work, revision: RevisionRow, number: number, made: NewVersion) {
    const id = randomUUID();
    await repository.insert(work, {
      id,
      revisionId: revision.id,
      number,
      kind: made.kind,
      why: made.why,
      document: JSON.stringify(made.document),
      sha256: hashOf(made.document),
      createdAt: work.at,
      createdBy: work.actor.personId,
    });
    work.event({
      what: 'stackup.version-created',
      subject: id,
      boardId: revision.boardId,
      from: number - 1,
      to: { number, kind: made.kind, why: made.why, sha256: hashOf(made.document) },
      detail: `Stackup of revision ${revision.letter}, version ${number}: ${made.why}`.slice(0, 400),
    });
    work.change({ what: 'stackup.version-created', boardId: revision.boardId, revisionId: revision.id });
    return id;
  }

  /** The next version over the one the caller saw; the checks of the revision's drafts are of an earlier stackup then. */
  async function add(
    caller: Caller,
    revisionId: string,
    seen: number,
    made: NewVersion,
  ): Promise<StackupVersion> {
    const revision = await openRevision(revisionId);
    const id = await unitOfWork(actorOf(caller), async (work) => {
      await repository.hold(work, revisionId);
      const newest = await repository.newest(revisionId, work.transaction);
      if ((newest?.number ?? 0) !== seen) return undefined;
      const added = await insert(work, revision, seen + 1, made);
      await repository.outdateDrafts(work, revisionId);
      for (const { channelId } of await repository.drafts(revisionId, work.transaction))
        work.job({ kind: 'recheck', payload: { channelId }, dedupeKey: `recheck:${channelId}:s${seen + 1}` });
      return added;
    });
    if (id === undefined) {
      const newest = await repository.newest(revisionId);
      throw problems.changedMeanwhile(newest ? presentVersion(newest) : null);
    }
    return presentVersion((await repository.one(id))!);
  }

  return {
    async list(caller: Caller, revisionId: string): Promise<StackupVersions> {
      const revision = (await boards.revision(revisionId))!;
      const [board, rows, drafts] = await Promise.all([
        boards.board(revision.boardId),
        repository.ofRevision(revisionId),
        repository.drafts(revisionId),
      ]);
      return presentVersions(rows, drafts, !revision.archived && !board!.archived, caller.roles);
    },

    read: async (stackupId: string): Promise<StackupVersion> =>
      presentVersion((await repository.one(stackupId))!),

    sources: async (caller: Caller): Promise<StackupSource[]> =>
      (await repository.newestOfPerson(caller.id)).map(presentSource),

    create(
      caller: Caller,
      revisionId: string,
      seen: number,
      input: { document?: unknown; kind: StackupKind; why: string },
    ): Promise<StackupVersion> {
      return add(caller, revisionId, seen, { ...input, document: readBoard(input.document) });
    },

    /** The next version as a copy of one from any revision the caller may read. */
    async copy(
      caller: Caller,
      revisionId: string,
      seen: number,
      input: { fromVersionId: string; kind?: StackupKind; why?: string },
    ): Promise<StackupVersion> {
      const from = await repository.one(input.fromVersionId);
      if (!from || !(await boards.isMember(caller.id, from.boardId))) {
        const message = 'This stackup does not exist, or is not yours to see.';
        throw problems.unprocessable([{ path: 'fromVersionId', message }]);
      }
      return add(caller, revisionId, seen, {
        document: documentOf(from),
        kind: input.kind ?? 'design',
        why:
          input.why ??
          `Copied from ${from.boardName}, revision ${from.revisionLetter}, version ${from.number}.`,
      });
    },

    /** A new revision starts with the stackup of the one it comes after. */
    async start(work: Work, from: RevisionRow, to: RevisionRow): Promise<void> {
      const newest = await repository.newest(from.id, work.transaction);
      if (!newest) return;
      const why = `Copied from revision ${from.letter}, version ${newest.number}.`;
      await insert(work, to, 1, { document: documentOf(newest), kind: newest.kind, why });
    },
  };
}

function hashOf(document: CompleteStackup): string {
  return createHash('sha256')
    .update(canonicalize(document) ?? '')
    .digest('hex');
}

/** A document that traces can run on. @throws HttpProblem 422 with paths below `document` */
function readBoard(document: unknown): CompleteStackup {
  const parsed = parseStackup(document);
  if (!parsed.ok) throw problems.unprocessable(below('document', parsed.problems));
  const found = stackupProblems(parsed.stackup);
  if (found.length) throw problems.unprocessable(below('document', found));
  return parsed.stackup;
}

export function below(prefix: string, fields: readonly FieldProblem[]): FieldProblem[] {
  return fields.map((field) => ({ ...field, path: field.path ? `${prefix}.${field.path}` : prefix }));
}
