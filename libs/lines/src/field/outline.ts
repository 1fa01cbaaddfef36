import { sameHeightM, type Shape } from './section';

/** What a piece of the outline is. */
export const surface = { lower: 0, upper: 1, side: 2, planeAbove: 3, between: 4 } as const;
export type Surface = (typeof surface)[keyof typeof surface];

/** Where segments crowd: at one end, at both, or growing by a ratio away from the copper. */
export type Crowding = 'start' | 'end' | 'both' | 'outward' | 'inward';

/**
 * A straight piece of the right half of a section. Copper knows the material outside it; a piece between two dielectrics the
 * one on the left of its direction and the one on the right. Materials count sheets, then the mask, then air.
 */
export interface Piece {
  readonly surface: Surface;
  readonly from: readonly [number, number];
  readonly to: readonly [number, number];
  readonly crowding: Crowding;
  /** Copper: outside. Between: on the left. */
  readonly left: number;
  readonly right: number;
  /** What its segments must resolve: the nearest thing that faces it. */
  readonly nearM: number;
  /** Growing outward: the first segment where the copper's own corners don't set it. */
  readonly firstM?: number;
}

/** Half width reached by open interfaces, in heights of what they belong to: beyond, what is left weighs under 1e-5. */
const openReach = 20;
/** The same under a plane, where fields die out by exp(-pi x/height). */
const coveredReach = 4;

export function airOf({ section }: Shape): number {
  return section.sheets.length + (section.mask ? 1 : 0);
}

/** All pieces of the right half: copper, the plane above, and the faces between dielectrics. */
export function outlineOf(shape: Shape): Piece[] {
  const { section, heightM } = shape;
  const pieces = copperOf(shape);
  const endM = endOf(shape);
  for (let i = 0; i + 1 < section.sheets.length; i++)
    pieces.push(...faceAt(shape, shape.topsM[i]!, i, i + 1, endM));
  if (section.planeAbove) {
    pieces.push(...planeAbove(shape, endM));
  } else if (section.mask) {
    const mask = section.sheets.length;
    pieces.push(...faceAt(shape, heightM, mask - 1, mask, endM), ...maskSurface(shape, endM));
  } else {
    pieces.push(...faceAt(shape, heightM, section.sheets.length - 1, airOf(shape), endM));
  }
  return pieces;
}

/** Where the faces that run outward end. */
function endOf({ section, centreM, heightM, lowerWidthM, upperWidthM }: Shape): number {
  const edgeM = centreM + Math.max(lowerWidthM, upperWidthM) / 2;
  const upperM = section.traceAtM + section.trace.thicknessM + (section.mask?.thicknessM ?? 0);
  return edgeM + (section.planeAbove ? coveredReach : openReach) * Math.max(heightM, upperM);
}

function sheetAt({ section, topsM }: Shape, yM: number): number {
  const index = topsM.findIndex((top) => yM < top - sameHeightM);
  return index >= 0 ? index : section.sheets.length;
}

/** What conducts, whatever the dielectrics: the trace, and the plane above where there is one. */
export function conductorsOf(shape: Shape): Piece[] {
  const bare = { ...shape, topsM: [], section: { ...shape.section, mask: undefined } };
  const pieces = copperOf(bare);
  return shape.section.planeAbove ? [...pieces, ...planeAbove(bare, endOf(bare))] : pieces;
}

