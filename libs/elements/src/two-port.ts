import type { ChannelElement, ElementOf } from '@tollgate/contracts';
import { cascade2Into } from '@tollgate/network';
import { branchAt, seriesInto, setValue, shuntInto, type BranchValue } from './branch';
import { budgetLossWriter } from './budget-loss';
import { dbPerNeper } from './constants';
import { lineInto, stubAt } from './line';
import { rlgcInto } from './rlgc';
import { writeSymmetric } from './symmetric';
import type { PointWriter } from './types';

/** Kinds that are a two-port, and stand once in each leg of a pair. */
export type TwoPortKind =
  | 'line'
  | 'rlgc-line'
  | 'series'
  | 'shunt'
  | 'stub'
  | 'tee'
  | 'pi'
  | 'transformer'
  | 'attenuator'
  | 'budget-loss'
  | 'capacitor';

const value: BranchValue = { isAdmittance: false, re: 0, im: 0 };

/** Kinds that come most often, each with a loop of its own. */
type LoopedKind = 'line' | 'series' | 'shunt';

type Writers = {
  readonly [Kind in Exclude<TwoPortKind, LoopedKind>]: (
    element: ElementOf<Kind>,
    referenceOhm: number,
  ) => PointWriter | readonly PointWriter[];
};

/** Each kind as one writer, or several that are cascaded. */
const writers: Writers = {
  'rlgc-line': (element, reference) => (out, at, f) => rlgcInto(out, at, element, f, reference),
  stub: (element, reference) => stubWriter(element, reference),
  tee: ({ near, shunt, far }, reference) => [
    seriesWriter(near, reference),
    shuntWriter(shunt, reference),
    seriesWriter(far, reference),
  ],
  pi: ({ near, series, far }, reference) => [
    shuntWriter(near, reference),
    seriesWriter(series, reference),
    shuntWriter(far, reference),
  ],
  transformer: ({ turnsRatio }) => transformerWriter(turnsRatio),
  // A matched pad: loss without delay in its own impedance.
  attenuator:
    ({ attenuationDb, z0Ohm }, reference) =>
    (out, at) =>
      padInto(out, at, z0Ohm, attenuationDb, reference),
  'budget-loss': (element) => budgetLossWriter(element),
  capacitor: (element, reference) => {
    const body = {
      resistanceOhm: element.seriesResistanceOhm,
      inductanceH: element.seriesInductanceH,
      capacitanceF: element.capacitanceF,
    };
    return [
      capacitanceWriter(element.padCapacitanceF, reference),
      seriesWriter(body, reference),
      capacitanceWriter(element.padCapacitanceF, reference),
    ];
  },
};

export function isTwoPort(element: ChannelElement): element is ElementOf<TwoPortKind> {
  return element.kind in writers || element.kind === 'line' || isBranch(element);
}

/** S of a two-port, and at how many points a wave is trapped without loss between the parts it is made of. */
export interface TwoPort {
  readonly s: Float64Array;
  readonly trappedPoints: number;
}

/** S of a two-port kind at every frequency, at `referenceOhm`. */
export function twoPort(
  element: ElementOf<TwoPortKind>,
  frequenciesHz: Float64Array,
  referenceOhm: number,
): TwoPort {
  const s = new Float64Array(frequenciesHz.length * 8);
  return { s, trappedPoints: twoPortInto(s, element, frequenciesHz, referenceOhm) };
}

/**
 * The same into an array that may be used again: 8 numbers a point, S11, S12, S21, S22 as real and imaginary part. Nothing is
 * allocated per point.
 * @param frequenciesHz ascending, from 0 up
 * @returns at how many points a wave is trapped without loss between the parts the element is made of
 */
export function twoPortInto(
  out: Float64Array,
  element: ElementOf<TwoPortKind>,
  frequenciesHz: Float64Array,
  referenceOhm: number,
): number {
  if (element.kind === 'line') {
    lineInto(out, element, frequenciesHz, referenceOhm);
    return 0;
  }
  if (isBranch(element)) {
    branchInto(out, element, frequenciesHz, referenceOhm);
    return 0;
  }
  const made = (
    writers[element.kind] as (element: never, referenceOhm: number) => PointWriter | readonly PointWriter[]
  )(element as never, referenceOhm);
  if (typeof made !== 'function') return cascadedInto(out, made, frequenciesHz);
  fillInto(out, made, frequenciesHz);
  return 0;
}

function isBranch(element: ChannelElement): element is ElementOf<'series' | 'shunt'> {
  return element.kind === 'series' || element.kind === 'shunt';
}

function branchInto(
  out: Float64Array,
  element: ElementOf<'series' | 'shunt'>,
  frequenciesHz: Float64Array,
  referenceOhm: number,
): void {
  const series = element.kind === 'series';
  const { resistanceOhm = 0, inductanceH = 0, capacitanceF } = element;
  if (series && capacitanceF === undefined) {
    // q = Z/(2R)
    const scale = 1 / (2 * referenceOhm);
    splitInto(out, frequenciesHz, resistanceOhm * scale, 2 * Math.PI * inductanceH * scale, 1);
    return;
  }
  if (!series && capacitanceF !== undefined && resistanceOhm === 0 && inductanceH === 0) {
    // q = Y R/2
    splitInto(out, frequenciesHz, 0, Math.PI * capacitanceF * referenceOhm, -1);
    return;
  }
  for (let point = 0; point < frequenciesHz.length; point++) {
    branchAt(element, frequenciesHz[point]!, value);
    if (series) seriesInto(out, point * 8, value, referenceOhm);
    else shuntInto(out, point * 8, value, referenceOhm);
  }
}

