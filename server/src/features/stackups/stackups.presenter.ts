import {
  roleAllows,
  stackupCautions,
  type CompleteStackup,
  type Role,
  type StackupSource,
  type StackupVersion,
  type StackupVersions,
  type StackupVersionSummary,
} from '@tollgate/contracts';
import type { DraftStackup, PlacedStackup } from './stackups.repository';

export function presentSummary(row: PlacedStackup): StackupVersionSummary {
  const { layers } = documentOf(row);
  return {
    id: row.id,
    number: row.number,
    kind: row.kind,
    why: row.why,
    layers: layers.length,
    copperLayers: layers.filter(({ kind }) => kind === 'copper').length,
    thicknessM: layers.reduce((sum, { thicknessM }) => sum + thicknessM, 0),
    createdAt: new Date(row.createdAt).toISOString(),
    createdBy: row.createdByName ?? 'Tollgate',
  };
}

export function presentVersion(row: PlacedStackup): StackupVersion {
  const document = documentOf(row);
  return {
    ...presentSummary(row),
    revisionId: row.revisionId,
    document,
    cautions: stackupCautions(document),
  };
}

export function presentVersions(
  rows: readonly PlacedStackup[],
  drafts: readonly DraftStackup[],
  open: boolean,
  roles: readonly Role[],
): StackupVersions {
  const following = drafts.filter(({ followsSha256 }) => followsSha256 !== null);
  return {
    items: rows.map(presentSummary),
    drafts: {
      total: drafts.length,
      following: following.length,
      behind: following.filter(({ followsSha256 }) => followsSha256 !== rows[0]?.sha256).length,
    },
    can: {
      change: open && roleAllows('stackup.create', roles),
      use: open && roleAllows('stackup.use', roles),
    },
  };
}

export function presentSource(row: PlacedStackup): StackupSource {
  const { boardId, boardName, revisionId, revisionLetter } = row;
  return { boardId, boardName, revisionId, revisionLetter, version: presentSummary(row) };
}

export function documentOf(row: { readonly document: string }): CompleteStackup {
  return JSON.parse(row.document) as CompleteStackup;
}
