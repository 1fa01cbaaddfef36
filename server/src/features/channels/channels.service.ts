import { randomUUID } from 'node:crypto';
import type { Transaction } from 'sequelize';
import { partsNeeded, readChannel } from '@tollgate/budget';
import {
  parseChannelFile,
  type Channel,
  type ChannelSummary,
  type CompleteChannel,
  type FieldProblem,
} from '@tollgate/contracts';
import type { Config } from '../../platform/config/config';
import { actorOf, problems, type Caller } from '../../platform/http';
import { theProduct, type UnitOfWork, type Work } from '../../platform/work';
import type { RevisionRow } from '../boards';
import {
  Uncheckable,
  type CheckOutcome,
  type CheckPool,
  type ChecksRepository,
  type CheckTask,
} from '../checks';
import type { ChannelRow, UseRow } from './channels.model';
import { presentChannel, presentChannelSummary } from './channels.presenter';
import type { ChannelsRepository, PlacedChannel } from './channels.repository';
import type { DraftEvents } from './draft-events';
import type { ResolveChannel } from './resolve-channel';

/** What a document came to: a check, or why there is none. */
interface Examined {
  readonly outcome: CheckOutcome | undefined;
  readonly problems: readonly FieldProblem[];
  readonly uses: readonly Omit<UseRow, 'channelId'>[];
}

/** Gives a document its stored form inside the unit of work that stores it. */
export type Place = (work: Work, channel: CompleteChannel) => Promise<CompleteChannel>;

/** Which stackup version a draft follows, as far as it is known here, and whether a newer one stands; given by the stackups' own feature. */
export type FollowStackup = (
  revisionId: string,
  channel: CompleteChannel,
  transaction: Transaction,
) => Promise<{ readonly versionId: string | undefined; readonly behind: boolean }>;

export type ChannelsService = ReturnType<typeof createChannelsService>;

interface Needs {
  readonly config: Config;
  readonly repository: ChannelsRepository;
  readonly checks: ChecksRepository;
  readonly pool: CheckPool;
  readonly resolve: ResolveChannel;
  readonly follow: FollowStackup;
  readonly drafts: DraftEvents;
  readonly unitOfWork: UnitOfWork;
}

