import { STATUS_CODES } from 'node:http';
import type { FieldProblem } from '@tollgate/contracts';

/** An error that a caller is told as problem+json. Thrown by services and routes; never built by hand. */
export class HttpProblem extends Error {
  constructor(
    readonly status: number,
    /** Stable name a client can act on. */
    readonly id: string,
    readonly detail: string,
    readonly fields: readonly FieldProblem[] = [],
    readonly extra: { readonly headers?: Readonly<Record<string, string>>; readonly current?: unknown } = {},
  ) {
    super(detail);
  }

  get title(): string {
    return STATUS_CODES[this.status] ?? 'Error';
  }
}

export const problems = {
  invalid: (
    fields: readonly FieldProblem[],
    detail = 'Something in the request is not right; see the fields.',
  ) => new HttpProblem(400, 'invalid-request', detail, fields),
  signedOut: () => new HttpProblem(401, 'signed-out', 'Sign in first.'),
  wrongCredentials: () =>
    new HttpProblem(401, 'wrong-credentials', 'Mail address and password do not go together.'),
  forbidden: (detail = 'Your roles do not allow this.') => new HttpProblem(403, 'forbidden', detail),
  untrustedOrigin: () =>
    new HttpProblem(
      403,
      'untrusted-origin',
      'The request did not come from a page of this server; load the page again.',
    ),
  notFound: (thing = 'This') =>
    new HttpProblem(404, 'not-found', `${thing} does not exist, or is not yours to see.`),
  conflict: (detail: string, fields: readonly FieldProblem[] = []) =>
    new HttpProblem(409, 'conflict', detail, fields),
  superseded: () => new HttpProblem(409, 'superseded', 'A newer check of this channel took its place.'),
  gone: (detail: string) => new HttpProblem(410, 'gone', detail),
  changedMeanwhile: (current: unknown) =>
    new HttpProblem(
      412,
      'changed-meanwhile',
      'Someone saved this in the meantime; what is stored now comes with this reply.',
      [],
      { current },
    ),
  tooLarge: (detail: string) => new HttpProblem(413, 'too-large', detail),
  wrongType: (detail: string) => new HttpProblem(415, 'wrong-type', detail),
  unprocessable: (
    fields: readonly FieldProblem[],
    detail = 'The content cannot be used as it stands; see the fields.',
  ) => new HttpProblem(422, 'unprocessable', detail, fields),
  versionRequired: () =>
    new HttpProblem(428, 'version-required', 'Send If-Match with the version you changed, such as "3".'),
  tooMany: (seconds: number) =>
    new HttpProblem(
      429,
      'too-many-attempts',
      `Too many attempts; try again in ${Math.max(1, Math.ceil(seconds / 60))} minutes.`,
      [],
      {
        headers: { 'Retry-After': String(Math.max(1, Math.ceil(seconds))) },
      },
    ),
  wrongHost: () => new HttpProblem(421, 'wrong-host', 'This server does not answer under that host name.'),
  away: () =>
    new HttpProblem(
      503,
      'database-away',
      'The database is away; what was saved is safe. Try again shortly.',
      [],
      {
        headers: { 'Retry-After': '2' },
      },
    ),
  unexpected: () =>
    new HttpProblem(
      500,
      'unexpected',
      'Something went wrong on the server. Nothing was written; quote the instance when you report it.',
    ),
} as const;
