import type { Rectangle, SectionKind } from './cross-section';
import { thickAirPair, thickPairPermittivity } from './coupled-microstrip';
import { LineError } from './line-error';
import { thickAirMicrostrip, thickMicrostripPermittivity } from './microstrip';
import { thickPair, wheelerStripline } from './stripline';

export type ModeName = 'single' | 'even' | 'odd';

/** One closed form: impedance in air, and the permittivity that dielectrics below and above make of it. */
export interface LineModel {
  readonly modes: readonly ModeName[];
  /** Published source, and what the model is worth. */
  readonly source: string;
  readonly cautions: readonly string[];
  /** Ohm, all dielectrics replaced by air, perfect conductors. */
  readonly airOhm: (rectangle: Rectangle, mode: ModeName) => number;
  /** Effective relative permittivity, quasi-static. */
  readonly permittivity: (rectangle: Rectangle, mode: ModeName, below: number, above: number) => number;
}

/** Halves of a stripline may differ by this share before a pair is no longer taken as centred. */
const centred = 0.02;

function refuseOutside(value: number, from: number, to: number, what: string, at: string): void {
  if (value >= from && value <= to) return;
  throw new LineError(
    `${what} is ${Number(value.toPrecision(4))}, outside ${from} to ${to}, for which the closed form is published.`,
    'Change the section, or wait for the field solution.',
    at,
  );
}

/** Halves above and below in parallel: each as half of a centred stripline of its own spacing. */
function halves({ widthM, thicknessM, belowM, aboveM }: Rectangle): { below: number; above: number } {
  const half = (heightM: number): number => {
    const spacing = 2 * heightM + thicknessM;
    return wheelerStripline(widthM / spacing, thicknessM / spacing);
  };
  const below = half(belowM);
  return { below, above: aboveM === belowM ? below : half(aboveM) };
}

function stripline(rectangle: Rectangle): LineModel {
  const offset = Math.abs(rectangle.aboveM - rectangle.belowM) / (rectangle.aboveM + rectangle.belowM);
  return {
    modes: ['single'],
    source: 'Wheeler, IEEE Trans. MTT-26, 1978',
    cautions:
      offset > centred
        ? ['The trace is off centre: two half lines in parallel, which misses the impedance by 2 % or more.']
        : [],
    airOhm: (r) => {
      const { below, above } = halves(r);
      return 2 / (1 / below + 1 / above);
    },
    permittivity: (r, _, below, above) => {
      const half = halves(r);
      return (below / half.below + above / half.above) / (1 / half.below + 1 / half.above);
    },
  };
}

function microstrip({ widthM, belowM }: Rectangle, below: number): LineModel {
  refuseOutside(widthM / belowM, 0.01, 100, 'Width over height', 'widthM');
  refuseOutside(below, 1, 128, 'The permittivity', 'dk');
  return {
    modes: ['single'],
    source: 'Hammerstad and Jensen, IEEE MTT-S Digest, 1980',
    cautions: [],
    airOhm: (r) => thickAirMicrostrip(r.widthM / r.belowM, r.thicknessM / r.belowM),
    permittivity: (r, _, er) => thickMicrostripPermittivity(r.widthM / r.belowM, r.thicknessM / r.belowM, er),
  };
}

function striplinePair(rectangle: Rectangle): LineModel {
  const offset = Math.abs(rectangle.aboveM - rectangle.belowM) / (rectangle.aboveM + rectangle.belowM);
  if (offset > centred) {
    throw new LineError(
      `The pair is off centre: ${rectangle.belowM} m below, ${rectangle.aboveM} m above. No listed closed form covers it.`,
      'Centre the pair between its planes, or wait for the field solution.',
      'aboveM',
    );
  }
  return {
    modes: ['even', 'odd'],
    source: 'Cohn, IRE Trans. MTT-3, 1955, with terms for thickness',
    cautions: [
      'A pair of thick strips has no closed form of proven accuracy: even and odd impedance may be 2 % off.',
    ],
    airOhm: (r, mode) => {
      const spacing = r.belowM + r.aboveM + r.thicknessM;
      return thickPair(r.widthM / spacing, r.gapM / spacing, r.thicknessM / spacing)[
        mode === 'even' ? 'even' : 'odd'
      ];
    },
    permittivity: (r, _, below, above) => (below * r.aboveM + above * r.belowM) / (r.belowM + r.aboveM),
  };
}

function microstripPair({ widthM, belowM, gapM }: Rectangle, below: number): LineModel {
  refuseOutside(widthM / belowM, 0.1, 10, 'Width over height', 'widthM');
  refuseOutside(gapM / belowM, 0.1, 10, 'Gap over height', 'gapM');
  refuseOutside(below, 1, 18, 'The permittivity', 'dk');
  return {
    modes: ['even', 'odd'],
    source: 'Kirschning and Jansen, IEEE Trans. MTT-32, 1984, with terms for thickness',
    cautions: [
      'A pair of thick microstrips has no closed form of proven accuracy: even and odd impedance may be 2 % off.',
      'The dispersion of a pair of microstrips is left out.',
    ],
    airOhm: (r, mode) =>
      thickAirPair(r.widthM / r.belowM, r.gapM / r.belowM, r.thicknessM / r.belowM)[
        mode === 'even' ? 'even' : 'odd'
      ],
    permittivity: (r, mode, er) =>
      thickPairPermittivity(r.widthM / r.belowM, r.gapM / r.belowM, r.thicknessM / r.belowM, er)[
        mode === 'even' ? 'even' : 'odd'
      ],
  };
}

/**
 * The closed form for a kind of section.
 * @throws LineError where no listed form covers it
 */
export function modelOf(kind: SectionKind, rectangle: Rectangle, below: number): LineModel {
  switch (kind) {
    case 'stripline':
      return stripline(rectangle);
    case 'microstrip':
      return microstrip(rectangle, below);
    case 'stripline-pair':
      return striplinePair(rectangle);
    case 'microstrip-pair':
      return microstripPair(rectangle, below);
  }
}
