import { distanceM, type Point } from './polyline';
import { tidyPoint } from './place';

/** What a point that is moved may come to rest on. */
export interface SnapGround {
  /** Spacing of the grid in metres; 0 for none. */
  readonly gridM: number;
  /** Ends and pins: taken exactly. */
  readonly pins: readonly Point[];
  /** Points whose x or y may be taken over. */
  readonly aligned: readonly Point[];
  /** How close is close, in metres on the plan. */
  readonly reachM: number;
  /** Where the piece that is drawn begins: it may run level, upright or at 45 degrees. */
  readonly from?: Point;
}

/** A line from the point that gave its x or y to the snapped one. */
export interface Guide {
  readonly from: Point;
  readonly to: Point;
}

export interface Snapped {
  readonly point: Point;
  readonly to: 'pin' | 'alignment' | 'grid' | 'nothing';
  readonly guides: readonly Guide[];
}

/** The place a moved point comes to rest: the nearest pin within reach, else x and y each by alignment or by the grid. */
export function snapped(point: Point, ground: SnapGround): Snapped {
  const pin = nearest(ground.pins, point, ground.reachM);
  if (pin) return { point: pin, to: 'pin', guides: [] };
  const onDiagonal = diagonal(point, ground);
  if (onDiagonal) return onDiagonal;
  const byX = closest(ground.aligned, point, 0, ground.reachM);
  const byY = closest(ground.aligned, point, 1, ground.reachM);
  const rest = tidyPoint([
    byX ? byX[0] : onGrid(point[0], ground.gridM),
    byY ? byY[1] : onGrid(point[1], ground.gridM),
  ]);
  const guides = [byX, byY].flatMap((from) =>
    from && distanceM(from, rest) > 0 ? [{ from, to: rest }] : [],
  );
  const to = byX || byY ? 'alignment' : ground.gridM > 0 ? 'grid' : 'nothing';
  return { point: rest, to, guides };
}

export function onGrid(value: number, gridM: number): number {
  return gridM > 0 ? Math.round(value / gridM) * gridM : value;
}

function diagonal(point: Point, { from, gridM, reachM }: SnapGround): Snapped | undefined {
  if (!from) return undefined;
  const [dx, dy] = [point[0] - from[0], point[1] - from[1]];
  const off = Math.abs(Math.abs(dx) - Math.abs(dy)) / Math.SQRT2;
  if (off > reachM || Math.min(Math.abs(dx), Math.abs(dy)) <= reachM) return undefined;
  const step = onGrid((Math.abs(dx) + Math.abs(dy)) / 2, gridM);
  const rest = tidyPoint([from[0] + Math.sign(dx) * step, from[1] + Math.sign(dy) * step]);
  return { point: rest, to: 'alignment', guides: [{ from, to: rest }] };
}

function nearest(points: readonly Point[], to: Point, reachM: number): Point | undefined {
  let best: Point | undefined;
  let least = reachM;
  for (const point of points) {
    const off = distanceM(point, to);
    if (off <= least) [best, least] = [point, off];
  }
  return best;
}

/** The point closest in x (axis 0) or y (axis 1); among equals the one that is closest altogether. */
function closest(points: readonly Point[], to: Point, axis: 0 | 1, reachM: number): Point | undefined {
  let best: Point | undefined;
  for (const point of points) {
    const off = Math.abs(point[axis] - to[axis]);
    if (off > reachM) continue;
    const least = best ? Math.abs(best[axis] - to[axis]) : Infinity;
    if (off < least || (off === least && distanceM(point, to) < distanceM(best!, to))) best = point;
  }
  return best;
}