export function createChannelsService(needs: Needs) {
  const { config, repository, checks, pool, resolve, follow, drafts, unitOfWork } = needs;

  /** Reads, resolves and runs; what stands in the way of a check is returned, not thrown. */
  async function examine(
    boardId: string,
    document: unknown,
    person: string,
    key: string | undefined,
    form: CheckTask['form'] = 'view',
  ): Promise<Examined> {
    const read = readChannel(document, { parts: 'fileId' });
    if (!read.ok) return { outcome: undefined, problems: read.problems, uses: [] };
    const draft = await resolve(boardId, read.channel, partsNeeded(read.channel));
    if (draft.problems.length) return { outcome: undefined, problems: draft.problems, uses: draft.uses };
    try {
      const task = { channel: draft.channel, parts: draft.parts, dataDirectory: config.dataDirectory, form };
      return { outcome: await pool.run(person, key, task), problems: [], uses: draft.uses };
    } catch (error) {
      if (error instanceof Uncheckable)
        return { outcome: undefined, problems: error.problems, uses: draft.uses };
      throw error;
    }
  }

  /** The columns a check sets, and its row. */
  async function record(
    work: Work,
    { id, revisionId }: Pick<ChannelRow, 'id' | 'revisionId'>,
    channel: CompleteChannel,
    examined: Examined,
  ): Promise<Partial<ChannelRow>> {
    const { outcome } = examined;
    if (outcome) await checks.keep(work, outcome);
    const { versionId, behind } = await follow(revisionId, channel, work.transaction);
    const stackup = versionId ? [{ kind: 'stackup-version' as const, usedId: versionId }] : [];
    await repository.setUses(work, id, [...examined.uses, ...stackup]);
    return {
      // A draft that follows the revision's stackup stays out of date until it takes the newest version.
      outOfDate: behind,
      fingerprint: outcome?.fingerprint ?? null,
      verdict: outcome?.summary.verdict ?? 'not-checked',
      worstMarginDb: outcome?.summary.worstMarginDb ?? null,
      worstLimitTitle: outcome?.summary.worstLimitTitle ?? null,
      worstLimitStatus: outcome?.summary.worstLimitStatus ?? null,
      worstFrequencyHz: outcome?.summary.worstFrequencyHz ?? null,
      weakestStanding: outcome?.summary.weakestStanding ?? null,
      checkProblems: JSON.stringify(examined.problems),
    };
  }

  async function read(channelId: string, caller: Caller): Promise<Channel> {
    const row = (await repository.one(channelId))!;
    const view = row.fingerprint
      ? (pool.recall(row.fingerprint)?.json ?? (await checks.viewJson(row.fingerprint)))
      : undefined;
    return presentChannel(row, view, caller.roles);
  }

  function refuseClosed(row: PlacedChannel): void {
    if (!row.open) throw problems.conflict('The revision is archived; its channels are no longer changed.');
    if (row.archived) throw problems.conflict(`${row.name} is archived; take it out of the archive first.`);
  }

  return {
    read,

    list: async (revisionId: string): Promise<ChannelSummary[]> =>
      (await repository.ofRevision(revisionId)).map(presentChannelSummary),

    /** Checks a document that is not saved; the reply is the view as JSON text. */
    async check(caller: Caller, channelId: string, boardId: string, document: unknown): Promise<string> {
      const examined = await examine(boardId, document, caller.id, `${caller.id}:${channelId}`);
      if (!examined.outcome) throw problems.unprocessable(within('document', examined.problems));
      return examined.outcome.json;
    },

    /**
     * Makes a channel of a document. `place` runs inside the unit of work and gives the document as it is stored, for imports
     * whose parts become files of the board at the same time; such a channel is checked right after.
     */
    async create(
      caller: Caller,
      boardId: string,
      revisionId: string,
      document: unknown,
      linkId: string | null,
      place?: Place,
    ): Promise<string> {
      const channel = wellFormed(document);
      if (linkId && !(await repository.isLinkOf(linkId, revisionId))) throw strangeLink();
      const id = randomUUID();
      const examined = place ? undefined : await examine(boardId, channel, caller.id, undefined);
      await unitOfWork(actorOf(caller), async (work) => {
        await repository.insert(
          work,
          emptyRow(id, revisionId, linkId, place ? await place(work, channel) : channel, work),
        );
        if (examined)
          await repository.update(work, id, await record(work, { id, revisionId }, channel, examined));
        work.event({
          what: 'channel.created',
          subject: id,
          boardId,
          to: { name: channel.name },
          detail: `${channel.name} created`,
        });
        work.change({ what: 'channel.created', boardId, revisionId, channelId: id, version: 1 });
      });
      return id;
    },

    /** Saves a document over the version it was made from. */
    async save(
      caller: Caller,
      channelId: string,
      boardId: string,
      version: number,
      document: unknown,
    ): Promise<Channel> {
      const channel = wellFormed(document);
      const before = (await repository.one(channelId))!;
      refuseClosed(before);
      if (before.version !== version) throw problems.changedMeanwhile(await read(channelId, caller));
      const examined = await examine(boardId, channel, caller.id, undefined);
      const overtaken = await unitOfWork(actorOf(caller), async (work) => {
        const now = await repository.locked(work, channelId);
        if (now.version !== version) return true;
        const columns = await record(work, now, channel, examined);
        const { name, signaling } = channel;
        await repository.update(work, channelId, {
          ...columns,
          name,
          signaling,
          document: JSON.stringify(channel),
          version: version + 1,
          changedAt: work.at,
          changedBy: caller.id,
        });
        await drafts.saved(work, now, boardId);
        work.change({
          what: 'channel.saved',
          boardId,
          revisionId: now.revisionId,
          channelId,
          version: version + 1,
        });
        return false;
      });
      if (overtaken) throw problems.changedMeanwhile(await read(channelId, caller));
      return read(channelId, caller);
    },

    async change(
      caller: Caller,
      channelId: string,
      boardId: string,
      change: { linkId?: string | null; archived?: boolean },
    ): Promise<Channel> {
      await unitOfWork(actorOf(caller), async (work) => {
        const before = await repository.locked(work, channelId);
        if (change.linkId && !(await repository.isLinkOf(change.linkId, before.revisionId)))
          throw strangeLink();
        await repository.update(work, channelId, change);
        const { linkId, archived } = before;
        work.event({
          what: 'channel.changed',
          subject: channelId,
          boardId,
          from: { linkId, archived: Boolean(archived) },
          to: change,
          detail: `${before.name} moved or archived`,
        });
        work.change({
          what: 'channel.changed',
          boardId,
          revisionId: before.revisionId,
          channelId,
          version: before.version,
        });
      });
      return read(channelId, caller);
    },

    /** The whole response of the stored document, as JSON text. */
    async response(caller: Caller, channelId: string, boardId: string): Promise<string> {
      const row = (await repository.one(channelId))!;
      const examined = await examine(boardId, JSON.parse(row.document), caller.id, undefined, 'response');
      if (!examined.outcome) throw problems.unprocessable(within('document', examined.problems));
      return examined.outcome.json;
    },

    /** Checks a stored channel again: after an import, a new engine, a changed reference. */
    async recheck(channelId: string): Promise<void> {
      const row = await repository.one(channelId);
      if (!row) return;
      const examined = await examine(row.boardId, JSON.parse(row.document), 'jobs', undefined);
      await unitOfWork(theProduct, async (work) => {
        const now = await repository.locked(work, channelId);
        // A save in the meantime has brought its own check.
        if (now.version !== row.version) return;
        const channel = JSON.parse(row.document) as CompleteChannel;
        await repository.update(work, channelId, await record(work, now, channel, examined));
        work.change({
          what: 'channel.checked',
          boardId: row.boardId,
          revisionId: row.revisionId,
          channelId,
          version: row.version,
        });
      });
    },

    /** Channels of a new revision: the documents and their checks as they stand in the one it starts from. */
    async copy(
      work: Work,
      from: RevisionRow,
      to: RevisionRow,
      links: ReadonlyMap<string, string>,
    ): Promise<void> {
      for (const row of await repository.rowsOf(from.id, work.transaction)) {
        const id = randomUUID();
        const linkId = row.linkId ? (links.get(row.linkId) ?? null) : null;
        await repository.insert(work, {
          ...row,
          id,
          revisionId: to.id,
          linkId,
          version: 1,
          createdAt: work.at,
          changedAt: work.at,
          changedBy: work.actor.personId,
        });
        await repository.copyUses(work, row.id, id);
      }
    },
  };
}

