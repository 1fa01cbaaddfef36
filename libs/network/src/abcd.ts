import { NetworkError } from './network';

/**
 * ABCD to power-wave S of a two-port (A1: Frickey, IEEE Trans. MTT-42, 1994, with the comment of Marks and Williams), complex and
 * unequal references allowed. V1 = A V2 + B I2, I1 = C V2 + D I2, I2 out of port 2.
 *
 * @param abcd A, B, C, D as pairs, 8 numbers a point; may be `out`
 * @param referenceOhm two pairs
 */
export function abcdToS2Into(
  out: Float64Array,
  abcd: Float64Array,
  points: number,
  referenceOhm: Float64Array,
): void {
  const r1 = referenceOhm[0]!;
  const x1 = referenceOhm[1]!;
  const r2 = referenceOhm[2]!;
  const x2 = referenceOhm[3]!;
  const k2 = 2 * Math.sqrt(r1 * r2);
  for (let k = 0; k < points * 8; k += 8) {
    const ar = abcd[k]!;
    const ai = abcd[k + 1]!;
    const br = abcd[k + 2]!;
    const bi = abcd[k + 3]!;
    const cr = abcd[k + 4]!;
    const ci = abcd[k + 5]!;
    const dr = abcd[k + 6]!;
    const di = abcd[k + 7]!;
    // e = A Z2 + B, g = C Z2 + D, f = B - A Z2*, h = D - C Z2*
    const er = ar * r2 - ai * x2 + br;
    const ei = ar * x2 + ai * r2 + bi;
    const gr = cr * r2 - ci * x2 + dr;
    const gi = cr * x2 + ci * r2 + di;
    const fr = br - (ar * r2 + ai * x2);
    const fi = bi - (ai * r2 - ar * x2);
    const hr = dr - (cr * r2 + ci * x2);
    const hi = di - (ci * r2 - cr * x2);
    // D0 = e + Z1 g; S11 = (e - Z1* g)/D0; S22 = (f + Z1 h)/D0
    const nr = er + (gr * r1 - gi * x1);
    const ni = ei + (gr * x1 + gi * r1);
    const scale = 1 / (nr * nr + ni * ni);
    const ir = nr * scale;
    const ii = -ni * scale;
    const pr = er - (gr * r1 + gi * x1);
    const pi = ei - (gi * r1 - gr * x1);
    const qr = fr + (hr * r1 - hi * x1);
    const qi = fi + (hr * x1 + hi * r1);
    const detr = (ar * dr - ai * di - (br * cr - bi * ci)) * k2;
    const deti = (ar * di + ai * dr - (br * ci + bi * cr)) * k2;
    out[k] = pr * ir - pi * ii;
    out[k + 1] = pr * ii + pi * ir;
    out[k + 2] = detr * ir - deti * ii;
    out[k + 3] = detr * ii + deti * ir;
    out[k + 4] = k2 * ir;
    out[k + 5] = k2 * ii;
    out[k + 6] = qr * ir - qi * ii;
    out[k + 7] = qr * ii + qi * ir;
  }
}

/**
 * Power-wave S of a two-port to ABCD (A1). `s` may be `out`.
 * @throws NetworkError where S21 is 0, for which no ABCD exists
 */
export function sToAbcd2Into(
  out: Float64Array,
  s: Float64Array,
  points: number,
  referenceOhm: Float64Array,
): void {
  const r1 = referenceOhm[0]!;
  const x1 = referenceOhm[1]!;
  const r2 = referenceOhm[2]!;
  const x2 = referenceOhm[3]!;
  const k2 = 2 * Math.sqrt(r1 * r2);
  for (let k = 0; k < points * 8; k += 8) {
    const s11r = s[k]!;
    const s11i = s[k + 1]!;
    const s21r = s[k + 4]!;
    const s21i = s[k + 5]!;
    const s22r = s[k + 6]!;
    const s22i = s[k + 7]!;
    const size = s21r * s21r + s21i * s21i;
    if (size === 0) refuseNoPath(k / 8);
    const scale = 1 / (size * k2);
    const ir = s21r * scale;
    const ii = -s21i * scale;
    const mr = s[k + 2]! * s21r - s[k + 3]! * s21i;
    const mi = s[k + 2]! * s21i + s[k + 3]! * s21r;
    // u = Z1* + S11 Z1, v = Z2* + S22 Z2
    const ur = r1 + s11r * r1 - s11i * x1;
    const ui = -x1 + s11r * x1 + s11i * r1;
    const vr = r2 + s22r * r2 - s22i * x2;
    const vi = -x2 + s22r * x2 + s22i * r2;
    const pr = 1 - s11r;
    const pi = -s11i;
    const qr = 1 - s22r;
    const qi = -s22i;
    const mz1r = mr * r1 - mi * x1;
    const mz1i = mr * x1 + mi * r1;
    const mz2r = mr * r2 - mi * x2;
    const mz2i = mr * x2 + mi * r2;
    put(out, k, ur * qr - ui * qi + mz1r, ur * qi + ui * qr + mz1i, ir, ii);
    const mzzr = mz1r * r2 - mz1i * x2;
    const mzzi = mz1r * x2 + mz1i * r2;
    put(out, k + 2, ur * vr - ui * vi - mzzr, ur * vi + ui * vr - mzzi, ir, ii);
    put(out, k + 4, pr * qr - pi * qi - mr, pr * qi + pi * qr - mi, ir, ii);
    put(out, k + 6, pr * vr - pi * vi + mz2r, pr * vi + pi * vr + mz2i, ir, ii);
  }
}

function put(out: Float64Array, k: number, re: number, im: number, sr: number, si: number): void {
  out[k] = re * sr - im * si;
  out[k + 1] = re * si + im * sr;
}

/** Refuses a chain matrix of a part that passes nothing. */
export function refuseNoPath(point: number): never {
  throw new NetworkError(
    'Nothing passes from near to far, so no chain matrix exists.',
    'Stay with S, or leave this point out.',
    `s[${point}]`,
  );
}
