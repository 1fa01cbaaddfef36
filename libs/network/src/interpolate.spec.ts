import type { Network } from './index';
import {
  extendToDc,
  impedanceProfile,
  inspectGrid,
  interpolate,
  NetworkError,
  uniformReference,
} from './index';
import { largestDifference } from './testing/samples';

/** A matched line: pure delay with a loss that grows with frequency. */
function line(frequenciesHz: Float64Array, delayS: number, lossDbAtGHz = 0): Network {
  const s = new Float64Array(frequenciesHz.length * 8);
  frequenciesHz.forEach((f, k) => {
    const size = 10 ** ((-lossDbAtGHz * f) / 1e9 / 20);
    for (const at of [2, 4]) {
      s[k * 8 + at] = size * Math.cos(2 * Math.PI * f * delayS);
      s[k * 8 + at + 1] = -size * Math.sin(2 * Math.PI * f * delayS);
    }
  });
  return { ports: 2, frequenciesHz, s, referenceOhm: uniformReference(2, 50) };
}
const grid = (from: number, step: number, count: number): Float64Array =>
  Float64Array.from({ length: count }, (_, k) => from + k * step);
const magnitudeDb = (s: Float64Array, at: number): number => 20 * Math.log10(Math.hypot(s[at]!, s[at + 1]!));

describe('interpolation', () => {
  it.each([
    [1e-9, 10e6, -0.0043],
    [5e-9, 10e6, -0.1076],
    [5e-9, 50e6, -3.01],
  ])(
    'of real and imaginary part shrinks a delay of %d s over %d Hz by %d dB, as worked: cos(pi tau df)',
    (delayS, df, dB) => {
      const source = line(grid(df, df, 8), delayS);
      const { network } = interpolate(source, Float64Array.of(3.5 * df), { method: 'rectangular' });
      expect(magnitudeDb(network.s, 4)).toBeCloseTo(20 * Math.log10(Math.cos(Math.PI * delayS * df)), 10);
      expect(Math.abs(magnitudeDb(network.s, 4) - dB)).toBeLessThan(0.006);
    },
  );
  it('of real and imaginary part makes nothing of a delay of 10 ns over 50 MHz, as worked', () => {
    const { network } = interpolate(line(grid(5e7, 5e7, 8), 10e-9), Float64Array.of(1.75e8), {
      method: 'rectangular',
    });
    expect(Math.hypot(network.s[4]!, network.s[5]!)).toBeLessThan(1e-12);
  });
  it('in polar form keeps a pure delay exactly while the phase can be unwrapped', () => {
    const wanted = grid(1.3e7, 0.7e7, 50);
    const { network, error } = interpolate(line(grid(1e7, 1e7, 60), 5e-9), wanted, { method: 'polar' });
    expect(largestDifference(network.s, line(wanted, 5e-9).s)).toBeLessThan(1e-12);
    expect(error.maxAbs).toBeLessThan(1e-12);
  });
  it.each(['polar', 'rectangular'] as const)(
    'estimates the error it makes in %s form within a factor of two',
    (method) => {
      const wanted = grid(2.25e8, 1e8, 20);
      const source = line(grid(1e8, 1e8, 30), 0.3e-9, 2);
      const { network, errorAbs } = interpolate(source, wanted, { method });
      const truth = line(wanted, 0.3e-9, 2);
      for (let k = 0; k < wanted.length; k++) {
        const made = largestDifference(network.s.slice(k * 8, k * 8 + 8), truth.s.slice(k * 8, k * 8 + 8));
        expect(errorAbs[k]).toBeGreaterThan(made / 2);
        expect(errorAbs[k]).toBeLessThan(made * 2 + 1e-6);
      }
    },
  );
  it('gives the data back bit by bit at their own frequencies', () => {
    const source = line(grid(1e7, 1e7, 40), 5e-9, 3);
    for (const method of ['polar', 'rectangular'] as const) {
      expect(interpolate(source, source.frequenciesHz, { method }).network.s).toEqual(source.s);
    }
  });
  it('names phase steps too wide to interpolate', () => {
    const { warnings } = interpolate(line(grid(5e7, 5e7, 40), 5e-9), Float64Array.of(1.1e8), {
      method: 'polar',
    });
    expect(warnings.join()).toMatch(/45 degrees/);
  });
  it.each([
    ['below', 0.5e7, /Start the grid/],
    ['above', 9e8, /End the grid/],
  ])('refuses what lies %s the data', (_, f, mend) => {
    const attempt = (): unknown =>
      interpolate(line(grid(1e7, 1e7, 60), 1e-9), Float64Array.of(f), { method: 'polar' });
    expect(attempt).toThrow(NetworkError);
    expect(attempt).toThrow(mend);
  });
});

