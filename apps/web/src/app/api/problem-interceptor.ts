import type { HttpInterceptorFn } from '@angular/common/http';
import { inject } from '@angular/core';
import { catchError, defer, switchMap, throwError } from 'rxjs';
import { apiProblemOf } from './api-problem';
import { Availability } from './availability';
import { SignedOut } from './signed-out';

/** Turns every failure into an ApiProblem; reads wait for a server that is away; a 401 ends the session on screen. */
export const problemInterceptor: HttpInterceptorFn = (request, next) => {
  const availability = inject(Availability);
  const signedOut = inject(SignedOut);
  const attempt: ReturnType<typeof next> = defer(() => next(request)).pipe(
    catchError((error: unknown) => {
      const problem = apiProblemOf(error);
      if (problem.away) {
        const back = availability.lost();
        if (request.method === 'GET') return back.pipe(switchMap(() => attempt));
      }
      if (problem.status === 401 && !request.url.endsWith('/api/session')) signedOut.happened.next();
      return throwError(() => problem);
    }),
  );
  return request.url.startsWith('/api/') && request.url !== '/api/health' ? attempt : next(request);
};
