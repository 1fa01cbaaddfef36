import type { Dimension, DimensionDefinition } from './dimensions';
import { definitionOf } from './dimensions';

export type ParsedQuantity =
  | { readonly ok: true; readonly value: number; readonly unit: string }
  | { readonly ok: false; readonly message: string };

const quantityPattern = /^([+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?)\s*(.*)$/u;

/**
 * Reads a quantity as a person writes it ("12 mil", "3.5in", "25.78125 GBd").
 *
 * @param text number with an optional unit; the decimal mark is a point. Without a unit the number is taken in
 *   `assumedUnit`, or in the SI unit where none is given.
 * @returns the value in the dimension's SI unit and the unit it was written in, or why it could not be read.
 */
export function parseQuantity(text: string, dimension: Dimension, assumedUnit?: string): ParsedQuantity {
  const definition = definitionOf(dimension);
  // NFKC folds the micro sign and the ohm sign into the Greek letters they look like.
  const trimmed = text
    .normalize('NFKC')
    .trim()
    .replace(/\u2212/g, '-');
  if (trimmed === '') return refused(`Give ${definition.noun}, such as "${example(definition)}".`);
  if (/^[+-]?\d+,\d/.test(trimmed)) return refused('Write the decimal mark as a point, not a comma.');
  const match = quantityPattern.exec(trimmed);
  if (!match)
    return refused(`"${clip(text)}" is not ${definition.noun}; write it as "${example(definition)}".`);
  const written = match[2]!.trim();
  const unit = written === '' ? (assumedUnit ?? siUnit(definition)) : unitNamed(written, definition);
  if (unit === undefined) {
    return refused(
      `"${clip(written)}" is not a unit of ${definition.noun.replace(/^an? /, '')}; use ${unitList(definition)}.`,
    );
  }
  return scaled(match[1]!, unit, definition);
}

function scaled(digits: string, unit: string, definition: DimensionDefinition): ParsedQuantity {
  const factor = definition.units[unit] ?? 1;
  // A decimal factor is an integer and a power of ten: "12 mil" is 12 x 254 x 1e-7, exactly 304.8 um.
  const [mantissa, exponent] = factor.toExponential().split('e') as [string, string];
  const integer = Number(mantissa.replace('.', ''));
  const shift = Number(exponent) - (mantissa.length > 1 ? mantissa.length - 2 : 0);
  const exact = shifted(digits, integer, shift);
  const value = Number.isNaN(exact) ? Number(digits) * factor : exact;
  return Number.isFinite(value) ? { ok: true, value, unit } : refused('The number is too large.');
}

/** Digits x integer x 10^shift, rounded once; NaN where the digits are too many to be held as an integer. */
function shifted(digits: string, integer: number, shift: number): number {
  const [mantissa, written] = digits.toLowerCase().split('e') as [string, string | undefined];
  const places = (mantissa.split('.')[1] ?? '').length;
  const whole = Number(mantissa.replace('.', '')) * integer;
  if (!Number.isSafeInteger(whole)) return Number.NaN;
  return Number(`${whole}e${Number(written ?? 0) + shift - places}`);
}

function unitNamed(written: string, definition: DimensionDefinition): string | undefined {
  const names = Object.keys(definition.units);
  const exact = names.find((name) => name === written) ?? definition.spellings?.[written];
  if (exact !== undefined) return exact;
  const lower = written.toLowerCase();
  const spelled = definition.spellings?.[lower];
  if (spelled !== undefined) return spelled;
  const alike = names.filter((name) => name.toLowerCase() === lower);
  return definition.caseSensitive ? alike.find((name) => sameMilliOrMega(name, written)) : alike[0];
}

/** m and M are a factor of a thousand million apart: that letter's case is never guessed. */
function sameMilliOrMega(name: string, written: string): boolean {
  return name[0]!.toLowerCase() !== 'm' || name[0] === written[0];
}

/** Units of a dimension, the one offered first in front. */
export function unitsOf(dimension: Dimension): readonly string[] {
  return Object.keys(definitionOf(dimension).units);
}

/** The factor that takes a number in `unit` to SI; throws a RangeError for a unit the dimension does not have. */
export function factorOf(dimension: Dimension, unit: string): number {
  const factor = definitionOf(dimension).units[unit];
  if (factor === undefined) throw new RangeError(`${unit} is not a unit of ${dimension}`);
  return factor;
}

function siUnit(definition: DimensionDefinition): string {
  return Object.entries(definition.units).find(([, factor]) => factor === 1)?.[0] ?? definition.si;
}

function unitList(definition: DimensionDefinition): string {
  const names = Object.keys(definition.units).map((name) => (name === '' ? 'no unit' : name));
  return names.length > 1 ? `${names.slice(0, -1).join(', ')} or ${names[names.length - 1]}` : names[0]!;
}

function example(definition: DimensionDefinition): string {
  return `1 ${Object.keys(definition.units)[0]}`.trim();
}

function clip(text: string): string {
  return text.length > 40 ? `${text.slice(0, 39)}…` : text;
}

function refused(message: string): ParsedQuantity {
  return { ok: false, message };
}
