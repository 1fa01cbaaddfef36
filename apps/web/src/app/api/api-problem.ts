import { HttpErrorResponse } from '@angular/common/http';
import type { FieldProblem, Problem } from '@tollgate/contracts';

/** What a request that failed is told as: the server's problem document, or one of our own where no answer came. */
export class ApiProblem extends Error {
  constructor(readonly problem: Problem) {
    super(problem.detail || problem.title);
  }

  get status(): number {
    return this.problem.status;
  }

  get fields(): readonly FieldProblem[] {
    return this.problem.fields;
  }

  /** The server, or the database behind it, did not answer. */
  get away(): boolean {
    return this.status === 0 || this.status === 503;
  }
}

/** Reads any failure of HttpClient as a problem. */
export function apiProblemOf(error: unknown): ApiProblem {
  if (error instanceof ApiProblem) return error;
  if (error instanceof HttpErrorResponse) return new ApiProblem(problemOf(error));
  return new ApiProblem(
    own('unexpected', 0, 'Something went wrong', error instanceof Error ? error.message : String(error)),
  );
}

function problemOf(error: HttpErrorResponse): Problem {
  const body = bodyOf(error);
  if (body)
    return { ...own(body.id, error.status, body.title, body.detail), ...body, fields: body.fields ?? [] };
  if (error.status === 0 || error.status === 502 || error.status === 504) {
    return own('away', 0, 'The server does not answer', 'Nothing was saved. Try again in a moment.');
  }
  return own('unexpected', error.status, 'Something went wrong', `The server answered ${error.status}.`);
}

function bodyOf(error: HttpErrorResponse): Problem | undefined {
  const body: unknown = typeof error.error === 'string' ? parsed(error.error) : error.error;
  return isProblem(body) ? body : undefined;
}

function isProblem(value: unknown): value is Problem {
  return typeof value === 'object' && value !== null && 'title' in value && 'status' in value;
}

function parsed(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch (error) {
    if (error instanceof SyntaxError) return undefined;
    throw error;
  }
}

function own(id: string, status: number, title: string, detail: string): Problem {
  return { type: 'about:blank', id, title, status, detail, instance: '', fields: [] };
}