describe('extension to 0 Hz', () => {
  it('finds the direct-current value of a resistive mismatch behind a delay, and says what it did', () => {
    const frequenciesHz = grid(1e7, 1e7, 60);
    const source = line(frequenciesHz, 1e-9);
    const mismatched = { ...source, s: source.s.map((x) => 0.8 * x) };
    const wanted = grid(0, 2.5e6, 5);
    const result = interpolate(mismatched, wanted, { method: 'polar', below: 'to-dc' });
    expect(result.network.s[4]).toBeCloseTo(0.8, 6);
    expect(result.network.s[5]).toBe(0);
    expect(result.extendedHz).toEqual([0, 1e7]);
    expect(result.warnings.join()).toMatch(/Extended from 10000000 Hz/);
  });
  it('gives no more than the passivity of the first point', () => {
    const { network } = extendToDc(line(grid(1e7, 1e7, 60), 1e-9));
    expect(Math.abs(network.s[4]!)).toBeLessThanOrEqual(1);
  });
  it('refuses data that begin more than a quarter turn above 0 Hz', () => {
    expect(() => extendToDc(line(grid(1e9, 1e7, 60), 1e-9))).toThrow(/quarter turn/);
  });
});

describe('inspection of the grid', () => {
  it('names a gap, the missing 0 Hz point and the largest phase step', () => {
    const frequenciesHz = Float64Array.of(...grid(1e7, 1e7, 10), ...grid(2e8, 1e7, 10));
    const found = inspectGrid(line(frequenciesHz, 1e-9));
    expect(found.gapsHz).toEqual([[1e8, 2e8]]);
    expect(found.hasDc).toBe(false);
    expect(found.largestPhaseStepDeg).toBeCloseTo(36, 6);
    expect(found.largestPhaseStepHz).toBe(1e8);
    expect(found.widePhaseStepsHz).toEqual([]);
  });
  it('finds no gap on a logarithmic grid', () => {
    const frequenciesHz = Float64Array.from({ length: 40 }, (_, k) => 1e6 * 1.2 ** k);
    expect(inspectGrid(line(frequenciesHz, 1e-12)).gapsHz).toEqual([]);
  });
});

describe('impedance profile', () => {
  const frequenciesHz = grid(0, 1e7, 2001);
  /** A line of 60 ohm between 50 ohm ends: S11 = rho (1 - e^(-2 j theta))/(1 - rho^2 e^(-2 j theta)). */
  const step = (delayS: number): Network => {
    const rho = 10 / 110;
    const s = new Float64Array(frequenciesHz.length * 2);
    frequenciesHz.forEach((f, k) => {
      const c = Math.cos(4 * Math.PI * f * delayS);
      const d = -Math.sin(4 * Math.PI * f * delayS);
      const [nr, ni] = [rho * (1 - c), -rho * d];
      const [qr, qi] = [1 - rho * rho * c, -rho * rho * d];
      s[k * 2] = (nr * qr + ni * qi) / (qr * qr + qi * qi);
      s[k * 2 + 1] = (ni * qr - nr * qi) / (qr * qr + qi * qi);
    });
    return { ports: 1, frequenciesHz, s, referenceOhm: uniformReference(1, 50) };
  };
  it.each(['none', 'hann', 'kaiser-6'] as const)(
    'shows a line of 60 ohm for twice its delay, then 50 (window %s)',
    (window) => {
      const profile = impedanceProfile(step(1e-9), 0, { riseTimeS: 60e-12, window });
      const at = (t: number): number => profile.impedanceOhm[profile.timeS.findIndex((x) => x >= t)]!;
      expect(at(-150e-12)).toBeCloseTo(50, 1);
      expect(Math.abs(at(0) - 54.8)).toBeLessThan(0.3);
      expect(at(1e-9)).toBeCloseTo(60, 1);
      expect(at(1.8e-9)).toBeCloseTo(60, 1);
      expect(Math.abs(at(2.6e-9) - 50)).toBeLessThan(0.2);
    },
  );
  it('states its rise time, window and reference, and warns of an edge the data do not carry', () => {
    const profile = impedanceProfile(step(1e-9), 0, { riseTimeS: 5e-12, window: 'hann' });
    expect(profile).toMatchObject({ riseTimeS: 5e-12, window: 'hann', referenceOhm: 50 });
    expect(profile.warnings.join()).toMatch(/do not carry/);
  });
  it('refuses a rise time that is not above zero, and data without 0 Hz', () => {
    expect(() => impedanceProfile(step(1e-9), 0, { riseTimeS: 0, window: 'none' })).toThrow(/not above zero/);
    const above = { ...step(1e-9), frequenciesHz: frequenciesHz.map((f) => f + 1e6) };
    expect(() => impedanceProfile(above, 0, { riseTimeS: 1e-10, window: 'none' })).toThrow(/data reach from/);
  });
});
