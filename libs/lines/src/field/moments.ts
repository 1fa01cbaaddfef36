import { vacuumImpedance } from '../constants';
import type { WallShares } from '../conductor';
import type { Kernel } from './kernel';
import { factorize, solve, solveTransposed } from './linear-system';
import type { Mesh } from './mesh';
import { surface } from './outline';

/** The symmetry of a mode about the middle: 1 mirrors charges, -1 mirrors and turns their sign. */
export type Symmetry = 1 | -1;

/** Charge over eps0 on every segment of copper in air, the trace at 1 V. */
export function airCharges(mesh: Mesh, kernel: Kernel, symmetry: Symmetry): Float64Array {
  const { count, copperCount } = mesh;
  const a = new Float64Array(copperCount * copperCount);
  for (let row = 0; row < copperCount; row++) {
    for (let column = 0; column < copperCount; column++) {
      const at = row * count + column;
      a[row * copperCount + column] = kernel.own[at]! + symmetry * kernel.mirrored[at]!;
    }
  }
  return solve(factorize(a, copperCount), voltages(mesh, copperCount));
}

function voltages({ traceCount }: Mesh, count: number): Float64Array {
  return new Float64Array(count).fill(1, 0, traceCount);
}

/** Charge of the trace's right half (or of the right trace) over eps0. */
export function chargeOf({ traceCount, half }: Mesh, density: Float64Array): number {
  let charge = 0;
  for (let k = 0; k < traceCount; k++) charge += 2 * half[k]! * density[k]!;
  return charge;
}

/** Free charge of the trace over eps0, and its slope by the permittivity of each material. */
export interface Filled {
  readonly charge: number;
  readonly slopes: Float64Array;
}

/**
 * Free charge of the trace with dielectrics: unknown are all charges, bound ones included, as if in air. On a face between two
 * dielectrics the displacement is continuous: with E the field of all other charges across it,
 * (eL - eR) E + (eL + eR) sigma/2 = 0; free charge on copper is the total times the permittivity outside it.
 * The slopes come from the adjoint system, so that no material asks for a solution of its own.
 */
export function freeCharge(
  mesh: Mesh,
  kernel: Kernel,
  symmetry: Symmetry,
  permittivities: readonly number[],
): Filled {
  const { count, copperCount, traceCount, left, right, half } = mesh;
  const a = new Float64Array(count * count);
  for (let row = 0; row < count; row++) {
    const [l, r] = [permittivities[left[row]!]!, permittivities[right[row]!]!];
    const scale = row < copperCount ? 1 : l - r;
    for (let at = row * count; at < (row + 1) * count; at++) {
      a[at] = scale * (kernel.own[at]! + symmetry * kernel.mirrored[at]!);
    }
    if (row >= copperCount) a[row * count + row]! += (l + r) / 2;
  }
  const factors = factorize(a, count);
  const density = solve(factors, voltages(mesh, count));
  const weights = new Float64Array(count);
  const slopes = new Float64Array(permittivities.length);
  let charge = 0;
  for (let k = 0; k < traceCount; k++) {
    weights[k] = 2 * half[k]! * permittivities[left[k]!]!;
    charge += weights[k]! * density[k]!;
    slopes[left[k]!]! += 2 * half[k]! * density[k]!;
  }
  const adjoint = solveTransposed(factors, weights);
  for (let row = copperCount; row < count; row++) {
    let field = 0;
    for (let column = 0, at = row * count; column < count; column++, at++) {
      field += (kernel.own[at]! + symmetry * kernel.mirrored[at]!) * density[column]!;
    }
    slopes[left[row]!]! -= adjoint[row]! * (density[row]! / 2 + field);
    slopes[right[row]!]! -= adjoint[row]! * (density[row]! / 2 - field);
  }
  return { charge, slopes };
}

/**
 * How the impedance in air grows as each wall recedes: eta0 times the integral of (sigma/Q)^2 over the wall (formula B8; the tangential
 * magnetic field goes as the charge in air). A single trace has two halves.
 */
export function sharesOf(mesh: Mesh, charges: Float64Array, symmetry: Symmetry, alone: boolean): WallShares {
  const charge = chargeOf(mesh, charges);
  const scale = (vacuumImpedance * (alone ? 0.5 : 1)) / (charge * charge);
  const sums = [0, 0, 0, 0, 0];
  for (let k = 0; k < mesh.copperCount; k++) {
    sums[mesh.on[k]!]! += 2 * mesh.half[k]! * charges[k]! * charges[k]! * mesh.crest[k]!;
  }
  return {
    lower: scale * sums[surface.lower]!,
    upper: scale * sums[surface.upper]!,
    sides: scale * sums[surface.side]!,
    planeBelow: scale * squareBelow(mesh, charges, symmetry),
    planeAbove: scale * sums[surface.planeAbove]!,
  };
}

/** Integral of the squared charge density (over eps0) on the right half of the plane at height 0. */
function squareBelow(mesh: Mesh, charges: Float64Array, symmetry: Symmetry): number {
  let scaleM = Infinity;
  let edgeM = 0;
  for (let k = 0; k < mesh.traceCount; k++) {
    scaleM = Math.min(scaleM, mesh.midY[k]!);
    edgeM = Math.max(edgeM, mesh.midX[k]!);
  }
  // Level steps below the trace, then steps that grow; the field has no feature narrower than its height.
  const step = Math.max(scaleM / 5, edgeM / 80);
  const end = edgeM + 60 * scaleM;
  let sum = 0;
  for (let x = 0, width = step; x < end; x += width) {
    if (x > edgeM + 2 * scaleM) width *= 1.1;
    const density = densityBelow(mesh, charges, symmetry, x + width / 2);
    sum += density * density * width;
  }
  return sum;
}

/** Charge on the plane below (over eps0) at x, of segments taken as points seen from their height. */
function densityBelow(mesh: Mesh, charges: Float64Array, symmetry: Symmetry, x: number): number {
  let density = 0;
  for (let k = 0; k < mesh.copperCount; k++) {
    const y = mesh.midY[k]!;
    const [a, b] = [x - mesh.midX[k]!, x + mesh.midX[k]!];
    const seen = 1 / (a * a + y * y) + symmetry / (b * b + y * y);
    density -= (2 * mesh.half[k]! * charges[k]! * y * seen) / Math.PI;
  }
  return density;
}
