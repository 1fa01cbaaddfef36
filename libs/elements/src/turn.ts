/** Half a right angle's two parts: the first of 33 bits, so that its multiples are exact up to a million turns. */
const quarterHigh = 1.5707963267341256;
const quarterMiddle = 6.077100506303966e-11;
const quarterLow = 2.0222662487959506e-21;
const quartersPerRad = 2 / Math.PI;
/** Beyond this many radians the parts no longer carry the angle. */
const furthestRad = 1e6;

/**
 * Cosine and sine of an angle in radians to out[0] and out[1], within two units in the last place: the angle less its quarter turns, then
 * both Taylor series, which to this order leave under 1e-17 up to a half right angle. About twice as fast as asking for each.
 */
export function turnInto(out: Float64Array, angleRad: number): void {
  if (!(angleRad > -furthestRad && angleRad < furthestRad)) {
    out[0] = Math.cos(angleRad);
    out[1] = Math.sin(angleRad);
    return;
  }
  const quarters = Math.floor(angleRad * quartersPerRad + 0.5);
  const x = angleRad - quarters * quarterHigh - quarters * quarterMiddle - quarters * quarterLow;
  // Both series in pairs of terms, so that a processor can work on several at once.
  const y = x * x;
  const y2 = y * y;
  const y4 = y2 * y2;
  const sin =
    x +
    x *
      y *
      (-1 / 6 +
        y * (1 / 120) +
        y2 * (-1 / 5040 + y * (1 / 362880)) +
        y4 * (-1 / 39916800 + y * (1 / 6227020800) + y2 * (-1 / 1307674368000 + y * (1 / 355687428096000))));
  const cos =
    1 +
    y *
      (-1 / 2 +
        y * (1 / 24) +
        y2 * (-1 / 720 + y * (1 / 40320)) +
        y4 * (-1 / 3628800 + y * (1 / 479001600) + y2 * (-1 / 87178291200 + y * (1 / 20922789888000))));
  const odd = (quarters & 1) !== 0;
  const a = odd ? sin : cos;
  const b = odd ? cos : sin;
  out[0] = ((quarters + 1) & 2) !== 0 ? -a : a;
  out[1] = (quarters & 2) !== 0 ? -b : b;
}
