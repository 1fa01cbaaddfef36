import type { CrossSection, LineModeFigures, SectionFigures } from '@tollgate/contracts';

/** A line of the table of figures: solved, by closed form, and how far they are apart. */
export interface FigureRow {
  readonly title: string;
  readonly strong: boolean;
  readonly solved: string;
  readonly closed: string;
  readonly difference: string;
}

interface Figure {
  readonly title: string;
  readonly strong?: boolean;
  readonly unit: string;
  readonly of: (figures: SectionFigures) => number | null | undefined;
  readonly digits: number;
  readonly scale?: number;
}

const mode = (figures: SectionFigures, name: LineModeFigures['mode']) =>
  figures.modes.find((each) => each.mode === name);
/** The mode that carries the signal: the only one of a trace, the odd one of a pair. */
const carrying = (figures: SectionFigures) => mode(figures, 'single') ?? mode(figures, 'odd');

const perInch = 0.0254;

const ofTrace: readonly Figure[] = [
  { title: 'Impedance', strong: true, unit: 'ohm', digits: 2, of: ({ z0Ohm }) => z0Ohm },
];
const ofPair: readonly Figure[] = [
  { title: 'Differential', strong: true, unit: 'ohm', digits: 2, of: (each) => each.differentialOhm },
  { title: 'Common', unit: 'ohm', digits: 2, of: (each) => each.commonOhm },
  { title: 'Odd mode', unit: 'ohm', digits: 2, of: (each) => mode(each, 'odd')?.z0Ohm },
  { title: 'Even mode', unit: 'ohm', digits: 2, of: (each) => mode(each, 'even')?.z0Ohm },
];
const ofBoth: readonly Figure[] = [
  {
    title: 'Effective permittivity',
    unit: '',
    digits: 3,
    of: (each) => carrying(each)?.effectivePermittivity,
  },
  { title: 'Delay', unit: 'ps/mm', digits: 3, scale: 1e9, of: (each) => carrying(each)?.delaySPerM },
  { title: 'Loss of the copper', unit: 'dB/m', digits: 2, of: (each) => carrying(each)?.conductorLossDbPerM },
  {
    title: 'Loss of the dielectric',
    unit: 'dB/m',
    digits: 2,
    of: (each) => carrying(each)?.dielectricLossDbPerM,
  },
  { title: 'Loss', strong: true, unit: 'dB/m', digits: 2, of: lossDbPerM },
  {
    title: 'Loss an inch',
    unit: 'dB/in',
    digits: 3,
    of: (each) => {
      const loss = lossDbPerM(each);
      return loss === undefined ? undefined : loss * perInch;
    },
  },
];

function lossDbPerM(figures: SectionFigures): number | undefined {
  const of = carrying(figures);
  return of && of.conductorLossDbPerM + of.dielectricLossDbPerM;
}

export function figureRows({ figures, closedForm, pair }: CrossSection): FigureRow[] {
  return [...(pair ? ofPair : ofTrace), ...ofBoth].map(({ title, strong, unit, of, digits, scale = 1 }) => {
    const [solved, closed] = [of(figures), closedForm && of(closedForm)];
    const written = (value: number | null | undefined) =>
      value === null || value === undefined
        ? ''
        : `${(value * scale).toFixed(digits)}${unit ? ` ${unit}` : ''}`;
    return {
      title,
      strong: strong ?? false,
      solved: written(solved),
      closed: written(closed),
      difference: solved && closed ? percent(closed / solved - 1) : '',
    };
  });
}

/** With its sign: "+0.42 %". */
export function percent(share: number): string {
  const text = (share * 100).toFixed(2);
  return `${text.startsWith('-') ? '' : '+'}${text} %`
    .replace('-', '\u2212')
    .replace('+0.00', '0.00')
    .replace('\u22120.00', '0.00');
}
