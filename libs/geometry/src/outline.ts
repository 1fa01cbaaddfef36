import type { Point } from './polyline';

/** A rectangle's four corners from its upper left, clockwise on a plan whose y axis points down. */
export function rectangle(at: Point, widthM: number, heightM: number): Point[] {
  const [x, y] = at;
  return [
    [x, y],
    [x + widthM, y],
    [x + widthM, y + heightM],
    [x, y + heightM],
  ];
}

/** Area of a closed polygon in square metres, never negative (shoelace formula). */
export function areaM2(corners: readonly Point[]): number {
  const twice = corners.reduce((sum, [x, y], i) => {
    const [nextX, nextY] = corners[(i + 1) % corners.length]!;
    return sum + x * nextY - nextX * y;
  }, 0);
  return Math.abs(twice) / 2;
}

/**
 * The first two sides of a closed polygon that cross or touch without being neighbours, by the number of their first
 * corner; undefined where the polygon is simple. Every pair of sides is looked at: meant for outlines of up to a few hundred corners.
 */
export function crossingSides(corners: readonly Point[]): readonly [number, number] | undefined {
  const count = corners.length;
  for (let i = 0; i < count; i++) {
    for (let j = i + 1; j < count; j++) {
      const neighbours = j === i + 1 || (i === 0 && j === count - 1);
      if (neighbours) continue;
      if (cross(corners[i]!, corners[(i + 1) % count]!, corners[j]!, corners[(j + 1) % count]!))
        return [i, j];
    }
  }
  return undefined;
}

/** Whether a closed polygon contains a point (even-odd rule); a point on a side may count either way. */
export function contains(corners: readonly Point[], [x, y]: Point): boolean {
  let inside = false;
  corners.forEach(([ax, ay], i) => {
    const [bx, by] = corners[(i + 1) % corners.length]!;
    if (ay > y !== by > y && x < ax + ((y - ay) / (by - ay)) * (bx - ax)) inside = !inside;
  });
  return inside;
}

function cross(a: Point, b: Point, c: Point, d: Point): boolean {
  const [abC, abD] = [side(a, b, c), side(a, b, d)];
  const [cdA, cdB] = [side(c, d, a), side(c, d, b)];
  if (abC === 0 && abD === 0 && cdA === 0 && cdB === 0) return overlap(a, b, c, d);
  return abC * abD <= 0 && cdA * cdB <= 0;
}

/** Four points on one line: whether the pieces share one. */
function overlap(a: Point, b: Point, c: Point, d: Point): boolean {
  return ([0, 1] as const).every(
    (axis) =>
      Math.max(a[axis], b[axis]) >= Math.min(c[axis], d[axis]) &&
      Math.max(c[axis], d[axis]) >= Math.min(a[axis], b[axis]),
  );
}

function side(a: Point, b: Point, point: Point): number {
  return Math.sign((b[0] - a[0]) * (point[1] - a[1]) - (b[1] - a[1]) * (point[0] - a[0]));
}
