import { complexSqrt } from '@tollgate/network';
import type { ElementOf } from '@tollgate/contracts';
import { passInto } from './line';
import { writeSymmetric } from './symmetric';

const root = new Float64Array(2);

/** Below this |gamma l|^4 a line is short: cosh and sinh by their series, good to the last digit with four terms. */
const shortFourth = 1e-6;

/**
 * A uniform line by its constants per length: gamma = sqrt((R + jwL)(G + jwC)), Zc = sqrt((R + jwL)/(G + jwC)) (Pozar 2.5, 2.7).
 * A short line needs neither, and is finite down to 0 Hz, where Zc is none or 0/0.
 */
export function rlgcInto(
  out: Float64Array,
  at: number,
  line: ElementOf<'rlgc-line'>,
  frequencyHz: number,
  referenceOhm: number,
): void {
  const w = 2 * Math.PI * frequencyHz;
  immittanceLineInto(
    out,
    at,
    line.resistanceOhmPerM,
    w * line.inductanceHPerM,
    line.conductanceSPerM,
    w * line.capacitanceFPerM,
    line.lengthM,
    referenceOhm,
  );
}

/** The same from series impedance z (ohm/m) and shunt admittance y (S/m) at one frequency, and a length in metres. */
export function immittanceLineInto(
  out: Float64Array,
  at: number,
  zRe: number,
  zIm: number,
  yRe: number,
  yIm: number,
  lengthM: number,
  referenceOhm: number,
): void {
  const square = lengthM * lengthM;
  const gRe2 = (zRe * yRe - zIm * yIm) * square;
  const gIm2 = (zRe * yIm + zIm * yRe) * square;
  if (gRe2 * gRe2 + gIm2 * gIm2 < shortFourth) {
    shortInto(out, at, zRe, zIm, yRe, yIm, lengthM, referenceOhm, gRe2, gIm2);
    return;
  }
  complexSqrt(root, 0, zRe * yRe - zIm * yIm, zRe * yIm + zIm * yRe);
  const gammaRe = Math.abs(root[0]!);
  const gammaIm = root[0]! < 0 ? -root[1]! : root[1]!;
  // Zc = z / gamma needs no second root and no choice of its sign.
  const size = gammaRe * gammaRe + gammaIm * gammaIm;
  const zcRe = (zRe * gammaRe + zIm * gammaIm) / size;
  const zcIm = (zIm * gammaRe - zRe * gammaIm) / size;
  const sumRe = zcRe + referenceOhm;
  const sum = sumRe * sumRe + zcIm * zcIm;
  const gRe = ((zcRe - referenceOhm) * sumRe + zcIm * zcIm) / sum;
  const gIm = (zcIm * sumRe - (zcRe - referenceOhm) * zcIm) / sum;
  passInto(out, at, gRe, gIm, gammaRe * lengthM, gammaIm * lengthM);
}

/** With g = (gamma l)^2: A = cosh, B = z l sinh(gamma l)/(gamma l), C = y l sinh(gamma l)/(gamma l); S from ABCD (Frickey, 1994). */
function shortInto(
  out: Float64Array,
  at: number,
  zRe: number,
  zIm: number,
  yRe: number,
  yIm: number,
  lengthM: number,
  referenceOhm: number,
  gRe: number,
  gIm: number,
): void {
  seriesInto(even, gRe, gIm, 1 / 2, 1 / 12, 1 / 30);
  seriesInto(odd, gRe, gIm, 1 / 6, 1 / 20, 1 / 42);
  const aRe = even[0]!;
  const aIm = even[1]!;
  const hRe = odd[0]!;
  const hIm = odd[1]!;
  const scale = lengthM / referenceOhm;
  const back = lengthM * referenceOhm;
  const bRe = (zRe * hRe - zIm * hIm) * scale;
  const bIm = (zRe * hIm + zIm * hRe) * scale;
  const cRe = (yRe * hRe - yIm * hIm) * back;
  const cIm = (yRe * hIm + yIm * hRe) * back;
  const dRe = 2 * aRe + bRe + cRe;
  const dIm = 2 * aIm + bIm + cIm;
  const size = dRe * dRe + dIm * dIm;
  const rRe = bRe - cRe;
  const rIm = bIm - cIm;
  writeSymmetric(
    out,
    at,
    (rRe * dRe + rIm * dIm) / size,
    (rIm * dRe - rRe * dIm) / size,
    (2 * dRe) / size,
    (-2 * dIm) / size,
  );
}

const even = new Float64Array(2);
const odd = new Float64Array(2);

/** 1 + a g (1 + b g (1 + c g)), complex. */
function seriesInto(out: Float64Array, gRe: number, gIm: number, a: number, b: number, c: number): void {
  const cRe = 1 + c * gRe;
  const cIm = c * gIm;
  const bRe = 1 + b * (cRe * gRe - cIm * gIm);
  const bIm = b * (cRe * gIm + cIm * gRe);
  out[0] = 1 + a * (bRe * gRe - bIm * gIm);
  out[1] = a * (bRe * gIm + bIm * gRe);
}
