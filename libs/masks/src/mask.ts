import type { FieldProblem, Limit } from '@tollgate/contracts';
import { FormulaError } from './formula/formula-error';
import { readFormula } from './formula/formula';

/** A stretch of a limit on which it is continuous, both ends included; a single value has equal ends. */
export interface MaskPiece {
  readonly fromHz: number;
  readonly toHz: number;
  /** The limit at a frequency inside the piece: positive dB, or seconds for delay and skew. */
  readonly valueAt: (frequencyHz: number) => number;
}

/** A limit over frequency: pieces in ascending order, which may share ends (a step) or leave gaps (not judged). */
export interface Mask {
  readonly pieces: readonly MaskPiece[];
}

export type MaskResult =
  { readonly ok: true; readonly mask: Mask } | { readonly ok: false; readonly problems: FieldProblem[] };

type MaskForm = Pick<Limit, 'segments' | 'points' | 'interpolation' | 'atHz' | 'db'>;

/** Between its ends a formula is tried at this many frequencies, so that one which is nowhere defined is found early. */
const trials = 64;

/**
 * Compiles a limit's own values. Formulas are in `f` = GHz; points are joined linear in frequency or in its logarithm, in
 * dB; two points of one frequency are a step.
 * @param path the limit's path in the channel file, such as `limits[0]`
 */
export function compileMask(limit: MaskForm, path: string): MaskResult {
  if (limit.atHz !== undefined && limit.db !== undefined) {
    const db = limit.db;
    return { ok: true, mask: { pieces: [{ fromHz: limit.atHz, toHz: limit.atHz, valueAt: () => db }] } };
  }
  if (limit.points) return ofPoints(limit.points, limit.interpolation ?? 'linear', path);
  return ofSegments(limit.segments ?? [], path);
}

function ofSegments(segments: NonNullable<Limit['segments']>, path: string): MaskResult {
  const problems: FieldProblem[] = [];
  const pieces: MaskPiece[] = [];
  segments.forEach(({ fromHz, toHz, formula }, i) => {
    const at = `${path}.segments[${i}].formula`;
    try {
      const of = readFormula(formula);
      const piece = { fromHz, toHz, valueAt: (frequencyHz: number) => of(frequencyHz / 1e9) };
      const undefinedHz = firstUndefinedHz(piece);
      if (undefinedHz === undefined) pieces.push(piece);
      else problems.push(undefinedProblem(at, undefinedHz, piece.valueAt(undefinedHz)));
    } catch (error) {
      if (!(error instanceof FormulaError)) throw error;
      problems.push({
        path: at,
        message: `${error.reason} (character ${error.position}).`,
        mend: error.mend,
      });
    }
  });
  if (problems.length) return { ok: false, problems };
  return { ok: true, mask: { pieces: pieces.sort((a, b) => a.fromHz - b.fromHz) } };
}

function firstUndefinedHz(piece: MaskPiece): number | undefined {
  for (let k = 0; k <= trials; k++) {
    const f = k === trials ? piece.toHz : piece.fromHz + ((piece.toHz - piece.fromHz) * k) / trials;
    if (!Number.isFinite(piece.valueAt(f))) return f;
  }
  return undefined;
}

function undefinedProblem(path: string, frequencyHz: number, value: number): FieldProblem {
  const ghz = Number((frequencyHz / 1e9).toPrecision(7));
  return {
    path,
    message: `At f = ${ghz} GHz the formula has no finite value (${value}).`,
    mend: 'Correct the formula, or end the segment before that frequency: dividing by zero and roots or logarithms of what is not positive have no value.',
  };
}

function ofPoints(
  points: readonly (readonly [number, number])[],
  join: 'linear' | 'log',
  path: string,
): MaskResult {
  if (join === 'log' && points[0]![0] === 0) {
    const mend = 'Start above 0 Hz, or join the points linear in frequency.';
    const message = 'Points joined in the logarithm of frequency cannot start at 0 Hz.';
    return { ok: false, problems: [{ path: `${path}.points[0][0]`, message, mend }] };
  }
  const pieces: MaskPiece[] = [];
  for (let k = 0; k + 1 < points.length; k++) {
    const [fromHz, fromDb] = points[k]!;
    const [toHz, toDb] = points[k + 1]!;
    if (toHz > fromHz) pieces.push(straight(fromHz, fromDb, toHz, toDb, join));
  }
  if (pieces.length) return { ok: true, mask: { pieces } };
  const mend = 'Give points of at least two frequencies, or a single value as atHz and db.';
  return {
    ok: false,
    problems: [{ path: `${path}.points`, message: 'All points share one frequency.', mend }],
  };
}

function straight(
  fromHz: number,
  fromDb: number,
  toHz: number,
  toDb: number,
  join: 'linear' | 'log',
): MaskPiece {
  const shareAt =
    join === 'linear'
      ? (f: number) => (f - fromHz) / (toHz - fromHz)
      : (f: number) => Math.log(f / fromHz) / Math.log(toHz / fromHz);
  return { fromHz, toHz, valueAt: (f) => fromDb + (toDb - fromDb) * shareAt(f) };
}

/**
 * The limit at a frequency: where pieces meet or overlap the stricter one counts (the lower for `max`, the higher for
 * `min`); null outside every piece.
 */
export function limitAt(mask: Mask, sense: 'max' | 'min', frequencyHz: number): number | null {
  let strictest: number | null = null;
  for (const piece of mask.pieces) {
    if (frequencyHz < piece.fromHz || frequencyHz > piece.toHz) continue;
    const value = piece.valueAt(frequencyHz);
    if (strictest === null) strictest = value;
    else strictest = sense === 'max' ? Math.min(strictest, value) : Math.max(strictest, value);
  }
  return strictest;
}

/** The ranges a mask covers, touching pieces joined, in ascending order. */
export function rangesOf(mask: Mask): [number, number][] {
  const ranges: [number, number][] = [];
  for (const { fromHz, toHz } of mask.pieces) {
    const last = ranges.at(-1);
    if (last && fromHz <= last[1]) last[1] = Math.max(last[1], toHz);
    else ranges.push([fromHz, toHz]);
  }
  return ranges;
}
