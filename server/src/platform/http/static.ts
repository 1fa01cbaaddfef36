import { existsSync } from 'node:fs';
import { join } from 'node:path';
import compression from 'compression';
import express, { type Express } from 'express';

/** Serves the built client; any address that is no file is a page of the client. */
export function serveClient(app: Express, directory: string): void {
  const index = join(directory, 'index.html');
  // Of the client only: a check's reply must not wait for a compressor.
  app.use(compression());
  app.use(
    express.static(directory, {
      index: false,
      setHeaders: (response, path) => {
        // Built names carry a hash of their content; everything else is asked for again.
        const hashed = /-[A-Z0-9]{8}\.(js|css|woff2?)$/.test(path);
        response.setHeader('Cache-Control', hashed ? 'public, max-age=31536000, immutable' : 'no-cache');
      },
    }),
  );
  app.get('/{*path}', (_request, response, next) => {
    if (!existsSync(index)) return next();
    response.setHeader('Cache-Control', 'no-cache');
    response.sendFile(index);
  });
}
