import * as z from 'zod';
import { modelFacts } from './model-facts';
import { partFacts } from './part-facts';
import { limitVerdicts } from './verdicts';

export const responseFormat = 'tollgate.response/1';

const complexNumber = z.tuple([z.number(), z.number()]);
const matrix = z.array(z.array(complexNumber));
/** Infinite loss has no number in JSON: it is null. */
const decibels = z.number().nullable();
const margin = z.object({ frequencyHz: z.number(), marginDb: decibels });

export const cornerNames = ['nominal', 'most-loss', 'lowest-impedance', 'highest-impedance'] as const;
/** An end of the stackup's tolerances. */
export type CornerName = (typeof cornerNames)[number];

/** The corner of the stackup's tolerances at which a limit has least margin, and which tolerance takes most of it. */
export const cornerResult = margin.extend({
  name: z.enum(cornerNames),
  /** A quantity of a layer; empty at the nominal corner. */
  drivenBy: z.string(),
});
export type CornerResult = z.output<typeof cornerResult>;

export const limitResult = z.object({
  id: z.string(),
  verdict: z.enum(limitVerdicts),
  holds: z.boolean(),
  /** Why a limit was not judged; empty where it was. */
  reason: z.string(),
  /** Of the grid's points inside the limit's range. */
  worst: margin.nullable(),
  /** Of the engine between the grid's points too; what screens and reports show. */
  worstRefined: margin.nullable(),
  exceedsHz: z.array(z.tuple([z.number(), z.number()])),
  /** Where the stackup carries tolerances: verdict and `holds` stand on it. Absent where the verdict is a nominal one. */
  corner: cornerResult.optional(),
});
export type LimitResult = z.output<typeof limitResult>;

export const ledgerRow = z.object({
  element: z.string(),
  tollDb: decibels,
  savedIfIdealDb: decibels,
  savedRangeDb: z.tuple([decibels, decibels]),
  allotmentDb: z.number().optional(),
});
export type LedgerRow = z.output<typeof ledgerRow>;

export const ledger = z.object({
  atHz: z.number(),
  limitId: z.string().optional(),
  limitDb: decibels.optional(),
  totalDb: decibels,
  reflectionDb: decibels,
  reserveDb: decibels.optional(),
  rows: z.array(ledgerRow),
});
export type Ledger = z.output<typeof ledger>;

/** What each element spoils of a return loss: how much it would rise without the element, in dB. */
export const spoils = z.object({
  limitId: z.string(),
  atHz: z.number(),
  returnLossDb: decibels,
  rows: z.array(
    z.object({ element: z.string(), spoilsDb: decibels, rangeDb: z.tuple([decibels, decibels]) }),
  ),
});
export type Spoils = z.output<typeof spoils>;

const lineMode = z.object({
  z0Ohm: z.number(),
  effectivePermittivity: z.number(),
  conductorLossDbPerM: z.array(z.number()),
  dielectricLossDbPerM: z.array(z.number()),
});
export const lineResult = z.object({
  element: z.string(),
  modes: z.object({ single: lineMode.optional(), even: lineMode.optional(), odd: lineMode.optional() }),
});

/** The whole result of a check, as scripts read it. `s[point][row][column] = [re, im]`. */
export const channelResponse = z.object({
  format: z.literal(responseFormat),
  engine: z.string(),
  fingerprint: z.string(),
  ports: z.number(),
  referenceOhm: z.array(complexNumber),
  frequenciesHz: z.array(z.number()),
  s: z.array(matrix),
  /** 4 ports only; rows and columns d near, d far, c near, c far. */
  mixedMode: z.array(matrix),
  mixedModeReferenceOhm: z.array(complexNumber),
  limits: z.array(limitResult),
  lines: z.array(lineResult),
  /** An entry for each trace and via. */
  models: z.array(modelFacts),
  /** An entry for each element that is a file. */
  parts: z.array(partFacts),
  ledger: z.array(ledger),
  /** For limits on return loss. */
  spoils: z.array(spoils),
});
export type ChannelResponse = z.output<typeof channelResponse>;
