/** Stackups of the demonstration, written as a person types them. Invented: no laminate, no fabricator, no product. */
const laminate = { df: 0.0042, atHz: '10 GHz', dispersion: 'wideband-debye', dfTolerance: 0.0005 };

function copper(name: string, role: 'signal' | 'plane', foilSide: 'down' | 'up', outer = false) {
  return {
    kind: 'copper',
    name,
    thicknessM: outer ? '43 um' : '16 um',
    thicknessToleranceM: outer ? '8 um' : '2 um',
    role,
    foilSide,
    roughness: {
      foot: { model: 'cannonball', rzM: '3 um' },
      top: { model: 'cannonball', rzM: outer ? '2 um' : '1.5 um' },
    },
    etchAngleDeg: outer ? '70 °' : '75 °',
    ...(role === 'signal' ? { widthToleranceM: outer ? '15 um' : '10 um' } : {}),
  };
}

const core = (name: string, thicknessM: string) => ({
  kind: 'dielectric',
  name,
  thicknessM,
  thicknessToleranceM: '6 um',
  dk: 3.62,
  dkTolerance: 0.06,
  ...laminate,
  source: 'Invented for the demonstration: core',
});

const prepreg = (name: string, thicknessM: string) => ({
  ...core(name, thicknessM),
  thicknessToleranceM: '10 um',
  dk: 3.38,
  dkTolerance: 0.08,
  source: 'Invented for the demonstration: prepreg, pressed',
});

const mask = (name: string) => ({
  kind: 'soldermask',
  name,
  thicknessM: '22 um',
  thicknessToleranceM: '8 um',
  dk: 3.5,
  dkTolerance: 0.3,
  df: 0.025,
  atHz: '1 GHz',
  dispersion: 'wideband-debye',
  source: 'Invented for the demonstration: solder mask',
});

/** Eight layers, 1.1 mm, symmetric about the middle; signals on L1, L3, L6, L8. */
function eightLayers(outerM: string, innerM: string): Record<string, unknown> {
  return {
    layers: [
      mask('Mask top'),
      copper('L1', 'signal', 'down', true),
      prepreg('PP 1-2', outerM),
      copper('L2', 'plane', 'down'),
      core('Core 2-3', '127 um'),
      copper('L3', 'signal', 'up'),
      prepreg('PP 3-4', innerM),
      copper('L4', 'plane', 'down'),
      core('Core 4-5', '200 um'),
      copper('L5', 'plane', 'up'),
      prepreg('PP 5-6', innerM),
      copper('L6', 'signal', 'down'),
      core('Core 6-7', '127 um'),
      copper('L7', 'plane', 'up'),
      prepreg('PP 7-8', outerM),
      copper('L8', 'signal', 'up', true),
      mask('Mask bottom'),
    ],
  };
}

/** The versions of the line card, oldest first. */
export const lineCardStackups = [
  {
    kind: 'design',
    why: 'First design: 100 ohm pairs on L3 and L6, escapes on L1.',
    document: eightLayers('100 um', '130 um'),
  },
  {
    kind: 'fabricator-proposal',
    why: 'Pressed thicknesses as the fabricator expects them; prepreg of the outer layers comes out thinner.',
    document: eightLayers('94 um', '134 um'),
  },
] as const;
