import * as z from 'zod';
import { id, list } from './common';

const point = z.tuple([z.number(), z.number()]);

/** What is drawn of a channel, and no more: enough to show it behind another one. Coordinates in metres. */
export const planChannel = z.object({
  id,
  name: z.string(),
  traces: z.array(z.object({ layer: z.string(), widthM: z.number(), path: z.array(point) })),
  parts: z.array(z.object({ kind: z.string(), at: point })),
});
export type PlanChannel = z.output<typeof planChannel>;
export const planChannels = list(planChannel);
