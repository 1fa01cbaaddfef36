import { formatQuantity, type Dimension } from '@tollgate/quantities';

const units: readonly (readonly [suffix: string, dimension: Dimension])[] = [
  ['DbPerM', 'lossPerLength'],
  ['OhmPerM', 'resistancePerLength'],
  ['HPerM', 'inductancePerLength'],
  ['SPerM', 'conductancePerLength'],
  ['FPerM', 'capacitancePerLength'],
  ['Ohm', 'resistance'],
  ['Bd', 'symbolRate'],
  ['Db', 'loss'],
  ['Hz', 'frequency'],
  ['Deg', 'angle'],
  ['H', 'inductance'],
  ['F', 'capacitance'],
  ['M', 'length'],
  ['S', 'time'],
];

/** The dimension a field's name ends in: `lengthM` is a length. */
export function dimensionOf(name: string): Dimension | undefined {
  return units.find(([suffix]) => name.endsWith(suffix))?.[1];
}

/** `lossSqrtDbPerM` as "loss sqrt". */
export function fieldWords(name: string): string {
  if (name === '') return 'all of it';
  const suffix = units.find(([ending]) => name.endsWith(ending) && name.length > ending.length)?.[0] ?? '';
  return name
    .slice(0, name.length - suffix.length)
    .replace(/([A-Z0-9]+)/g, ' $1')
    .toLowerCase()
    .trim();
}

/** A value of a field as a person reads it. */
export function valueWords(name: string, value: unknown): string {
  if (value === undefined || value === null) return name === '' ? 'removed' : 'left out';
  const dimension = dimensionOf(name);
  if (typeof value === 'number') return dimension ? formatQuantity(value, dimension) : String(value);
  if (typeof value === 'string') return value;
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  if (name === '') return 'kept, as edited';
  const text = JSON.stringify(value);
  return text.length > 120 ? `${text.slice(0, 119)}…` : text;
}
