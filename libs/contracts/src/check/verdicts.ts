import * as z from 'zod';

/** What a limit's comparison came to. */
export const limitVerdicts = ['holds', 'exceeds', 'not-judged'] as const;
export type LimitVerdict = (typeof limitVerdicts)[number];

/**
 * What a channel's check came to, as lists and marks show it. `inside-guard-band` arises where a board's policy demands
 * a guard band; `not-checked` is no check at all or one that is out of date.
 */
export const channelVerdicts = [
  'holds',
  'inside-guard-band',
  'exceeds',
  'not-judged',
  'not-checked',
] as const;
export type ChannelVerdict = (typeof channelVerdicts)[number];
export const channelVerdict = z.enum(channelVerdicts);
