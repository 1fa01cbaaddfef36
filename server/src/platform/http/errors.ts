import { randomUUID } from 'node:crypto';
import type { NextFunction, Request, Response } from 'express';
import { api } from '@tollgate/contracts';
import { isDatabaseAway } from '../database';
import { errorFacts, log } from '../log';
import { HttpProblem, problems } from './problem';

/** Nothing under /api answered: say so as every other error. */
export function unknownRoute(_request: Request, _response: Response, next: NextFunction): void {
  next(problems.notFound('This address'));
}

/** The last handler: every error leaves as problem+json, and what nobody expected is logged under the id that is shown. */
export function errorHandler(error: unknown, request: Request, response: Response, next: NextFunction): void {
  const instance = randomUUID();
  const told = asProblem(error);
  if (told.status >= 500) {
    log('error', told.id, { instance, method: request.method, path: request.path, ...errorFacts(error) });
  }
  // A reply that has begun can only be cut off.
  if (response.headersSent) return next(error);
  for (const [name, value] of Object.entries(told.extra.headers ?? {})) response.setHeader(name, value);
  response
    .status(told.status)
    .type(api.problemMediaType)
    .send(
      JSON.stringify({
        type: 'about:blank',
        id: told.id,
        title: told.title,
        status: told.status,
        detail: told.detail,
        instance,
        fields: told.fields,
        ...(told.extra.current === undefined ? {} : { current: told.extra.current }),
      }),
    );
}

function asProblem(error: unknown): HttpProblem {
  if (error instanceof HttpProblem) return error;
  if (isDatabaseAway(error)) return problems.away();
  return fromBodyReader(error) ?? problems.unexpected();
}

/** Errors of express' own body reader carry a type. */
function fromBodyReader(error: unknown): HttpProblem | undefined {
  const { type, message } = (error ?? {}) as { type?: string; message?: string };
  if (type === 'entity.too.large') return problems.tooLarge('The request is larger than 2 MB.');
  if (type === 'entity.parse.failed') {
    return problems.invalid([{ path: '', message: `The body is not JSON: ${message}.` }]);
  }
  if (type === 'encoding.unsupported' || type === 'charset.unsupported')
    return problems.wrongType('Send JSON in UTF-8.');
  if (type === 'request.aborted')
    return new HttpProblem(400, 'aborted', 'The request ended before it was whole.');
  return error instanceof URIError
    ? problems.invalid([{ path: '', message: 'The address holds a broken escape.' }])
    : undefined;
}
