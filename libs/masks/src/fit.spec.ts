import {
  deviationFigureDb,
  fitFrequencies,
  fitInLogarithm,
  fitLoss,
  insertionLossToCrosstalkDb,
  integratedCrosstalkV,
  powerSumDb,
  readFormula,
  totalCrosstalkV,
} from './index';

/** Check values of the standards sheet: D1 (IEEE Std 802.3 Annex 69B) and D6 (Annex 93A, clause 92). */
describe('a fitted loss', () => {
  const wave = readFormula('0.8 + 1.9*sqrt(f) + 0.55*f + 0.004*f^2');
  const frequencies = fitFrequencies(0.05e9, 25.78e9);
  const loss = frequencies.map((f) => wave(f / 1e9) + 0.4 * Math.cos(2 * Math.PI * 0.8 * (f / 1e9)));

  it('of Annex 69B is the line 4.01543 dB/GHz, 2.63182 dB through its own Amax from 1 to 6 GHz', () => {
    const amax = readFormula(
      '8.685889638*(2.0e-5*sqrt(f*1e9) + 1.1e-10*f*1e9 + 3.2e-20*(f*1e9)^2 - 1.2e-30*(f*1e9)^3)',
    );
    const samples = fitFrequencies(1e9, 6e9);
    expect(samples).toHaveLength(501);
    const [b, m] = fitLoss(
      samples,
      samples.map((f) => amax(f / 1e9)),
      'line',
    ).coefficients;
    expect(m).toBeCloseTo(4.01543, 5);
    expect(b).toBeCloseTo(2.63182, 5);
  });

  it('of Annex 93A, weighted by |S21|, has the published coefficients, deviation and figure', () => {
    expect(frequencies).toHaveLength(2574);
    const fit = fitLoss(frequencies, loss, 'weighted');
    [0.889986, 1.725245, 0.6111, 0.002562].forEach((a, k) => expect(fit.coefficients[k]).toBeCloseTo(a, 6));
    expect(fit.valueAt(12.890625e9)).toBeCloseTo(15.3874, 4);
    const deviation = loss.map((value, k) => value - fit.valueAt(frequencies[k]!));
    expect(Math.max(...deviation.map(Math.abs))).toBeCloseTo(0.55508, 5);
    const weight = {
      symbolRateBd: 25.78125e9,
      transmitterHz: 0.2365 / 9.6e-12,
      receiverHz: 0.75 * 25.78125e9,
    };
    expect(deviationFigureDb(frequencies, deviation, weight)).toBeCloseTo(0.184329, 6);
  });

  it('leaves out samples without transmission where it is weighted, and refuses them in a line', () => {
    const holed = loss.map((value, k) => (k === 100 ? Infinity : value));
    expect(fitLoss(frequencies, holed, 'weighted').valueAt(12.890625e9)).toBeCloseTo(15.3874, 2);
    expect(() => fitLoss(frequencies, holed, 'line')).toThrow('Nothing is transmitted at 1050000000 Hz');
    expect(() => fitLoss(frequencies.subarray(0, 3), loss.subarray(0, 3), 'weighted')).toThrow('3 samples');
  });
});

describe('crosstalk', () => {
  it('of two equal aggressors sums to 3.01 dB more than one', () => {
    const one = Float64Array.of(40, 60, Infinity);
    const sum = powerSumDb([one, one]);
    expect(sum[0]).toBeCloseTo(40 - 10 * Math.log10(2), 12);
    expect(sum[2]).toBe(Infinity);
    expect(insertionLossToCrosstalkDb(sum, Float64Array.of(10, 10, 10))[0]).toBeCloseTo(26.9897, 4);
    expect(() => powerSumDb([one, one.subarray(1)])).toThrow('Curve 2 has 2 points');
  });

  it('integrates to the published 4.26422 mV for one aggressor of -60 dB at 1 GHz rising 20 dB a decade', () => {
    const frequencies = fitFrequencies(0.05e9, 19e9);
    const near = frequencies.map((f) => 60 - 20 * Math.log10(f / 1e9));
    const settings = { symbolRateBd: 25.78125e9, amplitudeV: 0.6, transitionS: 9.6e-12, receiverHz: 18.75e9 };
    const noise = integratedCrosstalkV(frequencies, near, settings);
    expect(noise * 1e3).toBeCloseTo(4.26422, 5);
    expect(totalCrosstalkV(3e-3, 4e-3)).toBeCloseTo(5e-3, 12);
    const uneven = frequencies.map((f, k) => (k === 7 ? f + 1e5 : f));
    expect(() => integratedCrosstalkV(uneven, near, settings)).toThrow('uniform');
  });

  it('over loss is fitted by the line in log10 f that made it (69B.4.6)', () => {
    const frequencies = fitFrequencies(0.1e9, 5.1e9);
    const ratio = frequencies.map((f) => 23.3 - 18.7 * Math.log10(f / 5e9));
    const { b, m } = fitInLogarithm(frequencies, ratio);
    expect(m).toBeCloseTo(-18.7, 10);
    expect(b + m * Math.log10(5)).toBeCloseTo(23.3, 10);
  });
});
