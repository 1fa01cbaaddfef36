import { offsetPolyline, type Point } from '@tollgate/geometry';

const written = new WeakMap<readonly Point[], string>();
const legs = new WeakMap<
  readonly Point[],
  { readonly offsetM: number; readonly p: string; readonly n: string }
>();

/** A polyline as SVG path data in mm; written once for each list of points. */
export function pathText(points: readonly Point[]): string {
  const known = written.get(points);
  if (known !== undefined) return known;
  const text = points.map(([x, y], i) => `${i === 0 ? 'M' : 'L'}${mm(x)} ${mm(y)}`).join('');
  written.set(points, text);
  return text;
}

/** The two legs of a pair, each half a pitch beside the centre line. */
export function legTexts(
  points: readonly Point[],
  pitchM: number,
): { readonly p: string; readonly n: string } {
  const offsetM = pitchM / 2;
  const known = legs.get(points);
  if (known?.offsetM === offsetM) return known;
  const text = {
    offsetM,
    p: pathText(offsetPolyline(points, offsetM)),
    n: pathText(offsetPolyline(points, -offsetM)),
  };
  legs.set(points, text);
  return text;
}

/** Metres as millimetres with whole nanometres. */
export function mm(lengthM: number): number {
  return Math.round(lengthM * 1e9) / 1e6;
}