/** Lower face, upper face and side walls of the right-hand trace; only its right half where it is alone. */
function copperOf(shape: Shape): Piece[] {
  const { section, centreM, heightM, lowerWidthM, upperWidthM } = shape;
  const { traceAtM: lowM, gapM = Infinity, mask, planeAbove: covered } = section;
  const { thicknessM } = section.trace;
  const highM = lowM + thicknessM;
  const pair = section.gapM !== undefined;
  const face = (on: Surface, yM: number, widthM: number, material: number, overM: number): Piece => ({
    surface: on,
    from: [pair ? centreM - widthM / 2 : 0, yM],
    to: [centreM + widthM / 2, yM],
    crowding: pair ? 'both' : 'end',
    left: material,
    right: material,
    nearM: Math.min(overM, gapM, 3 * thicknessM),
  });
  const under = sheetAt(shape, lowM - 2 * sameHeightM);
  const over = mask ? section.sheets.length : sheetAt(shape, highM);
  const openM = covered ? heightM - highM : (mask?.thicknessM ?? Infinity);
  const pieces = [
    face(surface.lower, lowM, lowerWidthM, under, lowM),
    face(surface.upper, highM, upperWidthM, over, openM),
    ...wall(shape, 1),
  ];
  return pair ? [...pieces, ...wall(shape, -1)] : pieces;
}

/** A side wall from foot to top, cut where it passes from sheet to sheet. */
function wall(shape: Shape, side: 1 | -1): Piece[] {
  const { section, topsM, centreM } = shape;
  const { traceAtM: lowM, gapM = Infinity, mask } = section;
  const highM = lowM + section.trace.thicknessM;
  const cuts = topsM.filter((top) => top > lowM + sameHeightM && top < highM - sameHeightM);
  const heights = [lowM, ...cuts, highM];
  return heights.slice(1).map((toM, k): Piece => {
    const fromM = heights[k]!;
    const material = mask ? section.sheets.length : sheetAt(shape, (fromM + toM) / 2);
    return {
      surface: surface.side,
      from: [centreM + side * halfWidthAt(shape, fromM), fromM],
      to: [centreM + side * halfWidthAt(shape, toM), toM],
      crowding: 'both',
      left: material,
      right: material,
      nearM: Math.min(gapM, mask?.thicknessM ?? Infinity),
    };
  });
}

/** Half the trace's width at a height. */
export function halfWidthAt({ section, lowerWidthM, upperWidthM }: Shape, yM: number): number {
  const share = (yM - section.traceAtM) / section.trace.thicknessM;
  return (lowerWidthM + share * (upperWidthM - lowerWidthM)) / 2;
}

/** A level face between the material below and the one above, left out where copper lies. Its left looks up. */
function faceAt(shape: Shape, yM: number, below: number, above: number, endM: number): Piece[] {
  const { section, centreM } = shape;
  const lowM = section.traceAtM;
  const highM = lowM + section.trace.thicknessM;
  const common = { surface: surface.between, left: above, right: below };
  const through = yM > lowM - sameHeightM && yM < highM + sameHeightM;
  if (!through) return pastCopper(shape, common, yM, endM);
  const halfM = halfWidthAt(shape, Math.min(Math.max(yM, lowM), highM));
  const outer: Piece = {
    ...common,
    from: [centreM + halfM, yM],
    to: [endM, yM],
    crowding: 'outward',
    nearM: Infinity,
  };
  return section.gapM === undefined ? [outer] : [innerFace(common, yM, centreM - halfM, lowM), outer];
}

/** Between the legs of a pair: where they stand far apart it grows inward from the copper as the outer face does. */
function innerFace(common: Common, yM: number, toM: number, heightM: number): Piece {
  const crowding = toM > 2 * heightM ? 'inward' : 'end';
  return { ...common, from: [0, yM], to: [toM, yM], crowding, nearM: Infinity };
}

type Common = Pick<Piece, 'surface' | 'left' | 'right'>;

/** A level face that passes the copper at a distance: crowded over and under its edges, then outward. */
function pastCopper(shape: Shape, common: Common, yM: number, endM: number): Piece[] {
  const { section, centreM } = shape;
  const halfM = Math.max(shape.lowerWidthM, shape.upperWidthM) / 2;
  const edgeM = centreM + halfM;
  const spans: [number, number, Crowding][] =
    section.gapM === undefined
      ? [[0, edgeM, 'end']]
      : [
          [0, centreM - halfM, 'end'],
          [centreM - halfM, centreM, 'start'],
          [centreM, edgeM, 'end'],
        ];
  const apartM = Math.min(
    Math.abs(yM - section.traceAtM),
    Math.abs(yM - section.traceAtM - section.trace.thicknessM),
  );
  return [...spans, [edgeM, endM, 'outward'] as const].map(([from, to, crowding]) => ({
    ...common,
    from: [from, yM],
    to: [to, yM],
    crowding,
    nearM: Math.min(apartM, section.gapM ?? Infinity),
    firstM: apartM / 3,
  }));
}

