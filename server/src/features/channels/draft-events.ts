import { compare } from 'fast-json-patch';
import type { UnitOfWork, Work } from '../../platform/work';
import type { ChannelRow, WindowRow } from './channels.model';
import type { ChannelsRepository } from './channels.repository';

/** How long one person's editing of one channel is one event. */
export const windowMs = 10 * 60 * 1000;

export const closeDraftJob = 'close-draft';

export interface DraftEvents {
  /** Notes a save: opens the person's window, and closes those of others, whose changes end here. */
  saved(work: Work, before: ChannelRow, boardId: string): Promise<void>;
  /** Turns a window into its event, where it is still open. */
  close(channelId: string, personId: string): Promise<void>;
}

/**
 * Autosaved drafts: one event per person, channel and ten minutes, holding a JSON Patch from what was there before to what
 * the person left. The document before is kept beside the channel until then.
 */
export function createDraftEvents(repository: ChannelsRepository, unitOfWork: UnitOfWork): DraftEvents {
  async function turnIntoEvent(
    work: Work,
    window: WindowRow,
    now: ChannelRow,
    boardId: string,
  ): Promise<void> {
    const patch = compare(JSON.parse(window.baseDocument) as object, JSON.parse(now.document) as object);
    await repository.closeWindow(work, window);
    work.event({
      what: 'channel.edited',
      subject: now.id,
      boardId,
      from: window.baseVersion,
      to: { version: now.version, by: window.personId, patch },
      detail: `${now.name}: ${patch.length} change${patch.length === 1 ? '' : 's'}, versions ${window.baseVersion} to ${now.version}`,
    });
  }

  return {
    async saved(work, before, boardId) {
      const personId = work.actor.personId!;
      for (const other of await repository.otherWindows(work, before.id, personId))
        await turnIntoEvent(work, other, before, boardId);
      if (await repository.window(work, before.id, personId)) return;
      await repository.openWindow(work, {
        channelId: before.id,
        personId,
        openedAt: work.at,
        baseVersion: before.version,
        baseDocument: before.document,
      });
      work.job({
        kind: closeDraftJob,
        payload: { channelId: before.id, personId },
        runAfter: new Date(work.at.getTime() + windowMs),
        dedupeKey: `draft:${before.id}:${personId}`,
      });
    },

    async close(channelId, personId) {
      const boardId = await repository.boardOf(channelId);
      if (!boardId) return;
      await unitOfWork({ personId, name: 'editor' }, async (work) => {
        const now = await repository.locked(work, channelId);
        const window = await repository.window(work, channelId, personId);
        if (window) await turnIntoEvent(work, window, now, boardId);
      });
    },
  };
}
