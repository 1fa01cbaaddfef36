import type { HttpInterceptorFn } from '@angular/common/http';
import { inject } from '@angular/core';
import { CsrfToken } from './csrf-token';

const safe = new Set(['GET', 'HEAD', 'OPTIONS']);

/** Unsafe requests to our API carry the session's token. */
export const csrfInterceptor: HttpInterceptorFn = (request, next) => {
  const token = inject(CsrfToken).value;
  if (safe.has(request.method) || !request.url.startsWith('/api/') || token === '') return next(request);
  return next(request.clone({ setHeaders: { 'X-Csrf-Token': token } }));
};
