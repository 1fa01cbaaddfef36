import type { Limit, LimitVerdict } from '@tollgate/contracts';
import { NetworkError } from '@tollgate/network';
import { fitFrequencies, fitLoss, type LossFit } from './fit';
import type { Judgement } from './judgement';
import { limitAt, type Mask, type MaskPiece } from './mask';
import { reachOfFit, reachOfMask, spokenHz, type Reach } from './reach';
import { refineWorst, type Track, type Worst } from './refine';
import type { Subject } from './subject';
import { isConversion, isTime, largestConversion, measureOf, type Measure } from './values';

/** Margins this little below zero are rounding, not an excess: dB, or picoseconds. */
const rounding = 1e-9;
/** The refined worst margin is found to this: dB, or picoseconds. */
const refinedTo = 1e-4;
const picosecond = 1e-12;
/** A model whose modes convert less than this (-180 dB) has no asymmetry. */
const leastConversion = 1e-9;

/**
 * Holds a channel against one limit. Margin = limit - value for `max`, value - limit for `min`; it holds where the margin is
 * at least 0 all over its range. `worst` and `exceedsHz` are of the grid's points; `worstRefined` and the verdict are also of
 * every end, step and vertex of the limit and of the engine between the grid's points, to 1e-4 dB.
 * A limit that the channel cannot answer for is `not-judged`, with the reason, and margins over what is covered.
 */
export function judgeLimit(limit: Limit & { id: string }, mask: Mask, subject: Subject): Judgement {
  const measure = measureOf(limit, subject);
  const blank = blankOf(limit.id, measure.referenceOhm);
  const reach = reachOfMask(mask, subject);
  const fitted = isFit(limit) ? withFit(limit, measure, subject) : measure;
  if ('reason' in fitted) return { ...blank, reason: fitted.reason, missingHz: fitted.missingHz };
  const value = fitted.onGrid();
  const valueDb = Array.from(value, finiteOrNull);
  if (!reach.band) return { ...blank, valueDb, reason: reach.reason, missingHz: reach.missingHz };
  const sampled = sampleGrid(limit, mask, subject.grid.frequenciesHz, value);
  const refined = refine(limit, mask, subject, reach.band, fitted, value);
  const reason = refusal(limit, subject, reach, sampled, refined);
  const holds = refined !== null && refined.margin >= -allowed(limit, rounding);
  const verdict: LimitVerdict = reason !== '' ? 'not-judged' : holds ? 'holds' : 'exceeds';
  return {
    ...blank,
    verdict,
    holds: verdict === 'holds',
    reason,
    worst: told(sampled.worst),
    worstRefined: told(refined),
    exceedsHz: sampled.exceedsHz,
    missingHz: reach.missingHz,
    valueDb,
  };
}

/**
 * The margin against a limit at one frequency inside its range and the parts' band, dB or seconds; null where the limit, its
 * fit or the value has no number there.
 */
export function marginAt(limit: Limit, mask: Mask, subject: Subject, frequencyHz: number): number | null {
  const measure = measureOf(limit, subject);
  const fitted = isFit(limit) ? withFit(limit, measure, subject) : measure;
  const bound = limitAt(mask, limit.sense, frequencyHz);
  if ('reason' in fitted || bound === null) return null;
  return finiteOrNull(marginOf(limit.sense, bound, fitted.at(Float64Array.of(frequencyHz))[0]!));
}

function blankOf(id: string, referenceOhm: number): Judgement {
  const nothing = { worst: null, worstRefined: null, exceedsHz: [], missingHz: [], valueDb: [] };
  return { id, verdict: 'not-judged', holds: false, reason: '', referenceOhm, ...nothing };
}

function refusal(
  limit: Limit,
  subject: Subject,
  reach: Reach,
  sampled: Sampled,
  refined: Worst | null,
): string {
  const points = ['from', 'to'] as const;
  const other = points.filter((end) => limit[end] && subject[end] && !sameWords(limit[end], subject[end]));
  if (other.length) {
    const told = other.map((end) => `${end} ${limit[end]}, the channel ${end} ${subject[end]}`);
    return `The limit is stated ${told.join('; ')}: its test points are not the channel's.`;
  }
  if (reach.reason) return reach.reason;
  if (isConversion(limit) && largestConversion(subject.grid) < leastConversion) {
    return "The model has no asymmetry between p and n, so it cannot show conversion. Give the legs' difference, or a measured part.";
  }
  if (sampled.undefinedHz !== null || refined === null || Number.isNaN(refined.margin)) {
    return `There is no margin at ${spokenHz(sampled.undefinedHz ?? subject.gridHz[0])}: limit or value is undefined there.`;
  }
  return '';
}

function sameWords(one: string, other: string): boolean {
  const plain = (text: string): string => text.trim().toLowerCase().replace(/\s+/g, ' ');
  return plain(one) === plain(other);
}

function marginOf(sense: 'max' | 'min', bound: number, value: number): number {
  return sense === 'max' ? bound - value : value - bound;
}

/** A tolerance in the limit's own unit. */
function allowed(limit: Limit, amount: number): number {
  return isTime(limit.quantity) ? amount * picosecond : amount;
}

interface Sampled {
  readonly worst: Worst | null;
  readonly exceedsHz: [number, number][];
  /** The first grid point at which limit or value is not a number. */
  readonly undefinedHz: number | null;
}

