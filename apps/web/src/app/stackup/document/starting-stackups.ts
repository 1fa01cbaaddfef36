import type { CompleteStackup, Layer } from '@tollgate/contracts';

const assumed = 'Assumed: a starting value of no product; confirm with the fabricator';

/** New layers, and the layers one starts from. Every value is assumed and says so; none is that of a product. */
export function newCopper(name: string, role: 'signal' | 'plane', foilSide: 'down' | 'up' = 'down'): Layer {
  return {
    kind: 'copper',
    name,
    thicknessM: 17e-6,
    conductivitySPerM: 5.8e7,
    role,
    foilSide,
    etchAngleDeg: 80,
    roughness: { foot: { model: 'cannonball', rzM: 4e-6 }, top: { model: 'cannonball', rzM: 2e-6 } },
  };
}

export function newDielectric(name: string, thicknessM = 150e-6): Layer {
  return {
    kind: 'dielectric',
    name,
    thicknessM,
    dk: 3.9,
    df: 0.012,
    atHz: 1e9,
    dispersion: 'wideband-debye',
    source: assumed,
  };
}

export function newMask(name: string): Layer {
  return {
    kind: 'soldermask',
    name,
    thicknessM: 25e-6,
    dk: 3.6,
    df: 0.025,
    atHz: 1e9,
    dispersion: 'wideband-debye',
    source: assumed,
  };
}

const outer = (name: string, foilSide: 'down' | 'up'): Layer => ({
  ...newCopper(name, 'signal', foilSide),
  thicknessM: 40e-6,
});

export interface StartingStackup {
  readonly key: string;
  readonly title: string;
  readonly detail: string;
  readonly stackup: CompleteStackup;
}

export const startingStackups: readonly StartingStackup[] = [
  {
    key: 'four',
    title: 'Four layers',
    detail: 'Signals outside over two planes, 1.5 mm',
    stackup: {
      layers: [
        newMask('Mask top'),
        outer('L1', 'down'),
        newDielectric('Prepreg 1-2', 120e-6),
        newCopper('L2', 'plane', 'down'),
        newDielectric('Core 2-3', 1.1e-3),
        newCopper('L3', 'plane', 'up'),
        newDielectric('Prepreg 3-4', 120e-6),
        outer('L4', 'up'),
        newMask('Mask bottom'),
      ],
    },
  },
  {
    key: 'eight',
    title: 'Eight layers',
    detail: 'Signals on L1, L3, L6 and L8, each beside a plane, 1.2 mm',
    stackup: {
      layers: [
        newMask('Mask top'),
        outer('L1', 'down'),
        newDielectric('Prepreg 1-2', 110e-6),
        newCopper('L2', 'plane', 'down'),
        newDielectric('Core 2-3', 130e-6),
        newCopper('L3', 'signal', 'up'),
        newDielectric('Prepreg 3-4', 150e-6),
        newCopper('L4', 'plane', 'down'),
        newDielectric('Core 4-5', 130e-6),
        newCopper('L5', 'plane', 'up'),
        newDielectric('Prepreg 5-6', 150e-6),
        newCopper('L6', 'signal', 'down'),
        newDielectric('Core 6-7', 130e-6),
        newCopper('L7', 'plane', 'up'),
        newDielectric('Prepreg 7-8', 110e-6),
        outer('L8', 'up'),
        newMask('Mask bottom'),
      ],
    },
  },
];
