import { extendToDc } from './dc-extension';
import { inspectGrid } from './grid';
import type { Network } from './network';
import { checkFrequencies, NetworkError } from './network';

export type InterpolationMethod = 'polar' | 'rectangular';

export interface InterpolationOptions {
  /** Magnitude and unwrapped phase, or real and imaginary part; both linear in frequency. */
  readonly method: InterpolationMethod;
  /** What to do below the first point; `to-dc` extends to 0 Hz and says so. Default `refuse`. */
  readonly below?: 'refuse' | 'to-dc';
}

export interface Interpolation {
  readonly network: Network;
  /** Estimated largest |error| of any entry, the range of points taken together, and where it occurs. */
  readonly error: { readonly maxAbs: number; readonly atHz: number };
  /** The same estimate for every wanted frequency. */
  readonly errorAbs: Float64Array;
  /** The range below the data that was extended, or null. */
  readonly extendedHz: readonly [number, number] | null;
  /** What a person should know, in sentences. */
  readonly warnings: readonly string[];
}

/** A wanted frequency this close (relative) to an end of the data is that end. */
const endTolerance = 1e-12;

/**
 * A network on other frequencies. The error is estimated as the difference from the cubic through the four nearest points
 * (formula A8 gives the exact error for a pure delay); where the wanted frequency is a point of the data, the data come back
 * unchanged.
 * @throws NetworkError where the data do not reach, unless extension to 0 Hz was asked for
 */
export function interpolate(
  network: Network,
  frequenciesHz: Float64Array,
  options: InterpolationOptions,
): Interpolation {
  checkFrequencies(frequenciesHz);
  const count = network.frequenciesHz.length;
  const first = frequenciesHz[0];
  const last = frequenciesHz[frequenciesHz.length - 1];
  if (count === 0 || first === undefined || last === undefined) {
    throw new NetworkError(
      'There are no points to interpolate.',
      'Give at least one frequency and one point of data.',
    );
  }
  const warnings: string[] = [];
  let source = network;
  let extendedHz: [number, number] | null = null;
  const lowest = network.frequenciesHz[0]!;
  if (first < lowest * (1 - endTolerance)) {
    if (options.below !== 'to-dc') refuseRange(network, first, last, 'below');
    const extension = extendToDc(network);
    source = extension.network;
    warnings.push(...extension.warnings);
    extendedHz = [first, lowest];
  }
  if (last > network.frequenciesHz[count - 1]! * (1 + endTolerance))
    refuseRange(network, first, last, 'above');
  const result =
    options.method === 'polar' ? polar(source, frequenciesHz) : rectangular(source, frequenciesHz);
  const wide = inspectGrid(source).widePhaseStepsHz.filter(([from, to]) => from < last && to > first);
  if (wide.length > 0) {
    warnings.push(
      `Phase steps of more than 45 degrees between points from ${wide[0]![0]} to ${wide[wide.length - 1]![1]} Hz: interpolation is uncertain there.`,
    );
  }
  let worst = 0;
  for (let k = 0; k < frequenciesHz.length; k++) if (result.errorAbs[k]! > result.errorAbs[worst]!) worst = k;
  return {
    network: { ports: network.ports, frequenciesHz, s: result.s, referenceOhm: network.referenceOhm },
    error: { maxAbs: result.errorAbs[worst]!, atHz: frequenciesHz[worst]! },
    errorAbs: result.errorAbs,
    extendedHz,
    warnings,
  };
}

function refuseRange(network: Network, fromHz: number, toHz: number, side: 'below' | 'above'): never {
  const f = network.frequenciesHz;
  throw new NetworkError(
    `The data reach from ${f[0]} to ${f[f.length - 1]} Hz, and ${side === 'below' ? fromHz : toHz} Hz is asked for.`,
    side === 'below'
      ? 'Start the grid at the first point, or ask for the extension to 0 Hz.'
      : 'End the grid at the last point.',
    'frequenciesHz',
  );
}

/** For each wanted frequency the interval it lies in and its place there, 0 to 1. */
interface Places {
  readonly interval: Int32Array;
  readonly share: Float64Array;
}

function placesOf(source: Float64Array, wanted: Float64Array): Places {
  const interval = new Int32Array(wanted.length);
  const share = new Float64Array(wanted.length);
  const last = source.length - 1;
  let k = 0;
  for (let point = 0; point < wanted.length; point++) {
    const f = wanted[point]!;
    while (k < last - 1 && source[k + 1]! <= f) k++;
    interval[point] = k;
    if (last === 0) continue;
    const t = (f - source[k]!) / (source[k + 1]! - source[k]!);
    share[point] = Math.min(1, Math.max(0, t));
  }
  return { interval, share };
}

