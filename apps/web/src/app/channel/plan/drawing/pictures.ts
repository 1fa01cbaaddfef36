import type { CompleteChannel, ElementOf } from '@tollgate/contracts';
import { distanceM, type Point } from '@tollgate/geometry';
import type { PlanNode, PlanTrace } from '../layout/plan-layout';
import { legTexts, mm, pathText } from './path-text';
import { halfSizeMm, viaRings, type ViaRings } from './sizes';

/** A pair is drawn as one until its legs lie this far apart on the screen. */
const apartPx = 7;

export interface TracePicture {
  readonly item: PlanTrace;
  readonly line: string;
  readonly pair: boolean;
  /** In scale: the legs of a pair, each as wide as it is. */
  readonly legs: readonly string[];
  /** Width in mm where it is drawn in scale, 0 where it would be too thin to see. */
  readonly width: number;
}

export function tracePicture(item: PlanTrace, pairs: boolean, pxPerM: number): TracePicture {
  const line = pathText(item.points);
  const pitchM = item.gapM === undefined ? 0 : item.gapM + item.widthM;
  const inScale = item.drawn && pitchM * pxPerM >= apartPx;
  const legs = inScale ? legTexts(item.points, pitchM) : undefined;
  const widthPx = item.widthM * pxPerM;
  const wide = item.drawn && (legs ? widthPx >= 1.5 : item.gapM === undefined && widthPx > 2.5);
  return {
    item,
    line,
    pair: item.gapM !== undefined || (pairs && item.layer === ''),
    legs: legs ? [legs.p, legs.n] : [],
    width: wide ? mm(item.widthM) : 0,
  };
}

export interface NodePicture {
  readonly item: PlanNode;
  /** Place in mm. */
  readonly x: number;
  readonly y: number;
  readonly rotationDeg: number;
  readonly halfLength: number;
  readonly halfWidth: number;
  readonly via: ViaRings | undefined;
  readonly returns: readonly Point[];
}

export function nodePicture(item: PlanNode, document: CompleteChannel, pxPerM: number): NodePicture {
  const element = document.elements[item.index];
  const via: ElementOf<'via'> | undefined = element?.kind === 'via' ? element : undefined;
  const [halfLength, halfWidth] = halfSizeMm(item.body, pxPerM);
  const rings = via && viaRings(via, pxPerM);
  return {
    item,
    x: mm(item.at[0]),
    y: mm(item.at[1]),
    rotationDeg: item.rotationDeg,
    halfLength,
    halfWidth: rings ? Math.max(rings.pad + rings.half, halfWidth) : halfWidth,
    via: rings,
    returns: via && pxPerM > 12e3 ? (via.returnVias ?? []).map(([x, y]) => [mm(x), mm(y)] as const) : [],
  };
}

/** The middle of the longest piece of a line, where its caption has the most room. */
export function captionPlace(points: readonly Point[]): Point {
  let best = 0;
  for (let i = 1; i + 1 < points.length; i++) {
    if (distanceM(points[i]!, points[i + 1]!) > distanceM(points[best]!, points[best + 1]!)) best = i;
  }
  const [a, b] = [points[best]!, points[best + 1]!];
  return [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2];
}

export interface Name {
  readonly id: string;
  readonly text: string;
  readonly x: number;
  readonly y: number;
}

const letterPx = 7;
const linePx = 15;

/** Names beside parts, in px; one that would lie on another is left out, the first in the list has its place. */
export function roomyNames(names: readonly Name[]): readonly Name[] {
  const kept: Name[] = [];
  for (const name of names) {
    const hides = kept.some(
      (other) =>
        Math.abs(other.y - name.y) < linePx &&
        name.x < other.x + other.text.length * letterPx &&
        other.x < name.x + name.text.length * letterPx,
    );
    if (!hides) kept.push(name);
  }
  return kept;
}
