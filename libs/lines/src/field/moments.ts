import type { Kernel } from './kernel';
import { factorize, solve, solveTransposed } from './linear-system';
import type { Mesh } from './mesh';

/** The symmetry of a mode about the middle: 1 mirrors charges, -1 mirrors and turns their sign. */
export type Symmetry = 1 | -1;

/** Charge over eps0 on every segment of copper in air, the trace at 1 V. */
export function airCharges(mesh: Mesh, kernel: Kernel, symmetry: Symmetry): Float64Array {
  return solve(
    factorize(airMatrix(mesh, kernel, symmetry), mesh.copperCount),
    voltages(mesh, mesh.copperCount),
  );
}

/** What unit charges on copper do to its potential in air. */
export function airMatrix({ count, copperCount }: Mesh, kernel: Kernel, symmetry: Symmetry): Float64Array {
  const a = new Float64Array(copperCount * copperCount);
  for (let row = 0; row < copperCount; row++) {
    for (let column = 0; column < copperCount; column++) {
      const at = row * count + column;
      a[row * copperCount + column] = kernel.own[at]! + symmetry * kernel.mirrored[at]!;
    }
  }
  return a;
}

/** The trace at 1 V, all else at 0. */
export function voltages({ traceCount }: Mesh, count: number): Float64Array {
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