function sampleGrid(limit: Limit, mask: Mask, frequenciesHz: Float64Array, value: Float64Array): Sampled {
  const { sense } = limit;
  const slack = allowed(limit, rounding);
  let worst: Worst | null = null;
  let undefinedHz: number | null = null;
  const exceedsHz: [number, number][] = [];
  let exceeding = false;
  for (let k = 0; k < frequenciesHz.length; k++) {
    const frequencyHz = frequenciesHz[k]!;
    const bound = limitAt(mask, sense, frequencyHz);
    const margin = bound === null ? null : marginOf(sense, bound, value[k]!);
    if (margin !== null && Number.isNaN(margin)) undefinedHz ??= frequencyHz;
    if (margin !== null && (worst === null || margin < worst.margin)) worst = { frequencyHz, margin };
    const exceeds = margin !== null && margin < -slack;
    if (exceeds && exceeding) exceedsHz.at(-1)![1] = frequencyHz;
    else if (exceeds) exceedsHz.push([frequencyHz, frequencyHz]);
    exceeding = exceeds;
  }
  return { worst, exceedsHz, undefinedHz };
}

function refine(
  limit: Limit,
  mask: Mask,
  subject: Subject,
  [fromHz, toHz]: readonly [number, number],
  measure: Measure,
  gridValues: Float64Array,
): Worst | null {
  const clipped = mask.pieces.flatMap((piece) => {
    const from = Math.max(piece.fromHz, fromHz);
    const to = Math.min(piece.toHz, toHz);
    // An end that rounding puts just outside the band is read at the band's end.
    if (from <= to) return [{ piece, fromHz: from, toHz: to }];
    return from - to < 1e-9 * from
      ? [{ piece, fromHz: clamp(from, fromHz, toHz), toHz: clamp(to, fromHz, toHz) }]
      : [];
  });
  const grid = subject.grid.frequenciesHz;
  const known = new Map<number, number>();
  grid.forEach((f, k) => known.set(f, gridValues[k]!));
  const ends = new Set(clipped.flatMap((part) => [part.fromHz, part.toHz]).filter((f) => !known.has(f)));
  const asked = Float64Array.from(ends).sort();
  if (asked.length) measure.at(asked).forEach((value, k) => known.set(asked[k]!, value));
  const margin = (piece: MaskPiece, f: number, value: number): number => {
    const inside = clamp(f, piece.fromHz, piece.toHz);
    return marginOf(limit.sense, piece.valueAt(inside), value);
  };
  const tracks = clipped.map((part): Track => {
    const between = grid.subarray(firstAbove(grid, part.fromHz), firstFrom(grid, part.toHz));
    const frequenciesHz = Array.from(new Set([part.fromHz, ...between, part.toHz]));
    const margins = frequenciesHz.map((f) => margin(part.piece, f, known.get(f)!));
    return { piece: part.piece, frequenciesHz, margins };
  });
  return refineWorst(tracks, (f) => measure.at(f), margin, allowed(limit, refinedTo));
}

function clamp(value: number, least: number, most: number): number {
  return Math.min(Math.max(value, least), most);
}

function firstAbove(sorted: Float64Array, value: number): number {
  const at = firstFrom(sorted, value);
  return sorted[at] === value ? at + 1 : at;
}

/** Index of the first entry not below `value`. */
function firstFrom(sorted: Float64Array, value: number): number {
  let low = 0;
  let high = sorted.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (sorted[middle]! < value) low = middle + 1;
    else high = middle;
  }
  return low;
}

function told(worst: Worst | null): Judgement['worst'] {
  return worst === null ? null : { frequencyHz: worst.frequencyHz, marginDb: finiteOrNull(worst.margin) };
}

function finiteOrNull(value: number): number | null {
  return Number.isFinite(value) ? value : null;
}

function isFit(limit: Limit): boolean {
  return limit.quantity === 'fitted-attenuation' || limit.quantity === 'insertion-loss-deviation';
}

/** The fitted loss, or the deviation from it (signed, IL - fit), on 10 MHz samples of the engine whatever the grid. */
function withFit(
  limit: Limit,
  loss: Measure,
  subject: Subject,
): Measure | { readonly reason: string; readonly missingHz: [number, number][] } {
  const { basis, fromHz, toHz } = limit.fit ?? { basis: 'line', fromHz: 0, toHz: 0 };
  const reach = reachOfFit(fromHz, toHz, subject);
  if (reach.reason) return { reason: reach.reason, missingHz: reach.missingHz };
  const samples = fitFrequencies(fromHz, toHz);
  let fit: LossFit;
  try {
    fit = fitLoss(samples, samples.length ? loss.at(samples) : samples, basis);
  } catch (error) {
    if (error instanceof NetworkError) return { reason: `${error.reason} ${error.mend}`, missingHz: [] };
    throw error;
  }
  const { referenceOhm } = loss;
  if (limit.quantity === 'fitted-attenuation') {
    const at = (frequenciesHz: Float64Array): Float64Array => frequenciesHz.map((f) => fit.valueAt(f));
    return { referenceOhm, at, onGrid: () => at(subject.grid.frequenciesHz) };
  }
  const deviation = (frequenciesHz: Float64Array, losses: Float64Array): Float64Array =>
    losses.map((lossDb, k) => lossDb - fit.valueAt(frequenciesHz[k]!));
  return {
    referenceOhm,
    at: (frequenciesHz) => deviation(frequenciesHz, loss.at(frequenciesHz)),
    onGrid: () => deviation(subject.grid.frequenciesHz, loss.onGrid()),
  };
}
