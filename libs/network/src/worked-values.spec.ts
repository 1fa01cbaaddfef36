import {
  abcdToS2Into,
  assessQuality,
  cascade2Into,
  maximumAvailableGain,
  renormalize,
  sToAbcd2Into,
  toMixedModeInto,
  uniformReference,
} from './index';
import {
  chainProduct,
  flat,
  largestDifference,
  lineChain,
  onePoint,
  seriesChain,
  shuntChain,
} from './testing/samples';

const references = Float64Array.of(40, 10, 75, -20);
const network = chainProduct(
  chainProduct(lineChain(60, [0.05, 1.2]), seriesChain([5, 3])),
  shuntChain([0.002, 0.004]),
);
const scattering = [0.092197, 0.213461, 0.185807, -0.797689, 0.185807, -0.797689, 0.064646, -0.234247];

describe('worked values of Frickey, IEEE Trans. MTT-42 (1994), with complex references', () => {
  it('gives the chain matrix of the worked line, series and shunt', () => {
    const chain = [0.139079, 0.172296, 2.761716, 57.313802, 0.000436, 0.017075, 0.317661, 0.125295];
    expect(largestDifference(flat(network), chain)).toBeLessThan(6e-7);
  });
  it('turns it into the published scattering matrix and back', () => {
    const s = new Float64Array(8);
    abcdToS2Into(s, flat(network), 1, references);
    expect(largestDifference(s, scattering)).toBeLessThan(6e-7);
    const back = new Float64Array(8);
    sToAbcd2Into(back, s, 1, references);
    expect(largestDifference(back, flat(network))).toBeLessThan(1e-13);
  });
  it('renormalises it to 50 ohm without going through Z (Kurokawa power waves)', () => {
    const s = new Float64Array(8);
    abcdToS2Into(s, flat(network), 1, references);
    const direct = new Float64Array(8);
    abcdToS2Into(direct, flat(network), 1, uniformReference(2, 50));
    const at50 = renormalize({ ...onePoint(2, [], references), s }, 50);
    expect(largestDifference(at50.s, direct)).toBeLessThan(1e-15);
    const published = [0.126288, 0.092519, 0.191875, -0.825897, 0.191875, -0.825897, 0.121736, -0.06399];
    expect(largestDifference(at50.s, published)).toBeLessThan(6e-7);
  });
  it('cascades it with a line of 35 ohm as worked by star, T, chain matrix and block form', () => {
    const a = new Float64Array(8);
    const b = new Float64Array(8);
    abcdToS2Into(a, flat(network), 1, uniformReference(2, 50));
    abcdToS2Into(b, flat(lineChain(35, [0.02, 0.7])), 1, uniformReference(2, 50));
    expect(cascade2Into(a, a, b, 1)).toBe(0);
    const published = [0.173522, 0.241708, -0.384527, -0.685586, -0.384527, -0.685586, -0.198622, -0.276267];
    expect(largestDifference(a, published)).toBeLessThan(6e-7);
  });
});

describe('worked value of Bockelman and Eisenstadt, IEEE Trans. MTT-43 (1995)', () => {
  it('gives the mixed mode of a symmetric pair of lines', () => {
    const even = new Float64Array(8);
    const odd = new Float64Array(8);
    abcdToS2Into(even, flat(lineChain(60, [0.02, 1.3])), 1, uniformReference(2, 50));
    abcdToS2Into(odd, flat(lineChain(40, [0.03, 1.1])), 1, uniformReference(2, 50));
    const s = new Float64Array(32);
    for (let row = 0; row < 4; row++) {
      for (let column = 0; column < 4; column++) {
        const k = ((row >> 1) * 2 + (column >> 1)) * 2;
        const sign = row % 2 === column % 2 ? 1 : -1;
        for (let part = 0; part < 2; part++) {
          s[(row * 4 + column) * 2 + part] = (even[k + part]! + sign * odd[k + part]!) / 2;
        }
      }
    }
    const mixed = new Float64Array(32);
    toMixedModeInto(mixed, s, 1);
    const entry = (row: number, column: number): number[] => [
      ...mixed.subarray((row * 4 + column) * 2).slice(0, 2),
    ];
    expect(largestDifference(entry(1, 0), [0.423844, -0.852343])).toBeLessThan(6e-7);
    expect(largestDifference(entry(0, 0), [-0.172288, -0.082418])).toBeLessThan(6e-7);
    expect(largestDifference(entry(3, 2), [0.254491, -0.931377])).toBeLessThan(6e-7);
    expect(largestDifference(entry(2, 2), [0.164813, 0.044052])).toBeLessThan(6e-7);
    expect(Math.hypot(...entry(3, 0), ...entry(0, 2))).toBeLessThan(1e-15);
    // Read in the order 1-2, 3-4 the same file has a plausible, wrong loss: -11.3 dB.
    const wrong = new Float64Array(32);
    const order = [0, 2, 1, 3];
    order.forEach((row, r) =>
      order.forEach((column, c) => {
        const k = (row * 4 + column) * 2;
        wrong.set(s.subarray(k, k + 2), (r * 4 + c) * 2);
      }),
    );
    toMixedModeInto(mixed, wrong, 1);
    expect(largestDifference(entry(1, 0), [0.253, 0.103])).toBeLessThan(6e-4);
    expect(20 * Math.log10(Math.hypot(...entry(1, 0)))).toBeCloseTo(-11.3, 1);
  });
});

describe('maximum available gain (Pozar, Microwave Engineering, 12.2)', () => {
  it('is the attenuation of a matched attenuator and of a mismatched lossy line, and 1 for a lossless step', () => {
    const pad = flat([
      [0, 0],
      [0.5, 0],
      [0.5, 0],
      [0, 0],
    ]);
    expect(maximumAvailableGain(pad, 1).gain[0]).toBeCloseTo(0.25, 15);
    const line = new Float64Array(8);
    abcdToS2Into(line, flat(lineChain(20, [0.3, 0.4])), 1, uniformReference(2, 50));
    expect(maximumAvailableGain(line, 1).gain[0]).toBeCloseTo(Math.exp(-0.6), 14);
    abcdToS2Into(line, flat(lineChain(20, [0, 0.4])), 1, uniformReference(2, 50));
    expect(maximumAvailableGain(line, 1).gain[0]).toBe(1);
  });
});

describe('a figure of causality (IEEE Std 370-2020)', () => {
  it('is 100 for 0.3 e^-jw50ps + 0.2 e^+jw20ps too, part of which comes early: it hints, and proves nothing', () => {
    const frequenciesHz = Float64Array.from({ length: 101 }, (_, k) => k * 1e8);
    const values = new Float64Array(frequenciesHz.length * 2);
    frequenciesHz.forEach((f, k) => {
      const w = 2 * Math.PI * f;
      values[k * 2] = 0.3 * Math.cos(w * 50e-12) + 0.2 * Math.cos(w * 20e-12);
      values[k * 2 + 1] = -0.3 * Math.sin(w * 50e-12) + 0.2 * Math.sin(w * 20e-12);
    });
    const network = { ports: 1, frequenciesHz, s: values, referenceOhm: uniformReference(1, 50) };
    expect(assessQuality(network).causality!.percent).toBeCloseTo(100, 9);
  });
});
