/** Somlo's fitted term, 1.11e-15 F per cm of circumference, over the permittivity of vacuum in F/m. */
const curvature = 1.11e-13 / 8.8541878128e-12;
/** Largest outer over inner radius his fit covers. */
const largestRatio = 6;

/**
 * Capacitance of one face of a pad, where the inner conductor of a coaxial line steps from radius `innerM` to `padM` inside
 * `outerM`: C = 2 pi r3 {(eps/pi) [((a^2 + 1)/a) ln((1 + a)/(1 - a)) - 2 ln(4 a/(1 - a^2))] + 1.11e-13 (1 - a)(t - 1)} F with
 * a = (r3 - r2)/(r3 - r1), t = r3/r1 (P. I. Somlo, IEEE Trans. MTT-15 no. 1, 1967, pp. 48-53; from memory, agrees with public
 * code). Fitted for 0.01 <= a <= 1 and 1 <= t <= 6; beyond, t is held at 6. Two faces of a thin pad together come out up to
 * some 15 % high, against a thin iris between parallel plates.
 * @returns C over the permittivity around it, in metres; 0 where there is no step
 */
export function stepCapacitanceM(innerM: number, padM: number, outerM: number): number {
  if (padM <= innerM) return 0;
  const a = (outerM - padM) / (outerM - innerM);
  const plane = ((a * a + 1) / a) * Math.log((1 + a) / (1 - a)) - 2 * Math.log((4 * a) / (1 - a * a));
  const ratio = Math.min(outerM / innerM, largestRatio);
  return 2 * Math.PI * outerM * (plane / Math.PI + curvature * (1 - a) * (ratio - 1));
}
