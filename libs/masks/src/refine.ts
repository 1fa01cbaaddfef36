import type { MaskPiece } from './mask';

/** The margin along one piece of a mask, at ascending frequencies. */
export interface Track {
  readonly piece: MaskPiece;
  readonly frequenciesHz: readonly number[];
  readonly margins: readonly number[];
}

export interface Worst {
  readonly frequencyHz: number;
  readonly margin: number;
}

/** A local minimum of the margin and its neighbours; an end of a track is its own neighbour. */
interface Bracket {
  readonly track: Track;
  searched: boolean;
  hz: [number, number, number];
  margins: [number, number, number];
}

/** Far from the worst, a minimum is let go once it lies this many of its own steps above it. */
const letGoSteps = 10;
const mostRounds = 40;

/**
 * The least margin over all tracks, found between their points: each local minimum is closed in on by thirds until a
 * convex margin could not lie more than half of `tolerance` lower, or it can no longer be the worst.
 * @param valuesAt the judged value at strictly ascending frequencies
 * @param marginOf the margin that a value leaves on a piece at a frequency
 */
export function refineWorst(
  tracks: readonly Track[],
  valuesAt: (frequenciesHz: Float64Array) => Float64Array,
  marginOf: (piece: MaskPiece, frequencyHz: number, value: number) => number,
  tolerance: number,
): Worst | null {
  let worst = leastOf(tracks);
  if (!worst) return null;
  let open = tracks.flatMap(bracketsOf);
  for (let round = 0; round < mostRounds; round++) {
    open = open.filter((bracket) => mayStillBeWorst(bracket, worst!, tolerance));
    if (open.length === 0) break;
    const asked = open.map(thirdsOf);
    const frequencies = Float64Array.from(new Set(asked.flat())).sort();
    const values = valuesAt(frequencies);
    const found = new Map(Array.from(frequencies, (f, k) => [f, values[k]!]));
    open.forEach((bracket, k) => {
      const margins = asked[k]!.map((f) => marginOf(bracket.track.piece, f, found.get(f)!));
      closeIn(bracket, asked[k]!, margins);
      if (bracket.margins[1] < worst!.margin)
        worst = { frequencyHz: bracket.hz[1], margin: bracket.margins[1] };
    });
  }
  return worst;
}

/** The least margin of the tracks' own points; the lowest frequency where several are equal. */
export function leastOf(tracks: readonly Track[]): Worst | null {
  let worst: Worst | null = null;
  for (const { frequenciesHz, margins } of tracks) {
    for (let k = 0; k < margins.length; k++) {
      const lower = worst === null || margins[k]! < worst.margin;
      if (lower) worst = { frequencyHz: frequenciesHz[k]!, margin: margins[k]! };
    }
  }
  return worst;
}

function bracketsOf(track: Track): Bracket[] {
  const { frequenciesHz: f, margins: m } = track;
  const found: Bracket[] = [];
  for (let k = 0; k < m.length; k++) {
    const before = Math.max(k - 1, 0);
    const after = Math.min(k + 1, m.length - 1);
    if ((k > 0 && m[k]! >= m[before]!) || m[k]! > m[after]!) continue;
    if (before === after) continue;
    found.push({
      track,
      searched: false,
      hz: [f[before]!, f[k]!, f[after]!],
      margins: [m[before]!, m[k]!, m[after]!],
    });
  }
  return found;
}

function mayStillBeWorst({ hz, margins, searched }: Bracket, worst: Worst, tolerance: number): boolean {
  const [a, b, c] = hz;
  const left = margins[0] - margins[1];
  const right = margins[2] - margins[1];
  if (!(c - a > 1e-12 * c)) return false;
  if (margins[1] - letGoSteps * Math.max(left, right) > worst.margin + tolerance) return false;
  if (!searched) return true;
  // Of a convex margin the chord beyond b bounds how far it can fall on the other side of b.
  const fallLeft = c > b ? (right * (b - a)) / (c - b) : left;
  const fallRight = b > a ? (left * (c - b)) / (b - a) : right;
  return !(Math.max(fallLeft, fallRight) < tolerance / 2);
}

function thirdsOf({ hz: [a, b, c] }: Bracket): number[] {
  const points = [a + (b - a) / 3, a + ((b - a) * 2) / 3, b + (c - b) / 3, b + ((c - b) * 2) / 3];
  return points.filter((f) => f > a && f < c && f !== b);
}

function closeIn(bracket: Bracket, frequencies: readonly number[], margins: readonly number[]): void {
  const [a, b, c] = bracket.hz;
  const points = [
    ...frequencies.map((f, k) => [f, margins[k]!] as const),
    [b, bracket.margins[1]] as const,
    ...(a < b ? [[a, bracket.margins[0]] as const] : []),
    ...(b < c ? [[c, bracket.margins[2]] as const] : []),
  ].sort((one, other) => one[0] - other[0]);
  let least = 0;
  points.forEach(([, margin], k) => {
    if (margin < points[least]![1]) least = k;
  });
  const before = points[Math.max(least - 1, 0)]!;
  const after = points[Math.min(least + 1, points.length - 1)]!;
  bracket.searched = true;
  bracket.hz = [before[0], points[least]![0], after[0]];
  bracket.margins = [before[1], points[least]![1], after[1]];
}
