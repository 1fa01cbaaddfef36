import type { Network } from '@tollgate/network';
import { uniformReference } from '@tollgate/network';
import fc from 'fast-check';
import type { WriteOptions } from './index';
import { readTouchstone, writeTouchstone } from './index';

const finite = fc.double({ min: -1, max: 1, noNaN: true });

function arbitraryNetwork(ports: number, symmetric = false): fc.Arbitrary<Network> {
  return fc
    .tuple(
      fc.uniqueArray(fc.double({ min: 0, max: 1e11, noNaN: true }), { minLength: 1, maxLength: 4 }),
      fc.array(finite, { minLength: ports * ports * 8, maxLength: ports * ports * 8 }),
      fc.double({ min: 1, max: 200, noNaN: true }),
    )
    .map(([frequencies, numbers, reference]) => {
      const frequenciesHz = Float64Array.from(frequencies.map((f) => Math.abs(f))).sort();
      const s = Float64Array.from(numbers.slice(0, frequenciesHz.length * ports * ports * 2));
      if (symmetric) {
        for (let k = 0; k < s.length; k++) {
          const entry = k >> 1;
          const inPoint = entry % (ports * ports);
          const other = entry - inPoint + (inPoint % ports) * ports + Math.floor(inPoint / ports);
          if (other < entry) s[k] = s[other * 2 + (k & 1)]!;
        }
      }
      return { ports, frequenciesHz, s, referenceOhm: uniformReference(ports, reference) };
    });
}

function largestDifference(a: Float64Array, b: Float64Array): number {
  return a.length === b.length ? a.reduce((most, x, k) => Math.max(most, Math.abs(x - b[k]!)), 0) : Infinity;
}
const readBack = (network: Network, options: WriteOptions): Network =>
  readTouchstone(`x.s${network.ports}p`, new TextEncoder().encode(writeTouchstone(network, options))).network;
const runs = { numRuns: 200, seed: 11 };

describe('writing and reading back', () => {
  it.each([1, 2, 3, 5])('loses nothing in RI, in any unit and both versions, for %i ports', (ports) => {
    const unit = fc.constantFrom('Hz', 'kHz', 'MHz', 'GHz' as const);
    const version = fc.constantFrom('1.1', '2.0' as const);
    fc.assert(
      fc.property(arbitraryNetwork(ports), unit, version, (network, u, v) => {
        const back = readBack(network, { version: v, unit: u });
        expect([...back.frequenciesHz]).toEqual([...network.frequenciesHz]);
        expect(largestDifference(back.s, network.s)).toBe(0);
        expect([...back.referenceOhm]).toEqual([...network.referenceOhm]);
      }),
      runs,
    );
  });
  it.each(['MA', 'DB'] as const)('keeps 1e-13 in %s', (format) => {
    fc.assert(
      fc.property(arbitraryNetwork(3), (network) => {
        expect(largestDifference(readBack(network, { version: '1.1', format }).s, network.s)).toBeLessThan(
          1e-13,
        );
      }),
      runs,
    );
  });
  it.each(['Lower', 'Upper'] as const)('keeps a symmetric matrix in its %s triangle', (matrixFormat) => {
    fc.assert(
      fc.property(arbitraryNetwork(3, true), (network) => {
        expect(largestDifference(readBack(network, { version: '2.0', matrixFormat }).s, network.s)).toBe(0);
      }),
      runs,
    );
  });
  it.each(['Y', 'Z', 'H', 'G'] as const)('keeps the network in %s parameters, both versions', (parameter) => {
    fc.assert(
      fc.property(arbitraryNetwork(2), fc.constantFrom('1.1', '2.0' as const), (network, version) => {
        const passive = { ...network, s: network.s.map((x) => x * 0.3) };
        const back = readBack(passive, { version, parameter });
        expect(largestDifference(back.s, passive.s)).toBeLessThan(1e-12);
      }),
      runs,
    );
  });
  it('keeps four ports in mixed modes, turned legs included', () => {
    const mixedModeOrder = ['D1,3', 'S2', 'C1,3', 'S4'];
    fc.assert(
      fc.property(arbitraryNetwork(4), (network) => {
        expect(
          largestDifference(readBack(network, { version: '2.0', mixedModeOrder }).s, network.s),
        ).toBeLessThan(1e-14);
      }),
      runs,
    );
  });
  it('keeps noise rows in both versions', () => {
    const noise = [
      {
        frequencyHz: 1e9,
        minimumNoiseFigureDb: 2,
        optimumReflectionMagnitude: 0.5,
        optimumReflectionAngleDeg: 30,
        noiseResistanceOhm: 25,
      },
    ];
    const network = {
      ports: 2,
      frequenciesHz: Float64Array.of(2e9),
      s: new Float64Array(8),
      referenceOhm: uniformReference(2, 50),
    };
    for (const version of ['1.1', '2.0'] as const) {
      const text = writeTouchstone(network, { version, noise, unit: 'GHz' });
      expect(readTouchstone('x.s2p', new TextEncoder().encode(text)).noise).toEqual(noise);
    }
  });
});

describe('what the writer refuses', () => {
  const network = (referenceOhm: Float64Array): Network => ({
    ports: 2,
    frequenciesHz: Float64Array.of(1e9),
    s: Float64Array.of(0, 0, 1, 0, 0.5, 0, 0, 0),
    referenceOhm,
  });
  it('complex references', () => {
    expect(() => writeTouchstone(network(uniformReference(2, 50, 5)), { version: '2.0' })).toThrow(/complex/);
  });
  it('unequal references in version 1, which 2.0 takes', () => {
    const unequal = network(Float64Array.of(50, 0, 75, 0));
    expect(() => writeTouchstone(unequal, { version: '1.1' })).toThrow(/one reference/);
    expect([...readBack(unequal, { version: '2.0' }).referenceOhm]).toEqual([50, 0, 75, 0]);
  });
  it('a triangle of a matrix that is not symmetric', () => {
    expect(() =>
      writeTouchstone(network(uniformReference(2, 50)), { version: '2.0', matrixFormat: 'Lower' }),
    ).toThrow(/not symmetric/);
  });
});
