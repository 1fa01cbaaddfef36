import { solveInPlace } from './linear-solve';
import { rememberer } from './remembered';

/** Capacitances a metre over the permittivity, of one rod, with both driven alike (even) or against each other (odd). */
export interface PairCapacitance {
  readonly even: number;
  readonly odd: number;
  /** How far the finer of two meshes still was from the value given, as a share of it. */
  readonly meshErrorShare: number;
}

/** Elements on half a rod and on half of its antipad's edge, in the coarser of two meshes: more where a gap is narrow. */
const fewest = 24;
const most = 96;
const remembered = rememberer<PairCapacitance>();

/**
 * Two equal rods in a plane's opening: the union of two circular antipads about their axes. Antipads that don't overlap are two
 * coaxial lines that don't see each other; where they do, the charge on rods and edge is found by the method of moments.
 *
 * @param rodM diameter, below both the antipad's and the pitch
 */
export function pairInOpening(rodM: number, antipadM: number, pitchM: number): PairCapacitance {
  if (pitchM >= antipadM) {
    const alone = (2 * Math.PI) / Math.log(antipadM / rodM);
    return { even: alone, odd: alone, meshErrorShare: 0 };
  }
  const [rod, antipad] = [rodM / pitchM, antipadM / pitchM];
  return remembered(`${rod.toPrecision(12)} ${antipad.toPrecision(12)}`, () => {
    const gap = Math.min(1 - rod, (antipad - rod) / 2);
    const coarse = Math.min(most, Math.max(fewest, Math.ceil((4 * rod) / gap)));
    const [rough, fine] = [coarse, 2 * coarse].map((elements) => momentSolution(rod, antipad, elements));
    // The error of straight elements falls with the square of their length; extrapolated to none.
    const [even, odd] = [0, 1].map((mode) => (4 * fine![mode]! - rough![mode]!) / 3);
    return {
      even: even!,
      odd: odd!,
      meshErrorShare: Math.max(Math.abs(fine![0] / even! - 1), Math.abs(fine![1] / odd! - 1)),
    };
  });
}

/** Straight elements: midpoint, half length, direction. */
interface Mesh {
  readonly x: Float64Array;
  readonly y: Float64Array;
  readonly half: Float64Array;
  readonly ux: Float64Array;
  readonly uy: Float64Array;
}

/**
 * Method of moments with constant charge on each element and the potential matched at its middle (R. F. Harrington, Field
 * Computation by Moment Methods, 1968), on a quarter of the boundary; the rest are its images. Lengths are in pitches, and
 * are halved once more: a boundary of logarithmic capacity 1 would let a charge go unseen.
 * @returns even and odd charge of the right rod at 1 V, over the permittivity
 */
function momentSolution(rod: number, antipad: number, elements: number): [number, number] {
  const shrink = 1 / (4 * (1 + antipad));
  const mesh = quarterMesh(rod * shrink, antipad * shrink, shrink, elements);
  const n = mesh.x.length;
  const matrices = [new Float64Array(n * n), new Float64Array(n * n)];
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      const own = potential(mesh, j, mesh.x[i]!, mesh.y[i]!) + potential(mesh, j, mesh.x[i]!, -mesh.y[i]!);
      const image =
        potential(mesh, j, -mesh.x[i]!, mesh.y[i]!) + potential(mesh, j, -mesh.x[i]!, -mesh.y[i]!);
      matrices[0]![i * n + j] = own + image;
      matrices[1]![i * n + j] = own - image;
    }
  }
  const [even, odd] = matrices.map((matrix) => {
    const charge = Float64Array.from({ length: n }, (_, i) => (i < elements ? 1 : 0));
    solveInPlace(matrix, charge, n, 1);
    let sum = 0;
    // Half a rod is meshed, the other half carries as much.
    for (let i = 0; i < elements; i++) sum += 2 * charge[i]! * 2 * mesh.half[i]!;
    return sum;
  });
  return [even!, odd!];
}

/** Upper half of the right rod, then the upper half of the right antipad's edge as far as it is not inside the other, all by arcs. */
function quarterMesh(rod: number, antipad: number, pitch: number, elements: number): Mesh {
  const count = 2 * elements;
  const mesh: Mesh = {
    x: new Float64Array(count),
    y: new Float64Array(count),
    half: new Float64Array(count),
    ux: new Float64Array(count),
    uy: new Float64Array(count),
  };
  const put = (i: number, radius: number, from: number, to: number): void => {
    const middle = (from + to) / 2;
    mesh.x[i] = pitch / 2 + radius * Math.cos(middle);
    mesh.y[i] = radius * Math.sin(middle);
    mesh.half[i] = (radius * Math.abs(to - from)) / 2;
    mesh.ux[i] = -Math.sin(middle);
    mesh.uy[i] = Math.cos(middle);
  };
  const end = Math.PI - Math.acos(Math.min(1, pitch / antipad));
  // Charge grows without bound at the edge where the two circles meet: elements shrink towards it.
  const along = (k: number): number => end * (1 - (1 - k / elements) ** 3);
  for (let k = 0; k < elements; k++) {
    put(k, rod / 2, aroundRod(k / elements, rod / pitch), aroundRod((k + 1) / elements, rod / pitch));
    put(elements + k, antipad / 2, along(k), along(k + 1));
  }
  return mesh;
}

/**
 * Angle on the right rod at a share of its elements, 0 on the outer side. Against each other, close rods carry their charge
 * where they face, evenly in the bipolar angle; driven alike, on the outer side: the mean of that spacing and of an even one.
 */
function aroundRod(share: number, rod: number): number {
  const focus = Math.sqrt(1 - rod * rod);
  const bipolar = Math.PI * share;
  // x/focus = sinh t/(cosh t - cos s), y/focus = sin s/(cosh t - cos s), with cosh t = pitch/rod and sinh t = focus/rod.
  const size = 1 / rod - Math.cos(bipolar);
  const angle = Math.atan2((focus * Math.sin(bipolar)) / size, (focus * focus) / rod / size - 1);
  return (angle + bipolar) / 2;
}

/** Potential of an element's unit charge a length at a point, times 2 pi: minus the integral of ln r along it, divided by 2 pi. */
function potential(mesh: Mesh, j: number, x: number, y: number): number {
  const dx = x - mesh.x[j]!;
  const dy = y - mesh.y[j]!;
  const along = dx * mesh.ux[j]! + dy * mesh.uy[j]!;
  const off = Math.abs(dx * mesh.uy[j]! - dy * mesh.ux[j]!);
  const half = mesh.half[j]!;
  return (primitive(along - half, off) - primitive(along + half, off)) / (2 * Math.PI);
}

/** Integral of ln sqrt(u^2 + h^2) over u. */
function primitive(u: number, h: number): number {
  const square = u * u + h * h;
  if (square === 0) return 0;
  return (u * Math.log(square)) / 2 - u + (h === 0 ? 0 : h * Math.atan(u / h));
}
