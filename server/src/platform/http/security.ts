import type { NextFunction, Request, RequestHandler, Response } from 'express';
import type { Config } from '../config/config';
import { problems } from './problem';

const contentSecurityPolicy = [
  "default-src 'self'",
  "style-src 'self' 'unsafe-inline'",
  "img-src 'self' data: blob:",
  "object-src 'none'",
  "base-uri 'none'",
  "frame-ancestors 'none'",
  "form-action 'self'",
].join('; ');

/** Headers of every reply. */
export function securityHeaders(config: Config): RequestHandler {
  const https = config.url.startsWith('https:');
  return (_request, response, next) => {
    response.setHeader('Content-Security-Policy', contentSecurityPolicy);
    response.setHeader('X-Content-Type-Options', 'nosniff');
    response.setHeader('Referrer-Policy', 'same-origin');
    response.setHeader('Cross-Origin-Opener-Policy', 'same-origin');
    response.setHeader('Cross-Origin-Resource-Policy', 'same-origin');
    if (https) response.setHeader('Strict-Transport-Security', 'max-age=31536000');
    next();
  };
}

/** Refuses a Host outside the configured address, so that no foreign name can be rebound to this server. */
export function hostCheck(config: Config, boundPort: () => number): RequestHandler {
  const configured = new URL(config.url).host;
  return (request, _response, next) => {
    const host = request.headers.host ?? '';
    const port = boundPort();
    const ours = [configured, `127.0.0.1:${port}`, `localhost:${port}`, `[::1]:${port}`];
    next(ours.includes(host) ? undefined : problems.wrongHost());
  };
}

const safeMethods = new Set(['GET', 'HEAD', 'OPTIONS']);

/** Unsafe methods need proof of the same origin and the session's synchroniser token. */
export function forgeryCheck(request: Request, _response: Response, next: NextFunction): void {
  if (safeMethods.has(request.method)) return next();
  if (!sameOrigin(request)) return next(problems.untrustedOrigin());
  const expected = request.session.csrfToken;
  if (!expected || request.headers['x-csrf-token'] !== expected) return next(problems.untrustedOrigin());
  next();
}

function sameOrigin(request: Request): boolean {
  const site = request.headers['sec-fetch-site'];
  if (site !== undefined) return site === 'same-origin';
  const origin = request.headers.origin;
  if (origin === undefined || !URL.canParse(origin)) return false;
  return new URL(origin).host === request.headers.host;
}
