import type { SectionDrawing, Stackup } from '@tollgate/contracts';
import type { CrossSectionFacts } from '@tollgate/elements';

type Point = [number, number];
type Corners = readonly (readonly [number, number])[];

/** Beside and above the copper the picture goes on by this many heights of it, so that one sees what it runs in. */
const marginHeights = 2.5;

/**
 * The section as the board has it, in metres: x from the middle, y up from the foot of the picture. The engine sees every
 * section with a plane below; one that returns on the plane above is turned back here.
 */
export function drawingOf({ drawing, planes }: CrossSectionFacts, stackup: Stackup): SectionDrawing {
  const thicknessOf = (name: string | null) =>
    stackup.layers?.find((layer) => layer.name === name)?.thicknessM ?? 0;
  // Seen turned, the plane drawn below is the one above.
  const [lower, upper] = drawing.turned ? [planes.above, planes.below] : [planes.below, planes.above];
  const baseM = thicknessOf(lower);
  const sheetsTopM = drawing.sheets.at(-1)?.toM ?? 0;
  const copperTopM = Math.max(...drawing.traces.flat().map(([, y]) => y));
  const maskM = drawing.mask?.thicknessM ?? 0;
  const closed = drawing.planeAboveAtM !== undefined;
  const topM = closed ? sheetsTopM + thicknessOf(upper) : Math.max(sheetsTopM, copperTopM + maskM) * 1.15;
  const heightM = baseM + topM;
  const reachM = Math.max(...drawing.traces.flat().map(([x]) => x));
  const widthM = 2 * (reachM + marginHeights * Math.max(sheetsTopM / 2, copperTopM / 2));
  const place = ([x, y]: readonly [number, number]): Point => [x, drawing.turned ? topM - y : baseM + y];
  const span = (fromM: number, toM: number) => {
    const ends = [place([0, fromM])[1], place([0, toM])[1]];
    return { fromM: Math.min(...ends), toM: Math.max(...ends) };
  };
  const dfOf = (name: string): number => {
    const layer = stackup.layers?.find((each) => each.name === name);
    return layer && layer.kind !== 'copper' ? layer.df : 0;
  };
  return {
    widthM,
    heightM,
    sheets: drawing.sheets.map(({ layer, dk, fromM, toM }) => ({
      layer,
      dk,
      df: dfOf(layer),
      ...span(fromM, toM),
    })),
    planes: [
      ...(lower === null ? [] : [{ layer: lower, ...span(-baseM, 0) }]),
      ...(closed && upper !== null ? [{ layer: upper, ...span(sheetsTopM, topM) }] : []),
    ],
    traces: drawing.traces.map((corners) => corners.map(place)),
    mask: drawing.mask
      ? {
          layer: drawing.mask.layer,
          dk: drawing.mask.dk,
          outline: maskOutline(drawing.traces, sheetsTopM, maskM, widthM / 2).map(place),
        }
      : null,
  };
}

/** The mask's surface over laminate, side walls and tops at its own thickness, closed along the laminate. */
function maskOutline(traces: readonly Corners[], baseM: number, maskM: number, halfM: number): Point[] {
  const over: Point[] = [];
  for (const [lowerLeft, lowerRight, upperRight, upperLeft] of traces as readonly (readonly [
    Point,
    Point,
    Point,
    Point,
  ])[]) {
    const left = wall(lowerLeft, upperLeft, maskM, -1);
    const right = wall(lowerRight, upperRight, maskM, 1);
    const last = over.at(-1);
    // Where two traces stand close, their covers meet before the mask reaches the laminate between them.
    if (last && last[0] > left.foot[0]) {
      const share = Math.max(0, Math.min(1, meeting(over.at(-2)!, last, left.top, left.foot)));
      const [top, foot] = [over.at(-2)!, over.pop()!];
      over.push([top[0] + share * (foot[0] - top[0]), top[1] + share * (foot[1] - top[1])], left.top);
    } else over.push(left.foot, left.top);
    over.push(right.top, right.foot);
  }
  return [[-halfM, baseM], [-halfM, baseM + maskM], ...over, [halfM, baseM + maskM], [halfM, baseM]];
}

/** The cover of a side wall, parallel to it at the mask's thickness: where it leaves the flat, and where it meets the top. */
function wall(lower: Point, upper: Point, maskM: number, side: -1 | 1): { foot: Point; top: Point } {
  const lean = (upper[0] - lower[0]) / (upper[1] - lower[1]);
  const outM = side * maskM * Math.hypot(1, lean);
  const at = (yM: number): Point => [lower[0] + outM + lean * (yM - lower[1]), yM];
  return { foot: at(lower[1] + maskM), top: at(upper[1] + maskM) };
}

/** How far down its wall the cover of the left trace meets that of the right one; both fall from the same height. */
function meeting(leftTop: Point, leftFoot: Point, rightTop: Point, rightFoot: Point): number {
  const apart = rightTop[0] - leftTop[0];
  const closing = leftFoot[0] - leftTop[0] - (rightFoot[0] - rightTop[0]);
  return closing > 0 ? apart / closing : 1;
}
