import type { Network } from './network';
import { entryAt } from './network';

/** Magnitude of one entry as a positive loss in dB: -20 log10 |S|; Infinity where nothing passes. */
export function lossDb(re: number, im: number): number {
  return 0 - 20 * Math.log10(Math.hypot(re, im));
}

/** Loss of one entry over frequency, positive dB, Infinity where |S| is 0 (null at the JSON edge). Ports from 0. */
export function entryLossDb(network: Network, row: number, column: number): Float64Array {
  const { ports, s, frequenciesHz } = network;
  return Float64Array.from(frequenciesHz, (_, point) => {
    const k = entryAt(ports, point, row, column);
    return lossDb(s[k]!, s[k + 1]!);
  });
}

/** Insertion loss from port `from` to port `to` (from 0; default: the first near to the first far port). */
export function insertionLossDb(
  network: Network,
  to = Math.floor(network.ports / 2),
  from = 0,
): Float64Array {
  return entryLossDb(network, to, from);
}

/** Return loss at a port (from 0), positive dB. */
export function returnLossDb(network: Network, port: number): Float64Array {
  return entryLossDb(network, port, port);
}

/** Phase of one entry in radians, steps of more than half a turn undone; a zero entry keeps the phase before it. */
export function unwrappedPhaseRad(network: Network, row: number, column: number): Float64Array {
  const { ports, s, frequenciesHz } = network;
  const phase = new Float64Array(frequenciesHz.length);
  let last = 0;
  let started = false;
  for (let point = 0; point < phase.length; point++) {
    const k = entryAt(ports, point, row, column);
    if (s[k] !== 0 || s[k + 1] !== 0) {
      const wrapped = Math.atan2(s[k + 1]!, s[k]!);
      last = started ? wrapped - 2 * Math.PI * Math.round((wrapped - last) / (2 * Math.PI)) : wrapped;
      started = true;
    }
    phase[point] = last;
  }
  return phase;
}

/**
 * Group delay -d phase / d omega of one entry in seconds, by the parabola through each point and its neighbours (exact
 * for a phase of second degree on any grid); 0 for a single point.
 */
export function groupDelayS(network: Network, row: number, column: number): Float64Array {
  const phase = unwrappedPhaseRad(network, row, column);
  const f = network.frequenciesHz;
  const count = f.length;
  const delay = new Float64Array(count);
  if (count < 2) return delay;
  const slope = (k: number): number => (phase[k + 1]! - phase[k]!) / (f[k + 1]! - f[k]!);
  for (let k = 0; k < count; k++) {
    let d: number;
    if (count === 2) d = slope(0);
    else if (k === 0) d = endSlope(slope(0), slope(1), f[1]! - f[0]!, f[2]! - f[1]!);
    else if (k === count - 1) {
      d = endSlope(slope(k - 1), slope(k - 2), f[k]! - f[k - 1]!, f[k - 1]! - f[k - 2]!);
    } else {
      const before = f[k]! - f[k - 1]!;
      const after = f[k + 1]! - f[k]!;
      d = (slope(k - 1) * after + slope(k) * before) / (before + after);
    }
    delay[k] = 0 - d / (2 * Math.PI);
  }
  return delay;
}

function endSlope(outer: number, inner: number, outerStep: number, innerStep: number): number {
  return outer + ((outer - inner) * outerStep) / (outerStep + innerStep);
}
