import { distanceM, type Point } from './polyline';

/** Corners whose two normals point this far apart are cut off: their mitre would run far out. cos of the turn, plus 1. */
const leastMitre = 0.12;

/**
 * A line beside a path, with mitred corners: one leg of a pair along its centre line.
 *
 * At a corner between directions with normals n1 and n2 the offset vertex is v + d (n1 + n2) / (1 + n1 . n2): the
 * crossing of the two shifted pieces (plane geometry). Turns sharper than about 152 degrees are bevelled instead.
 *
 * @param path vertices in metres; repeated vertices are passed over.
 * @param offsetM distance in metres; above 0 to the right, looking along the path on a plan whose y axis points down.
 * @returns the vertices of the shifted line; empty where the path has no direction.
 */
export function offsetPolyline(path: readonly Point[], offsetM: number): Point[] {
  const vertices = path.filter((point, i) => i === 0 || distanceM(point, path[i - 1]!) > 0);
  if (vertices.length < 2) return [];
  const normals = vertices.slice(1).map((point, i) => normalOf(vertices[i]!, point));
  return vertices.flatMap((vertex, i): Point[] => {
    const before = normals[i - 1] ?? normals[i]!;
    const after = normals[i] ?? before;
    const mitre = 1 + before[0] * after[0] + before[1] * after[1];
    if (mitre < leastMitre) return [along(vertex, before, offsetM), along(vertex, after, offsetM)];
    const joint: Point = [(before[0] + after[0]) / mitre, (before[1] + after[1]) / mitre];
    return [along(vertex, joint, offsetM)];
  });
}

function along(from: Point, direction: Point, lengthM: number): Point {
  return [from[0] + direction[0] * lengthM, from[1] + direction[1] * lengthM];
}

/** To the right of the way from a to b, y pointing down. */
function normalOf(a: Point, b: Point): Point {
  const size = distanceM(a, b);
  return [-(b[1] - a[1]) / size, (b[0] - a[0]) / size];
}
