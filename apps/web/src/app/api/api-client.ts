import { HttpClient, type HttpHeaders, type HttpResponse } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { Observable } from 'rxjs';

export type Query = Readonly<Record<string, string | number | boolean>>;

/**
 * Requests to our own API. Paths are given without `/api`; errors arrive as ApiProblem (problem-interceptor).
 * A read that meets a server which is away waits and is sent again; a write fails at once, so that its form keeps the draft.
 */
@Injectable({ providedIn: 'root' })
export class ApiClient {
  private readonly http = inject(HttpClient);

  get<Reply>(path: string, query?: Query): Observable<Reply> {
    return this.http.get<Reply>(address(path), { params: query });
  }

  /** `version`, where it is given, goes as If-Match. */
  post<Reply>(path: string, body: unknown = {}, version?: number): Observable<Reply> {
    return this.http.post<Reply>(address(path), body, { headers: ifMatch(version) });
  }

  patch<Reply>(path: string, body: unknown): Observable<Reply> {
    return this.http.patch<Reply>(address(path), body);
  }

  /** `version` goes as If-Match: a 412 problem carries what is stored now as `current`. */
  put<Reply>(path: string, body: unknown, version?: number): Observable<Reply> {
    return this.http.put<Reply>(address(path), body, { headers: ifMatch(version) });
  }

  delete<Reply = void>(path: string): Observable<Reply> {
    return this.http.delete<Reply>(address(path));
  }

  /** A file as the body itself; the media type is said by the caller. */
  upload<Reply>(path: string, file: Blob, mediaType: string, query?: Query): Observable<Reply> {
    return this.http.post<Reply>(address(path), file, {
      params: query,
      headers: { 'Content-Type': mediaType },
    });
  }

  /** A file to keep: the blob, and headers with its name. */
  download(path: string): Observable<HttpResponse<Blob>> {
    return this.http.get(address(path), { observe: 'response', responseType: 'blob' });
  }
}

/** The name a download carries in Content-Disposition. */
export function downloadName(headers: HttpHeaders, otherwise: string): string {
  const disposition = headers.get('Content-Disposition') ?? '';
  const encoded = /filename\*=UTF-8''([^;]+)/i.exec(disposition)?.[1];
  if (encoded) return decodeURIComponent(encoded);
  return /filename="([^"]+)"/i.exec(disposition)?.[1] ?? otherwise;
}

function ifMatch(version: number | undefined): Record<string, string> {
  return version === undefined ? {} : { 'If-Match': `"${version}"` };
}

function address(path: string): string {
  return `/api${path}`;
}
