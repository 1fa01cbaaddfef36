import type { Limit, LimitQuantity } from '@tollgate/contracts';
import {
  entryAt,
  lossDb,
  renormalize,
  sameReference,
  uniformReference,
  type Network,
} from '@tollgate/network';
import { commonBand, type Subject } from './subject';

/** One number a frequency from the channel's network: dB, or seconds for delay and skew. */
export interface Measure {
  /** Reference the value is taken at: the differential value for a pair. */
  readonly referenceOhm: number;
  onGrid(): Float64Array;
  /** @param frequenciesHz strictly ascending, inside every part's band */
  at(frequenciesHz: Float64Array): Float64Array;
}

/** One entry of a mixed-mode matrix: response and stimulus, each a mode and an end (0 near, 1 far). */
interface ModeEntry {
  readonly response: 'd' | 'c';
  readonly responseEnd: number;
  readonly stimulus: 'd' | 'c';
  readonly stimulusEnd: number;
}

const entries: Partial<Record<LimitQuantity, string>> = {
  'insertion-loss': 'SDD21',
  'fitted-attenuation': 'SDD21',
  'insertion-loss-deviation': 'SDD21',
  delay: 'SDD21',
  'return-loss-near': 'SDD11',
  'return-loss-far': 'SDD22',
  'common-return-loss-near': 'SCC11',
  'common-return-loss-far': 'SCC22',
};

/** Reads a name such as SCD21: response mode, stimulus mode, response end, stimulus end. */
export function modeEntry(name: string): ModeEntry {
  const [, response, stimulus, to, from] = [...name.toLowerCase()];
  return {
    response: response === 'c' ? 'c' : 'd',
    responseEnd: Number(to) - 1,
    stimulus: stimulus === 'c' ? 'c' : 'd',
    stimulusEnd: Number(from) - 1,
  };
}

/** Whether a limit is on the energy that changes mode, which a model without asymmetry cannot show. */
export function isConversion(limit: Pick<Limit, 'quantity' | 'parameter'>): boolean {
  if (limit.quantity !== 'mode-conversion') return false;
  const { response, stimulus } = modeEntry(limit.parameter ?? 'SCD21');
  return response !== stimulus;
}

export function isTime(quantity: LimitQuantity): boolean {
  return quantity === 'delay' || quantity === 'pair-skew';
}

/**
 * What a limit is on, of this channel, at the limit's own reference: loss as positive dB, delay and skew in seconds.
 * Differential channels are judged by SDD (Bockelman and Eisenstadt 1995, formulas A6), common-mode limits by SCC.
 */
export function measureOf(
  limit: Pick<Limit, 'quantity' | 'parameter' | 'referenceOhm'>,
  subject: Subject,
): Measure {
  const { reference, shownOhm } = referencesOf(limit.referenceOhm, subject);
  const settle = (network: Network): Network =>
    sameReference(network.referenceOhm, reference) ? network : renormalize(network, reference);
  const evaluate = (frequenciesHz: Float64Array): Network => settle(subject.evaluate(frequenciesHz));
  if (isTime(limit.quantity)) {
    const at = timeOf(limit.quantity, subject, evaluate);
    return { referenceOhm: shownOhm, onGrid: () => at(subject.grid.frequenciesHz), at };
  }
  const name = limit.parameter ?? entries[limit.quantity] ?? 'SDD21';
  const loss = (network: Network): Float64Array => entryLosses(network, modeEntry(name));
  return {
    referenceOhm: shownOhm,
    onGrid: () => loss(settle(subject.grid)),
    at: (frequenciesHz) => loss(evaluate(frequenciesHz)),
  };
}

function referencesOf(
  referenceOhm: number | undefined,
  subject: Subject,
): { reference: Float64Array; shownOhm: number } {
  const own = subject.grid.referenceOhm;
  const legs = subject.signaling === 'differential' ? 2 : 1;
  if (referenceOhm === undefined) return { reference: own, shownOhm: own[0]! * legs };
  return { reference: uniformReference(subject.grid.ports, referenceOhm / legs), shownOhm: referenceOhm };
}

function entryLosses(network: Network, entry: ModeEntry): Float64Array {
  const losses = new Float64Array(network.frequenciesHz.length);
  const at = new Float64Array(2);
  for (let point = 0; point < losses.length; point++) {
    readEntry(at, network, point, entry);
    losses[point] = lossDb(at[0]!, at[1]!);
  }
  return losses;
}

