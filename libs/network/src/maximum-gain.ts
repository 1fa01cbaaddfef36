/** What matching at both ends can win, point by point. */
export interface MaximumGain {
  /** Power ratio: maximum available gain where K >= 1, else the maximum stable gain |S21/S12|. */
  readonly gain: Float64Array;
  /** Rollett's stability factor K; Infinity where a path is missing. */
  readonly stabilityFactor: Float64Array;
  /** 1 where the part is potentially unstable (K < 1 beyond rounding, or gain without bound), else 0. */
  readonly potentiallyUnstable: Uint8Array;
}

/** Rounding of 1 - |S11|^2 - |S22|^2 + |D|^2: K - 1 below this over |S12 S21| is taken as 0, a lossless part. */
const rounding = 3e-15;

/**
 * Maximum available gain of a two-port (Rollett, IRE Trans. CT-9, 1962; Pozar, Microwave Engineering, 12.2):
 * G = |S21/S12| (K - sqrt(K^2 - 1)), K = B/(2 |S12 S21|), B = 1 - |S11|^2 - |S22|^2 + |S11 S22 - S12 S21|^2.
 * Written as 2 |S21|^2/(B + sqrt(B^2 - 4 |S12 S21|^2)), which also holds where S12 = 0. It does not depend on the real
 * references and is 1 for a lossless part.
 *
 * @param s two-port, 8 numbers a point
 */
export function maximumAvailableGain(s: Float64Array, points: number): MaximumGain {
  const gain = new Float64Array(points);
  const stabilityFactor = new Float64Array(points);
  const potentiallyUnstable = new Uint8Array(points);
  for (let point = 0; point < points; point++) {
    const k = point * 8;
    const [s11, s22] = [square(s, k), square(s, k + 6)];
    const [s12, s21] = [square(s, k + 2), square(s, k + 4)];
    const re = product(s, k, k + 6, 0) - product(s, k + 2, k + 4, 0);
    const im = product(s, k, k + 6, 1) - product(s, k + 2, k + 4, 1);
    const b = 1 - s11 - s22 + re * re + im * im;
    const twice = 2 * Math.sqrt(s12 * s21);
    stabilityFactor[point] = twice === 0 ? Infinity : b / twice;
    if (s21 === 0) {
      gain[point] = 0;
    } else if (Math.abs(b - twice) <= rounding) {
      stabilityFactor[point] = 1;
      gain[point] = twice === 0 ? 0 : Math.sqrt(s21 / s12);
    } else if (b < twice) {
      gain[point] = s12 === 0 ? Infinity : Math.sqrt(s21 / s12);
      potentiallyUnstable[point] = 1;
    } else {
      gain[point] = (2 * s21) / (b + Math.sqrt(b * b - twice * twice));
    }
  }
  return { gain, stabilityFactor, potentiallyUnstable };
}

/**
 * Toll: the loss of the part when matched at both ends, -10 log10 of its maximum available gain, in dB; Infinity
 * where nothing passes, negative for a part that amplifies.
 */
export function tollDb(s: Float64Array, points: number): Float64Array {
  return maximumAvailableGain(s, points).gain.map((gain) => 0 - 10 * Math.log10(gain));
}

function square(s: Float64Array, k: number): number {
  return s[k]! * s[k]! + s[k + 1]! * s[k + 1]!;
}

function product(s: Float64Array, p: number, q: number, part: 0 | 1): number {
  return part === 0 ? s[p]! * s[q]! - s[p + 1]! * s[q + 1]! : s[p]! * s[q + 1]! + s[p + 1]! * s[q]!;
}
