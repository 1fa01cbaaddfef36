import { largestSingularValue } from '@tollgate/network';
import fc from 'fast-check';
import type { Layer, Stackup } from '@tollgate/contracts';
import { buildVia, viaProblems } from './index';
import { mediumAt, modelVia, runsOf } from './model';
import { arbitraryVia, contextOf, eightLayers, farthest, via } from './testing/boards';
import { turnedPair } from './turned-pair';

const runs = { numRuns: 200, seed: 24983 };
const frequenciesHz = Float64Array.of(0, 1, 1e6, 1e9, 7.3e9, 1.6e10, 3.3e10, 1e11);

describe.each(['single-ended', 'differential'] as const)('any %s via', (signaling) => {
  const context = contextOf(eightLayers, signaling);
  const ports = signaling === 'single-ended' ? 2 : 4;

  it('is finite, passive and reciprocal', () => {
    fc.assert(
      fc.property(arbitraryVia(signaling), (any) => {
        expect(viaProblems(any, signaling, eightLayers)).toEqual([]);
        const { s } = buildVia(any, frequenciesHz, context);
        expect(s.every(Number.isFinite)).toBe(true);
        for (let point = 0; point < frequenciesHz.length; point++) {
          const at = point * ports * ports * 2;
          expect(largestSingularValue(s, ports, at)).toBeLessThan(1 + 1e-9);
          for (let row = 0; row < ports; row++) {
            for (let column = 0; column < row; column++) {
              const entry = at + (row * ports + column) * 2;
              const mirror = at + (column * ports + row) * 2;
              expect(Math.abs(s[entry]! - s[mirror]!)).toBeLessThan(1e-12);
              expect(Math.abs(s[entry + 1]! - s[mirror + 1]!)).toBeLessThan(1e-12);
            }
          }
        }
      }),
      { ...runs, numRuns: ports === 2 ? 200 : 60 },
    );
  });

  it('keeps its response when a dielectric of its board is told as two', () => {
    const split: Stackup = {
      layers: eightLayers.layers!.flatMap((layer): Layer[] =>
        layer.name === 'C2'
          ? [
              { ...layer, name: 'C2a', thicknessM: layer.thicknessM * 0.3 },
              { ...layer, name: 'C2b', thicknessM: layer.thicknessM * 0.7 },
            ]
          : [layer],
      ),
    };
    fc.assert(
      fc.property(arbitraryVia(signaling), (any) => {
        const one = buildVia(any, frequenciesHz, context).s;
        const two = buildVia(any, frequenciesHz, contextOf(split, signaling)).s;
        expect(farthest(one, two)).toBeLessThan(1e-11);
      }),
      { ...runs, numRuns: 30 },
    );
  });

  it('gives each frequency the same number on any grid', () => {
    fc.assert(
      fc.property(arbitraryVia(signaling), (any) => {
        const all = buildVia(any, frequenciesHz, context).s;
        const size = ports * ports * 2;
        frequenciesHz.forEach((f, k) => {
          const one = buildVia(any, Float64Array.of(f), context).s;
          expect(farthest(one, all.slice(k * size, (k + 1) * size))).toBe(0);
        });
      }),
      { ...runs, numRuns: 20 },
    );
  });
});

it('a lossless via returns what it does not let through', () => {
  const lossless: Stackup = {
    layers: eightLayers.layers!.map((layer) => (layer.kind === 'copper' ? layer : { ...layer, df: 0 })),
  };
  fc.assert(
    fc.property(arbitraryVia('single-ended'), (any) => {
      const { s } = buildVia(any, frequenciesHz, contextOf(lossless));
      for (let at = 0; at < s.length; at += 8) {
        const power = s[at]! ** 2 + s[at + 1]! ** 2 + s[at + 4]! ** 2 + s[at + 5]! ** 2;
        expect(power).toBeLessThan(1 + 1e-12);
        // Only the plating of the barrel takes any.
        expect(power).toBeGreaterThan(0.95);
      }
    }),
    runs,
  );
});

it('even and odd computed apart agree with the legs computed together', () => {
  fc.assert(
    fc.property(arbitraryVia('differential'), (any) => {
      const mirrored = { ...any, returnVias: [] };
      const model = modelVia(mirrored, 'differential', eightLayers);
      const together = turnedPair(runsOf(model), mediumAt(model, frequenciesHz), 50);
      const apart = buildVia(mirrored, frequenciesHz, contextOf(eightLayers, 'differential')).s;
      expect(farthest(together, apart)).toBeLessThan(1e-11);
    }),
    { ...runs, numRuns: 30 },
  );
});

it('return vias mirrored about the pair exchange the legs', () => {
  const returnVias: [number, number][] = [
    [1.2e-3, 0.2e-3],
    [1.4e-3, -0.5e-3],
  ];
  const of = (places: [number, number][]): Float64Array =>
    buildVia(
      via({ pitchM: 1e-3, returnVias: places }),
      Float64Array.of(9e9),
      contextOf(eightLayers, 'differential'),
    ).s;
  const one = of(returnVias);
  const other = of(returnVias.map(([x, y]) => [-x, y]));
  const exchanged = new Float64Array(32);
  for (let row = 0; row < 4; row++) {
    for (let column = 0; column < 4; column++) {
      const to = (row * 4 + column) * 2;
      const from = ((row ^ 1) * 4 + (column ^ 1)) * 2;
      exchanged[to] = other[from]!;
      exchanged[to + 1] = other[from + 1]!;
    }
  }
  expect(farthest(one, exchanged)).toBeLessThan(1e-12);
});
