import {
  roleAllows,
  type Board,
  type BoardOutline,
  type BoardSummary,
  type Link,
  type Member,
  type Revision,
  type RevisionSummary,
  type Role,
} from '@tollgate/contracts';
import type { BoardRow, LinkRow, RevisionRow } from './boards.model';
import type { RevisionTally, WorstChannel } from './boards.repository';

const none = { channels: 0, holds: 0, exceeds: 0, notJudged: 0, notChecked: 0 };

export function presentRevisionSummary(
  row: RevisionRow,
  tallies: readonly RevisionTally[],
  worsts: readonly WorstChannel[],
): RevisionSummary {
  const { channels, holds, exceeds, notJudged, notChecked } =
    tallies.find((each) => each.revisionId === row.id) ?? none;
  const worst = worsts.find((each) => each.revisionId === row.id);
  return {
    id: row.id,
    letter: row.letter,
    releaseOn: row.releaseOn,
    archived: row.archived,
    channels,
    counts: { holds, exceeds, notJudged, notChecked },
    worst: worst
      ? {
          marginDb: worst.marginDb,
          limitTitle: worst.limitTitle,
          channelId: worst.channelId,
          channelName: worst.channelName,
        }
      : null,
  };
}

export function presentBoardSummary(row: BoardRow, latest: RevisionSummary | null): BoardSummary {
  return { id: row.id, name: row.name, description: row.description, archived: row.archived, latest };
}

export function presentBoard(
  row: BoardRow,
  revisions: RevisionSummary[],
  members: Member[],
  roles: readonly Role[],
): Board {
  return {
    id: row.id,
    name: row.name,
    description: row.description,
    archived: row.archived,
    revisions,
    members,
    can: {
      change: roleAllows('board.change', roles),
      manageMembers: roleAllows('board.members', roles),
      createRevision: roleAllows('revision.create', roles) && !row.archived,
    },
  };
}

export function presentLink({ id, name, archived }: LinkRow): Link {
  return { id, name, archived };
}

export function presentRevision(
  row: RevisionRow,
  board: BoardRow,
  links: readonly LinkRow[],
  siblings: readonly RevisionRow[],
  roles: readonly Role[],
): Revision {
  const open = !row.archived && !board.archived;
  return {
    id: row.id,
    boardId: board.id,
    boardName: board.name,
    letter: row.letter,
    releaseOn: row.releaseOn,
    archived: row.archived,
    outline: row.outline === null ? null : (JSON.parse(row.outline) as BoardOutline),
    links: links.map(presentLink),
    siblings: siblings.map(({ id, letter }) => ({ id, letter })),
    can: {
      change: roleAllows('revision.change', roles),
      changeLinks: open && roleAllows('link.change', roles),
      createChannels: open && roleAllows('channel.create', roles),
      uploadFiles: open && roleAllows('file.upload', roles),
    },
  };
}
