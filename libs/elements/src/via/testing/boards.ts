import type { Layer, Signaling, Stackup } from '@tollgate/contracts';
import fc from 'fast-check';
import type { BuildContext } from '../../types';
import type { Via } from '../barrel';

/** Copper that hardly resists, so that a stub's notch stands where its length puts it. */
const nearlyPerfect = 1e9;

export function copper(
  name: string,
  role: 'signal' | 'plane',
  thicknessM = 18e-6,
  conductivitySPerM = 5.8e7,
): Layer {
  return { kind: 'copper', name, role, thicknessM, conductivitySPerM, foilSide: 'down', etchAngleDeg: 90 };
}

export function laminate(name: string, thicknessM: number, dk: number, df = 0): Layer {
  return { kind: 'dielectric', name, thicknessM, dk, df, atHz: 1e9, dispersion: 'wideband-debye' };
}

/** A board of one dielectric whose copper is as good as nothing: signal, plane, signal, plane, signal, at the depths given. */
export function thinBoard(dk: number, gapsM: readonly [number, number, number, number]): Stackup {
  const thin = (name: string, role: 'signal' | 'plane') => copper(name, role, 1e-9, nearlyPerfect);
  return {
    layers: [
      thin('L1', 'signal'),
      laminate('D1', gapsM[0], dk),
      thin('L2', 'plane'),
      laminate('D2', gapsM[1], dk),
      thin('L3', 'signal'),
      laminate('D3', gapsM[2], dk),
      thin('L4', 'plane'),
      laminate('D4', gapsM[3], dk),
      thin('L5', 'signal'),
    ],
  };
}

/** Eight layers of a board as one would have it made: three signal layers inside and out, lossy prepreg and core. */
export const eightLayers: Stackup = {
  layers: [
    { ...laminate('mask', 20e-6, 3.5, 0.02), kind: 'soldermask' } as Layer,
    copper('L1', 'signal', 45e-6),
    laminate('P1', 100e-6, 3.6, 0.006),
    copper('L2', 'plane'),
    laminate('C1', 150e-6, 3.8, 0.008),
    copper('L3', 'signal'),
    laminate('P2', 180e-6, 3.6, 0.006),
    copper('L4', 'plane', 35e-6),
    laminate('C2', 400e-6, 3.8, 0.008),
    copper('L5', 'plane', 35e-6),
    laminate('P3', 180e-6, 3.6, 0.006),
    copper('L6', 'signal'),
    laminate('C3', 150e-6, 3.8, 0.008),
    copper('L7', 'plane'),
    laminate('P4', 100e-6, 3.6, 0.006),
    copper('L8', 'signal', 45e-6),
  ],
};

export function via(fields: Partial<Via> = {}): Via {
  return {
    kind: 'via',
    fromLayer: 'L1',
    toLayer: 'L3',
    drillM: 0.25e-3,
    padM: 0,
    antipadM: 0.8e-3,
    ...fields,
  };
}

export function contextOf(stackup: Stackup, signaling: Signaling = 'single-ended'): BuildContext {
  return { signaling, jointOhm: 50, stackup, parts: new Map() };
}

/** Signal layers of the eight-layer board. */
const signals = ['L1', 'L3', 'L6', 'L8'] as const;

/** Vias of the eight-layer board that can be built: any two layers, with and without pads, drilled back or not, return vias or none. */
export function arbitraryVia(signaling: Signaling): fc.Arbitrary<Via> {
  return fc
    .record({
      ends: fc
        .tuple(fc.constantFrom(...signals), fc.constantFrom(...signals))
        .filter(([from, to]) => from !== to),
      drillM: fc.double({ min: 0.15e-3, max: 0.35e-3, noNaN: true }),
      pad: fc.option(fc.double({ min: 1.4, max: 1.9, noNaN: true }), { nil: 0 }),
      antipad: fc.double({ min: 2, max: 3.5, noNaN: true }),
      pitch: fc.double({ min: 2.1, max: 5, noNaN: true }),
      returns: fc.array(
        fc.tuple(fc.double({ min: 3, max: 6, noNaN: true }), fc.double({ min: -1, max: 1, noNaN: true })),
        { maxLength: 2 },
      ),
      residualM: fc.option(fc.double({ min: 0, max: 0.1e-3, noNaN: true }), { nil: undefined }),
    })
    .map(({ ends: [fromLayer, toLayer], drillM, pad, antipad, pitch, returns, residualM }) => {
      const [upper, lower] = [fromLayer, toLayer].sort();
      return via({
        fromLayer,
        toLayer,
        drillM,
        padM: pad * drillM,
        antipadM: antipad * drillM,
        pitchM: signaling === 'differential' ? pitch * drillM : undefined,
        backdrill: {
          topResidualM: upper === 'L1' ? undefined : residualM,
          bottomResidualM: lower === 'L8' ? undefined : residualM,
        },
        // One to the left, the next to the right, each beyond the leg of its side.
        returnVias: returns.map(([x, y], i) => {
          const side = i === 0 ? -1 : 1;
          const legM = signaling === 'differential' ? (pitch * drillM) / 2 : 0;
          return [side * (legM + x * drillM), y * drillM];
        }),
      });
    });
}

/** Largest distance between two responses. */
export function farthest(one: Float64Array, other: Float64Array): number {
  if (one.length !== other.length) throw new RangeError(`${one.length} numbers beside ${other.length}.`);
  return one.reduce((most, value, i) => Math.max(most, Math.abs(value - other[i]!)), 0);
}