function strangeLink() {
  return problems.unprocessable([{ path: 'linkId', message: 'This link is not of this revision.' }]);
}

/** Shape, bounds and units; what breaks them is not stored. */
function wellFormed(document: unknown): CompleteChannel {
  const parsed = parseChannelFile(document);
  if (!parsed.ok) throw problems.unprocessable(within('document', parsed.problems));
  return parsed.channel;
}

export function within(prefix: string, fields: readonly FieldProblem[]): FieldProblem[] {
  return fields.map((field) => ({ ...field, path: field.path ? `${prefix}.${field.path}` : prefix }));
}

function emptyRow(
  id: string,
  revisionId: string,
  linkId: string | null,
  channel: CompleteChannel,
  work: Work,
): ChannelRow {
  return {
    id,
    revisionId,
    linkId,
    name: channel.name,
    state: 'drafting',
    signaling: channel.signaling,
    document: JSON.stringify(channel),
    version: 1,
    fingerprint: null,
    verdict: 'not-checked',
    outOfDate: false,
    worstMarginDb: null,
    worstLimitTitle: null,
    worstLimitStatus: null,
    worstFrequencyHz: null,
    weakestStanding: null,
    checkProblems: '[]',
    archived: false,
    createdAt: work.at,
    changedAt: work.at,
    changedBy: work.actor.personId,
  };
}
