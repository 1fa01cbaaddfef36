import { readQuantity, type QuantityField } from '@tollgate/contracts';
import { formatQuantity, parseQuantity } from '@tollgate/quantities';

export type Entry =
  | { readonly ok: true; readonly value: number | undefined }
  | { readonly ok: false; readonly message: string };

/**
 * Reads what a person typed into a quantity's field. A bare number is taken in the unit the field showed before, so that
 * typing over "12 mil" with "14" stays in mil.
 */
export function readEntry(text: string, field: QuantityField, optional: boolean, unit: string): Entry {
  if (text.trim() === '' && optional) return { ok: true, value: undefined };
  const parsed = parseQuantity(text, field.dimension, unit);
  if (!parsed.ok) return { ok: false, message: parsed.message };
  const read = readQuantity(parsed.value, field);
  return typeof read === 'number'
    ? { ok: true, value: read }
    : { ok: false, message: bounded(read.message, field) };
}

/** A bound is said in the unit of the field and not in SI. */
function bounded(message: string, field: QuantityField): string {
  return message.replace(/(than|least|most) (-?[\d.e+-]+)\.$/, (_, word: string, number: string) => {
    return `${word} ${formatQuantity(Number(number), field.dimension)}.`;
  });
}

/** The unit written behind a number: "mil" of "12 mil". */
export function unitIn(text: string, field: QuantityField): string | undefined {
  const parsed = parseQuantity(text, field.dimension, '\u0000');
  return parsed.ok && parsed.unit !== '\u0000' ? parsed.unit : undefined;
}
