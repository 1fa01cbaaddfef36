/** A point of the floor plan in metres: x to the right, y downwards. */
export type Point = readonly [xM: number, yM: number];

/**
 * Length of a polyline.
 *
 * @param path vertices in metres, in order.
 * @returns the sum of the straight pieces in metres; 0 for fewer than two vertices.
 */
export function polylineLengthM(path: readonly Point[]): number {
  let total = 0;
  for (let i = 1; i < path.length; i++) total += distanceM(path[i - 1]!, path[i]!);
  return total;
}

/** Distance between two points in metres. */
export function distanceM(a: Point, b: Point): number {
  return Math.hypot(b[0] - a[0], b[1] - a[1]);
}

/**
 * Signed turn at each inner vertex, in radians, from -pi to pi: positive turns towards +y from +x
 * (to the right on a plan whose y axis points down). A vertex that repeats its neighbour has no direction and is passed over.
 */
export function turnsRad(path: readonly Point[]): number[] {
  const pieces = directions(path);
  return pieces.slice(1).map((direction, i) => {
    const before = pieces[i]!;
    const cross = before[0] * direction[1] - before[1] * direction[0];
    const dot = before[0] * direction[0] + before[1] * direction[1];
    return Math.atan2(cross, dot);
  });
}

function directions(path: readonly Point[]): Point[] {
  const pieces: Point[] = [];
  for (let i = 1; i < path.length; i++) {
    const size = distanceM(path[i - 1]!, path[i]!);
    if (size === 0) continue;
    pieces.push([(path[i]![0] - path[i - 1]![0]) / size, (path[i]![1] - path[i - 1]![1]) / size]);
  }
  return pieces;
}
