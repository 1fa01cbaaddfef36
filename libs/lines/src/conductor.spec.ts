import {
  copperConductivityAt,
  internalImpedance,
  skinDepth,
  surfaceResistance,
  wallShares,
  wheelerStripline,
  type Rectangle,
} from './index';

/** A value printed to so many digits, and half a unit of the last. */
const printed = (value: number, text: string): void => {
  const digits = text.split('.')[1]?.length ?? 0;
  expect(Math.abs(value - Number(text))).toBeLessThanOrEqual(0.51 * 10 ** -digits);
};

describe('the skin depth (formula B8)', () => {
  it.each([
    [1e6, '66.012', 5.813e7],
    [1e8, '6.6012', 5.813e7],
    [1e9, '2.0875', 5.813e7],
    [5e9, '0.9335', 5.813e7],
    [1e10, '0.6601', 5.813e7],
    [2.8e10, '0.3945', 5.813e7],
    [1e6, '65.192', 5.96e7],
    [5e9, '0.9220', 5.96e7],
    [2.8e10, '0.3896', 5.96e7],
  ])('at %d Hz is %s um (sigma %d)', (f, um, sigma) => {
    printed(skinDepth(f, sigma) * 1e6, um);
  });
  it('is the thickness of 35 um at 3.565 MHz and half of it at 14.26 MHz', () => {
    expect(skinDepth(3.565e6, 5.8e7)).toBeCloseTo(35e-6, 8);
    expect(skinDepth(14.26e6, 5.8e7)).toBeCloseTo(17.5e-6, 8);
  });
});

describe('a slab that carries current on one side, Z = (1+j) Rs coth[(1+j) t/delta] (formula B8)', () => {
  it.each([
    [0.5, '1.00554'],
    [1, '1.08564'],
    [2, '1.89781'],
    [3, '3.01014'],
  ])('has at t/delta = %d the resistance %s of its own at 0 Hz', (ratio, share) => {
    const [widthM, thicknessM, sigma] = [1e-3, 35e-6, 5.8e7];
    const rectangle: Rectangle = { widthM, thicknessM, belowM: 1e-4, aboveM: Infinity, gapM: Infinity };
    // One wall of the strip's own width: R = Rs/w.
    const shares = { lower: 376.730313461 / widthM, upper: 0, sides: 0, planeBelow: 0, planeAbove: 0 };
    const f = (ratio / thicknessM) ** 2 / (Math.PI * 4e-7 * Math.PI * sigma);
    const [re] = internalImpedance(
      { conductivitySPerM: sigma },
      rectangle,
      'down',
      shares,
      Float64Array.of(f),
    );
    printed(re! * sigma * widthM * thicknessM, share);
  });
});

describe('the stripline of Pozar, example 3.5 (b = 3.2 mm, er = 2.2, t = 0.01 mm, 10 GHz)', () => {
  const [b, t, er, f] = [3.2e-3, 1e-5, 2.2, 1e10];
  const sigma = 5.813e7;
  it("loses 0.1197 Np/m by Wheeler's incremental inductance", () => {
    const rectangle: Rectangle = {
      ...{ widthM: 2.6555e-3, thicknessM: t, belowM: (b - t) / 2, aboveM: (b - t) / 2, gapM: Infinity },
    };
    const air = ({ widthM, thicknessM, belowM, aboveM }: Rectangle): number => {
      const spacing = belowM + thicknessM + aboveM;
      return wheelerStripline(widthM / spacing, thicknessM / spacing);
    };
    const shares = wallShares(rectangle, air);
    const sum = shares.lower + shares.upper + shares.sides + shares.planeBelow + shares.planeAbove;
    const ohmPerM = (surfaceResistance(f, sigma) / 376.730313461) * sum;
    expect(ohmPerM / ((2 * air(rectangle)) / Math.sqrt(er))).toBeCloseTo(0.1197, 4);
  });
  it('has a surface resistance of 0.02606 ohm and, as wide as the fitted formula of zero thickness has it, 50 ohm less 1 % for its thickness', () => {
    expect(surfaceResistance(f, sigma)).toBeCloseTo(0.02606, 5);
    const ohm = wheelerStripline(2.6555 / 3.2, 0.01 / 3.2) / Math.sqrt(er);
    expect(ohm).toBeGreaterThan(49.4);
    expect(ohm).toBeLessThan(50);
  });
});

describe('copper off room temperature (formula B13)', () => {
  it.each([
    [85, '1.25545', '1.12047'],
    [-40, '0.76420', '0.87419'],
  ])('at %d degrees has %s of the resistivity and %s of the conductor loss', (celsius, resistivity, loss) => {
    const ratio = 5.8e7 / copperConductivityAt(5.8e7, celsius);
    printed(ratio, resistivity);
    printed(surfaceResistance(1e9, 5.8e7 / ratio) / surfaceResistance(1e9, 5.8e7), loss);
  });
});
