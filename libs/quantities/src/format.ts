import type { Dimension } from './dimensions';
import { definitionOf } from './dimensions';
import { factorOf } from './parse';

export interface FormatOptions {
  /** Write in this unit; left out, the unit that gives a number from 1 to 1000 is chosen. */
  readonly unit?: string;
  /** Significant digits at most (default 6). */
  readonly digits?: number;
  /** Leave the unit away. */
  readonly bare?: boolean;
}

const prefixed: Partial<Record<Dimension, readonly string[]>> = {
  length: ['um', 'mm', 'm'],
  frequency: ['Hz', 'kHz', 'MHz', 'GHz'],
  symbolRate: ['Bd', 'kBd', 'MBd', 'GBd'],
  resistance: ['mohm', 'ohm', 'kohm', 'Mohm'],
  inductance: ['fH', 'pH', 'nH', 'uH', 'mH', 'H'],
  capacitance: ['fF', 'pF', 'nF', 'uF', 'mF', 'F'],
  time: ['fs', 'ps', 'ns', 'us', 'ms', 's'],
  inductancePerLength: ['nH/m', 'uH/m'],
  capacitancePerLength: ['pF/m', 'nF/m'],
  conductivity: ['S/m', 'MS/m'],
};

/** Writes an SI number as a person reads it: "12.7 mm", "25.78125 GBd". Reading it back gives the same value to `digits`. */
export function formatQuantity(value: number, dimension: Dimension, options: FormatOptions = {}): string {
  const unit = options.unit ?? chosenUnit(value, dimension);
  const number = trimmed(value / factorOf(dimension, unit), options.digits ?? 6);
  return options.bare || unit === '' ? number : `${number} ${unit}`;
}

/** A loss, gain or margin with its two decimals; infinite loss reads "no transmission". */
export function formatDb(valueDb: number | null, withUnit = true): string {
  if (valueDb === null || valueDb === Infinity) return 'no transmission';
  const text = valueDb
    .toFixed(2)
    .replace(/^-(0\.00)$/, '$1')
    .replace('-', '\u2212');
  return withUnit ? `${text} dB` : text;
}

function chosenUnit(value: number, dimension: Dimension): string {
  const ladder = prefixed[dimension];
  const size = Math.abs(value);
  const first = Object.keys(definitionOf(dimension).units)[0]!;
  if (!ladder || size === 0) return first;
  const fitting = ladder.filter((unit) => size >= factorOf(dimension, unit) * (1 - 1e-12));
  return fitting[fitting.length - 1] ?? ladder[0]!;
}

function trimmed(value: number, digits: number): string {
  const rounded = Number(value.toPrecision(digits));
  return Math.abs(rounded) >= 1e-6 && Math.abs(rounded) < 1e12 ? plain(rounded) : String(rounded);
}

function plain(value: number): string {
  return value.toLocaleString('en-US', { useGrouping: false, maximumSignificantDigits: 15 });
}
