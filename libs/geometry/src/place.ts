import { distanceM, type Point } from './polyline';

/** A nanometre: closer than this two points are one. */
export const sameM = 1e-9;

export function samePoint(a: Point, b: Point): boolean {
  return distanceM(a, b) <= 10 * sameM;
}

/** A point on whole nanometres, so that what is stored has no digits of arithmetic. */
export function tidyPoint(point: Point): Point {
  return [tidy(point[0]), tidy(point[1])];
}

export function shifted(point: Point, by: Point): Point {
  return tidyPoint([point[0] + by[0], point[1] + by[1]]);
}

/** Way from a to b. */
export function wayTo(a: Point, b: Point): Point {
  return [b[0] - a[0], b[1] - a[1]];
}

export function between(a: Point, b: Point, share: number): Point {
  return [a[0] + (b[0] - a[0]) * share, a[1] + (b[1] - a[1]) * share];
}

/** Direction from a to b in degrees, clockwise on a plan whose y axis points down; 0 where they are one point. */
export function headingDeg(a: Point, b: Point): number {
  const degrees = (Math.atan2(b[1] - a[1], b[0] - a[0]) * 180) / Math.PI;
  return Math.round(degrees * 1e6) / 1e6;
}

/** The point at a distance from another in a direction in degrees. */
export function stepped(from: Point, directionDeg: number, lengthM: number): Point {
  const angle = (directionDeg * Math.PI) / 180;
  return tidyPoint([from[0] + Math.cos(angle) * lengthM, from[1] + Math.sin(angle) * lengthM]);
}

/** Where a point lies beside a polyline: the nearest place on it, in which piece, and how far off. */
export interface NearestPlace {
  readonly point: Point;
  /** The piece from vertex `piece` to the next. */
  readonly piece: number;
  readonly distanceM: number;
}

/** @returns undefined for fewer than two vertices. */
export function nearestPlace(path: readonly Point[], to: Point): NearestPlace | undefined {
  let best: NearestPlace | undefined;
  for (let piece = 0; piece + 1 < path.length; piece++) {
    const [a, b] = [path[piece]!, path[piece + 1]!];
    const square = distanceM(a, b) ** 2;
    const share =
      square === 0 ? 0 : ((to[0] - a[0]) * (b[0] - a[0]) + (to[1] - a[1]) * (b[1] - a[1])) / square;
    const point = between(a, b, Math.min(1, Math.max(0, share)));
    const off = distanceM(point, to);
    if (!best || off < best.distanceM) best = { point, piece, distanceM: off };
  }
  return best;
}

/** The smallest upright rectangle around points. */
export interface Box {
  readonly x0: number;
  readonly y0: number;
  readonly x1: number;
  readonly y1: number;
}

/** @returns undefined for no point. */
export function boxOf(points: readonly Point[]): Box | undefined {
  const first = points[0];
  if (!first) return undefined;
  let [x0, y0] = first;
  let [x1, y1] = first;
  for (const [x, y] of points) {
    x0 = Math.min(x0, x);
    y0 = Math.min(y0, y);
    x1 = Math.max(x1, x);
    y1 = Math.max(y1, y);
  }
  return { x0, y0, x1, y1 };
}

function tidy(value: number): number {
  return Math.round(value / sameM) / 1e9 + 0;
}

/** A way from a to b of at most three vertices: first at 45 degrees, then level or upright. */
export function elbow(a: Point, b: Point): Point[] {
  const [dx, dy] = wayTo(a, b);
  const diagonal = Math.min(Math.abs(dx), Math.abs(dy));
  const corner = tidyPoint([a[0] + Math.sign(dx) * diagonal, a[1] + Math.sign(dy) * diagonal]);
  const all = [a, corner, b];
  return all.filter((point, i) => i === 0 || !samePoint(point, all[i - 1]!));
}
