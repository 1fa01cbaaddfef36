import {
  roleAllows,
  type Channel,
  type ChannelSummary,
  type CheckView,
  type CompleteChannel,
  type FieldProblem,
  type Role,
} from '@tollgate/contracts';
import type { PlacedChannel } from './channels.repository';

export function presentChannelSummary(row: PlacedChannel): ChannelSummary {
  return {
    id: row.id,
    name: row.name,
    linkId: row.linkId,
    signaling: row.signaling,
    archived: row.archived,
    verdict: row.verdict,
    outOfDate: row.outOfDate,
    worstMarginDb: row.worstMarginDb,
    worstLimitTitle: row.worstLimitTitle,
    worstFrequencyHz: row.worstFrequencyHz,
    worstLimitStatus: row.worstLimitStatus,
    weakestStanding: row.weakestStanding,
    version: row.version,
    changedAt: new Date(row.changedAt).toISOString(),
    changedBy: row.changedByName ?? 'Tollgate',
  };
}

export function presentChannel(
  row: PlacedChannel,
  viewJson: string | undefined,
  roles: readonly Role[],
): Channel {
  const changeable = row.open && !row.archived;
  return {
    ...presentChannelSummary(row),
    boardId: row.boardId,
    boardName: row.boardName,
    revisionId: row.revisionId,
    revisionLetter: row.revisionLetter,
    document: JSON.parse(row.document) as CompleteChannel,
    check: viewJson === undefined ? null : (JSON.parse(viewJson) as CheckView),
    checkProblems: JSON.parse(row.checkProblems) as FieldProblem[],
    can: {
      change: changeable && roleAllows('channel.change', roles),
      uploadFiles: changeable && roleAllows('file.upload', roles),
    },
  };
}