/**
 * Weights of the cubic through points k-1..k+2 minus those of the straight line through k, k+1; the first point used goes to
 * the result's `from`. Fewer points where the data have fewer.
 */
function curvatureWeights(source: Float64Array, k: number, f: number, out: Float64Array): number {
  const last = source.length - 1;
  const from = Math.max(0, Math.min(k - 1, last - 3));
  const to = Math.min(last, from + 3);
  out.fill(0);
  for (let i = from; i <= to; i++) {
    let weight = 1;
    for (let j = from; j <= to; j++) {
      if (j !== i) weight *= (f - source[j]!) / (source[i]! - source[j]!);
    }
    out[i - from] = weight;
  }
  if (last > 0) {
    const t = (f - source[k]!) / (source[k + 1]! - source[k]!);
    out[k - from] = out[k - from]! - (1 - t);
    out[k + 1 - from] = out[k + 1 - from]! - t;
  }
  return from;
}

interface Interpolated {
  readonly s: Float64Array;
  readonly errorAbs: Float64Array;
}

function rectangular(network: Network, wanted: Float64Array): Interpolated {
  const { s: data, frequenciesHz: source } = network;
  const size = network.ports * network.ports * 2;
  const { interval, share } = placesOf(source, wanted);
  const s = new Float64Array(wanted.length * size);
  const errorAbs = new Float64Array(wanted.length);
  const weights = new Float64Array(4);
  for (let point = 0; point < wanted.length; point++) {
    const k = interval[point]!;
    const t = share[point]!;
    const low = k * size;
    const high = t === 0 ? low : low + size;
    for (let e = 0; e < size; e++) {
      // At an end of the interval the data come back bit by bit.
      s[point * size + e] =
        t === 1 ? data[high + e]! : data[low + e]! + t * (data[high + e]! - data[low + e]!);
    }
    if (t === 0 || t === 1) continue;
    const from = curvatureWeights(source, k, wanted[point]!, weights);
    let worst = 0;
    for (let e = 0; e < size; e += 2) {
      let re = 0;
      let im = 0;
      for (let n = 0; n < 4 && from + n < source.length; n++) {
        re += weights[n]! * data[(from + n) * size + e]!;
        im += weights[n]! * data[(from + n) * size + e + 1]!;
      }
      worst = Math.max(worst, re * re + im * im);
    }
    errorAbs[point] = Math.sqrt(worst);
  }
  return { s, errorAbs };
}

/** Magnitudes and unwrapped phases of one entry. */
function polarEntry(
  data: Float64Array,
  size: number,
  entry: number,
  magnitude: Float64Array,
  phase: Float64Array,
): void {
  let last = 0;
  let started = false;
  for (let k = 0; k < magnitude.length; k++) {
    const re = data[k * size + entry]!;
    const im = data[k * size + entry + 1]!;
    magnitude[k] = Math.hypot(re, im);
    if (magnitude[k] !== 0) {
      const wrapped = Math.atan2(im, re);
      last = started ? wrapped - 2 * Math.PI * Math.round((wrapped - last) / (2 * Math.PI)) : wrapped;
      started = true;
    }
    phase[k] = last;
  }
}

function polar(network: Network, wanted: Float64Array): Interpolated {
  const { s: data, frequenciesHz: source } = network;
  const size = network.ports * network.ports * 2;
  const { interval, share } = placesOf(source, wanted);
  const s = new Float64Array(wanted.length * size);
  const errorAbs = new Float64Array(wanted.length);
  const magnitude = new Float64Array(source.length);
  const phase = new Float64Array(source.length);
  const weights = new Float64Array(4);
  for (let entry = 0; entry < size; entry += 2) {
    polarEntry(data, size, entry, magnitude, phase);
    for (let point = 0; point < wanted.length; point++) {
      const k = interval[point]!;
      const t = share[point]!;
      const at = point * size + entry;
      if (t === 0 || t === 1) {
        const from = (k + t) * size + entry;
        s[at] = data[from]!;
        s[at + 1] = data[from + 1]!;
        continue;
      }
      const m = magnitude[k]! + t * (magnitude[k + 1]! - magnitude[k]!);
      const p = phase[k]! + t * (phase[k + 1]! - phase[k]!);
      s[at] = m * Math.cos(p);
      s[at + 1] = m * Math.sin(p);
      const from = curvatureWeights(source, k, wanted[point]!, weights);
      let dm = 0;
      let dp = 0;
      for (let n = 0; n < 4 && from + n < source.length; n++) {
        dm += weights[n]! * magnitude[from + n]!;
        dp += weights[n]! * phase[from + n]!;
      }
      errorAbs[point] = Math.max(
        errorAbs[point]!,
        Math.hypot(dm, 2 * m * Math.sin(Math.min(Math.abs(dp), Math.PI) / 2)),
      );
    }
  }
  return { s, errorAbs };
}