/** Two ports: the plain S. Four: half the signed sum over the legs, a = (p - n)/sqrt 2 and (p + n)/sqrt 2. */
function readEntry(out: Float64Array, network: Network, point: number, entry: ModeEntry): void {
  const { ports, s } = network;
  if (ports === 2) {
    const k = entryAt(2, point, entry.responseEnd, entry.stimulusEnd);
    out[0] = s[k]!;
    out[1] = s[k + 1]!;
    return;
  }
  const rowSign = entry.response === 'd' ? -1 : 1;
  const columnSign = entry.stimulus === 'd' ? -1 : 1;
  const pp = entryAt(4, point, entry.responseEnd * 2, entry.stimulusEnd * 2);
  const np = pp + 8;
  for (let part = 0; part < 2; part++) {
    const p = s[pp + part]! + columnSign * s[pp + 2 + part]!;
    const n = s[np + part]! + columnSign * s[np + 2 + part]!;
    out[part] = (p + rowSign * n) / 2;
  }
}

/** Half the step of the difference that gives group delay, as a share of the band it is taken in. */
const delayStep = 1e-6;

/**
 * Group delay, or the difference of both legs' group delays as a magnitude, from two evaluations close together:
 * tau = -arg(S(f + d) conj S(f - d)) / (4 pi d). Frequencies are drawn in by at most d, so that both stay inside the band.
 * Not a number where nothing passes.
 */
function timeOf(
  quantity: LimitQuantity,
  subject: Subject,
  evaluate: (frequenciesHz: Float64Array) => Network,
): (frequenciesHz: Float64Array) => Float64Array {
  const [bandFrom, bandTo] = commonBand(subject.parts) ?? subject.gridHz;
  const fromHz = Math.max(bandFrom, 0);
  const toHz = Number.isFinite(bandTo) ? bandTo : Math.max(subject.gridHz[1], 1) * 2;
  const step = (toHz - fromHz) * delayStep;
  const centre = (f: number): number => fromHz + step + (f - fromHz) * (1 - 2 * delayStep);
  return (frequenciesHz) => {
    const below = evaluate(frequenciesHz.map((f) => centre(f) - step));
    const above = evaluate(frequenciesHz.map((f) => centre(f) + step));
    const pass = subject.grid.ports === 2 || quantity === 'delay' ? [through] : [legP, legN];
    return frequenciesHz.map((_, point) => {
      const delays = pass.map((read) => delayOf(read, below, above, point, step));
      return delays.length === 2 ? Math.abs(delays[0]! - delays[1]!) : delays[0]!;
    });
  };
}

type Read = (out: Float64Array, network: Network, point: number) => void;

const through: Read = (out, network, point) => readEntry(out, network, point, modeEntry('SDD21'));
const legP: Read = (out, network, point) => out.set(network.s.subarray(...pairAt(point, 2, 0)));
const legN: Read = (out, network, point) => out.set(network.s.subarray(...pairAt(point, 3, 1)));

function pairAt(point: number, row: number, column: number): [number, number] {
  const k = entryAt(4, point, row, column);
  return [k, k + 2];
}

function delayOf(read: Read, below: Network, above: Network, point: number, step: number): number {
  const a = new Float64Array(2);
  const b = new Float64Array(2);
  read(a, below, point);
  read(b, above, point);
  const re = b[0]! * a[0]! + b[1]! * a[1]!;
  const im = b[1]! * a[0]! - b[0]! * a[1]!;
  if (re === 0 && im === 0) return NaN;
  return -Math.atan2(im, re) / (4 * Math.PI * step);
}

/** The largest conversion between modes on the grid, as a magnitude; 0 for a channel of two ports. */
export function largestConversion(grid: Network): number {
  if (grid.ports !== 4) return 0;
  const at = new Float64Array(2);
  let largest = 0;
  for (let point = 0; point < grid.frequenciesHz.length; point++) {
    for (const ends of ['11', '12', '21', '22']) {
      for (const modes of ['CD', 'DC']) {
        readEntry(at, grid, point, modeEntry(`S${modes}${ends}`));
        largest = Math.max(largest, Math.hypot(at[0]!, at[1]!));
      }
    }
  }
  return largest;
}
