import { request, type ClientRequest } from 'node:http';
import type { TestClient } from './client';

/** An upload whose head and body are written by hand. */
export function rawUpload(
  origin: string,
  client: TestClient,
  path: string,
  length: string,
  send: (request: ClientRequest) => void,
): Promise<{ status: number; reply: string }> {
  return new Promise((resolve, reject) => {
    const headers = {
      cookie: client.cookieHeader,
      origin,
      'x-csrf-token': client.csrfToken,
      'content-type': 'application/octet-stream',
      'content-length': length,
    };
    const outgoing = request(`${origin}${path}`, { method: 'POST', headers }, (response) => {
      let reply = '';
      response.on('data', (part: Buffer) => (reply += part.toString()));
      response.on('end', () => {
        outgoing.destroy();
        resolve({ status: response.statusCode ?? 0, reply });
      });
    });
    outgoing.on('error', reject);
    send(outgoing);
  });
}
