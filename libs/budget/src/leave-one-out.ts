import { commonBand } from '@tollgate/masks';
import { leaveOneOutInto, lossDb, prefixCascades, suffixCascades } from '@tollgate/network';
import { atReference, sectionsOf, type Chain } from './chain';

/** Points at which the effect of leaving an element out is looked at around a frequency. */
const spreadPoints = 33;

/** The frequency itself and points within half a turn of the channel's delay to both sides, inside the parts' band. */
export function spreadAround(chain: Chain, atHz: number, delayS: number): Float64Array {
  if (!(delayS > 0)) return Float64Array.of(atHz);
  const reach = 1 / (2 * delayS);
  const [bandFrom, bandTo] = commonBand(chain.coverage) ?? [0, Infinity];
  const from = Math.max(bandFrom, atHz - reach);
  const to = Math.min(bandTo, atHz + reach);
  const points = new Set([atHz]);
  for (let k = 0; k < spreadPoints; k++) {
    points.add(k === spreadPoints - 1 ? to : from + ((to - from) * k) / (spreadPoints - 1));
  }
  return Float64Array.from(points).sort();
}

/** Every element's S on these frequencies, kept side by side: for the few points of a ledger. */
export function sectionsAt(chain: Chain, frequenciesHz: Float64Array): Float64Array[] {
  return Array.from(sectionsOf(chain, frequenciesHz, false), ({ s }) => s);
}

/** A loss in dB at each point of a cascade. */
export type LossOf = (s: Float64Array, ports: 2 | 4, points: number) => Float64Array;

export interface LeaveOneOut {
  /** Of the channel, by frequency. */
  readonly all: Float64Array;
  /** Of the channel without each element. */
  readonly without: readonly Float64Array[];
}

/** A loss of the channel, and of the channel without each of its elements in turn, at `reference`. */
export function leaveOneOut(
  chain: Chain,
  sections: readonly Float64Array[],
  frequenciesHz: Float64Array,
  reference: Float64Array,
  lossOf: LossOf,
): LeaveOneOut {
  const points = frequenciesHz.length;
  const ports = chain.sectionPorts;
  const prefixes = prefixCascades(sections, ports, points);
  const suffixes = suffixCascades(sections, ports, points);
  const left = new Float64Array(points * ports * ports * 2);
  const at = (s: Float64Array): Float64Array =>
    lossOf(atReference(chain, s, frequenciesHz, reference).s, ports, points);
  return {
    all: at(prefixes.at(-1)!),
    without: sections.map((_, i) => {
      leaveOneOutInto(left, prefixes, suffixes, i, ports, points);
      return at(left);
    }),
  };
}

/** Insertion loss near to far, of SDD21 = (S31 - S32 - S41 + S42)/2 for four ports. */
export const throughLoss: LossOf = (s, ports, points) => modeLoss(s, ports, points, 1, 0, -1);

/**
 * Loss of one entry of a two-port, or of one mode of a pair between two ends: (Spp - Spn - Snp + Snn)/2 for the difference
 * (`sign` -1), all plus for the common mode (Bockelman and Eisenstadt, 1995).
 */
export function modeLoss(
  s: Float64Array,
  ports: 2 | 4,
  points: number,
  row: 0 | 1,
  column: 0 | 1,
  sign: 1 | -1,
): Float64Array {
  const losses = new Float64Array(points);
  for (let point = 0; point < points; point++) {
    if (ports === 2) {
      const k = point * 8 + row * 4 + column * 2;
      losses[point] = lossDb(s[k]!, s[k + 1]!);
      continue;
    }
    const k = point * 32 + row * 16 + column * 4;
    const re = s[k]! + sign * s[k + 2]! + sign * s[k + 8]! + s[k + 10]!;
    const im = s[k + 1]! + sign * s[k + 3]! + sign * s[k + 9]! + s[k + 11]!;
    losses[point] = lossDb(re / 2, im / 2);
  }
  return losses;
}

export function finiteOrNull(value: number): number | null {
  return Number.isFinite(value) ? value : null;
}
