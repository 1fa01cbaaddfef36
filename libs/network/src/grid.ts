import type { Network } from './network';

/** What a network's frequency grid can carry, and where it cannot. */
export interface GridInspection {
  readonly fromHz: number;
  readonly toHz: number;
  readonly points: number;
  /** Whether there is a point at 0 Hz. */
  readonly hasDc: boolean;
  /** Steps far wider than their neighbours: points are missing there. */
  readonly gapsHz: readonly (readonly [number, number])[];
  /** Largest phase step between neighbouring points of an entry that carries a signal, in degrees, and where. */
  readonly largestPhaseStepDeg: number;
  readonly largestPhaseStepHz: number;
  /** Ranges with phase steps above 45 degrees: too wide to interpolate with confidence (formula A8). */
  readonly widePhaseStepsHz: readonly (readonly [number, number])[];
}

/** A step this many times wider than both its neighbours is a gap. */
const gapRatio = 2.5;
/** Entries below this magnitude say nothing about phase. */
const leastMagnitude = 0.01;
/** From formula A8: 360 tau df should stay below about 45 degrees. */
const widePhaseStepRad = Math.PI / 4;

/** Names gaps, a missing 0 Hz point, and phase steps too wide to interpolate. */
export function inspectGrid(network: Network): GridInspection {
  const f = network.frequenciesHz;
  const gapsHz: [number, number][] = [];
  const wide: [number, number][] = [];
  let largest = 0;
  let largestHz = f[0] ?? 0;
  for (let k = 0; k + 1 < f.length; k++) {
    const step = f[k + 1]! - f[k]!;
    const neighbours = Math.max(k > 0 ? f[k]! - f[k - 1]! : 0, k + 2 < f.length ? f[k + 2]! - f[k + 1]! : 0);
    if (neighbours > 0 && step > gapRatio * neighbours) gapsHz.push([f[k]!, f[k + 1]!]);
    const phase = phaseStep(network, k);
    if (phase > largest) {
      largest = phase;
      largestHz = f[k]!;
    }
    if (phase <= widePhaseStepRad) continue;
    const last = wide[wide.length - 1];
    if (last && last[1] === f[k]) last[1] = f[k + 1]!;
    else wide.push([f[k]!, f[k + 1]!]);
  }
  return {
    fromHz: f[0] ?? 0,
    toHz: f[f.length - 1] ?? 0,
    points: f.length,
    hasDc: f[0] === 0,
    gapsHz,
    largestPhaseStepDeg: (largest * 180) / Math.PI,
    largestPhaseStepHz: largestHz,
    widePhaseStepsHz: wide,
  };
}

function phaseStep(network: Network, point: number): number {
  const { s, ports } = network;
  const size = ports * ports * 2;
  let largest = 0;
  for (let k = point * size; k < (point + 1) * size; k += 2) {
    const ar = s[k]!;
    const ai = s[k + 1]!;
    const br = s[k + size]!;
    const bi = s[k + size + 1]!;
    if (ar * ar + ai * ai < leastMagnitude ** 2 || br * br + bi * bi < leastMagnitude ** 2) continue;
    largest = Math.max(largest, Math.abs(Math.atan2(ar * bi - ai * br, ar * br + ai * bi)));
  }
  return largest;
}
