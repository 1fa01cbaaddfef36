/**
 * Real samples whose spectrum (0, df, 2 df, ... ; Hermitian) is given: x[n] = sum over k of X[k] e^(j 2 pi k n/size), k from
 * -size/2 to size/2. Radix-2 transform (Cooley and Tukey, Math. Comp. 19, 1965).
 *
 * @param spectrum pairs; at most size/2 + 1 of them
 * @param size a power of two
 */
export function realFromSpectrum(spectrum: Float64Array, size: number): Float64Array {
  const x = new Float64Array(size * 2);
  const count = Math.min(spectrum.length / 2, size / 2 + 1);
  for (let k = 0; k < count; k++) {
    const re = spectrum[k * 2]!;
    const im = spectrum[k * 2 + 1]!;
    x[k * 2] = re;
    x[k * 2 + 1] = k === 0 ? 0 : im;
    if (k === 0 || k === size / 2) continue;
    x[(size - k) * 2] = re;
    x[(size - k) * 2 + 1] = -im;
  }
  transform(x, size);
  return x.filter((_, k) => k % 2 === 0);
}

/** In-place transform with kernel e^(+j 2 pi k n/size), not scaled. */
function transform(x: Float64Array, size: number): void {
  for (let i = 0, j = 0; i < size; i++) {
    if (i < j) {
      for (let part = 0; part < 2; part++) {
        const kept = x[i * 2 + part]!;
        x[i * 2 + part] = x[j * 2 + part]!;
        x[j * 2 + part] = kept;
      }
    }
    let bit = size >> 1;
    while (bit >= 1 && (j & bit) !== 0) {
      j ^= bit;
      bit >>= 1;
    }
    j |= bit;
  }
  for (let half = 1; half < size; half *= 2) {
    for (let k = 0; k < half; k++) {
      const angle = (Math.PI * k) / half;
      const wr = Math.cos(angle);
      const wi = Math.sin(angle);
      for (let p = k; p < size; p += half * 2) butterfly(x, p * 2, (p + half) * 2, wr, wi);
    }
  }
}

function butterfly(x: Float64Array, p: number, q: number, wr: number, wi: number): void {
  const re = x[q]! * wr - x[q + 1]! * wi;
  const im = x[q]! * wi + x[q + 1]! * wr;
  x[q] = x[p]! - re;
  x[q + 1] = x[p + 1]! - im;
  x[p] = x[p]! + re;
  x[p + 1] = x[p + 1]! + im;
}
