import * as z from 'zod';
import { limit, limitStatuses } from '../channel-file/limits';
import { id, list } from './common';

/** A published or own set of limits, one immutable revision of it. */
export const maskSet = z.object({
  id,
  /** Stable short name, such as 93-KR4-IL. */
  key: z.string(),
  title: z.string(),
  standard: z.string(),
  clause: z.string(),
  status: z.enum(limitStatuses),
  from: z.string(),
  to: z.string(),
  referenceOhm: z.number(),
  revision: z.number(),
  revisionId: id,
  limits: z.array(limit),
  /** What the standard asks beyond these limits. */
  beyond: z.array(z.string()),
  confidence: z.string(),
});
export type MaskSet = z.output<typeof maskSet>;
export const maskSets = list(maskSet);
