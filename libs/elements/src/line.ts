import { dbPerNeper, lightSpeedMPerS } from './constants';
import type { BranchValue } from './branch';
import { setValue } from './branch';
import { writeSymmetric } from './symmetric';
import { decayTable, turnTable } from './turn-and-decay';

/** A uniform line of real impedance whose loss grows with sqrt(f) and f. */
export interface LossyLine {
  readonly z0Ohm: number;
  readonly lengthM: number;
  readonly effectivePermittivity: number;
  readonly lossSqrtDbPerM: number;
  readonly lossLinearDbPerM: number;
}

/** Attenuation of the whole line in dB: (sqrt-loss sqrt(f/GHz) + linear-loss f/GHz) x length. */
export function lineLossDb(line: LossyLine, frequencyHz: number): number {
  const gigahertz = frequencyHz / 1e9;
  return (line.lossSqrtDbPerM * Math.sqrt(gigahertz) + line.lossLinearDbPerM * gigahertz) * line.lengthM;
}

/** Phase of the whole line in radians: 2 pi f sqrt(eps) l / c0. */
export function linePhaseRad(line: LossyLine, frequencyHz: number): number {
  return (2 * Math.PI * frequencyHz * Math.sqrt(line.effectivePermittivity) * line.lengthM) / lightSpeedMPerS;
}

/** S of a line between equal real references at every frequency; `lineInto` says how. */
export function lineTwoPort(
  line: LossyLine,
  frequenciesHz: Float64Array,
  referenceOhm: number,
): Float64Array {
  const out = new Float64Array(frequenciesHz.length * 8);
  lineInto(out, line, frequenciesHz, referenceOhm);
  return out;
}

/**
 * S of a line between equal real references, 8 numbers a point, from its own reflection and one pass: with G = (Zc - R)/(Zc + R)
 * and P = e^(-gamma l), S11 = G (1 - P^2)/(1 - G^2 P^2), S21 = P (1 - G^2)/(1 - G^2 P^2). Nothing large is subtracted, so S21 keeps
 * its relative accuracy however lossy the line (multiple reflections, Pozar 2.4).
 *
 * This is where a check of many lines spends its time: one loop with everything in it, and e^-a, cos and sin from the nearest entry
 * of a table and the Taylor series of the rest, cut where what follows is below 1e-16.
 */
export function lineInto(
  out: Float64Array,
  line: LossyLine,
  frequenciesHz: Float64Array,
  referenceOhm: number,
): void {
  const end = frequenciesHz.length;
  const turns = turnTable;
  const decays = decayTable;
  const g = (line.z0Ohm - referenceOhm) / (line.z0Ohm + referenceOhm);
  const g2 = g * g;
  const rest = 1 - g2;
  const radPerHz = linePhaseRad(line, 1);
  const rootNp = (line.lossSqrtDbPerM * line.lengthM) / (dbPerNeper * Math.sqrt(1e9));
  const linearNp = (line.lossLinearDbPerM * line.lengthM) / (dbPerNeper * 1e9);
  for (let point = 0; point < end; point++) {
    const f = frequenciesHz[point]!;
    const attenuation = rootNp * Math.sqrt(f) + linearNp * f;
    const phase = radPerHz * f;
    let one: number;
    let cos: number;
    let sin: number;
    if (attenuation < 31.9 && phase < 1e5) {
      const decay = (attenuation * 32 + 0.5) | 0;
      const a = decay * 0.03125 - attenuation;
      const a2 = a * a;
      one =
        decays[decay]! *
        (1 + a + a2 * (1 / 2 + a * (1 / 6) + a2 * (1 / 24 + a * (1 / 120) + a2 * (1 / 720))));
      const step = (phase * 40.74366543152521 + 0.5) | 0;
      // A 256th of a turn in two numbers, the first so short that its multiples are exact.
      const x = phase - step * 0.024543692605220713 - step * 9.495469541415925e-13;
      const x2 = x * x;
      const s = x + x * x2 * (x2 * (1 / 120) - 1 / 6);
      const c = x2 * (x2 * (1 / 24 - x2 * (1 / 720)) - 1 / 2);
      const at = (step & 255) << 1;
      const tableCos = turns[at]!;
      const tableSin = turns[at | 1]!;
      cos = tableCos + (tableCos * c - tableSin * s);
      sin = tableSin + (tableSin * c + tableCos * s);
    } else {
      one = Math.exp(-attenuation);
      cos = Math.cos(phase);
      sin = Math.sin(phase);
    }
    const two = one * one;
    // 1 - P^2 without cancellation for a short line: (1 - e^-2a) + e^-2a (1 - cos 2p + j sin 2p).
    const turned = 2 * two * sin;
    const nRe = 1 - two + turned * sin;
    const nIm = turned * cos;
    const dRe = rest + g2 * nRe;
    const dIm = g2 * nIm;
    const inverse = 1 / (dRe * dRe + dIm * dIm);
    const iRe = dRe * inverse;
    const iIm = dIm * inverse;
    const t = one * rest;
    const tRe = t * (cos * iRe - sin * iIm);
    const tIm = -t * (sin * iRe + cos * iIm);
    const rRe = g * (nRe * iRe + nIm * iIm);
    const rIm = g * (nIm * iRe - nRe * iIm);
    // `k | n` is k + n, without a check for overflow.
    const k = point << 3;
    out[k] = rRe;
    out[k | 1] = rIm;
    out[k | 2] = tRe;
    out[k | 3] = tIm;
    out[k | 4] = tRe;
    out[k | 5] = tIm;
    out[k | 6] = rRe;
    out[k | 7] = rIm;
  }
}

