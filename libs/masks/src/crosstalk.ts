import { noiseWeight } from './fit';
import { NetworkError } from '@tollgate/network';

/**
 * Power sum of crosstalk losses (positive dB), frequency by frequency: -10 log10 sum 10^(-loss/10)
 * (IEEE Std 802.3 Annex 69B, formulas D1). Infinity where no aggressor couples.
 * @throws NetworkError where the curves do not share one grid
 */
export function powerSumDb(curvesDb: readonly Float64Array[]): Float64Array {
  const points = curvesDb[0]?.length ?? 0;
  const stray = curvesDb.findIndex((curve) => curve.length !== points);
  if (stray >= 0) {
    throw new NetworkError(
      `Curve ${stray + 1} has ${curvesDb[stray]!.length} points, the first ${points}.`,
      'Interpolate all aggressors onto one grid first.',
      `curves[${stray}]`,
    );
  }
  return Float64Array.from({ length: points }, (_, k) => {
    const power = curvesDb.reduce((sum, curve) => sum + 10 ** (-curve[k]! / 10), 0);
    return 0 - 10 * Math.log10(power);
  });
}

/** Insertion-loss-to-crosstalk ratio in dB: ICR = PSXT - IL, both positive losses (formulas D1). */
export function insertionLossToCrosstalkDb(
  powerSumDb: Float64Array,
  insertionLossDb: Float64Array,
): Float64Array {
  return powerSumDb.map((crosstalk, k) => crosstalk - insertionLossDb[k]!);
}

/** The straight line in log10 f that fits ICR, unweighted: value = b + m log10(f / GHz). */
export function fitInLogarithm(frequenciesHz: Float64Array, valueDb: Float64Array): { b: number; m: number } {
  const used = Array.from(frequenciesHz, (f, k) => [Math.log10(f / 1e9), valueDb[k]!] as const).filter(
    ([x, y]) => Number.isFinite(x) && Number.isFinite(y),
  );
  if (used.length < 2) {
    throw new NetworkError(
      `${used.length} finite values above 0 Hz cannot carry a line.`,
      'Give at least two frequencies above 0 Hz at which something couples.',
    );
  }
  const meanX = used.reduce((sum, [x]) => sum + x, 0) / used.length;
  const meanY = used.reduce((sum, [, y]) => sum + y, 0) / used.length;
  const along = used.reduce((sum, [x, y]) => sum + (x - meanX) * (y - meanY), 0);
  const square = used.reduce((sum, [x]) => sum + (x - meanX) ** 2, 0);
  const m = along / square;
  return { b: meanY - m * meanX, m };
}

/** What integrated crosstalk noise is taken with: rate, amplitude and transition time of the aggressor, receiver bandwidth. */
export interface NoiseSettings {
  readonly symbolRateBd: number;
  /** Peak differential amplitude of the aggressor, in volts. */
  readonly amplitudeV: number;
  /** 20 to 80 % transition time of the aggressor, in seconds. */
  readonly transitionS: number;
  /** 3 dB frequency of the receiver's filter, commonly 0.75 of the symbol rate. */
  readonly receiverHz: number;
}

/**
 * Integrated noise of one kind of crosstalk, in volts rms (IEEE Std 802.3 equations 92-44 to 92-47, formulas D6):
 * sigma = sqrt(2 df sum W 10^(-MD/10)), W = (A^2/fb) sinc^2(f/fb) / [1 + (f/ft)^4] / [1 + (f/fr)^8], ft = 0.2365/T.
 * @param frequenciesHz uniform, at most 10 MHz apart
 * @param powerSumDb the multi-disturber loss (positive dB) at those frequencies
 * @throws NetworkError for frequencies that are not uniform
 */
export function integratedCrosstalkV(
  frequenciesHz: Float64Array,
  powerSumDb: Float64Array,
  settings: NoiseSettings,
): number {
  const step = frequenciesHz.length > 1 ? frequenciesHz[1]! - frequenciesHz[0]! : 0;
  const uneven = frequenciesHz.findIndex((f, k) => Math.abs(f - frequenciesHz[0]! - k * step) > 1e-6 * step);
  if (!(step > 0) || uneven >= 0) {
    throw new NetworkError(
      'The noise is a sum over uniform frequencies.',
      'Interpolate onto a uniform grid of at most 10 MHz first.',
      `frequenciesHz[${Math.max(uneven, 0)}]`,
    );
  }
  const { symbolRateBd, amplitudeV, transitionS, receiverHz } = settings;
  const weight = { symbolRateBd, transmitterHz: 0.2365 / transitionS, receiverHz };
  const sum = frequenciesHz.reduce(
    (total, f, k) => total + noiseWeight(f, weight) * 10 ** (-powerSumDb[k]! / 10),
    0,
  );
  return Math.sqrt((2 * step * amplitudeV ** 2 * sum) / symbolRateBd);
}

/** ICN = sqrt(sigma_nx^2 + sigma_fx^2), in volts rms (equation 92-48). */
export function totalCrosstalkV(nearV: number, farV: number): number {
  return Math.hypot(nearV, farV);
}
