import * as z from 'zod';
import { channelFile, type ChannelFile } from '../channel-file/channel-file';
import { signalings, standings } from '../channel-file/common';
import type { CompleteChannel } from '../channel-file/complete';
import { checkView } from '../check/view';
import { channelVerdict } from '../check/verdicts';
import { can, id, instant, list } from './common';
import { fieldProblem } from './problem';

/** A row of the channel table. */
export const channelSummary = z.object({
  id,
  name: z.string(),
  linkId: id.nullable(),
  signaling: z.enum(signalings),
  archived: z.boolean(),
  verdict: channelVerdict,
  /** The verdict is of an earlier document, stackup or library item. */
  outOfDate: z.boolean(),
  worstMarginDb: z.number().nullable(),
  worstLimitTitle: z.string().nullable(),
  worstFrequencyHz: z.number().nullable(),
  /** Status of the mask behind the worst margin, so that the verdict's word can carry it. */
  worstLimitStatus: z.string().nullable(),
  weakestStanding: z.enum(standings).nullable(),
  version: z.number(),
  changedAt: instant,
  changedBy: z.string(),
});
export type ChannelSummary = z.output<typeof channelSummary>;
export const channels = list(channelSummary);

/** The document as it is stored: in SI, with ids. */
export const channelDocument = z
  .custom<CompleteChannel>((value) => typeof value === 'object' && value !== null)
  .meta({
    type: 'object',
    description: 'A channel file; see /api/schemas/channel.json',
  });
/** The document as it is sent: checked in full by the channel file's own schema. */
export const channelInput = channelFile as z.ZodType<ChannelFile>;

export const channel = channelSummary.extend({
  boardId: id,
  boardName: z.string(),
  revisionId: id,
  revisionLetter: z.string(),
  document: channelDocument,
  check: checkView.nullable(),
  /** Why there is no check, where the document cannot be checked as it stands. */
  checkProblems: z.array(fieldProblem),
  can: can('change', 'uploadFiles'),
});
export type Channel = z.output<typeof channel>;

export const channelCreate = z.strictObject({ document: z.unknown(), linkId: id.nullable().default(null) });
/** `If-Match: "<version>"` goes with it; the document is read by parseChannelFile, so that problems carry `document.` paths. */
export const channelSave = z.strictObject({
  document: z.unknown(),
  why: z.enum(['edit', 'undo', 'redo', 'merge', 'import']).default('edit'),
});
export const channelChange = z.strictObject({
  linkId: id.nullable().optional(),
  archived: z.boolean().optional(),
});
export const checkRequest = z.strictObject({ document: z.unknown() });

/** A part on a board: a Touchstone file with what was read from it. */
export const boardFile = z.object({
  id,
  name: z.string(),
  sha256: z.string(),
  sizeBytes: z.number(),
  ports: z.number(),
  points: z.number(),
  fromHz: z.number(),
  toHz: z.number(),
  referenceOhm: z.array(z.tuple([z.number(), z.number()])),
  /** For 4 ports: the pairing the data speaks for; null where they can't tell. */
  likelyPortOrder: z.string().nullable(),
  warnings: z.array(z.string()),
  addedAt: instant,
  addedBy: z.string(),
});
export type BoardFile = z.output<typeof boardFile>;
export const boardFiles = list(boardFile);

export const uploadQuery = z.strictObject({ name: z.string().trim().min(1, 'Name the file.').max(200) });
