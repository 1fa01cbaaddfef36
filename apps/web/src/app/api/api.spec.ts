import { provideHttpClient, withInterceptors } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { ApiClient } from './api-client';
import { ApiProblem } from './api-problem';
import { Availability } from './availability';
import { csrfInterceptor } from './csrf-interceptor';
import { CsrfToken } from './csrf-token';
import { problemInterceptor } from './problem-interceptor';
import { SignedOut } from './signed-out';

const refused = {
  type: 'x',
  id: 'unprocessable',
  title: 'Refused',
  status: 422,
  detail: 'See the fields.',
  instance: 'r1',
};
const stale = { ...refused, id: 'untrusted-origin', status: 403 };

describe('requests to the server', () => {
  let http: HttpTestingController;
  let api: ApiClient;

  beforeEach(() => {
    jest.useFakeTimers();
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(withInterceptors([csrfInterceptor, problemInterceptor])),
        provideHttpClientTesting(),
      ],
    });
    http = TestBed.inject(HttpTestingController);
    api = TestBed.inject(ApiClient);
    TestBed.inject(CsrfToken).value = 'token-1';
    TestBed.inject(CsrfToken).personId = 'noor';
  });

  afterEach(() => {
    http.verify();
    jest.useRealTimers();
  });

  it('carry the token when they change something, and only then', () => {
    api.post('/boards', {}).subscribe();
    api.get('/boards').subscribe();
    const [post, get] = http.match(() => true);
    expect(post!.request.headers.get('X-Csrf-Token')).toBe('token-1');
    expect(get!.request.headers.has('X-Csrf-Token')).toBe(false);
  });

  it('name the version they change', () => {
    api.put('/channels/1', {}, 7).subscribe();
    expect(http.expectOne('/api/channels/1').request.headers.get('If-Match')).toBe('"7"');
  });

  it('fail with the problem document, its fields never missing', () => {
    let failure: unknown;
    api.post('/boards', {}).subscribe({ error: (error: unknown) => (failure = error) });
    http.expectOne('/api/boards').flush(refused, { status: 422, statusText: 'Unprocessable' });
    expect(failure).toBeInstanceOf(ApiProblem);
    expect((failure as ApiProblem).fields).toEqual([]);
    expect((failure as ApiProblem).message).toBe('See the fields.');
  });

  it('are sent again once the server is back, when they only read', () => {
    const got: unknown[] = [];
    api.get('/boards').subscribe((reply) => got.push(reply));
    http.expectOne('/api/boards').flush('', { status: 503, statusText: 'Away' });
    expect(TestBed.inject(Availability).away()).toBe(true);
    jest.advanceTimersByTime(3000);
    http.expectOne('/api/health').flush({ status: 'degraded' });
    expect(TestBed.inject(Availability).away()).toBe(true);
    jest.advanceTimersByTime(3000);
    http.expectOne('/api/health').flush({ status: 'ok' });
    http.expectOne('/api/boards').flush({ items: [] });
    expect(got).toEqual([{ items: [] }]);
    expect(TestBed.inject(Availability).away()).toBe(false);
  });

  it('fail at once when they would change something and nobody answers', () => {
    let failure: ApiProblem | undefined;
    api.post('/boards', {}).subscribe({ error: (error: ApiProblem) => (failure = error) });
    http.expectOne('/api/boards').error(new ProgressEvent('error'));
    expect(failure?.away).toBe(true);
    expect(failure?.message).toContain('Nothing was saved');
  });

  it('tell when the session is no longer known', () => {
    let times = 0;
    TestBed.inject(SignedOut).happened.subscribe(() => times++);
    api.get('/boards').subscribe({ error: () => undefined });
    http.expectOne('/api/boards').flush({ ...refused, status: 401 }, { status: 401, statusText: 'Who' });
    expect(times).toBe(1);
  });

  it('take a refused sign-in for no end of the session', () => {
    let times = 0;
    TestBed.inject(SignedOut).happened.subscribe(() => times++);
    api.post('/session', {}).subscribe({ error: () => undefined });
    http.expectOne('/api/session').flush({ ...refused, status: 401 }, { status: 401, statusText: 'Who' });
    expect(times).toBe(0);
  });

  it('go out once more with the token that another tab renewed', () => {
    let saved = false;
    api.post('/boards', {}).subscribe(() => (saved = true));
    http.expectOne('/api/boards').flush(stale, { status: 403, statusText: 'No' });
    http.expectOne('/api/session').flush({ csrfToken: 'token-2', person: { id: 'noor' } });
    const again = http.expectOne('/api/boards');
    expect(again.request.headers.get('X-Csrf-Token')).toBe('token-2');
    again.flush({});
    expect(saved).toBe(true);
  });

  it('never go out in the name of somebody else who signed in meanwhile', () => {
    let failure: ApiProblem | undefined;
    api.post('/boards', {}).subscribe({ error: (error: ApiProblem) => (failure = error) });
    http.expectOne('/api/boards').flush(stale, { status: 403, statusText: 'No' });
    http.expectOne('/api/session').flush({ csrfToken: 'token-2', person: { id: 'tamsin' } });
    expect(failure?.status).toBe(403);
  });
});
