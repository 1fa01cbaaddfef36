import * as z from 'zod';
import { limitQuantities, limitStatuses } from '../channel-file/limits';
import { standings } from '../channel-file/common';
import { modelFacts } from './model-facts';
import { partFacts } from './part-facts';
import { ledger, limitResult, spoils } from './response';
import { channelVerdict } from './verdicts';

const curve = z.array(z.number().nullable());

/** Something the person should know about an input, short of refusing it. */
export const warning = z.object({
  /** Path in the channel file, or empty. */
  path: z.string(),
  message: z.string(),
});
export type Warning = z.output<typeof warning>;

/** A limit as it is drawn and told: the result, its words and a polyline of its own values. */
export const limitView = limitResult.extend({
  title: z.string(),
  quantity: z.enum(limitQuantities),
  sense: z.enum(['max', 'min']),
  status: z.enum(limitStatuses).optional(),
  source: z.string().optional(),
  from: z.string().optional(),
  to: z.string().optional(),
  includes: z.array(z.string()).optional(),
  referenceOhm: z.number(),
  /** The limit's own values, [Hz, dB], a step written as two points of one frequency; segments apart. */
  outline: z.array(z.array(z.tuple([z.number(), z.number()]))),
  /** Ranges of the limit that no part or grid reaches. */
  missingHz: z.array(z.tuple([z.number(), z.number()])),
  /** What the limit's standard asks beyond it. */
  beyond: z.array(z.string()),
});
export type LimitView = z.output<typeof limitView>;

/** What the channel screen draws: curves, verdicts and tolls, never the S matrices. */
export const checkView = z.object({
  fingerprint: z.string(),
  engine: z.string(),
  verdict: channelVerdict,
  /** The refined worst margin over all judged limits, and whose it is. */
  worstMarginDb: z.number().nullable(),
  worstLimitId: z.string().nullable(),
  worstFrequencyHz: z.number().nullable(),
  weakestStanding: z.enum(standings),
  weakestElement: z.string(),
  elementStandings: z.array(
    z.object({ element: z.string(), standing: z.enum(standings), reason: z.string() }),
  ),
  evaluationHz: z.number().optional(),
  nyquistHz: z.number().optional(),
  temperatureC: z.number().optional(),
  delayS: z.number().nullable(),
  /** One-way delay of each element, in the order of the channel. */
  elementDelaysS: z.array(z.number()),
  frequenciesHz: z.array(z.number()),
  /** SDD for a differential channel; positive dB, null where nothing is transmitted. */
  curves: z.object({ insertionLossDb: curve, returnLossNearDb: curve, returnLossFarDb: curve }),
  limits: z.array(limitView),
  ledger: z.array(ledger),
  spoils: z.array(spoils),
  models: z.array(modelFacts),
  parts: z.array(partFacts),
  warnings: z.array(warning),
});
export type CheckView = z.output<typeof checkView>;
