import { parseQuantity, type Dimension } from '@tollgate/quantities';
import * as z from 'zod';

/** What a form needs to know of a quantity; the schema that carries it also validates it. */
export interface QuantityField {
  readonly dimension: Dimension;
  /** As a form and an error name it: "Characteristic impedance". */
  readonly label: string;
  /** Unit offered first in a form. */
  readonly unit: string;
  readonly min?: number;
  readonly max?: number;
  /** The value must be larger than this. */
  readonly above?: number;
  readonly hint?: string;
}

const fields = new WeakMap<z.ZodType, QuantityField>();

/**
 * A quantity of the channel file: a number in SI or a string with a unit; the result is always the SI number.
 * One custom schema with its own message, because a union could only say "invalid input".
 */
export function quantity(field: QuantityField): z.ZodType<number> {
  const schema = z
    .unknown()
    .meta({ type: ['number', 'string'], description: describe(field) })
    .transform((value, context): number => {
      const read = readQuantity(value, field);
      if (typeof read === 'number') return read;
      context.addIssue({
        code: 'custom',
        message: read.message,
        input: value,
        params: { mend: mendOf(field) },
      });
      return z.NEVER;
    });
  fields.set(schema, field);
  return schema;
}

/** The number in SI, or why the value is refused. Shared by the schema and by forms. */
export function readQuantity(value: unknown, field: QuantityField): number | { message: string } {
  if (typeof value === 'number') return bounded(value, field);
  if (typeof value !== 'string') {
    return {
      message:
        value === undefined
          ? `${field.label} is missing.`
          : `${field.label} must be a number or text such as "1 ${field.unit}".`,
    };
  }
  const parsed = parseQuantity(value, field.dimension);
  return parsed.ok ? bounded(parsed.value, field) : { message: parsed.message };
}

function bounded(value: number, field: QuantityField): number | { message: string } {
  if (!Number.isFinite(value)) return { message: `${field.label} must be a finite number.` };
  if (field.above !== undefined && !(value > field.above)) {
    return { message: `${field.label} must be greater than ${field.above}.` };
  }
  if (field.min !== undefined && value < field.min)
    return { message: `${field.label} must be at least ${field.min}.` };
  if (field.max !== undefined && value > field.max)
    return { message: `${field.label} must be at most ${field.max}.` };
  return value;
}

/** The quantity behind a schema, seen through optional and default; undefined where the schema is something else. */
export function quantityField(
  schema: z.ZodType,
): (QuantityField & { optional: boolean; default?: number }) | undefined {
  const direct = fields.get(schema);
  if (direct) return { ...direct, optional: false };
  if (schema instanceof z.ZodOptional) {
    const inner = quantityField(schema.unwrap() as z.ZodType);
    return inner && { ...inner, optional: true };
  }
  if (schema instanceof z.ZodDefault) {
    const inner = quantityField(schema.unwrap() as z.ZodType);
    return inner && { ...inner, optional: true, default: schema.def.defaultValue as number };
  }
  return undefined;
}

function mendOf(field: QuantityField): string {
  const bounds = boundsOf(field);
  const limits = bounds.length ? `, ${bounds.join(' and ')}` : '';
  return `Give a finite number in SI, or text such as "${`1 ${field.unit}`.trim()}"${limits}.`;
}

function boundsOf(field: QuantityField): string[] {
  return [
    field.above === undefined ? '' : `more than ${field.above}`,
    field.min === undefined ? '' : `at least ${field.min}`,
    field.max === undefined ? '' : `at most ${field.max}`,
  ].filter(Boolean);
}

function describe(field: QuantityField): string {
  const bounds = boundsOf(field);
  return `${field.label}; a number in SI or text with a unit such as "1 ${field.unit}"${bounds.length ? `; ${bounds.join(', ')}` : ''}`;
}
