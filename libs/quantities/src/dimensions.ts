/**
 * Every dimension the product speaks, its SI unit and the units people write.
 * Factors are exact by definition (inch = 25.4 mm, mil = inch/1000) or decimal prefixes.
 */
export interface DimensionDefinition {
  /** The unit numbers are stored in. */
  readonly si: string;
  /** What a person calls it in a sentence: "a length". */
  readonly noun: string;
  /** Unit as shown -> factor to SI. The first one listed is the unit offered first. */
  readonly units: Readonly<Record<string, number>>;
  /** Other spellings of a unit -> unit as shown; Greek letters in their NFKC form. */
  readonly spellings?: Readonly<Record<string, string>>;
  /** SI prefixes differ only by case (m and M): compare units with their case. */
  readonly caseSensitive?: boolean;
}

export const dimensions = {
  length: {
    si: 'm',
    noun: 'a length',
    units: { mm: 1e-3, um: 1e-6, mil: 25.4e-6, in: 25.4e-3, cm: 1e-2, m: 1, nm: 1e-9 },
    spellings: {
      μm: 'um',
      micron: 'um',
      mils: 'mil',
      thou: 'mil',
      inch: 'in',
      inches: 'in',
      '"': 'in',
    },
  },
  frequency: {
    si: 'Hz',
    noun: 'a frequency',
    units: { GHz: 1e9, MHz: 1e6, kHz: 1e3, Hz: 1 },
  },
  symbolRate: {
    si: 'Bd',
    noun: 'a symbol rate',
    units: { GBd: 1e9, MBd: 1e6, kBd: 1e3, Bd: 1 },
    spellings: { gbaud: 'GBd', mbaud: 'MBd', baud: 'Bd' },
  },
  resistance: {
    si: 'ohm',
    noun: 'a resistance',
    units: { ohm: 1, mohm: 1e-3, kohm: 1e3, Mohm: 1e6 },
    spellings: { Ω: 'ohm', ohms: 'ohm', mΩ: 'mohm', kΩ: 'kohm', MΩ: 'Mohm' },
    caseSensitive: true,
  },
  inductance: {
    si: 'H',
    noun: 'an inductance',
    units: { nH: 1e-9, pH: 1e-12, uH: 1e-6, mH: 1e-3, H: 1, fH: 1e-15 },
    spellings: { μH: 'uH' },
    caseSensitive: true,
  },
  capacitance: {
    si: 'F',
    noun: 'a capacitance',
    units: { pF: 1e-12, nF: 1e-9, fF: 1e-15, uF: 1e-6, mF: 1e-3, F: 1 },
    spellings: { μF: 'uF' },
    caseSensitive: true,
  },
  time: {
    si: 's',
    noun: 'a time',
    units: { ps: 1e-12, ns: 1e-9, fs: 1e-15, us: 1e-6, ms: 1e-3, s: 1 },
    spellings: { μs: 'us' },
  },
  loss: { si: 'dB', noun: 'a loss', units: { dB: 1 } },
  lossPerLength: {
    si: 'dB/m',
    noun: 'a loss per length',
    units: { 'dB/m': 1, 'dB/mm': 1e3, 'dB/cm': 100, 'dB/in': 1 / 25.4e-3 },
    spellings: { 'db/inch': 'dB/in' },
  },
  resistancePerLength: {
    si: 'ohm/m',
    noun: 'a resistance per length',
    units: { 'ohm/m': 1, 'ohm/mm': 1e3, 'ohm/cm': 100, 'ohm/in': 1 / 25.4e-3 },
    spellings: { 'Ω/m': 'ohm/m', 'Ω/mm': 'ohm/mm', 'Ω/cm': 'ohm/cm', 'Ω/in': 'ohm/in' },
    caseSensitive: true,
  },
  inductancePerLength: {
    si: 'H/m',
    noun: 'an inductance per length',
    units: { 'nH/m': 1e-9, 'uH/m': 1e-6, 'nH/mm': 1e-6, 'nH/cm': 1e-7, 'nH/in': 1e-9 / 25.4e-3, 'H/m': 1 },
    spellings: { 'μH/m': 'uH/m' },
    caseSensitive: true,
  },
  conductancePerLength: {
    si: 'S/m',
    noun: 'a conductance per length',
    units: { 'S/m': 1, 'mS/m': 1e-3, 'uS/m': 1e-6 },
    spellings: { 'μS/m': 'uS/m' },
    caseSensitive: true,
  },
  capacitancePerLength: {
    si: 'F/m',
    noun: 'a capacitance per length',
    units: { 'pF/m': 1e-12, 'nF/m': 1e-9, 'pF/mm': 1e-9, 'pF/cm': 1e-10, 'pF/in': 1e-12 / 25.4e-3, 'F/m': 1 },
    caseSensitive: true,
  },
  conductivity: {
    si: 'S/m',
    noun: 'a conductivity',
    units: { 'MS/m': 1e6, 'S/m': 1 },
    caseSensitive: true,
  },
  temperature: { si: 'degC', noun: 'a temperature', units: { '°C': 1 }, spellings: { c: '°C', degc: '°C' } },
  angle: { si: 'deg', noun: 'an angle', units: { '°': 1 }, spellings: { deg: '°', degrees: '°' } },
  ratio: { si: '', noun: 'a number', units: { '': 1, '%': 1e-2 } },
} as const satisfies Record<string, DimensionDefinition>;

export type Dimension = keyof typeof dimensions;

export function definitionOf(dimension: Dimension): DimensionDefinition {
  return dimensions[dimension];
}
