import type { Signaling } from '@tollgate/contracts';
import type { Network } from '@tollgate/network';

/** What a part, or the grid, can answer for; `what` names it in a reason ("the grid", "part x.s2p of T1"). */
export interface Coverage {
  readonly fromHz: number;
  readonly toHz: number;
  readonly what: string;
}

/** The channel as its limits see it. */
export interface Subject {
  readonly signaling: Signaling;
  /** The channel's own test points, where it states them. */
  readonly from?: string;
  readonly to?: string;
  /** The cascade on those grid points that every part covers, at the channel's references (2 or 4 ports). */
  readonly grid: Network;
  /** The cascade at other frequencies (ascending), same ports and references; only asked where all of `coverage` reaches. */
  evaluate(frequenciesHz: Float64Array): Network;
  /** The grid as asked for, and each part with its own band. */
  readonly coverage: readonly Coverage[];
}
