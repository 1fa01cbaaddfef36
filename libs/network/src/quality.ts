import type { Network } from './network';
import { largestSingularValue } from './singular';

/** Grades of IEEE Std 370-2020 for the frequency-domain metrics. */
export type QualityGrade = 'good' | 'acceptable' | 'inconclusive' | 'poor';

/** Frequency ranges, both ends points of the data. */
export type Ranges = readonly (readonly [number, number])[];

export interface PassivityQuality {
  readonly percent: number;
  readonly grade: QualityGrade;
  /** Largest singular value at every point. */
  readonly singularValues: Float64Array;
  readonly worst: { readonly frequencyHz: number; readonly singularValue: number };
  /** Where the largest singular value exceeds 1.00001. */
  readonly failsHz: Ranges;
  readonly failingPoints: number;
}

export interface ReciprocityQuality {
  readonly percent: number;
  readonly grade: QualityGrade;
  readonly worst: { readonly frequencyHz: number; readonly meanDifference: number };
  /** Where the mean |Sij - Sji| exceeds 1e-6. */
  readonly failsHz: Ranges;
  readonly failingPoints: number;
}

export interface CausalityQuality {
  readonly percent: number;
  readonly grade: QualityGrade;
  /** The entry that scores lowest, rows and columns from 0. */
  readonly worstEntry: readonly [number, number];
  /** Where that entry turns against the clockwise sense. */
  readonly failsHz: Ranges;
}

export interface NetworkQuality {
  readonly passivity: PassivityQuality;
  /** Null for one port, where it says nothing. */
  readonly reciprocity: ReciprocityQuality | null;
  /** Null below 3 points, where nothing turns. */
  readonly causality: CausalityQuality | null;
}

/** Thresholds of IEEE Std 370-2020, frequency-domain metrics (formula A7). */
const passivityThreshold = 1.00001;
const reciprocityThreshold = 1e-6;
const weightScale = 0.1;

/**
 * The frequency-domain quality metrics of IEEE Std 370-2020 ("initial" metrics): passivity, reciprocity, causality in per cent, graded,
 * with the frequencies where they fail. They judge, they do not refuse: an active or slightly non-passive part is named, and used.
 * Causality is a rotation heuristic, not proof.
 */
export function assessQuality(network: Network): NetworkQuality {
  return {
    passivity: passivity(network),
    reciprocity: network.ports > 1 ? reciprocity(network) : null,
    causality: network.frequenciesHz.length > 2 ? causality(network) : null,
  };
}

function gradeOf(
  percent: number,
  [good, acceptable, inconclusive]: readonly [number, number, number],
): QualityGrade {
  if (percent > good) return 'good';
  if (percent > acceptable) return 'acceptable';
  return percent > inconclusive ? 'inconclusive' : 'poor';
}
const matrixGrades = [99.9, 99, 80] as const;
const causalityGrades = [80, 50, 20] as const;

function rangesWhere(frequenciesHz: Float64Array, fails: (point: number) => boolean): [number, number][] {
  const ranges: [number, number][] = [];
  let open = false;
  frequenciesHz.forEach((f, point) => {
    const bad = fails(point);
    if (bad && open) ranges[ranges.length - 1]![1] = f;
    else if (bad) ranges.push([f, f]);
    open = bad;
  });
  return ranges;
}

function score(
  values: Float64Array,
  threshold: number,
): { percent: number; failingPoints: number; worst: number } {
  let sum = 0;
  let failingPoints = 0;
  let worst = 0;
  values.forEach((value, point) => {
    if (value > threshold) {
      sum += (value - threshold) / weightScale;
      failingPoints++;
    }
    if (value > values[worst]!) worst = point;
  });
  const percent = values.length === 0 ? 100 : (100 * Math.max(values.length - sum, 0)) / values.length;
  return { percent, failingPoints, worst };
}

function passivity(network: Network): PassivityQuality {
  const { ports, frequenciesHz, s } = network;
  const size = ports * ports * 2;
  const singularValues = Float64Array.from(frequenciesHz, (_, point) =>
    largestSingularValue(s, ports, point * size),
  );
  const { percent, failingPoints, worst } = score(singularValues, passivityThreshold);
  return {
    percent,
    grade: gradeOf(percent, matrixGrades),
    singularValues,
    worst: { frequencyHz: frequenciesHz[worst] ?? 0, singularValue: singularValues[worst] ?? 0 },
    failsHz: rangesWhere(frequenciesHz, (point) => singularValues[point]! > passivityThreshold),
    failingPoints,
  };
}

function reciprocity(network: Network): ReciprocityQuality {
  const { ports, frequenciesHz, s } = network;
  const differences = Float64Array.from(frequenciesHz, (_, point) => {
    let sum = 0;
    for (let row = 0; row < ports; row++) {
      for (let column = 0; column < row; column++) {
        const p = ((point * ports + row) * ports + column) * 2;
        const q = ((point * ports + column) * ports + row) * 2;
        sum += 2 * Math.hypot(s[p]! - s[q]!, s[p + 1]! - s[q + 1]!);
      }
    }
    return sum / (ports * (ports - 1));
  });
  const { percent, failingPoints, worst } = score(differences, reciprocityThreshold);
  return {
    percent,
    grade: gradeOf(percent, matrixGrades),
    worst: { frequencyHz: frequenciesHz[worst] ?? 0, meanDifference: differences[worst] ?? 0 },
    failsHz: rangesWhere(frequenciesHz, (point) => differences[point]! > reciprocityThreshold),
    failingPoints,
  };
}

/** Turning of one entry at the inner points: positive is clockwise, as of a causal delay. */
function rotation(network: Network, entry: number, point: number): number {
  const { s, ports } = network;
  const size = ports * ports * 2;
  const k = point * size + entry;
  const vr = s[k + size]! - s[k]!;
  const vi = s[k + size + 1]! - s[k + 1]!;
  const nr = s[k + 2 * size]! - s[k + size]!;
  const ni = s[k + 2 * size + 1]! - s[k + size + 1]!;
  return nr * vi - ni * vr;
}

function causality(network: Network): CausalityQuality {
  const { ports, frequenciesHz } = network;
  const inner = frequenciesHz.length - 2;
  let lowest = Infinity;
  let worst = 0;
  for (let entry = 0; entry < ports * ports * 2; entry += 2) {
    let clockwise = 0;
    let all = 0;
    for (let point = 0; point < inner; point++) {
      const turn = rotation(network, entry, point);
      if (turn > 0) clockwise += turn;
      all += Math.abs(turn);
    }
    const percent = all === 0 ? 100 : (100 * clockwise) / all;
    if (percent < lowest) {
      lowest = percent;
      worst = entry;
    }
  }
  return {
    percent: lowest,
    grade: gradeOf(lowest, causalityGrades),
    worstEntry: [Math.floor(worst / 2 / ports), (worst / 2) % ports],
    failsHz: rangesWhere(
      frequenciesHz.subarray(1, 1 + inner),
      (point) => rotation(network, worst, point) < 0,
    ),
  };
}
