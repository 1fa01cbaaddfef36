import canonicalize from 'canonicalize';
import type { CompleteChannel, FieldProblem, Limit } from '@tollgate/contracts';
import type { TaskPart } from '../checks';
import type { FilesService } from '../files';
import type { MasksRepository } from '../masks';
import type { UseRow } from './channels.model';

export interface ResolvedDraft {
  /** By value: every reference followed and its source named. */
  readonly channel: CompleteChannel;
  readonly parts: TaskPart[];
  readonly uses: Omit<UseRow, 'channelId'>[];
  readonly problems: FieldProblem[];
}

export type ResolveChannel = (
  boardId: string,
  draft: CompleteChannel,
  partKeys: readonly { key: string; path: string }[],
) => Promise<ResolvedDraft>;

/** Follows a draft's references: board files to their content, limits of mask sets to the revision they name. */
export function createResolveChannel(files: FilesService, masks: MasksRepository): ResolveChannel {
  return async (boardId, draft, partKeys) => {
    const [found, revisions] = await Promise.all([
      files.some(
        boardId,
        partKeys.map((part) => part.key),
      ),
      masks.limitsOf([...new Set(draft.limits.flatMap((limit) => revisionOf(limit) ?? []))]),
    ]);
    const missing = partKeys
      .filter((part) => !found.some((file) => file.id === part.key))
      .map((part) => ({
        path: part.path,
        message: 'This file is not one of the board.',
        mend: 'Choose a file of this board, or upload it.',
      }));
    return {
      channel: draft,
      parts: found.map((file) => ({ key: file.id, sha256: file.sha256, name: file.name })),
      uses: [
        ...found.map((file) => ({ kind: 'board-file' as const, usedId: file.id })),
        ...[...revisions.keys()].map((usedId) => ({ kind: 'mask-set-revision' as const, usedId })),
      ],
      problems: [...missing, ...draft.limits.flatMap((limit, i) => strayedFrom(limit, i, revisions))],
    };
  };
}

function revisionOf(limit: Limit): string | undefined {
  return typeof limit.source === 'object' ? limit.source.itemRevision : undefined;
}

/** A limit that names a mask-set revision must be what that revision says; otherwise it is one's own. */
function strayedFrom(
  limit: Limit,
  index: number,
  revisions: ReadonlyMap<string, readonly Limit[]>,
): FieldProblem[] {
  const revision = revisionOf(limit);
  if (revision === undefined) return [];
  const path = `limits[${index}].source.itemRevision`;
  const originals = revisions.get(revision);
  if (!originals)
    return [
      {
        path,
        message: 'This mask-set revision is not known here.',
        mend: 'Take the limit from the mask sets again, or name its source in words.',
      },
    ];
  const same = originals.some((original) => canonicalize(essence(original)) === canonicalize(essence(limit)));
  return same
    ? []
    : [
        {
          path,
          message: 'The limit differs from the mask set it names.',
          mend: 'Remove the reference: it is then a limit of your own.',
        },
      ];
}

function essence({
  quantity,
  sense,
  segments,
  points,
  interpolation,
  atHz,
  db,
  referenceOhm,
  status,
}: Limit) {
  return { quantity, sense, segments, points, interpolation, atHz, db, referenceOhm, status };
}
