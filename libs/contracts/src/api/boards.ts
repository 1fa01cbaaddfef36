import * as z from 'zod';
import { bounds } from '../bounds';
import { vertex } from '../channel-file/physical-kinds';
import { line } from '../text';
import { can, day, id, instant, list, role } from './common';

/** How many channels of a revision stand where. */
export const standingCounts = z.object({
  holds: z.number(),
  exceeds: z.number(),
  notJudged: z.number(),
  notChecked: z.number(),
});
export type StandingCounts = z.output<typeof standingCounts>;

const worst = z.object({
  marginDb: z.number(),
  limitTitle: z.string(),
  channelId: id,
  channelName: z.string(),
});

export const revisionSummary = z.object({
  id,
  letter: z.string(),
  releaseOn: day.nullable(),
  archived: z.boolean(),
  channels: z.number(),
  counts: standingCounts,
  worst: worst.nullable(),
});
export type RevisionSummary = z.output<typeof revisionSummary>;

export const member = z.object({ personId: id, name: z.string(), roles: z.array(role), since: instant });
export type Member = z.output<typeof member>;

export const boardSummary = z.object({
  id,
  name: z.string(),
  description: z.string(),
  archived: z.boolean(),
  latest: revisionSummary.nullable(),
});
export type BoardSummary = z.output<typeof boardSummary>;
export const boards = list(boardSummary);

export const board = z.object({
  id,
  name: z.string(),
  description: z.string(),
  archived: z.boolean(),
  revisions: z.array(revisionSummary),
  members: z.array(member),
  can: can('change', 'manageMembers', 'createRevision'),
});
export type Board = z.output<typeof board>;

const description = z.string().trim().max(500, 'A description has at most 500 characters.');
export const boardCreate = z.strictObject({ name: line('Name', 80), description: description.default('') });
export const boardChange = z.strictObject({
  name: line('Name', 80).optional(),
  description: description.optional(),
  archived: z.boolean().optional(),
});

/** The edge of the board as a closed polygon, seen from above: x to the right, y downwards. */
export const boardOutline = z.strictObject({
  cornersM: z
    .array(vertex)
    .min(3, 'An outline has at least three corners.')
    .max(bounds.outlineCorners, `An outline has at most ${bounds.outlineCorners} corners.`),
});
export type BoardOutline = z.output<typeof boardOutline>;

const letter = z
  .string()
  .trim()
  .regex(
    /^[A-Z]{1,3}[0-9]{0,2}$/,
    'A revision is one to three capital letters, digits may follow (A, B, C1).',
  );
export const revisionCreate = z.strictObject({
  /** Left out, the next letter. */
  letter: letter.optional(),
  releaseOn: day.optional(),
  /** A new revision starts as a copy of this one. */
  copyFrom: id.optional(),
});
export const revisionChange = z.strictObject({
  releaseOn: day.nullable().optional(),
  /** Null takes it away. */
  outline: boardOutline.nullable().optional(),
  archived: z.boolean().optional(),
});

export const link = z.object({ id, name: z.string(), archived: z.boolean() });
export type Link = z.output<typeof link>;
export const linkCreate = z.strictObject({ name: line('Name', 80) });
export const linkChange = z.strictObject({
  name: line('Name', 80).optional(),
  archived: z.boolean().optional(),
});

export const revision = z.object({
  id,
  boardId: id,
  boardName: z.string(),
  letter: z.string(),
  releaseOn: day.nullable(),
  archived: z.boolean(),
  outline: boardOutline.nullable(),
  links: z.array(link),
  siblings: z.array(z.object({ id, letter: z.string() })),
  can: can('change', 'changeLinks', 'createChannels', 'uploadFiles'),
});
export type Revision = z.output<typeof revision>;
