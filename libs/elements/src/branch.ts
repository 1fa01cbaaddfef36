import type { Branch } from '@tollgate/contracts';
import { writeSymmetric } from './symmetric';

/**
 * A two-terminal branch at one frequency, as impedance or admittance, whichever is finite: `isAdmittance` says which.
 * An open is Y = 0, a short Z = 0; neither is ever infinite.
 */
export interface BranchValue {
  isAdmittance: boolean;
  re: number;
  im: number;
}

/**
 * R, L and C in series at one frequency: Z = R + j w L + 1/(j w C). With u = 1 - w^2 L C + j w R C, Y = j w C/u and
 * Z = u/(j w C): Y where u is not near 0, so that a capacitor is exactly an open at 0 Hz and finite close to it, Z near
 * resonance.
 */
export function branchAt(branch: Branch, frequencyHz: number, out: BranchValue): void {
  const w = 2 * Math.PI * frequencyHz;
  const resistance = branch.resistanceOhm ?? 0;
  const reactance = w * (branch.inductanceH ?? 0);
  if (branch.capacitanceF === undefined) {
    setValue(out, false, resistance, reactance);
    return;
  }
  const susceptance = w * branch.capacitanceF;
  const uRe = 1 - susceptance * reactance;
  const uIm = susceptance * resistance;
  const size = uRe * uRe + uIm * uIm;
  if (size > 0.25) setValue(out, true, (susceptance * uIm) / size, (susceptance * uRe) / size);
  else setValue(out, false, resistance, -uRe / susceptance);
}

export function setValue(out: BranchValue, isAdmittance: boolean, re: number, im: number): void {
  out.isAdmittance = isAdmittance;
  out.re = re;
  out.im = im;
}

/**
 * S of a branch in the through path between equal real references R: with z = Z/R, S11 = z/(2 + z) and S21 = 2/(2 + z);
 * by admittance, y = Y R, S11 = 1/(1 + 2 y), S21 = 2 y/(1 + 2 y) (Pozar, Microwave Engineering, Table 4.1).
 * Written to out[at..at+7] as S11, S12, S21, S22.
 */
export function seriesInto(out: Float64Array, at: number, value: BranchValue, referenceOhm: number): void {
  const factor = value.isAdmittance ? 2 * referenceOhm : 1 / (2 * referenceOhm);
  const re = value.re * factor;
  const im = value.im * factor;
  // With q = Z/(2R): S21 = 1/(1+q), S11 = q/(1+q); with q = 2RY: S21 = q/(1+q), S11 = 1/(1+q).
  writeSplit(out, at, re, im, value.isAdmittance);
}

/**
 * S of a branch to ground between equal real references R: with y = Y R/2, S11 = -y/(1 + y), S21 = 1/(1 + y); by impedance,
 * z = 2 Z/R, S11 = -1/(1 + z), S21 = z/(1 + z) (Pozar, Table 4.1).
 */
export function shuntInto(out: Float64Array, at: number, value: BranchValue, referenceOhm: number): void {
  const factor = value.isAdmittance ? referenceOhm / 2 : 2 / referenceOhm;
  writeSplit(out, at, value.re * factor, value.im * factor, !value.isAdmittance);
  out[at] = -out[at]!;
  out[at + 1] = -out[at + 1]!;
  out[at + 6] = out[at]!;
  out[at + 7] = out[at + 1]!;
}

/** 1/(1+q) and q/(1+q) to transmission and reflection; `swap` exchanges them. Re q >= 0 for passive branches, so 1 + q is not 0. */
function writeSplit(out: Float64Array, at: number, re: number, im: number, swap: boolean): void {
  const denominator = (1 + re) * (1 + re) + im * im;
  const oneRe = (1 + re) / denominator;
  const oneIm = -im / denominator;
  const restRe = (re * (1 + re) + im * im) / denominator;
  const restIm = im / denominator;
  if (swap) writeSymmetric(out, at, oneRe, oneIm, restRe, restIm);
  else writeSymmetric(out, at, restRe, restIm, oneRe, oneIm);
}
