import { complexSqrt } from '@tollgate/network';
import type { ElementOf } from '@tollgate/contracts';
import { passInto, writeSymmetric } from './line';

const root = new Float64Array(2);

/**
 * A uniform line by its constants per length: gamma = sqrt((R + jwL)(G + jwC)), Zc = sqrt((R + jwL)/(G + jwC)) (Pozar 2.5, 2.7).
 * Where the shunt admittance is 0 (0 Hz without G) the line is its series resistance.
 */
export function rlgcInto(
  out: Float64Array,
  at: number,
  line: ElementOf<'rlgc-line'>,
  frequencyHz: number,
  referenceOhm: number,
): void {
  const w = 2 * Math.PI * frequencyHz;
  const zRe = line.resistanceOhmPerM;
  const zIm = w * line.inductanceHPerM;
  const yRe = line.conductanceSPerM;
  const yIm = w * line.capacitanceFPerM;
  if (yRe === 0 && yIm === 0) {
    const q = (zRe * line.lengthM) / (2 * referenceOhm);
    writeSymmetric(out, at, q / (1 + q), 0, 1 / (1 + q), 0);
    return;
  }
  if (zRe === 0 && zIm === 0) {
    const q = (yRe * line.lengthM * referenceOhm) / 2;
    writeSymmetric(out, at, -q / (1 + q), 0, 1 / (1 + q), 0);
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
  passInto(out, at, gRe, gIm, gammaRe * line.lengthM, gammaIm * line.lengthM);
}
