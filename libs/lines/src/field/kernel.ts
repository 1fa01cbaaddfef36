import type { Mesh } from './mesh';

/**
 * What unit charge on each segment does at the middle of each: the potential on copper rows, the field across the face on rows
 * between dielectrics (over eps0), each from the segment itself and from its mirror image in the symmetry plane. The plane at height 0
 * is there by images. Analytic over the straight source (line charge: R. F. Harrington, Field Computation by Moment Methods, 1968).
 */
export interface Kernel {
  readonly own: Float64Array;
  readonly mirrored: Float64Array;
}

const perTurn = 1 / (2 * Math.PI);

export function kernelOf(mesh: Mesh): Kernel {
  const { count, copperCount } = mesh;
  const own = new Float64Array(count * count);
  const mirrored = new Float64Array(count * count);
  for (let row = 0; row < count; row++) {
    const x = mesh.midX[row]!;
    const y = mesh.midY[row]!;
    if (row < copperCount) {
      for (let column = 0; column < count; column++) {
        const at = row * count + column;
        own[at] = perTurn * (potential(mesh, column, x, -y) - potential(mesh, column, x, y));
        mirrored[at] = perTurn * (potential(mesh, column, -x, -y) - potential(mesh, column, -x, y));
      }
      continue;
    }
    // The normal to the left of the row's direction.
    const nx = -mesh.alongY[row]!;
    const ny = mesh.alongX[row]!;
    for (let column = 0; column < count; column++) {
      const at = row * count + column;
      const direct = row === column ? 0 : slope(mesh, column, x, y, nx, ny);
      own[at] = perTurn * (direct - slope(mesh, column, x, -y, nx, -ny));
      mirrored[at] = perTurn * (slope(mesh, column, -x, y, -nx, ny) - slope(mesh, column, -x, -y, -nx, -ny));
    }
  }
  return { own, mirrored };
}

/** Beyond this many half lengths, squared, a segment is its first three multipoles, to a few parts in 1e8. */
const farSquare = 100;

/** Integral of ln(distance) over segment k, seen from (x, y). */
function potential(mesh: Mesh, k: number, x: number, y: number): number {
  const half = mesh.half[k]!;
  const dx = x - mesh.midX[k]!;
  const dy = y - mesh.midY[k]!;
  const tx = mesh.alongX[k]!;
  const ty = mesh.alongY[k]!;
  const u = dx * tx + dy * ty;
  const v = Math.abs(dy * tx - dx * ty);
  const apart = u * u + v * v;
  if (apart > farSquare * half * half) {
    // 2h Re[ln z - (h/z)^2/6 - (h/z)^4/20] with z = u + jv.
    const scale = (half * half) / (apart * apart);
    const re = scale * (u * u - v * v);
    const im = scale * 2 * u * v;
    return 2 * half * (Math.log(apart) / 2 - re / 6 - (re * re - im * im) / 20);
  }
  const near = u - half;
  const far = u + half;
  const square = v * v;
  const log = far * Math.log(far * far + square) - near * Math.log(near * near + square);
  const turn = v > 0 ? v * Math.atan2(2 * half * v, square + near * far) : 0;
  return log / 2 - 2 * half + turn;
}

/** The rate of the same integral along (nx, ny). */
function slope(mesh: Mesh, k: number, x: number, y: number, nx: number, ny: number): number {
  const half = mesh.half[k]!;
  const dx = x - mesh.midX[k]!;
  const dy = y - mesh.midY[k]!;
  const tx = mesh.alongX[k]!;
  const ty = mesh.alongY[k]!;
  const u = dx * tx + dy * ty;
  const v = dy * tx - dx * ty;
  const apart = u * u + v * v;
  let along: number;
  let across: number;
  if (apart > farSquare * half * half) {
    // 2 (h/z) [1 + (h/z)^2/3 + (h/z)^4/5]: real part along, imaginary part against across.
    const re = (half * u) / apart;
    const im = (-half * v) / apart;
    const re2 = re * re - im * im;
    const im2 = 2 * re * im;
    const a = 1 + re2 / 3 + (re2 * re2 - im2 * im2) / 5;
    const b = im2 / 3 + (2 * re2 * im2) / 5;
    along = 2 * (re * a - im * b);
    across = -2 * (re * b + im * a);
  } else {
    const near = u - half;
    const far = u + half;
    const square = v * v;
    along = Math.log((far * far + square) / (near * near + square)) / 2;
    across = Math.atan2(2 * half * v, square + near * far);
  }
  return along * (nx * tx + ny * ty) + across * (ny * tx - nx * ty);
}
