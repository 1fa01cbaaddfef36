import type { Network } from './network';
import { NetworkError } from './network';
import { largestSingularValue } from './singular';

/** Points the extension looks at. */
const points = 9;

/**
 * Adds a point at 0 Hz (formula A8): of every entry the delay is taken out, the real part, which is even in frequency, is fitted
 * as c0 + c2 f^2 over the first points, and c0 is the value at 0 Hz. Scaled down where it would be less passive than the first
 * point. A part that blocks direct current cannot be told from its pass band; the warning says so.
 * @throws NetworkError where the phase from 0 Hz to the first point exceeds a quarter turn, or with fewer than 3 points
 */
export function extendToDc(network: Network): { network: Network; warnings: string[] } {
  const { ports, frequenciesHz, s, referenceOhm } = network;
  const count = frequenciesHz.length;
  if (frequenciesHz[0] === 0) return { network, warnings: [] };
  if (count < 3) {
    throw new NetworkError(
      `${count} points are too few to extend to 0 Hz.`,
      'Measure lower frequencies, or start the grid higher.',
    );
  }
  const size = ports * ports * 2;
  const extended = new Float64Array(s.length + size);
  extended.set(s, size);
  const used = Math.min(points, count);
  for (let entry = 0; entry < size; entry += 2) extended[entry] = dcOfEntry(network, entry, used);
  const first = extended.slice(size, 2 * size);
  const allowed = Math.max(1, largestSingularValue(first, ports));
  const found = largestSingularValue(extended.subarray(0, size), ports);
  if (found > allowed) for (let e = 0; e < size; e++) extended[e] = (extended[e]! * allowed) / found;
  const frequencies = new Float64Array(count + 1);
  frequencies.set(frequenciesHz, 1);
  return {
    network: { ports, frequenciesHz: frequencies, s: extended, referenceOhm },
    warnings: [
      `Extended from ${frequenciesHz[0]} Hz down to 0 Hz from the first ${used} points; a part that blocks direct current cannot be recognised this way.`,
    ],
  };
}

function dcOfEntry(network: Network, entry: number, used: number): number {
  const { ports, frequenciesHz, s } = network;
  const size = ports * ports * 2;
  // Delay from the weighted phase steps; entries that carry nothing have none.
  let turning = 0;
  let weight = 0;
  for (let k = 0; k + 1 < used; k++) {
    const a = k * size + entry;
    const b = a + size;
    const cross = s[a]! * s[b + 1]! - s[a + 1]! * s[b]!;
    const dot = s[a]! * s[b]! + s[a + 1]! * s[b + 1]!;
    const w = Math.hypot(cross, dot);
    turning += (w * Math.atan2(cross, dot)) / (frequenciesHz[k + 1]! - frequenciesHz[k]!);
    weight += w;
  }
  const slope = weight > 0 ? turning / weight : 0;
  const strong = Math.hypot(s[entry]!, s[entry + 1]!) > 0.1;
  if (strong && Math.abs(slope * frequenciesHz[0]!) > Math.PI / 2) {
    throw new NetworkError(
      `The data begin at ${frequenciesHz[0]} Hz, more than a quarter turn of phase above 0 Hz.`,
      'Measure lower frequencies, or start the grid at the first point.',
      'frequenciesHz[0]',
    );
  }
  return fitEvenAtZero(network, entry, used, slope);
}

/** Least squares c0 of Re(S e^(-j slope f)) = c0 + c2 f^2. */
function fitEvenAtZero(network: Network, entry: number, used: number, slope: number): number {
  const { ports, frequenciesHz, s } = network;
  const size = ports * ports * 2;
  let sx = 0;
  let sxx = 0;
  let sy = 0;
  let sxy = 0;
  const scale = frequenciesHz[used - 1]!;
  for (let k = 0; k < used; k++) {
    const f = frequenciesHz[k]!;
    const x = (f / scale) ** 2;
    const y = s[k * size + entry]! * Math.cos(slope * f) + s[k * size + entry + 1]! * Math.sin(slope * f);
    sx += x;
    sxx += x * x;
    sy += y;
    sxy += x * y;
  }
  return (sxx * sy - sx * sxy) / (used * sxx - sx * sx);
}
