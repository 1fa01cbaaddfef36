import canonicalize from 'canonicalize';
import type { CompleteChannel, StackupUsed } from '@tollgate/contracts';
import { actorOf, problems, type Caller } from '../../platform/http';
import type { UnitOfWork, Work } from '../../platform/work';
import type { BoardsRepository } from '../boards';
import type { ChannelsRepository, DraftEvents } from '../channels';
import { documentOf } from './stackups.presenter';
import type { PlacedStackup, StackupsRepository } from './stackups.repository';

export type UseStackup = ReturnType<typeof createUseStackup>;

interface Needs {
  readonly repository: StackupsRepository;
  readonly channels: ChannelsRepository;
  readonly boards: BoardsRepository;
  readonly drafts: DraftEvents;
  readonly unitOfWork: UnitOfWork;
}

/**
 * Writes the newest stackup into drafts, each as its next version: whoever has one open is told, and merges. The checks
 * follow as jobs.
 */
export function createUseStackup({ repository, channels, boards, drafts, unitOfWork }: Needs) {
  async function into(work: Work, channelId: string, version: PlacedStackup) {
    const now = await channels.locked(work, channelId);
    const before = JSON.parse(now.document) as CompleteChannel;
    const after = withStackup(before, version);
    if (canonicalize(after) === canonicalize(before)) return undefined;
    await channels.update(work, channelId, {
      document: JSON.stringify(after),
      version: now.version + 1,
      outOfDate: true,
      changedAt: work.at,
      changedBy: work.actor.personId,
    });
    await drafts.saved(work, now, version.boardId);
    work.job({
      kind: 'recheck',
      payload: { channelId },
      dedupeKey: `recheck:${channelId}:${now.version + 1}`,
    });
    work.change({
      what: 'channel.saved',
      boardId: version.boardId,
      revisionId: version.revisionId,
      channelId,
      version: now.version + 1,
    });
    return { channelId, name: now.name, version: now.version + 1 };
  }

  return async (caller: Caller, revisionId: string, wanted?: readonly string[]): Promise<StackupUsed> => {
    const revision = (await boards.revision(revisionId))!;
    if (revision.archived)
      throw problems.conflict(`Revision ${revision.letter} is archived; take it out of the archive first.`);
    return unitOfWork(actorOf(caller), async (work) => {
      await repository.hold(work, revisionId);
      const newest = await repository.newest(revisionId, work.transaction);
      if (!newest) throw problems.conflict('The revision has no stackup yet; save one first.');
      const all = (await repository.drafts(revisionId, work.transaction)).map(({ channelId }) => channelId);
      refuseStrange(wanted ?? [], all);
      const chosen = wanted ? all.filter((id) => wanted.includes(id)) : all;
      const changed: StackupUsed['changed'] = [];
      for (const channelId of chosen) {
        const saved = await into(work, channelId, newest);
        if (saved) changed.push(saved);
      }
      if (changed.length) {
        work.event({
          what: 'stackup.used',
          subject: newest.id,
          boardId: newest.boardId,
          to: { number: newest.number, channels: changed.map(({ channelId }) => channelId) },
          detail: `Stackup version ${newest.number} written into ${changed.length} channel${changed.length === 1 ? '' : 's'} of revision ${revision.letter}`,
        });
      }
      return { number: newest.number, changed, unchanged: chosen.length - changed.length };
    });
  };
}

function refuseStrange(wanted: readonly string[], all: readonly string[]): void {
  const strange = wanted.flatMap((id, i) =>
    all.includes(id)
      ? []
      : [{ path: `channelIds[${i}]`, message: 'This channel is not an open one of this revision.' }],
  );
  if (strange.length) throw problems.unprocessable(strange);
}

/** A stackup that names no temperature leaves the channel its own. */
function withStackup(channel: CompleteChannel, version: PlacedStackup): CompleteChannel {
  const document = documentOf(version);
  const temperatureC = document.temperatureC ?? channel.stackup?.temperatureC;
  return {
    ...channel,
    stackup: { ...(temperatureC === undefined ? {} : { temperatureC }), ...document },
    library: { ...channel.library, stackupVersion: version.id },
  };
}