/** A branch whose q = re + j f imPerHz needs no choice between impedance and admittance: S21 = 1/(1 + q), S11 = sign q/(1 + q). */
function splitInto(
  out: Float64Array,
  frequenciesHz: Float64Array,
  re: number,
  imPerHz: number,
  sign: 1 | -1,
): void {
  const one = 1 + re;
  const square = one * one;
  const back = sign * re * one;
  const end = frequenciesHz.length;
  for (let point = 0; point < end; point++) {
    const im = imPerHz * frequenciesHz[point]!;
    const im2 = im * im;
    const inverse = 1 / (square + im2);
    const turned = im * inverse;
    const tRe = one * inverse;
    const tIm = -turned;
    const rRe = (back + sign * im2) * inverse;
    const rIm = sign * turned;
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

export function filled(write: PointWriter, frequenciesHz: Float64Array): Float64Array {
  const out = new Float64Array(frequenciesHz.length * 8);
  fillInto(out, write, frequenciesHz);
  return out;
}

function fillInto(out: Float64Array, write: PointWriter, frequenciesHz: Float64Array): void {
  for (let point = 0; point < frequenciesHz.length; point++) write(out, point * 8, frequenciesHz[point]!);
}

/** The part that is cascaded next, kept from call to call and as long as the longest grid so far. */
let next = new Float64Array(0);

function cascadedInto(out: Float64Array, parts: readonly PointWriter[], frequenciesHz: Float64Array): number {
  const points = frequenciesHz.length;
  if (next.length < points * 8) next = new Float64Array(points * 8);
  fillInto(out, parts[0]!, frequenciesHz);
  let trappedPoints = 0;
  for (let k = 1; k < parts.length; k++) {
    fillInto(next, parts[k]!, frequenciesHz);
    trappedPoints += cascade2Into(out, out, next, points);
  }
  return trappedPoints;
}

type Parts = { resistanceOhm?: number; inductanceH?: number; capacitanceF?: number };

export function seriesWriter(branch: Parts, reference: number): PointWriter {
  return (out, at, f) => {
    branchAt(branch, f, value);
    seriesInto(out, at, value, reference);
  };
}

export function shuntWriter(branch: Parts, reference: number): PointWriter {
  return (out, at, f) => {
    branchAt(branch, f, value);
    shuntInto(out, at, value, reference);
  };
}

/** A capacitance to ground that may be 0, which is nothing there. */
export function capacitanceWriter(capacitanceF: number, reference: number): PointWriter {
  return (out, at, f) => {
    setValue(value, true, 0, 2 * Math.PI * f * capacitanceF);
    shuntInto(out, at, value, reference);
  };
}

/** A shunt admittance G + j w C. */
export function leakyCapacitanceWriter(
  capacitanceF: number,
  conductanceS: number,
  reference: number,
): PointWriter {
  return (out, at, f) => {
    setValue(value, true, conductanceS, 2 * Math.PI * f * capacitanceF);
    shuntInto(out, at, value, reference);
  };
}

const load: BranchValue = { isAdmittance: false, re: 0, im: 0 };

function stubWriter(element: ElementOf<'stub'>, reference: number): PointWriter {
  return (out, at, f) => {
    let gRe = element.end === 'short' ? -1 : 1;
    let gIm = 0;
    if (element.load) {
      branchAt(element.load, f, load);
      // Reflection of the load in the stub's own impedance, from Z or from Y.
      const sign = load.isAdmittance ? -1 : 1;
      const scale = load.isAdmittance ? element.z0Ohm : 1 / element.z0Ohm;
      const re = load.re * scale;
      const im = load.im * scale;
      const size = (re + 1) * (re + 1) + im * im;
      gRe = (sign * (re * re + im * im - 1)) / size;
      gIm = (sign * 2 * im) / size;
    }
    stubAt(element, f, gRe, gIm, value);
    shuntInto(out, at, value, reference);
  };
}

/** Ideal n:1 between equal references: S11 = (n^2 - 1)/(n^2 + 1), S21 = 2n/(n^2 + 1) (Pozar, Table 4.1). */
function transformerWriter(turnsRatio: number): PointWriter {
  const square = turnsRatio * turnsRatio;
  const reflection = (square - 1) / (square + 1);
  const transmission = (2 * turnsRatio) / (square + 1);
  return (out, at) => {
    writeSymmetric(out, at, reflection, 0, transmission, 0);
    out[at + 6] = -reflection;
  };
}

function padInto(
  out: Float64Array,
  at: number,
  z0Ohm: number,
  attenuationDb: number,
  reference: number,
): void {
  const g = (z0Ohm - reference) / (z0Ohm + reference);
  const p = Math.exp(-attenuationDb / dbPerNeper);
  const denominator = 1 - g * g * p * p;
  writeSymmetric(out, at, (g * (1 - p * p)) / denominator, 0, (p * (1 - g * g)) / denominator, 0);
}
