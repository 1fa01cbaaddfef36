import type * as z from 'zod';

/** One thing wrong with an input: where, what, and how to mend it. */
export interface FieldProblem {
  /** Path in the input, such as `elements[2].lengthM`; empty for the whole. */
  readonly path: string;
  readonly message: string;
  readonly mend?: string;
}

/** Writes a path as people and scripts read it: `elements[2].lengthM`. */
export function formatPath(path: readonly PropertyKey[]): string {
  return path.reduce<string>((text, part) => {
    if (typeof part === 'number') return `${text}[${part}]`;
    return text === '' ? String(part) : `${text}.${String(part)}`;
  }, '');
}

/** Every problem a schema found, each with its own path (a field that is not known is named itself). */
export function problemsOf(error: z.ZodError): FieldProblem[] {
  return error.issues.flatMap((issue) => problemsOfIssue(issue, []));
}

function problemsOfIssue(issue: z.core.$ZodIssue, base: readonly PropertyKey[]): FieldProblem[] {
  const path = [...base, ...issue.path];
  if (issue.code === 'unrecognized_keys') {
    return issue.keys.map((key) => ({
      path: formatPath([...path, key]),
      message: `"${key}" is not a field known here.`,
      mend: 'Remove it or correct its spelling.',
    }));
  }
  if (issue.code === 'invalid_union' && issue.errors.length > 0) {
    const nearest = issue.errors.reduce((best, errors) => (deepest(errors) > deepest(best) ? errors : best));
    return nearest.flatMap((inner) => problemsOfIssue(inner, path));
  }
  return [{ path: formatPath(path), message: issue.message }];
}

function deepest(issues: readonly z.core.$ZodIssue[]): number {
  return Math.max(0, ...issues.map((issue) => issue.path.length));
}
