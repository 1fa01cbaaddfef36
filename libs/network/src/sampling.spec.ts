import { assessSampling } from './sampling';
import type { Network } from './network';

/** A matched delay on any grid. */
function delay(frequencies: readonly number[], delayS: number): Network {
  const s = new Float64Array(frequencies.length * 8);
  frequencies.forEach((f, k) => {
    for (const entry of [2, 4]) {
      s[k * 8 + entry] = Math.cos(2 * Math.PI * f * delayS);
      s[k * 8 + entry + 1] = -Math.sin(2 * Math.PI * f * delayS);
    }
  });
  const referenceOhm = Float64Array.of(50, 0, 50, 0);
  return { ports: 2, frequenciesHz: Float64Array.from(frequencies), s, referenceOhm };
}
const through = [[1, 0]] as const;

describe('the sampling of a file', () => {
  it('names what was left out of a linear sweep', () => {
    const frequencies = [1, 2, 3, 7, 8, 9].map((f) => f * 1e7);
    expect(assessSampling(delay(frequencies, 1e-9), through).gapsHz).toEqual([[3e7, 7e7]]);
  });

  it('sees no gap in a logarithmic sweep, nor below the first point above 0 Hz', () => {
    const log = Array.from({ length: 50 }, (_, k) => 1e6 * 10 ** (k / 10));
    expect(assessSampling(delay(log, 0), through).gapsHz).toEqual([]);
    const fromDc = [0, 10, 11, 12, 13].map((f) => f * 1e7);
    expect(assessSampling(delay(fromDc, 0), through)).toMatchObject({ gapsHz: [], reachesDc: true });
  });

  it('measures the widest turn: 360 tau df', () => {
    const frequencies = [10, 20, 30, 45, 60].map((f) => f * 1e6);
    const { phaseStep, reachesDc } = assessSampling(delay(frequencies, 10e-9), through);
    expect(phaseStep.deg).toBeCloseTo(54, 9);
    expect(phaseStep.fromHz).toBe(3e7);
    expect(reachesDc).toBe(false);
  });

  it('takes no phase from what is 40 dB down', () => {
    const quiet = delay([1e7, 2e7, 3e7], 20e-9);
    quiet.s.forEach((value, k) => (quiet.s[k] = value * 1e-3));
    expect(assessSampling(quiet, through).phaseStep.deg).toBe(0);
  });
});
