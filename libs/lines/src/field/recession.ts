import { vacuumImpedance } from '../constants';
import type { WallShares } from '../conductor';
import { kernelOf, type Kernel } from './kernel';
import { factorize, solve, solveTransposed } from './linear-system';
import { cutsFor, meshWith, type Fineness, type Mesh } from './mesh';
import { airMatrix, chargeOf, voltages, type Symmetry } from './moments';
import { conductorsOf, halfWidthAt } from './outline';
import type { Shape } from './section';

/** A wall's step over the smallest length of the section: slopes are good to it. */
const relativeStep = 2e-5;

/** A mode's charges in air, and what its trace's charge owes to the potential of each segment. */
interface State {
  readonly symmetry: Symmetry;
  readonly density: Float64Array;
  readonly adjoint: Float64Array;
  readonly charge: number;
}

/**
 * How the impedance in air grows as each wall recedes (incremental inductance, formula B8), for each symmetry. It is the slope of the
 * discrete solution by its adjoint: with A s = v, q = h s and A' l = h, the charge changes by dh s - l dA s. Charges settle much faster with
 * the mesh than the squared field at a corner, whose integral over the wall is the same slope.
 */
export function wallSharesOf(
  shape: Shape,
  symmetries: readonly Symmetry[],
  fineness: Fineness,
): WallShares[] {
  const pieces = conductorsOf(shape);
  const cuts = cutsFor(pieces, fineness);
  const mesh = meshWith(pieces, cuts);
  const kernel = kernelOf(mesh);
  const states = symmetries.map((symmetry) => stateOf(mesh, kernel, symmetry));
  const stepM = relativeStep * smallestOf(shape);
  const copies = shape.section.gapM === undefined ? 2 : 1;
  const before = states.map((state) => chargeOf(mesh, state.density) - owed(state, kernel));
  const slopes = (recede: (shape: Shape, byM: number) => Shape): number[] => {
    const moved = meshWith(conductorsOf(recede(shape, stepM)), cuts);
    const movedKernel = kernelOf(moved);
    return states.map((state, i) => {
      const change = chargeOf(moved, state.density) - owed(state, movedKernel) - before[i]!;
      return (-vacuumImpedance * change) / stepM / (copies * state.charge * state.charge);
    });
  };
  const lower = slopes(recedeLower);
  const upper = slopes(recedeUpper);
  const sides = slopes(recedeSides);
  const below = slopes(recedeBelow);
  const above = shape.section.planeAbove ? slopes(recedeAbove) : undefined;
  return states.map((_, i) => ({
    ...{ lower: lower[i]!, upper: upper[i]!, sides: sides[i]! },
    ...{ planeBelow: below[i]!, planeAbove: above?.[i] ?? 0 },
  }));
}

function stateOf(mesh: Mesh, kernel: Kernel, symmetry: Symmetry): State {
  const factors = factorize(airMatrix(mesh, kernel, symmetry), mesh.count);
  const density = solve(factors, voltages(mesh, mesh.count));
  const weights = mesh.half.map((half, k) => (k < mesh.traceCount ? 2 * half : 0));
  return { symmetry, density, adjoint: solveTransposed(factors, weights), charge: chargeOf(mesh, density) };
}

/** l A s with the matrix of a moved mesh. */
function owed({ symmetry, density, adjoint }: State, { own, mirrored }: Kernel): number {
  const n = density.length;
  let sum = 0;
  for (let row = 0, at = 0; row < n; row++) {
    let potential = 0;
    for (let column = 0; column < n; column++, at++) {
      potential += (own[at]! + symmetry * mirrored[at]!) * density[column]!;
    }
    sum += adjoint[row]! * potential;
  }
  return sum;
}

function smallestOf({ section, heightM, lowerWidthM, upperWidthM }: Shape): number {
  const { trace, traceAtM, planeAbove, gapM } = section;
  const overM = planeAbove ? heightM - traceAtM - trace.thicknessM : Infinity;
  return Math.min(trace.thicknessM, lowerWidthM, upperWidthM, traceAtM, overM, gapM ?? Infinity);
}

function recedeLower(shape: Shape, byM: number): Shape {
  const { section } = shape;
  const lowM = section.traceAtM + byM;
  const trace = { ...section.trace, thicknessM: section.trace.thicknessM - byM };
  return {
    ...shape,
    section: { ...section, trace, traceAtM: lowM },
    lowerWidthM: 2 * halfWidthAt(shape, lowM),
  };
}

function recedeUpper(shape: Shape, byM: number): Shape {
  const { section } = shape;
  const thicknessM = section.trace.thicknessM - byM;
  const upperWidthM = 2 * halfWidthAt(shape, section.traceAtM + thicknessM);
  return { ...shape, section: { ...section, trace: { ...section.trace, thicknessM } }, upperWidthM };
}

/** Both walls of a trace move inward at right angles to themselves. */
function recedeSides(shape: Shape, byM: number): Shape {
  const { lowerWidthM, upperWidthM, section } = shape;
  const lean = (lowerWidthM - upperWidthM) / 2 / section.trace.thicknessM;
  const change = 2 * byM * Math.hypot(1, lean);
  return { ...shape, lowerWidthM: lowerWidthM - change, upperWidthM: upperWidthM - change };
}

/** As seen from the plane below, all else moves up. */
function recedeBelow(shape: Shape, byM: number): Shape {
  const { section, heightM } = shape;
  return {
    ...shape,
    section: { ...section, traceAtM: section.traceAtM + byM },
    heightM: heightM + byM,
  };
}

function recedeAbove(shape: Shape, byM: number): Shape {
  return { ...shape, heightM: shape.heightM + byM };
}
