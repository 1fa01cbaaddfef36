import type { ChannelElement, CompleteChannel } from '@tollgate/contracts';
import {
  between,
  distanceM,
  headingDeg,
  polylineLengthM,
  samePoint,
  stepped,
  tidyPoint,
  type Box,
  type Point,
} from '@tollgate/geometry';
import { bodyOf, bodySizes, type Body } from './bodies';

interface Placed {
  readonly id: string;
  readonly index: number;
  /** Where the channel comes in and goes out. */
  readonly near: Point;
  readonly far: Point;
  /** Its place is in the document; else it is laid out by the rule of `planLayout` and drawn dashed. */
  readonly drawn: boolean;
}

export interface PlanTrace extends Placed {
  readonly body: 'trace';
  readonly layer: string;
  readonly widthM: number;
  readonly gapM: number | undefined;
  readonly points: readonly Point[];
  readonly lengthM: number;
  /** The length is typed in and does not follow what is drawn. */
  readonly typed: boolean;
}

export interface PlanNode extends Placed {
  readonly body: Exclude<Body, 'trace'>;
  readonly at: Point;
  readonly rotationDeg: number;
}

export type PlanItem = PlanTrace | PlanNode;

export interface PlanLayout {
  readonly items: readonly PlanItem[];
  /** Consecutive elements whose ends do not meet. */
  readonly gaps: readonly { readonly from: Point; readonly to: Point; readonly afterId: string }[];
  /** Elements laid out by rule are in scale; not where they are spread between two places that are given. */
  readonly inScale: boolean;
}

type Element = CompleteChannel['elements'][number];

/** A lumped element that nobody has placed takes this much of a line. */
const lumpM = 2e-3;
const noBoard: Box = { x0: 0, y0: 0, x1: 0.16, y1: 0.1 };

/**
 * Where every element stands. A trace with a path and a part with a place stand there. The others are laid out by one
 * rule: spread in proportion between the places before and after them; beyond the last one straight on, in scale; before
 * the first one likewise; and where nothing is placed, from the left of the board to the right.
 */
export function planLayout(document: CompleteChannel, board: Box = noBoard): PlanLayout {
  const { elements } = document;
  const items: PlanItem[] = [];
  let inScale = true;
  for (let start = 0; start < elements.length;) {
    const own = givenItem(elements[start]!, start);
    if (own) {
      items.push(own);
      start += 1;
      continue;
    }
    let end = start;
    while (end < elements.length && !isGiven(elements[end]!)) end += 1;
    const next = end < elements.length ? givenItem(elements[end]!, end) : undefined;
    const run = elements.slice(start, end);
    const line = lineFor(run, items.at(-1), next, board);
    inScale &&= line.inScale;
    items.push(...spread(run, start, line.from, line.to));
    start = end;
  }
  return { items, gaps: gapsOf(items), inScale };
}

function isGiven(element: Element): boolean {
  return element.kind === 'trace'
    ? element.path !== undefined
    : element.plan !== undefined && bodyOf(element.kind) !== 'trace';
}

/** The length a person typed, or what is drawn. */
export function lengthOf(element: ChannelElement): number {
  if (element.kind === 'line-pair') return Math.max(element.p.lengthM, element.n.lengthM);
  if (bodyOf(element.kind) !== 'trace') return 0;
  if ('lengthM' in element && element.lengthM !== undefined) return element.lengthM;
  return element.kind === 'trace' && element.path ? polylineLengthM(element.path) : 0;
}

export function givenItem(element: Element, index: number): PlanItem | undefined {
  if (!isGiven(element)) return undefined;
  if (element.kind === 'trace' && element.path) return traceItem(element, index, element.path, true);
  const { xM, yM, rotationDeg = 0 } = element.plan!;
  return nodeAt(element, index, [xM, yM], rotationDeg);
}

/** A part with its pins, turned about its middle. */
function nodeAt(element: Element, index: number, at: Point, rotationDeg: number): PlanNode {
  const body = bodyOf(element.kind) as PlanNode['body'];
  const half = bodySizes[body].lengthM / 2;
  const [near, far] = [stepped(at, rotationDeg, -half), stepped(at, rotationDeg, half)];
  return { id: element.id, index, body, at, rotationDeg, near, far, drawn: true };
}

function traceItem(element: Element, index: number, points: readonly Point[], drawn: boolean): PlanTrace {
  const trace = element.kind === 'trace' ? element : undefined;
  return {
    id: element.id,
    index,
    body: 'trace',
    layer: trace?.layer ?? '',
    widthM: trace?.widthM ?? 0,
    gapM: trace?.gapM,
    points,
    near: points[0]!,
    far: points.at(-1)!,
    lengthM: lengthOf(element),
    typed: !trace || trace.lengthM !== undefined,
    drawn,
  };
}

function roomOf(element: Element): number {
  const body = bodyOf(element.kind);
  return body === 'trace' ? Math.max(lengthOf(element), 1e-4) : Math.max(lumpM, bodySizes[body].lengthM);
}

/** The straight line that elements without a place are spread along. */
function lineFor(
  run: readonly Element[],
  before: PlanItem | undefined,
  after: PlanItem | undefined,
  board: Box,
): { from: Point; to: Point; inScale: boolean } {
  const totalM = run.reduce((sum, element) => sum + roomOf(element), 0);
  if (before && after) {
    const spanM = distanceM(before.far, after.near);
    return {
      from: before.far,
      to: after.near,
      inScale: spanM < 1e-8 || Math.abs(spanM - totalM) < 0.01 * totalM,
    };
  }
  if (before)
    return { from: before.far, to: stepped(before.far, headingAt(before, 'far'), totalM), inScale: true };
  if (after)
    return { from: stepped(after.near, headingAt(after, 'near'), -totalM), to: after.near, inScale: true };
  const widthM = board.x1 - board.x0;
  const from = tidyPoint([board.x0 + 0.08 * widthM, (board.y0 + board.y1) / 2]);
  const fits = totalM <= 0.84 * widthM;
  return { from, to: stepped(from, 0, fits ? totalM : 0.84 * widthM), inScale: fits };
}

function spread(run: readonly Element[], start: number, from: Point, to: Point): PlanItem[] {
  const totalM = run.reduce((sum, element) => sum + roomOf(element), 0);
  const joined = samePoint(from, to);
  const rotationDeg = headingDeg(from, to);
  let passedM = 0;
  return run.map((element, i): PlanItem => {
    const near = between(from, to, passedM / totalM);
    passedM += roomOf(element);
    const far = between(from, to, passedM / totalM);
    const index = start + i;
    if (bodyOf(element.kind) === 'trace') return traceItem(element, index, [near, far], false);
    const body = bodyOf(element.kind) as PlanNode['body'];
    // What stands where two drawn ends meet has a place, though nobody typed it.
    return {
      id: element.id,
      index,
      body,
      at: between(near, far, 0.5),
      rotationDeg,
      near,
      far,
      drawn: joined,
    };
  });
}

/** The way the channel runs at an end of an item, in degrees. */
export function headingAt(item: PlanItem, end: 'near' | 'far'): number {
  if (item.body !== 'trace') return item.rotationDeg;
  const { points } = item;
  const [a, b] = end === 'near' ? [points[0]!, points[1]!] : [points.at(-2)!, points.at(-1)!];
  return headingDeg(a, b);
}

function gapsOf(items: readonly PlanItem[]): PlanLayout['gaps'] {
  return items.slice(1).flatMap((item, i) => {
    const before = items[i]!;
    return samePoint(before.far, item.near) ? [] : [{ from: before.far, to: item.near, afterId: before.id }];
  });
}
