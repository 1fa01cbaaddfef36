import { vacuumImpedance } from './constants';

/**
 * Impedance of a microstrip of zero thickness in air (E. Hammerstad and O. Jensen, IEEE MTT-S Digest, 1980, pp. 407-409; formula B1).
 * @param u width over height; stated within 0.03 % up to 1000
 */
export function airMicrostrip(u: number): number {
  const f = 6 + (2 * Math.PI - 6) * Math.exp(-((30.666 / u) ** 0.7528));
  return (vacuumImpedance / (2 * Math.PI)) * Math.log(f / u + Math.sqrt(1 + (2 / u) ** 2));
}

/**
 * Effective permittivity of a microstrip of zero thickness (Hammerstad and Jensen, 1980; formula B1): stated within 0.2 % for er up to
 * 128 and 0.01 <= u <= 100.
 */
export function microstripPermittivity(u: number, er: number): number {
  if (er === 1) return 1;
  const a =
    1 + Math.log((u ** 4 + (u / 52) ** 2) / (u ** 4 + 0.432)) / 49 + Math.log(1 + (u / 18.1) ** 3) / 18.7;
  const b = 0.564 * ((er - 0.9) / (er + 3)) ** 0.053;
  return (er + 1) / 2 + ((er - 1) / 2) * (1 + 10 / u) ** (-a * b);
}

/** Width gained by a strip of thickness t in air, over the height (Hammerstad and Jensen, 1980). */
function widening(u: number, t: number): number {
  if (t === 0) return 0;
  const coth = 1 / Math.tanh(Math.sqrt(6.517 * u));
  return (t / Math.PI) * Math.log(1 + (4 * Math.E) / (t * coth * coth));
}

/** Impedance in air of a strip of thickness t (over height). */
export function thickAirMicrostrip(u: number, t: number): number {
  return airMicrostrip(u + widening(u, t));
}

/**
 * Effective permittivity with thickness (Hammerstad and Jensen, 1980; formula B1): ee(ur, er) [Z01(u1)/Z01(ur)]^2, where
 * u1 is widened for air and ur for the substrate. Always a little low: within 0.7 %.
 */
export function thickMicrostripPermittivity(u: number, t: number, er: number): number {
  const inAir = widening(u, t);
  const onSubstrate = (inAir * (1 + 1 / Math.cosh(Math.sqrt(er - 1)))) / 2;
  const ratio = airMicrostrip(u + inAir) / airMicrostrip(u + onSubstrate);
  return microstripPermittivity(u + onSubstrate, er) * ratio * ratio;
}

/** Impedance and permittivity of a microstrip at a frequency. */
export interface Dispersed {
  readonly z0Ohm: number;
  readonly effectivePermittivity: number;
}

/**
 * Dispersion of a microstrip (M. Kirschning and R. H. Jansen, Electron. Lett. 18 no. 6, 1982, pp. 272-273; impedance: R. H. Jansen and
 * M. Kirschning, AEU 37, 1983, pp. 108-112; formula B2). For 0.1 <= u <= 100, 1 <= er <= 20, h/lambda0 <= 0.13. R2 is 0.267 u^7
 * (another copy has 0.2671; the check values do not tell).
 *
 * @param fn frequency times height, GHz mm
 * @param ee0 static effective permittivity, and z0 static impedance
 */
export function disperseMicrostrip(u: number, er: number, fn: number, ee0: number, z0: number): Dispersed {
  const p1 = 0.27488 + (0.6315 + 0.525 / (1 + 0.0157 * fn) ** 20) * u - 0.065683 * Math.exp(-8.7513 * u);
  const p2 = 0.33622 * (1 - Math.exp(-0.03442 * er));
  const p3 = 0.0363 * Math.exp(-4.6 * u) * (1 - Math.exp(-((fn / 38.7) ** 4.97)));
  const p4 = 1 + 2.751 * (1 - Math.exp(-((er / 15.916) ** 8)));
  const p = p1 * p2 * ((0.1844 + p3 * p4) * fn) ** 1.5763;
  const ee = er - (er - ee0) / (1 + p);
  return { effectivePermittivity: ee, z0Ohm: z0 * impedanceRatio(u, er, fn, ee0, ee) };
}

function impedanceRatio(u: number, er: number, fn: number, ee0: number, ee: number): number {
  const r1 = 0.03891 * er ** 1.4;
  const r2 = 0.267 * u ** 7;
  const r3 = 4.766 * Math.exp(-3.228 * u ** 0.641);
  const r4 = 0.016 + (0.0514 * er) ** 4.524;
  const r5 = (fn / 28.843) ** 12;
  const r6 = 22.2 * u ** 1.92;
  const r7 = 1.206 - 0.3144 * Math.exp(-r1) * (1 - Math.exp(-r2));
  const r8 = 1 + 1.275 * (1 - Math.exp(-0.004625 * r3 * er ** 1.674 * (fn / 18.365) ** 2.745));
  const cube = (er - 1) ** 6;
  const r9 =
    (((5.086 * r4 * r5) / (0.3838 + 0.386 * r4)) * Math.exp(-r6) * cube) /
    (1 + 1.2992 * r5) /
    (1 + 10 * cube);
  const r10 = 0.00044 * er ** 2.136 + 0.0184;
  const sixth = (fn / 19.47) ** 6;
  const r11 = sixth / (1 + 0.0962 * sixth);
  const r12 = 1 / (1 + 0.00245 * u * u);
  const r13 = 0.9408 * ee ** r8 - 0.9603;
  const r14 = (0.9408 - r9) * ee0 ** r8 - 0.9603;
  const r15 = 0.707 * r10 * (fn / 12.3) ** 1.097;
  const r16 = 1 + 0.0503 * er * er * r11 * (1 - Math.exp(-((u / 15) ** 6)));
  const r17 = r7 * (1 - 1.1241 * (r12 / r16) * Math.exp(-0.026 * fn ** 1.15656 - r15));
  return (r13 / r14) ** r17;
}
