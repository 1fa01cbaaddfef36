import * as z from 'zod';

/** A line of the event stream: enough to know what to read again, never content. */
export const streamEvent = z.object({
  seq: z.number(),
  what: z.string(),
  boardId: z.string().nullable(),
  revisionId: z.string().nullable(),
  channelId: z.string().nullable(),
  version: z.number().nullable(),
  who: z.string().nullable(),
});
export type StreamEvent = z.output<typeof streamEvent>;
export const streamQuery = z.strictObject({ since: z.coerce.number().int().min(0).optional() });

export const health = z.object({
  status: z.enum(['ok', 'degraded']),
  database: z.enum(['up', 'down']),
  version: z.string(),
  demonstration: z.boolean(),
});
