/**
 * Complex functions for loops over frequency: every result goes to `out[at]` (real) and `out[at + 1]`
 * (imaginary), so that nothing is allocated per point. `out` may hold the arguments.
 */

/** out = a / b by Smith's algorithm (CACM 5, 1962, algorithm 116): no overflow for large b. */
export function complexDivide(
  out: Float64Array,
  at: number,
  aRe: number,
  aIm: number,
  bRe: number,
  bIm: number,
): void {
  if (Math.abs(bRe) >= Math.abs(bIm)) {
    const ratio = bIm / bRe;
    const scale = 1 / (bRe + bIm * ratio);
    out[at] = (aRe + aIm * ratio) * scale;
    out[at + 1] = (aIm - aRe * ratio) * scale;
  } else {
    const ratio = bRe / bIm;
    const scale = 1 / (bRe * ratio + bIm);
    out[at] = (aRe * ratio + aIm) * scale;
    out[at + 1] = (aIm * ratio - aRe) * scale;
  }
}

/** out = a b. */
export function complexMultiply(
  out: Float64Array,
  at: number,
  aRe: number,
  aIm: number,
  bRe: number,
  bIm: number,
): void {
  out[at] = aRe * bRe - aIm * bIm;
  out[at + 1] = aRe * bIm + aIm * bRe;
}

/** out = principal square root (real part from 0 up). */
export function complexSqrt(out: Float64Array, at: number, re: number, im: number): void {
  // Math.hypot allocates; it is left to what would overflow or vanish when squared.
  let size = Math.sqrt(re * re + im * im);
  if (!(size > 1e-140 && size < 1e140)) size = Math.hypot(re, im);
  if (size === 0) {
    out[at] = 0;
    out[at + 1] = 0;
    return;
  }
  const larger = Math.sqrt((size + Math.abs(re)) / 2);
  const smaller = Math.abs(im) / (2 * larger);
  out[at] = re >= 0 ? larger : smaller;
  const imaginary = re >= 0 ? smaller : larger;
  out[at + 1] = im < 0 ? -imaginary : imaginary;
}

/** out = e^(re + j im). */
export function complexExp(out: Float64Array, at: number, re: number, im: number): void {
  const size = Math.exp(re);
  out[at] = size * Math.cos(im);
  out[at + 1] = size * Math.sin(im);
}

/** out = cosh(re + j im). */
export function complexCosh(out: Float64Array, at: number, re: number, im: number): void {
  out[at] = Math.cosh(re) * Math.cos(im);
  out[at + 1] = Math.sinh(re) * Math.sin(im);
}

/** out = sinh(re + j im). */
export function complexSinh(out: Float64Array, at: number, re: number, im: number): void {
  out[at] = Math.sinh(re) * Math.cos(im);
  out[at + 1] = Math.cosh(re) * Math.sin(im);
}

/**
 * out = tanh(re + j im), exact for large |re| where cosh overflows
 * (tanh z = (sinh 2x + j sin 2y)/(cosh 2x + cos 2y)). Infinite only at an exact pole.
 */
export function complexTanh(out: Float64Array, at: number, re: number, im: number): void {
  if (Math.abs(re) > 20) {
    out[at] = Math.sign(re);
    out[at + 1] = 4 * Math.sin(im) * Math.cos(im) * Math.exp(-2 * Math.abs(re));
    return;
  }
  // sinh^2 x + cos^2 y keeps its digits near a pole, where cosh 2x + cos 2y cancels.
  const sinh = Math.sinh(re);
  const cos = Math.cos(im);
  const size = sinh * sinh + cos * cos;
  out[at] = (sinh * Math.cosh(re)) / size;
  out[at + 1] = (Math.sin(im) * cos) / size;
}
