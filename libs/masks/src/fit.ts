import { NetworkError } from '@tollgate/network';

/**
 * How a loss is fitted. `line`: m f + b, unweighted (IEEE Std 802.3 Annex 69B, formulas D1). `weighted`:
 * a0 + a1 sqrt f + a2 f + a4 f^2 with rows scaled by |S21| (the public COM reference code, formulas D6).
 */
export type FitBasis = 'line' | 'weighted';

export interface LossFit {
  /** Coefficients for f in GHz: [b, m], or [a0, a1, a2, a4]. */
  readonly coefficients: readonly number[];
  /** The fitted loss in dB at a frequency. */
  readonly valueAt: (frequencyHz: number) => number;
}

/** Fits are taken on uniform samples this far apart, whatever the grid of the check. */
export const fitStepHz = 10e6;

/** 10 MHz samples from `fromHz` up to `toHz`, both included where they meet a sample. */
export function fitFrequencies(fromHz: number, toHz: number): Float64Array {
  // A thousandth of a hertz forgives rounding in a range's end.
  const count = Math.floor((toHz - fromHz + 1e-3) / fitStepHz) + 1;
  return Float64Array.from({ length: Math.max(count, 0) }, (_, k) => Math.min(fromHz + k * fitStepHz, toHz));
}

function rowOf(basis: FitBasis, fGhz: number): number[] {
  return basis === 'line' ? [1, fGhz] : [1, Math.sqrt(fGhz), fGhz, fGhz * fGhz];
}

/**
 * Least-squares fit of a loss (positive dB) over frequency by Householder QR; the normal equations would lose half of
 * the digits. A sample of infinite loss has no weight in a weighted fit and no place in a line.
 * @throws NetworkError with fewer samples than coefficients, or an infinite loss in a line fit
 */
export function fitLoss(frequenciesHz: Float64Array, lossDb: Float64Array, basis: FitBasis): LossFit {
  const size = rowOf(basis, 1).length;
  const rows: number[][] = [];
  frequenciesHz.forEach((f, k) => {
    const loss = lossDb[k]!;
    if (!Number.isFinite(loss)) {
      if (basis === 'weighted') return;
      throw new NetworkError(
        `Nothing is transmitted at ${f} Hz.`,
        'Fit a range in which the channel transmits.',
        'fit',
      );
    }
    const weight = basis === 'line' ? 1 : 10 ** (-loss / 20);
    rows.push([...rowOf(basis, f / 1e9), loss].map((entry) => entry * weight));
  });
  if (rows.length < size) {
    throw new NetworkError(
      `${rows.length} samples cannot fit ${size} coefficients.`,
      'Widen the range of the fit: it is sampled each 10 MHz.',
      'fit',
    );
  }
  const coefficients = leastSquares(rows, size);
  const valueAt = (frequencyHz: number): number =>
    rowOf(basis, frequencyHz / 1e9).reduce((sum, entry, k) => sum + entry * coefficients[k]!, 0);
  return { coefficients, valueAt };
}

/** Householder QR of rows that carry the right-hand side as their last entry; overwrites them. */
function leastSquares(rows: number[][], size: number): number[] {
  for (let column = 0; column < size; column++) {
    const norm = Math.sqrt(rows.slice(column).reduce((sum, row) => sum + row[column]! ** 2, 0));
    const pivot = rows[column]!;
    const alpha = pivot[column]! > 0 ? -norm : norm;
    const reflector = rows.slice(column).map((row) => row[column]!);
    reflector[0]! -= alpha;
    const square = reflector.reduce((sum, v) => sum + v * v, 0);
    for (let k = column; square > 0 && k <= size; k++) {
      const along = reflector.reduce((sum, v, i) => sum + v * rows[column + i]![k]!, 0);
      const scale = (2 * along) / square;
      reflector.forEach((v, i) => (rows[column + i]![k]! -= scale * v));
    }
  }
  const solution = new Array<number>(size).fill(0);
  for (let row = size - 1; row >= 0; row--) {
    const known = solution.reduce((sum, value, k) => (k > row ? sum + value * rows[row]![k]! : sum), 0);
    solution[row] = (rows[row]![size]! - known) / rows[row]![row]!;
  }
  return solution;
}

/** Settings of the weight of equation 93A-57. */
export interface NoiseWeight {
  readonly symbolRateBd: number;
  /** 0.2365 over the transition time. */
  readonly transmitterHz: number;
  /** 0.75 of the symbol rate. */
  readonly receiverHz: number;
}

/** W(f) = sinc^2(f/fb) / [1 + (f/ft)^4] / [1 + (f/fr)^8], sinc x = sin(pi x)/(pi x) (93A-57, formulas D6). */
export function noiseWeight(
  frequencyHz: number,
  { symbolRateBd, transmitterHz, receiverHz }: NoiseWeight,
): number {
  const x = (Math.PI * frequencyHz) / symbolRateBd;
  const sinc = x === 0 ? 1 : Math.sin(x) / x;
  return (sinc * sinc) / (1 + (frequencyHz / transmitterHz) ** 4) / (1 + (frequencyHz / receiverHz) ** 8);
}

/** Root mean square of the weighted insertion-loss deviation, FOM_ILD = sqrt(sum W ILD^2 / N), dB (93A-56). */
export function deviationFigureDb(
  frequenciesHz: Float64Array,
  deviationDb: Float64Array,
  weight: NoiseWeight,
): number {
  const sum = frequenciesHz.reduce((total, f, k) => total + noiseWeight(f, weight) * deviationDb[k]! ** 2, 0);
  return Math.sqrt(sum / frequenciesHz.length);
}