/** The same at one frequency for a complex reflection; attenuation in nepers, phase in radians. */
export function passInto(
  out: Float64Array,
  at: number,
  gRe: number,
  gIm: number,
  attenuationNp: number,
  phaseRad: number,
): void {
  // P = e^-a (cos - j sin); 1 - P^2 without cancellation for a short line: 1 - e^-2a = -m (2 + m), 1 - cos 2p = 2 sin^2 p.
  // e^-a keeps its own digits where it is small, e^-a - 1 where a is.
  const short = attenuationNp < 0.5;
  const raw = short ? Math.expm1(-attenuationNp) : Math.exp(-attenuationNp);
  const less = short ? raw : raw - 1;
  const one = short ? 1 + raw : raw;
  const two = one * one;
  const cos = Math.cos(phaseRad);
  const sin = Math.sin(phaseRad);
  const pRe = one * cos;
  const pIm = -one * sin;
  const turned = 2 * two * sin;
  const nRe = turned * sin - less * (2 + less);
  const nIm = turned * cos;
  const g2Re = gRe * gRe - gIm * gIm;
  const g2Im = 2 * gRe * gIm;
  // 1 - G^2 P^2 = (1 - G^2) + G^2 (1 - P^2)
  const dRe = 1 - g2Re + (g2Re * nRe - g2Im * nIm);
  const dIm = -g2Im + (g2Re * nIm + g2Im * nRe);
  const size = dRe * dRe + dIm * dIm;
  const rRe = gRe * nRe - gIm * nIm;
  const rIm = gRe * nIm + gIm * nRe;
  const tRe = pRe * (1 - g2Re) + pIm * g2Im;
  const tIm = pIm * (1 - g2Re) - pRe * g2Im;
  writeSymmetric(
    out,
    at,
    (rRe * dRe + rIm * dIm) / size,
    (rIm * dRe - rRe * dIm) / size,
    (tRe * dRe + tIm * dIm) / size,
    (tIm * dRe - tRe * dIm) / size,
  );
}

/**
 * What a line closed at its far end shows: with the load's reflection in the line's own impedance turned back by two passes,
 * G = G_L e^(-2 gamma l), Z = Zc (1 + G)/(1 - G). Given as Z or as Y, whichever is the smaller number, so that a quarter-wave
 * open is exactly a short and a half-wave short too.
 */
export function stubAt(
  line: LossyLine,
  frequencyHz: number,
  loadRe: number,
  loadIm: number,
  out: BranchValue,
): void {
  const two = Math.exp((-2 * lineLossDb(line, frequencyHz)) / dbPerNeper);
  const angle = -2 * linePhaseRad(line, frequencyHz);
  const pRe = two * Math.cos(angle);
  const pIm = two * Math.sin(angle);
  const gRe = loadRe * pRe - loadIm * pIm;
  const gIm = loadRe * pIm + loadIm * pRe;
  const asAdmittance = gRe > 0;
  // Y = (1 - G)/(1 + G)/Zc where G points to an open, Z = Zc (1 + G)/(1 - G) where it points to a short.
  const sign = asAdmittance ? 1 : -1;
  const scale = asAdmittance ? 1 / line.z0Ohm : line.z0Ohm;
  const dRe = 1 + sign * gRe;
  const dIm = sign * gIm;
  const size = dRe * dRe + dIm * dIm;
  const re = ((1 - sign * gRe) * dRe - sign * gIm * dIm) / size;
  const im = (-sign * gIm * dRe - (1 - sign * gRe) * dIm) / size;
  setValue(out, asAdmittance, Math.max(re, 0) * scale, im * scale);
}
