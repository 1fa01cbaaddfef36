import type { CheckView, LimitView } from '@tollgate/contracts';

export interface Point {
  readonly x: number;
  readonly y: number | null;
}

export type CurveName = keyof CheckView['curves'];

/** Frequencies in GHz and losses in dB, as the charts take them. On a logarithmic axis 0 Hz has no place. */
export function curvePoints(view: CheckView, name: CurveName, log: boolean): Point[] {
  const values = view.curves[name];
  const points: Point[] = [];
  view.frequenciesHz.forEach((frequency, i) => {
    if (!log || frequency > 0) points.push({ x: frequency / 1e9, y: values[i] ?? null });
  });
  return points;
}

/** The limit as one line; a gap in frequency between two segments is a gap in it. */
export function limitPoints(limit: LimitView, log: boolean): Point[] {
  const runs: Point[][] = [];
  for (const segment of limit.outline) {
    const points = segment
      .filter(([frequencyHz]) => !log || frequencyHz > 0)
      .map(([frequencyHz, db]) => ({ x: frequencyHz / 1e9, y: db }));
    const last = runs.at(-1);
    if (last && points[0] && last.at(-1)!.x === points[0].x) last.push(...points);
    else if (points.length) runs.push(points);
  }
  return runs.flatMap((run, i) => (i === 0 ? run : [{ x: run[0]!.x, y: null }, ...run]));
}

/** The limits drawn beside a curve. */
export function limitsOf(view: CheckView, quantities: readonly LimitView['quantity'][]): LimitView[] {
  return view.limits.filter((limit) => quantities.includes(limit.quantity) && limit.outline.length > 0);
}

/**
 * Round numbers from 0 that hold the curves and their limits; a deep notch does not flatten all the rest, and a limit
 * counts up to `untilHz` (Nyquist): beyond it many run out of all proportion.
 */
export function lossRange(
  values: readonly (number | null)[],
  limits: readonly LimitView[],
  atLeast: number,
  untilHz = Infinity,
): number {
  const ofLimits = limits.flatMap((limit) => {
    const points = limit.outline.flat();
    const within = points.filter(([frequencyHz]) => frequencyHz <= untilHz * 1.001);
    return (within.length ? within : points.slice(0, 1)).map(([, db]) => db);
  });
  const sorted = values.filter((value) => value !== null).sort((a, b) => a - b);
  const deep = sorted[Math.floor(sorted.length * 0.99)] ?? 0;
  const top = Math.max(deep * 1.15, ...ofLimits.map((db) => db * 1.15), atLeast);
  const step = top > 60 ? 20 : top > 25 ? 10 : top > 12 ? 4 : top > 4 ? 2 : 1;
  return Math.min(120, Math.ceil(top / step) * step);
}

/** The frequencies on the axis, in GHz: of the curve, and of every limit beside it. */
export function frequencyRange(
  view: CheckView,
  limits: readonly LimitView[],
  log: boolean,
): [number, number] {
  const ends = limits.flatMap((limit) => limit.outline.flat().map(([frequencyHz]) => frequencyHz));
  const lowest = view.frequenciesHz.find((frequencyHz) => !log || frequencyHz > 0) ?? 0;
  const all = [lowest, view.frequenciesHz.at(-1) ?? 1e9, ...ends];
  const above = all.filter((frequencyHz) => frequencyHz > 0);
  const high = Math.max(...all);
  const first = Math.min(...all);
  const low = log ? Math.min(...above) : first < high / 20 ? 0 : first;
  // A limit at one frequency at the very end would stand on the frame.
  const room = limits.some((limit) => limit.outline.flat().length === 1 && limit.outline[0]![0]![0] === high);
  return [low / 1e9, (room ? 1.03 * high : high) / 1e9];
}

/** Index of the grid point next to a frequency in GHz. */
export function nearestPoint(view: CheckView, frequencyGhz: number): number {
  const wanted = frequencyGhz * 1e9;
  let [low, high] = [0, view.frequenciesHz.length - 1];
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (view.frequenciesHz[middle]! <= wanted) low = middle;
    else high = middle;
  }
  const [a, b] = [view.frequenciesHz[low] ?? 0, view.frequenciesHz[high] ?? 0];
  return wanted - a <= b - wanted ? low : high;
}
