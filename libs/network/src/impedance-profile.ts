import { realFromSpectrum } from './fourier';
import { interpolate } from './interpolate';
import type { Network } from './network';
import { NetworkError } from './network';
import { pickPorts } from './ports';

/** How the spectrum is brought to zero at its upper end. */
export type ProfileWindow = 'none' | 'hann' | 'kaiser-6';

export interface ImpedanceProfileOptions {
  /** 10 to 90 % rise time of the Gaussian edge of the step, in seconds. */
  readonly riseTimeS: number;
  readonly window: ProfileWindow;
  /** Whether data that begin above 0 Hz may be extended down; a profile needs 0 Hz. */
  readonly below?: 'refuse' | 'to-dc';
  /** End of the time axis; default and most: half the inverse of the frequency step. */
  readonly stopS?: number;
}

export interface ImpedanceProfile {
  /** The middle of the edge reaches the port at 0; a reflection from a distance comes after twice the delay. */
  readonly timeS: Float64Array;
  /** Z0 (1 + rho)/(1 - rho); Infinity where rho reaches 1. First-order: it does not undo multiple reflections. */
  readonly impedanceOhm: Float64Array;
  /** Step response of the reflection at the port. */
  readonly reflection: Float64Array;
  readonly riseTimeS: number;
  readonly window: ProfileWindow;
  readonly referenceOhm: number;
  readonly warnings: readonly string[];
}

const mostPoints = 20001;
/** Time samples for each sample that the band alone would give. */
const oversampling = 4;
/** 10 to 90 % of a Gaussian edge is this many standard deviations. */
const riseInSigmas = 2.5631031310892007;

/**
 * Impedance seen along time at one port (from 0), the others ended in their references: the response of S11 to a step with a
 * Gaussian edge.
 * @throws NetworkError for a complex reference, a rise time that is not positive, or data that do not reach 0 Hz
 */
export function impedanceProfile(
  network: Network,
  port: number,
  options: ImpedanceProfileOptions,
): ImpedanceProfile {
  if (!(options.riseTimeS > 0) || !Number.isFinite(options.riseTimeS)) {
    throw new NetworkError(
      `The rise time ${options.riseTimeS} s is not above zero.`,
      'Give a positive rise time.',
    );
  }
  const one = pickPorts(network, [port]);
  if (one.referenceOhm[1] !== 0) {
    throw new NetworkError('A profile needs a real reference.', 'Renormalise to a real reference first.');
  }
  const { grid, stepHz } = uniformGrid(one);
  const sampled = interpolate(one, grid, { method: 'rectangular', below: options.below });
  const warnings = [...sampled.warnings];
  const topHz = grid[grid.length - 1]!;
  if (options.riseTimeS * topHz < 0.7) {
    warnings.push(
      `Data up to ${topHz} Hz do not carry an edge of ${options.riseTimeS} s; details shorter than ${0.7 / topHz} s are smeared or ring.`,
    );
  }
  const spectrum = shape(sampled.network.s, grid, options);
  const size = 2 ** Math.ceil(Math.log2(grid.length * 2 * oversampling));
  const impulse = realFromSpectrum(spectrum, size);
  return integrate(impulse, stepHz, one.referenceOhm[0]!, options, warnings);
}

function uniformGrid(one: Network): { grid: Float64Array; stepHz: number } {
  const f = one.frequenciesHz;
  const topHz = f[f.length - 1] ?? 0;
  let finest = Infinity;
  for (let k = 1; k < f.length; k++) finest = Math.min(finest, f[k]! - f[k - 1]!);
  if (!Number.isFinite(finest)) {
    throw new NetworkError('A profile needs at least two frequencies.', 'Give a network over a range.');
  }
  const steps = Math.min(mostPoints - 1, Math.max(8, Math.round(topHz / finest)));
  const stepHz = topHz / steps;
  return {
    grid: Float64Array.from({ length: steps + 1 }, (_, k) => (k === steps ? topHz : k * stepHz)),
    stepHz,
  };
}

function windowAt(window: ProfileWindow, share: number): number {
  if (window === 'none') return 1;
  if (window === 'hann') return 0.5 + 0.5 * Math.cos(Math.PI * share);
  return besselI0(6 * Math.sqrt(Math.max(0, 1 - share * share))) / besselI0(6);
}

/** Modified Bessel function of order 0 by its series (Abramowitz and Stegun 9.6.12). */
function besselI0(x: number): number {
  let term = 1;
  let sum = 1;
  for (let k = 1; term > 1e-17 * sum; k++) {
    term *= (x / (2 * k)) ** 2;
    sum += term;
  }
  return sum;
}

function shape(s: Float64Array, grid: Float64Array, options: ImpedanceProfileOptions): Float64Array {
  const sigmaS = options.riseTimeS / riseInSigmas;
  const topHz = grid[grid.length - 1]!;
  const spectrum = new Float64Array(s.length);
  for (let k = 0; k < grid.length; k++) {
    const f = grid[k]!;
    const weight = windowAt(options.window, f / topHz) * Math.exp(-2 * (Math.PI * f * sigmaS) ** 2);
    spectrum[k * 2] = s[k * 2]! * weight;
    spectrum[k * 2 + 1] = s[k * 2 + 1]! * weight;
  }
  return spectrum;
}

function integrate(
  impulse: Float64Array,
  stepHz: number,
  referenceOhm: number,
  options: ImpedanceProfileOptions,
  warnings: string[],
): ImpedanceProfile {
  const size = impulse.length;
  const stepS = 1 / (size * stepHz);
  // The edge begins before its middle: the integral starts a few rise times early, in the wrapped part of the axis.
  const early = Math.min(Math.floor(size / 8), Math.ceil((3 * options.riseTimeS) / stepS));
  const longest = Math.floor(size / 2);
  const stop = options.stopS === undefined ? longest : Math.min(longest, Math.floor(options.stopS / stepS));
  const count = early + stop + 1;
  const timeS = new Float64Array(count);
  const reflection = new Float64Array(count);
  let sum = 0;
  for (let k = 0; k < count; k++) {
    const at = (k - early + size) % size;
    // Trapezoid: half a sample before, half after.
    sum += impulse[at]! * stepHz * stepS * 0.5;
    reflection[k] = sum;
    sum += impulse[at]! * stepHz * stepS * 0.5;
    timeS[k] = (k - early) * stepS;
  }
  return {
    timeS,
    reflection,
    impedanceOhm: reflection.map((rho) => (rho >= 1 ? Infinity : (referenceOhm * (1 + rho)) / (1 - rho))),
    riseTimeS: options.riseTimeS,
    window: options.window,
    referenceOhm,
    warnings,
  };
}
