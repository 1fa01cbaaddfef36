import { abcdToS2Into, cascadeAll, uniformReference } from './index';

/** S of a line of real impedance in 50 ohm, written with e^(-gamma l) so that no large number occurs (Pozar, 4.3). */
function lineS(z0: number, alphaL: number, betaL: number): Float64Array {
  const rho = (z0 - 50) / (z0 + 50);
  const [er, ei] = [Math.exp(-alphaL) * Math.cos(betaL), -Math.exp(-alphaL) * Math.sin(betaL)];
  const [qr, qi] = [er * er - ei * ei, 2 * er * ei];
  const [dr, di] = [1 - rho * rho * qr, -rho * rho * qi];
  const size = dr * dr + di * di;
  const over = (re: number, im: number): [number, number] => [
    (re * dr + im * di) / size,
    (im * dr - re * di) / size,
  ];
  const s11 = over(rho * (1 - qr), -rho * qi);
  const s21 = over((1 - rho * rho) * er, (1 - rho * rho) * ei);
  return Float64Array.of(...s11, ...s21, ...s21, ...s11);
}

describe('cascades of great loss', () => {
  it.each([40, 120, 220])('keep S21 to 1e-8 of itself and S11 to 1e-15 at %i dB', (lossDb) => {
    const sections = 20;
    const alphaL = lossDb / 8.685889638;
    const whole = lineS(75, alphaL, 300.7);
    const parts = Array.from({ length: sections }, () => lineS(75, alphaL / sections, 300.7 / sections));
    const s = cascadeAll(parts, 2, 1);
    const size = Math.hypot(whole[4]!, whole[5]!);
    expect(20 * Math.log10(size)).toBeLessThan(-lossDb + 1);
    expect(Math.hypot(s[4]! - whole[4]!, s[5]! - whole[5]!) / size).toBeLessThan(1e-11);
    expect(Math.hypot(s[0]! - whole[0]!, s[1]! - whole[1]!)).toBeLessThan(1e-14);
  });
  it('would lose S11 through the chain matrix, which is why the cascade does not go that way', () => {
    const alphaL = 220 / 8.685889638;
    const chain = Float64Array.of(
      ...[Math.cosh(alphaL) * Math.cos(1), Math.sinh(alphaL) * Math.sin(1)],
      ...[75 * Math.sinh(alphaL) * Math.cos(1), 75 * Math.cosh(alphaL) * Math.sin(1)],
      ...[(Math.sinh(alphaL) * Math.cos(1)) / 75, (Math.cosh(alphaL) * Math.sin(1)) / 75],
      ...[Math.cosh(alphaL) * Math.cos(1), Math.sinh(alphaL) * Math.sin(1)],
    );
    const s = new Float64Array(8);
    abcdToS2Into(s, chain, 1, uniformReference(2, 50));
    // A D - B C = 1 drowns in the rounding of entries of 1e10, and with it S12.
    const s12 = Math.hypot(s[2]!, s[3]!);
    const s21 = Math.hypot(s[4]!, s[5]!);
    expect(Math.abs(s12 / s21 - 1)).toBeGreaterThan(1e-8);
  });
});
