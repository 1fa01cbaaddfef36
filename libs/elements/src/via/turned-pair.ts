import { cascade4Into } from '@tollgate/network';
import {
  difference,
  loadAt,
  oneMinusProduct,
  product,
  quotient,
  scale,
  shift,
  storeAt,
  sumOfProducts,
} from './complex-registers';
import { ladderOf } from './ladder';
import type { Medium } from './medium';
import type { Runs } from './model';
import type { Piece } from './sections';
import { throughAndStubs } from './through-and-stubs';

const nothing = ladderOf([], 0);

/** Registers. ONE holds 1 for good. */
const [PP, PN, NN, R1, R2, T1, T2, A, B, C, D, DET, X, Y, Z, ONE] = [
  0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12, 13, 14, 15,
] as const;
loadAt(ONE, Float64Array.of(1, 0), 0);

/**
 * S of a pair whose modes turn from piece to piece, 4 ports. Each piece carries two modes that don't see each other; on the legs
 * they are turned by the piece's angle. Pieces are cascaded as scattering parameters, stubs folded to their input reflection.
 */
export function turnedPair(runs: Runs, medium: Medium, referenceOhm: number): Float64Array {
  const points = medium.frequenciesHz.length;
  const out = shuntOf(openStub(runs.nearStub, medium, referenceOhm), points);
  for (const piece of runs.through) {
    cascade4Into(out, out, onLegs(piece, medium, referenceOhm), points);
  }
  cascade4Into(out, out, shuntOf(openStub(runs.farStub, medium, referenceOhm), points), points);
  return out;
}

/** The two modes of a piece as two-ports. */
function modesOfPiece(piece: Piece, medium: Medium, referenceOhm: number): [Float64Array, Float64Array] {
  const mode = (index: number): Float64Array =>
    throughAndStubs(
      { through: ladderOf([piece], index), nearStub: nothing, farStub: nothing },
      medium,
      referenceOhm,
    );
  return [mode(0), mode(1)];
}

/** Legs from modes: with (cos a, sin a) and (-sin a, cos a), S = T diag(first, second) T', block by block. */
function onLegs(piece: Piece, medium: Medium, referenceOhm: number): Float64Array {
  const points = medium.frequenciesHz.length;
  const [first, second] = modesOfPiece(piece, medium, referenceOhm);
  const cos = Math.cos(piece.angleRad);
  const sin = Math.sin(piece.angleRad);
  const out = new Float64Array(points * 32);
  for (let point = 0; point < points; point++) {
    for (let block = 0; block < 4; block++) {
      const from = point * 8 + block * 2;
      const to = point * 32 + ((block >> 1) * 8 + (block & 1) * 2) * 2;
      for (let k = 0; k < 2; k++) {
        const a = first[from + k]!;
        const b = second[from + k]!;
        out[to + k] = cos * cos * a + sin * sin * b;
        out[to + 2 + k] = cos * sin * (a - b);
        out[to + 8 + k] = out[to + 2 + k]!;
        out[to + 10 + k] = sin * sin * a + cos * cos * b;
      }
    }
  }
  return out;
}

/** A symmetric 2 x 2 complex matrix a point: pp, pn, nn. */
const perPoint = 6;

/** Reflection of an open stub on the two legs, from its open end inward. */
function openStub(pieces: readonly Piece[], medium: Medium, referenceOhm: number): Float64Array {
  const points = medium.frequenciesHz.length;
  const reflection = new Float64Array(points * perPoint);
  for (let at = 0; at < reflection.length; at += perPoint) {
    reflection[at] = 1;
    reflection[at + 4] = 1;
  }
  for (const piece of [...pieces].reverse()) {
    const [first, second] = modesOfPiece(piece, medium, referenceOhm);
    for (let point = 0; point < points; point++) {
      turn(reflection, point * perPoint, piece.angleRad);
      foldInto(reflection, point * perPoint, first, second, point * 8);
      turn(reflection, point * perPoint, -piece.angleRad);
    }
  }
  return reflection;
}

/** T' G T of a symmetric matrix: from legs to modes, or back with the angle below 0. */
function turn(g: Float64Array, at: number, angleRad: number): void {
  const cos = Math.cos(angleRad);
  const sin = Math.sin(angleRad);
  for (let k = at; k < at + 2; k++) {
    const [p, m, n] = [g[k]!, g[k + 2]!, g[k + 4]!];
    g[k] = cos * cos * p + 2 * cos * sin * m + sin * sin * n;
    g[k + 2] = cos * sin * (n - p) + (cos * cos - sin * sin) * m;
    g[k + 4] = sin * sin * p - 2 * cos * sin * m + cos * cos * n;
  }
}

/**
 * G = S11 + S12 (1 - G S22)^-1 G S21 with diagonal S11 = S22 (r) and S12 = S21 (t): formula A4, in the modes of the piece.
 * The numbers of a point stand in the register file of `complex-registers`, so that nothing is allocated.
 */
function foldInto(g: Float64Array, at: number, first: Float64Array, second: Float64Array, s: number): void {
  loadAt(PP, g, at);
  loadAt(PN, g, at + 2);
  loadAt(NN, g, at + 4);
  loadAt(R1, first, s);
  loadAt(R2, second, s);
  loadAt(T1, first, s + 4);
  loadAt(T2, second, s + 4);
  // 1 - G S22 = (A, B; C, D)
  oneMinusProduct(A, PP, R1);
  product(B, PN, R2);
  product(C, PN, R1);
  oneMinusProduct(D, NN, R2);
  difference(DET, A, D, B, C);
  // (D, B; C, A)/DET x G, for the off-diagonals of the matrix are -B and -C.
  sumOfProducts(X, D, PP, B, PN);
  sumOfProducts(Y, D, PN, B, NN);
  sumOfProducts(Z, A, NN, C, PN);
  for (const entry of [X, Y, Z] as const) quotient(entry, entry, DET);
  product(X, X, T1);
  sumOfProducts(X, X, T1, R1, ONE);
  product(Y, Y, T1);
  product(Y, Y, T2);
  product(Z, Z, T2);
  sumOfProducts(Z, Z, T2, R2, ONE);
  storeAt(X, g, at);
  storeAt(Y, g, at + 2);
  storeAt(Z, g, at + 4);
}

/** A reflection in shunt on both legs: S21 = 2 - 4 (3 + G)^-1, S11 = S21 - 1; finite for every passive G, a short included. */
function shuntOf(reflection: Float64Array, points: number): Float64Array {
  const out = new Float64Array(points * 32);
  for (let point = 0; point < points; point++) {
    const at = point * perPoint;
    loadAt(A, reflection, at);
    loadAt(B, reflection, at + 2);
    loadAt(D, reflection, at + 4);
    shift(A, 3);
    shift(D, 3);
    difference(DET, A, D, B, B);
    // -4 (3 + G)^-1, and 2 more on the diagonal.
    quotient(X, D, DET);
    quotient(Y, B, DET);
    quotient(Z, A, DET);
    scale(X, -4);
    scale(Y, 4);
    scale(Z, -4);
    shift(X, 1);
    shift(Z, 1);
    const to = point * 32;
    for (let block = 0; block < 4; block++) {
      const k = to + ((block >> 1) * 8 + (block & 1) * 2) * 2;
      const through = block === 1 || block === 2 ? 1 : 0;
      storeAt(X, out, k);
      storeAt(Y, out, k + 2);
      storeAt(Y, out, k + 8);
      storeAt(Z, out, k + 10);
      out[k]! += through;
      out[k + 10]! += through;
    }
  }
  return out;
}
