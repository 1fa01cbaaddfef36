import { FormControl, FormGroup, type ValidatorFn } from '@angular/forms';
import type * as z from 'zod';

/** A form group whose controls hold what `Initial` holds. */
export type FormFor<Initial> = FormGroup<ControlsFor<Initial>>;
type ControlsFor<Initial> = { [Key in keyof Initial]: FormControl<Initial[Key]> };

/** The schema's own sentence, as the error of one control; an empty field counts as left out where the schema allows that. */
export function validatorOf(schema: z.ZodType): ValidatorFn {
  const mayBeLeftOut = schema.safeParse(undefined).success;
  return (control) => {
    const value: unknown = control.value;
    if (mayBeLeftOut && isEmpty(value)) return null;
    const read = schema.safeParse(value);
    return read.success ? null : { schema: read.error.issues[0]?.message ?? 'This value is not accepted.' };
  };
}

/**
 * A form over the fields of a request's schema, so that the form and the server refuse the same things in the same words.
 *
 * @param initial the fields the form has, with what they hold at first; names are those of the schema.
 */
export function formOf<Initial extends Record<string, unknown>>(
  schema: z.ZodObject,
  initial: Initial,
): FormFor<Initial> {
  const controls = Object.entries(initial).map(([name, value]) => {
    const field = schema.shape[name] as z.ZodType | undefined;
    if (!field) throw new Error(`The schema has no field "${name}".`);
    return [name, new FormControl(value, { nonNullable: true, validators: validatorOf(field) })];
  });
  return new FormGroup(Object.fromEntries(controls) as ControlsFor<Initial>);
}

/** What the form sends: the schema's own output; fields left empty are left out where that is allowed. */
export function requestOf<Schema extends z.ZodObject>(schema: Schema, form: FormGroup): z.output<Schema> {
  const entries = Object.entries(form.getRawValue() as Record<string, unknown>).filter(([name, value]) => {
    const field = schema.shape[name] as z.ZodType | undefined;
    return !(isEmpty(value) && field?.safeParse(undefined).success);
  });
  return schema.parse(Object.fromEntries(entries));
}

function isEmpty(value: unknown): boolean {
  return value === '' || value === null;
}
