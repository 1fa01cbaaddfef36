import { entryAt, type Network } from './network';

/** How densely a file's frequencies stand, for what is to be read between them. */
export interface SamplingQuality {
  /** Ranges left out: steps far wider than those beside them. */
  readonly gapsHz: readonly (readonly [number, number])[];
  /** Whether the file has a point at 0 Hz. */
  readonly reachesDc: boolean;
  /** The widest turn of a transmission entry from point to point, degrees, and where its step begins. */
  readonly phaseStep: { readonly deg: number; readonly fromHz: number };
}

/** A step this much wider than both its neighbours is a gap; a logarithmic sweep's steps grow steadily and are none. */
const gapRatio = 2.5;
/** Entries below -40 dB carry noise, not phase. */
const leastMagnitude = 1e-2;
/** Past this turn between two points (formulas A8) magnitude and phase are no longer read reliably between them. */
export const widestPhaseStepDeg = 45;

/**
 * Looks for gaps, a missing 0 Hz point and phase steps too wide to interpolate over.
 * @param entries (row, column) pairs, from 0, of the transmissions that matter
 */
export function assessSampling(
  network: Network,
  entries: readonly (readonly [number, number])[],
): SamplingQuality {
  const f = network.frequenciesHz;
  return { gapsHz: gapsOf(f), reachesDc: f[0] === 0, phaseStep: widestStep(network, entries) };
}

function gapsOf(f: Float64Array): [number, number][] {
  const gaps: [number, number][] = [];
  const step = (k: number): number => (k < 0 || k + 1 >= f.length ? 0 : f[k + 1]! - f[k]!);
  for (let k = 0; k + 1 < f.length; k++) {
    const beside = Math.max(step(k - 1), step(k + 1));
    // The first step of a sweep that starts at 0 Hz reaches up to where the instrument begins.
    if (beside > 0 && f[k]! > 0 && step(k) > gapRatio * beside) gaps.push([f[k]!, f[k + 1]!]);
  }
  return gaps;
}

function widestStep(
  { ports, s, frequenciesHz }: Network,
  entries: readonly (readonly [number, number])[],
): SamplingQuality['phaseStep'] {
  let widest = { deg: 0, fromHz: frequenciesHz[0] ?? 0 };
  for (const [row, column] of entries) {
    for (let point = 0; point + 1 < frequenciesHz.length; point++) {
      const a = entryAt(ports, point, row, column);
      const b = entryAt(ports, point + 1, row, column);
      if (Math.hypot(s[a]!, s[a + 1]!) < leastMagnitude || Math.hypot(s[b]!, s[b + 1]!) < leastMagnitude)
        continue;
      const re = s[b]! * s[a]! + s[b + 1]! * s[a + 1]!;
      const im = s[b + 1]! * s[a]! - s[b]! * s[a + 1]!;
      const deg = (Math.abs(Math.atan2(im, re)) * 180) / Math.PI;
      if (deg > widest.deg) widest = { deg, fromHz: frequenciesHz[point]! };
    }
  }
  return widest;
}
