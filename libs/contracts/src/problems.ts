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

/**
 * Every problem a schema found, each with its own path (a field that is not known is named itself) and how to mend it.
 * @param input what was read: a problem then tells the number or word that stands at its path. Left out for what is secret.
 */
export function problemsOf(error: z.ZodError, input?: unknown): FieldProblem[] {
  return error.issues.flatMap((issue) => problemsOfIssue(issue, [], input));
}

function problemsOfIssue(
  issue: z.core.$ZodIssue,
  base: readonly PropertyKey[],
  input: unknown,
): FieldProblem[] {
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
    return nearest.flatMap((inner) => problemsOfIssue(inner, path, input));
  }
  const mend = ownMend(issue) ?? (input === undefined ? undefined : mendOf(issue));
  const message = withValue(issue.message, valueAt(input, path));
  return [{ path: formatPath(path), message, ...(mend === undefined ? {} : { mend }) }];
}

function deepest(issues: readonly z.core.$ZodIssue[]): number {
  return Math.max(0, ...issues.map((issue) => issue.path.length));
}

function valueAt(input: unknown, path: readonly PropertyKey[]): unknown {
  return path.reduce<unknown>(
    (value, key) =>
      typeof value === 'object' && value !== null ? (value as Record<PropertyKey, unknown>)[key] : undefined,
    input,
  );
}

const longestShown = 40;

function isScalar(value: unknown): value is string | number | boolean | null {
  return value === null || ['string', 'number', 'boolean'].includes(typeof value);
}

/** "Length must be at least 0." of -1: "Length must be at least 0; -1 is given." A list or an object is not told. */
function withValue(message: string, value: unknown): string {
  if (!isScalar(value)) return message;
  const text = typeof value === 'string';
  const shown = text ? JSON.stringify(value) : String(value);
  // The message may have quoted a word already.
  if (shown.length > longestShown || (text && message.includes(shown))) return message;
  return `${message.replace(/\.$/, '')}; ${shown} is given.`;
}

/** As the schema itself words it: `params.mend` of a custom check. */
function ownMend(issue: z.core.$ZodIssue): string | undefined {
  const mend: unknown = issue.code === 'custom' ? issue.params?.['mend'] : undefined;
  return typeof mend === 'string' ? mend : undefined;
}

/** By the kind of problem, where the message says what is asked for. */
function mendOf(issue: z.core.$ZodIssue): string {
  switch (issue.code) {
    case 'too_small':
      return sizeMends[issue.origin]?.more ?? 'Raise it.';
    case 'too_big':
      return sizeMends[issue.origin]?.less ?? 'Lower it.';
    case 'invalid_value':
      return 'Choose one of what is named.';
    case 'invalid_type':
      return 'Give a value of the kind that is asked for.';
    default:
      return 'Write it as the message says.';
  }
}

const sizeMends: Readonly<Record<string, { more: string; less: string }>> = {
  string: { more: 'Write it out.', less: 'Shorten it.' },
  array: { more: 'Add entries.', less: 'Remove entries.' },
};
