import type { ChannelElement, ElementOf } from '@tollgate/contracts';
import { cascade2Into } from '@tollgate/network';
import { branchAt, seriesInto, setValue, shuntInto, type BranchValue } from './branch';
import { dbPerNeper } from './constants';
import { lineTwoPort, stubAt } from './line';
import { rlgcInto } from './rlgc';
import { writeSymmetric } from './symmetric';

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

/** Writes one point to out[at..at+7]. */
export type PointWriter = (out: Float64Array, at: number, frequencyHz: number) => void;

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

/** S of a two-port kind at every frequency, at `referenceOhm`. */
export function twoPort(
  element: ElementOf<TwoPortKind>,
  frequenciesHz: Float64Array,
  referenceOhm: number,
): Float64Array {
  if (element.kind === 'line') return lineTwoPort(element, frequenciesHz, referenceOhm);
  if (isBranch(element)) return branchTwoPort(element, frequenciesHz, referenceOhm);
  const made = (
    writers[element.kind] as (element: never, referenceOhm: number) => PointWriter | readonly PointWriter[]
  )(element as never, referenceOhm);
  return typeof made === 'function' ? filled(made, frequenciesHz) : cascaded(made, frequenciesHz);
}

function isBranch(element: ChannelElement): element is ElementOf<'series' | 'shunt'> {
  return element.kind === 'series' || element.kind === 'shunt';
}

function branchTwoPort(
  element: ElementOf<'series' | 'shunt'>,
  frequenciesHz: Float64Array,
  referenceOhm: number,
): Float64Array {
  const out = new Float64Array(frequenciesHz.length * 8);
  const series = element.kind === 'series';
  for (let point = 0; point < frequenciesHz.length; point++) {
    branchAt(element, frequenciesHz[point]!, value);
    if (series) seriesInto(out, point * 8, value, referenceOhm);
    else shuntInto(out, point * 8, value, referenceOhm);
  }
  return out;
}

export function filled(write: PointWriter, frequenciesHz: Float64Array): Float64Array {
  const out = new Float64Array(frequenciesHz.length * 8);
  for (let point = 0; point < frequenciesHz.length; point++) write(out, point * 8, frequenciesHz[point]!);
  return out;
}

function cascaded(parts: readonly PointWriter[], frequenciesHz: Float64Array): Float64Array {
  const [first, ...rest] = parts;
  const out = filled(first!, frequenciesHz);
  for (const part of rest) cascade2Into(out, out, filled(part, frequenciesHz), frequenciesHz.length);
  return out;
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

/**
 * A placeholder: loss that falls to 0 with sqrt(f) or f, matched, or with a stated return loss. The reflection is taken in
 * quadrature to the transmission, which keeps it passive as long as the power it returns is not more than what the loss leaves.
 */
function budgetLossWriter(element: ElementOf<'budget-loss'>): PointWriter {
  const { lossDb, atHz, shape, returnLossDb, delayS } = element;
  return (out, at, f) => {
    const ratio = shape === 'sqrt' ? Math.sqrt(f / atHz) : f / atHz;
    const transmission = 10 ** ((-lossDb * ratio) / 20);
    const wanted = returnLossDb === undefined ? 0 : 10 ** (-returnLossDb / 20);
    // No more is returned than is not let through.
    const reflection = Math.min(wanted, Math.sqrt(Math.max(0, 1 - transmission * transmission)));
    const angle = -2 * Math.PI * f * (delayS ?? 0);
    const cos = Math.cos(angle);
    const sin = Math.sin(angle);
    writeSymmetric(out, at, -reflection * sin, reflection * cos, transmission * cos, transmission * sin);
  };
}
