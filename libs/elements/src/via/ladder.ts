import { speedOfLight, vacuumImpedance, vacuumPermeability } from '@tollgate/lines';
import { complexCosh, complexDivide, complexSinh, complexSqrt } from '@tollgate/network';
import { vacuumPermittivity, type Medium } from './medium';
import type { Piece } from './sections';

/** One mode of a run of pieces, in the order in which a wave meets them. */
export interface Ladder {
  readonly lengthM: Float64Array;
  /** Over the permittivity: a metre for a line, in metres for a pad's face. */
  readonly capacitance: Float64Array;
  readonly material: Int32Array;
}

export function ladderOf(pieces: readonly Piece[], mode: number): Ladder {
  return {
    lengthM: Float64Array.from(pieces, (piece) => piece.lengthM),
    capacitance: Float64Array.from(pieces, (piece) => piece.modes[mode]!),
    material: Int32Array.from(pieces, (piece) => piece.material),
  };
}

/** Lossless impedance of a piece of line: eta0/(capacitance over permittivity), less by the root of the permittivity. */
export function impedanceOhm(capacitance: number, dk: number): number {
  return vacuumImpedance / (capacitance * Math.sqrt(dk));
}

/** Time of flight of a piece in seconds. */
export function flightS(lengthM: number, dk: number): number {
  return (lengthM * Math.sqrt(dk)) / speedOfLight;
}

/** A, B, C of a piece: the chain matrix is (A, B; C, A). Re and Im in turn. */
const piece = new Float64Array(6);
/** cosh sqrt g and sinh(sqrt g)/sqrt g. */
const hyperbolic = new Float64Array(4);
const root = new Float64Array(2);

/**
 * Carries states (voltage, current away from the near side) from the far end of a ladder to its near end at one frequency:
 * `state[4 k..4 k + 3]` is V and I of the k-th state, Re and Im. Line pieces have z = R + j(X + w mu0/c) and y = j w eps c
 * (homogeneous filling, L = mu0 eps0/C), so that an open end (1, 0) gives A and C of the ladder, finite at every frequency.
 */
export function carryBack(state: Float64Array, ladder: Ladder, medium: Medium, point: number): void {
  for (let i = ladder.lengthM.length - 1; i >= 0; i--) {
    chainOf(ladder, i, medium, point);
    const aRe = piece[0]!;
    const aIm = piece[1]!;
    const bRe = piece[2]!;
    const bIm = piece[3]!;
    const cRe = piece[4]!;
    const cIm = piece[5]!;
    for (let k = 0; k < state.length; k += 4) {
      const vRe = state[k]!;
      const vIm = state[k + 1]!;
      const iRe = state[k + 2]!;
      const iIm = state[k + 3]!;
      state[k] = aRe * vRe - aIm * vIm + bRe * iRe - bIm * iIm;
      state[k + 1] = aRe * vIm + aIm * vRe + bRe * iIm + bIm * iRe;
      state[k + 2] = cRe * vRe - cIm * vIm + aRe * iRe - aIm * iIm;
      state[k + 3] = cRe * vIm + cIm * vRe + aRe * iIm + aIm * iRe;
    }
  }
}

function chainOf(ladder: Ladder, i: number, medium: Medium, point: number): void {
  const k = point * 2;
  const w = 2 * Math.PI * medium.frequenciesHz[point]!;
  const lengthM = ladder.lengthM[i]!;
  const capacitance = ladder.capacitance[i]!;
  const er = medium.permittivities[ladder.material[i]!]!;
  const yRe = w * vacuumPermittivity * capacitance * er[k + 1]!;
  const yIm = w * vacuumPermittivity * capacitance * er[k]!;
  if (lengthM === 0) {
    piece[0] = 1;
    piece[1] = 0;
    piece[2] = 0;
    piece[3] = 0;
    piece[4] = yRe;
    piece[5] = yIm;
    return;
  }
  const zRe = medium.barrelOhmPerM[k]!;
  const zIm = medium.barrelOhmPerM[k + 1]! + (w * vacuumPermeability) / capacitance;
  const square = lengthM * lengthM;
  hyperbolicInto((zRe * yRe - zIm * yIm) * square, (zRe * yIm + zIm * yRe) * square);
  const sRe = hyperbolic[2]! * lengthM;
  const sIm = hyperbolic[3]! * lengthM;
  piece[0] = hyperbolic[0]!;
  piece[1] = hyperbolic[1]!;
  piece[2] = zRe * sRe - zIm * sIm;
  piece[3] = zRe * sIm + zIm * sRe;
  piece[4] = yRe * sRe - yIm * sIm;
  piece[5] = yRe * sIm + yIm * sRe;
}

/** Terms of the power series; the next one is below 1e-18 where |g| < 1. */
const terms = 10;

function hyperbolicInto(gRe: number, gIm: number): void {
  if (gRe * gRe + gIm * gIm >= 1) {
    complexSqrt(root, 0, gRe, gIm);
    complexCosh(hyperbolic, 0, root[0]!, root[1]!);
    complexSinh(hyperbolic, 2, root[0]!, root[1]!);
    complexDivide(hyperbolic, 2, hyperbolic[2]!, hyperbolic[3]!, root[0]!, root[1]!);
    return;
  }
  // 1 + g/(1*2) (1 + g/(3*4) (...)) and 1 + g/(2*3) (1 + g/(4*5) (...)).
  let cRe = 1;
  let cIm = 0;
  let sRe = 1;
  let sIm = 0;
  for (let n = terms; n > 0; n--) {
    const c = 1 / ((2 * n - 1) * 2 * n);
    const s = 1 / (2 * n * (2 * n + 1));
    const re = 1 + c * (cRe * gRe - cIm * gIm);
    cIm = c * (cRe * gIm + cIm * gRe);
    cRe = re;
    const reS = 1 + s * (sRe * gRe - sIm * gIm);
    sIm = s * (sRe * gIm + sIm * gRe);
    sRe = reS;
  }
  hyperbolic[0] = cRe;
  hyperbolic[1] = cIm;
  hyperbolic[2] = sRe;
  hyperbolic[3] = sIm;
}
