import type { AbstractControl } from '@angular/forms';
import type { FieldProblem } from '@tollgate/contracts';

/**
 * Puts each problem the server named onto the control of the same path (`elements[2].lengthM`), where it stays until the
 * value changes.
 *
 * @returns the problems for which the form has no control; they belong above the form.
 */
export function landOnFields(form: AbstractControl, fields: readonly FieldProblem[]): FieldProblem[] {
  return fields.filter((field) => {
    const control = field.path === '' ? null : form.get(pathOf(field.path));
    if (!control) return true;
    control.setErrors({ ...control.errors, server: sentence(field) });
    control.markAsTouched();
    return false;
  });
}

/** What is wrong and how to mend it, in one line. */
export function sentence(field: FieldProblem): string {
  return field.mend ? `${field.message} ${field.mend}` : field.message;
}

/** The sentence a control shows: what the server said first, else what its validators say. */
export function messageOf(control: AbstractControl): string {
  const errors = Object.entries(control.errors ?? {});
  const [, first] = errors.find(([kind]) => kind === 'server') ?? errors[0] ?? [];
  return typeof first === 'string' ? first : errors.length ? 'This value is not accepted.' : '';
}

function pathOf(path: string): (string | number)[] {
  return [...path.matchAll(/\[(\d+)\]|[^.[\]]+/g)].map(([part, index]) =>
    index === undefined ? part : Number(index),
  );
}
