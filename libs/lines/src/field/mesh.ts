import { surface, type Piece } from './outline';

/** Straight segments of constant charge, and what each lies on. */
export interface Mesh {
  readonly count: number;
  /** Copper comes first: the trace's segments, then the plane's above, then the faces between dielectrics. */
  readonly traceCount: number;
  readonly copperCount: number;
  readonly midX: Float64Array;
  readonly midY: Float64Array;
  readonly half: Float64Array;
  /** Unit vector along the segment. */
  readonly alongX: Float64Array;
  readonly alongY: Float64Array;
  readonly on: Uint8Array;
  readonly left: Uint8Array;
  readonly right: Uint8Array;
}

/** How closely pieces are cut. `copper` is the segments on half a face, `open` those on a face that runs outward. */
export interface Fineness {
  readonly copper: number;
  readonly between: number;
  readonly open: number;
}

/** Segment sizes grow from a corner with this power of their count: charge there goes as distance to the power -1/3. */
const crowdingPower = 3.5;
/** A long face that something near faces is cut finer, up to this many times. */
const mostFiner = 3;

export function meshOf(pieces: readonly Piece[], fineness: Fineness): Mesh {
  const order = [...pieces].sort((a, b) => rank(a) - rank(b));
  return meshWith(order, cutsFor(order, fineness));
}

/** Where each piece is cut, as shares of its length, 0 and 1 included. */
export function cutsFor(pieces: readonly Piece[], fineness: Fineness): Float64Array[] {
  return pieces.map((piece) => cutsOf(piece, pieces, fineness));
}

/** The mesh of pieces, copper first, cut as said. */
export function meshWith(order: readonly Piece[], cuts: readonly Float64Array[]): Mesh {
  const count = cuts.reduce((sum, cut) => sum + cut.length - 1, 0);
  const mesh = blank(count);
  let k = 0;
  let traceCount = 0;
  let copperCount = 0;
  order.forEach((piece, i) => {
    k = fill(mesh, k, piece, cuts[i]!);
    if (rank(piece) === 0) traceCount = k;
    if (rank(piece) <= 1) copperCount = k;
  });
  return { ...mesh, count, traceCount, copperCount };
}

function rank({ surface: on }: Piece): number {
  return on === surface.between ? 2 : on === surface.planeAbove ? 1 : 0;
}

function blank(count: number): Omit<Mesh, 'count' | 'traceCount' | 'copperCount'> {
  const floats = () => new Float64Array(count);
  const bytes = () => new Uint8Array(count);
  return {
    ...{ midX: floats(), midY: floats(), half: floats(), alongX: floats(), alongY: floats() },
    ...{ on: bytes(), left: bytes(), right: bytes() },
  };
}

function fill(
  mesh: Omit<Mesh, 'count' | 'traceCount' | 'copperCount'>,
  from: number,
  piece: Piece,
  cuts: Float64Array,
): number {
  const [x0, y0] = piece.from;
  const [dx, dy] = [piece.to[0] - x0, piece.to[1] - y0];
  const length = Math.hypot(dx, dy);
  let k = from;
  for (let i = 0; i + 1 < cuts.length; i++, k++) {
    const middle = (cuts[i]! + cuts[i + 1]!) / 2;
    mesh.midX[k] = x0 + middle * dx;
    mesh.midY[k] = y0 + middle * dy;
    mesh.half[k] = ((cuts[i + 1]! - cuts[i]!) * length) / 2;
    mesh.alongX[k] = dx / length;
    mesh.alongY[k] = dy / length;
    mesh.on[k] = piece.surface;
    mesh.left[k] = piece.left;
    mesh.right[k] = piece.right;
  }
  return k;
}

function cutsOf(piece: Piece, all: readonly Piece[], { copper, between, open }: Fineness): Float64Array {
  const length = lengthOf(piece);
  const both = piece.crowding === 'both';
  const finer = (length / (both ? 2 : 1) / piece.nearM / 2) ** (1 / crowdingPower);
  const times = (count: number) => Math.round(count * Math.min(Math.max(finer, 1), mostFiner));
  const along = times(piece.surface <= surface.side ? copper : between);
  switch (piece.crowding) {
    case 'both': {
      const side = piece.surface === surface.side || piece.surface === surface.between;
      return bothEnds(side ? Math.max(3, times(copper * 0.6)) : times(copper));
    }
    case 'start':
      return towardsStart(along);
    case 'end':
      return turned(towardsStart(along));
    case 'inward':
    case 'outward': {
      const first = piece.firstM ?? finest(all, copper);
      // A plane above ends sooner than a face in the open.
      const count = Math.round(piece.surface === surface.planeAbove ? open * 0.7 : open);
      const cuts = outward(count, Math.min(first / length, 0.5 / count));
      return piece.crowding === 'outward' ? cuts : turned(cuts);
    }
  }
}

/** The size of the smallest segment on the copper, from which faces go outward. */
function finest(all: readonly Piece[], copper: number): number {
  const sizes = all
    .filter(({ surface: on }) => on === surface.lower || on === surface.upper)
    .map((piece) => lengthOf(piece) * (piece.crowding === 'both' ? 0.5 : 1));
  return Math.min(...sizes) * copper ** -crowdingPower;
}

function lengthOf({ from, to }: Piece): number {
  return Math.hypot(to[0] - from[0], to[1] - from[1]);
}

function turned(cuts: Float64Array): Float64Array {
  return cuts.map((_, i) => 1 - cuts[cuts.length - 1 - i]!);
}

function towardsStart(count: number): Float64Array {
  return Float64Array.from({ length: count + 1 }, (_, i) => (i / count) ** crowdingPower);
}

function bothEnds(half: number): Float64Array {
  return Float64Array.from({ length: 2 * half + 1 }, (_, i) => {
    const share = i / half;
    return share <= 1 ? share ** crowdingPower / 2 : 1 - (2 - share) ** crowdingPower / 2;
  });
}

/** Steps that grow by one ratio from `first` (as a share) to the end. */
function outward(count: number, first: number): Float64Array {
  let [low, high] = [1, 10];
  const total = (ratio: number) =>
    Math.abs(ratio - 1) < 1e-9 ? count * first : (first * (ratio ** count - 1)) / (ratio - 1);
  for (let k = 0; k < 60; k++) {
    const middle = (low + high) / 2;
    if (total(middle) < 1) low = middle;
    else high = middle;
  }
  const whole = total(low);
  const cuts = new Float64Array(count + 1);
  for (let i = 1, step = first; i <= count; i++, step *= low) cuts[i] = cuts[i - 1]! + step / whole;
  cuts[count] = 1;
  return cuts;
}
