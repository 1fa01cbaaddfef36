/* eslint-disable @typescript-eslint/no-explicit-any -- a spec looks into replies of any shape; what they are is what it tests */
/** A caller of the API over real HTTP: keeps its cookie, carries the session's token, and tells what came back. */
export interface Reply<Body = unknown> {
  readonly status: number;
  readonly headers: Headers;
  readonly body: Body;
  readonly text: string;
}

export type Sent = string | Uint8Array | object;

export class TestClient {
  private cookie = '';

  private token = '';

  constructor(readonly origin: string) {}

  get csrfToken(): string {
    return this.token;
  }

  get cookieHeader(): string {
    return this.cookie;
  }

  get<Body = any>(path: string, headers: Record<string, string> = {}): Promise<Reply<Body>> {
    return this.send<Body>('GET', path, undefined, headers);
  }
  post<Body = any>(path: string, body?: Sent, headers: Record<string, string> = {}): Promise<Reply<Body>> {
    return this.send<Body>('POST', path, body, headers);
  }
  put<Body = any>(path: string, body?: Sent, headers: Record<string, string> = {}): Promise<Reply<Body>> {
    return this.send<Body>('PUT', path, body, headers);
  }
  patch<Body = any>(path: string, body?: Sent): Promise<Reply<Body>> {
    return this.send<Body>('PATCH', path, body);
  }
  delete<Body = any>(path: string): Promise<Reply<Body>> {
    return this.send<Body>('DELETE', path);
  }

  /** Reads the session, and with it the token that unsafe requests carry. */
  async readSession(): Promise<Reply<any>> {
    const reply = await this.get('/api/session');
    this.token = (reply.body as { csrfToken: string }).csrfToken;
    return reply;
  }

  async signIn(email: string, password: string): Promise<Reply<any>> {
    await this.readSession();
    const reply = await this.post('/api/session', { email, password });
    if (reply.status === 200) this.token = reply.body.csrfToken;
    return reply;
  }

  async send<Body = any>(
    method: string,
    path: string,
    body?: Sent,
    extra: Record<string, string> = {},
  ): Promise<Reply<Body>> {
    const raw = typeof body === 'string' || body instanceof Uint8Array;
    const headers: Record<string, string> = {
      origin: this.origin,
      ...(this.cookie ? { cookie: this.cookie } : {}),
      ...(this.token ? { 'x-csrf-token': this.token } : {}),
      ...(body === undefined
        ? {}
        : { 'content-type': raw ? 'application/octet-stream' : 'application/json' }),
      ...extra,
    };
    const content =
      body === undefined
        ? undefined
        : raw
          ? (body as string | Uint8Array<ArrayBuffer>)
          : JSON.stringify(body);
    const response = await fetch(`${this.origin}${path}`, {
      method,
      headers,
      body: content,
      redirect: 'manual',
    });
    for (const cookie of response.headers.getSetCookie()) this.cookie = cookie.split(';')[0]!;
    const text = await response.text();
    const json = /json/.test(response.headers.get('content-type') ?? '');
    return {
      status: response.status,
      headers: response.headers,
      text,
      body: (json && text ? JSON.parse(text) : undefined) as Body,
    };
  }
}
