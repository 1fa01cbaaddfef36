import type {
  ChannelResponse,
  CompleteChannel,
  FieldProblem,
  Ledger,
  ModelFacts,
  PartFacts,
  Spoils,
  Standing,
  Warning,
} from '@tollgate/contracts';
import type { ElementPart } from '@tollgate/elements';
import type { Judgement, Mask } from '@tollgate/masks';
import type { Network } from '@tollgate/network';

/** A Touchstone part: its parsed file and the SHA-256 of its bytes. */
export type Part = ElementPart;

export interface ElementStanding {
  readonly element: string;
  readonly standing: Standing;
  readonly reason: string;
}

export interface JudgedLimit {
  readonly mask: Mask;
  readonly judgement: Judgement;
}

/** What checking a channel came to. */
export interface Check {
  readonly channel: CompleteChannel;
  /** The cascade on the grid points that every part covers, at the channel's references. */
  readonly network: Network;
  /** The same in mixed mode (d near, d far, c near, c far); absent for two ports. */
  readonly mixedMode?: Network;
  /** In the order of the channel's limits. */
  readonly limits: readonly JudgedLimit[];
  readonly ledger: readonly Ledger[];
  readonly spoils: readonly Spoils[];
  readonly lines: ChannelResponse['lines'];
  readonly models: readonly ModelFacts[];
  readonly parts: readonly PartFacts[];
  readonly standings: readonly ElementStanding[];
  readonly warnings: readonly Warning[];
  /** One-way delay by length and permittivity, over all elements. */
  readonly delayS: number;
  readonly elementDelaysS: readonly number[];
}

export type CheckResult =
  { readonly ok: true; readonly check: Check } | { readonly ok: false; readonly problems: FieldProblem[] };