function planeAbove(shape: Shape, endM: number): Piece[] {
  const yM = shape.heightM;
  const material = shape.section.sheets.length - 1;
  const common = { surface: surface.planeAbove, left: material, right: material };
  return pastCopper(shape, common, yM, endM);
}

/** The mask's outer face: along the laminate, up the walls parallel to them, over the top. Its left looks out. */
function maskSurface(shape: Shape, endM: number): Piece[] {
  const { section, centreM, heightM, lowerWidthM, upperWidthM } = shape;
  const tM = section.mask!.thicknessM;
  const thickM = section.trace.thicknessM;
  const angle = Math.atan2(thickM, (lowerWidthM - upperWidthM) / 2);
  const [sin, cos] = [Math.sin(angle), Math.cos(angle)];
  // The wall moved out by the mask's thickness, where it meets the mask on the laminate and on the top.
  const bottomM = lowerWidthM / 2 + tM * sin - (cos * tM * (1 - cos)) / sin;
  const topM = lowerWidthM / 2 + tM * sin - (cos * (thickM + tM * (1 - cos))) / sin;
  const [lowM, highM] = [heightM + tM, heightM + thickM + tM];
  const inner: Corner[] =
    section.gapM === undefined
      ? [{ at: [0, highM], crowding: 'end' }]
      : innerMask(shape, [centreM - bottomM, lowM], [centreM - topM, highM]);
  // Alone, or with the coats of a pair run into one, the top is cut finer towards its outer end only.
  const level = inner.at(-1)!.at[0] === centreM;
  const corners: Corner[] = [
    ...inner,
    { at: [centreM + topM, highM], crowding: level ? 'end' : 'both' },
    { at: [centreM + bottomM, lowM], crowding: 'both' },
    { at: [endM, lowM], crowding: 'outward' },
  ];
  const [mask, air] = [section.sheets.length, section.sheets.length + 1];
  const slitM = Math.abs(2 * (centreM - bottomM));
  return corners.slice(1).map(({ at, crowding }, k): Piece => ({
    surface: surface.between,
    from: corners[k]!.at,
    to: at,
    crowding,
    left: air,
    right: mask,
    nearM: at[0] < centreM ? Math.min(tM, slitM) : tM,
    firstM: tM / 6,
  }));
}

/** A point of the mask's outer face, and how the piece that ends there is cut. */
interface Corner {
  readonly at: readonly [number, number];
  readonly crowding: Crowding;
}

/** The inner half of a pair's mask, from the middle to the top: where the two coats meet, they fill the gap. */
function innerMask(shape: Shape, bottom: Corner['at'], top: Corner['at']): Corner[] {
  const from = (yM: number): Corner => ({ at: [0, yM], crowding: 'end' });
  if (bottom[0] > 0) {
    return [from(bottom[1]), { at: bottom, crowding: 'end' }, { at: top, crowding: 'both' }];
  }
  if (top[0] > 0) {
    const share = -bottom[0] / (top[0] - bottom[0]);
    return [from(bottom[1] + share * (top[1] - bottom[1])), { at: top, crowding: 'both' }];
  }
  // Level from leg to leg: cut where the copper below has its edges.
  const edgeM = shape.centreM - shape.upperWidthM / 2;
  return [
    from(top[1]),
    { at: [edgeM, top[1]], crowding: 'end' },
    { at: [shape.centreM, top[1]], crowding: 'start' },
  ];
}
