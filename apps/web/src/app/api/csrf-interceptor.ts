import { HttpBackend, HttpClient, type HttpInterceptorFn, type HttpRequest } from '@angular/common/http';
import { inject } from '@angular/core';
import type { Session } from '@tollgate/contracts';
import { catchError, switchMap, throwError } from 'rxjs';
import { apiProblemOf } from './api-problem';
import { CsrfToken } from './csrf-token';

const safe = new Set(['GET', 'HEAD', 'OPTIONS']);

/**
 * Unsafe requests to our API carry the session's token. Where another tab has renewed the session of the same person, the
 * new token is fetched and the request sent once more.
 */
export const csrfInterceptor: HttpInterceptorFn = (request, next) => {
  const csrf = inject(CsrfToken);
  const backend = inject(HttpBackend);
  if (safe.has(request.method) || !request.url.startsWith('/api/')) return next(request);
  return next(signed(request, csrf.value)).pipe(
    catchError((error: unknown) => {
      if (apiProblemOf(error).problem.id !== 'untrusted-origin') return throwError(() => error);
      return new HttpClient(backend).get<Session>('/api/session').pipe(
        switchMap((session) => {
          const stranger = (session.person?.id ?? '') !== csrf.personId;
          if (stranger || session.csrfToken === csrf.value) return throwError(() => error);
          csrf.value = session.csrfToken;
          return next(signed(request, csrf.value));
        }),
      );
    }),
  );
};

function signed(request: HttpRequest<unknown>, token: string): HttpRequest<unknown> {
  return token === '' ? request : request.clone({ setHeaders: { 'X-Csrf-Token': token } });
}
