import { polylineLengthM, turnsRad, type Point } from './polyline';

export interface PairLengths {
  /** The p leg runs on the right of the centre line, looking from near to far on a plan whose y axis points down. */
  readonly pM: number;
  readonly nM: number;
}

/** A turn sharper than this has no mitred offset of finite length. */
const sharpestTurnRad = (170 * Math.PI) / 180;

/**
 * Lengths of the two legs of a pair routed along a centre line with mitred corners.
 *
 * Each leg is the centre line moved sideways by half the pitch. At a turn of angle a the inner leg loses and the outer
 * leg gains pitch/2 * 2 tan(a/2): plane geometry of offset lines.
 *
 * @param path centre line in metres.
 * @param pitchM distance between the centre lines of the legs (width + gap), in metres, above 0.
 * @throws RangeError where a turn is sharper than 170 degrees.
 */
export function pairLengthsM(path: readonly Point[], pitchM: number): PairLengths {
  const turns = turnsRad(path);
  if (turns.some((turn) => Math.abs(turn) > sharpestTurnRad)) {
    throw new RangeError(
      'The path turns back on itself: a pair cannot follow a turn sharper than 170 degrees.',
    );
  }
  const shift = pitchM * turns.reduce((sum, turn) => sum + Math.tan(turn / 2), 0);
  const centre = polylineLengthM(path);
  return { pM: centre - shift, nM: centre + shift };
}
