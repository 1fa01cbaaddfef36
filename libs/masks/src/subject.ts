import type { Signaling } from '@tollgate/contracts';
import type { Network } from '@tollgate/network';

/** The band a part can answer for; `what` names the part in a reason, such as "conn.s2p (J1)". */
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
  /** First and last frequency of the grid as asked for, whether or not the parts reach them. */
  readonly gridHz: readonly [number, number];
  /** The cascade on those grid points that every part covers, at the channel's references (2 or 4 ports). */
  readonly grid: Network;
  /** Bands of the parts; empty where the channel has none and can be computed anywhere. */
  readonly parts: readonly Coverage[];
  /** The cascade at other frequencies, strictly ascending, inside every part's band; same ports and references as `grid`. */
  evaluate(frequenciesHz: Float64Array): Network;
}

/** The band that every part covers; null where no frequency is common to all. */
export function commonBand(parts: readonly Coverage[]): readonly [number, number] | null {
  const fromHz = parts.reduce((from, part) => Math.max(from, part.fromHz), 0);
  const toHz = parts.reduce((to, part) => Math.min(to, part.toHz), Infinity);
  return fromHz <= toHz ? [fromHz, toHz] : null;
}
