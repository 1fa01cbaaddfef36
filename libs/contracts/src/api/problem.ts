import * as z from 'zod';

export const problemMediaType = 'application/problem+json';

export const fieldProblem = z.object({ path: z.string(), message: z.string(), mend: z.string().optional() });

/** RFC 9457 problem details: the one shape of every error. `id` is stable, `instance` names the occurrence in the log. */
export const problem = z.object({
  type: z.string(),
  id: z.string(),
  title: z.string(),
  status: z.number(),
  detail: z.string(),
  instance: z.string(),
  fields: z.array(fieldProblem).default([]),
  /** 412 only: what is stored now. */
  current: z.unknown().optional(),
});
export type Problem = z.output<typeof problem>;
