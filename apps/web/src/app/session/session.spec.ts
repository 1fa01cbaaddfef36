import { provideHttpClient, withInterceptors } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { ChangeDetectionStrategy, Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter, Router } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import type { Role, Session } from '@tollgate/contracts';
import { ApiClient } from '../api/api-client';
import { problemInterceptor } from '../api/problem-interceptor';
import { administratorsOnly, signedInOnly, strangersOnly } from './session-guards';
import { draftPrefix, SessionStore } from './session-store';

@Component({ selector: 'tg-blank', template: '', changeDetection: ChangeDetectionStrategy.OnPush })
class Blank {}

function sessionOf(...roles: Role[]): Session {
  const person = roles.length ? { id: 'n', name: 'Noor', email: 'noor@example.com', roles } : null;
  const can = { createBoards: false, managePeople: false };
  return { csrfToken: 't', person, demonstration: false, unclaimed: false, can };
}

describe('the session', () => {
  let http: HttpTestingController;

  beforeEach(() => {
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(withInterceptors([problemInterceptor])),
        provideHttpClientTesting(),
        provideRouter([
          { path: 'sign-in', component: Blank, canActivate: [strangersOnly] },
          { path: 'boards', component: Blank, canActivate: [signedInOnly] },
          { path: 'people', component: Blank, canActivate: [signedInOnly, administratorsOnly] },
          { path: 'not-found', component: Blank },
        ]),
      ],
    });
    http = TestBed.inject(HttpTestingController);
    TestBed.inject(SessionStore);
  });

  const answer = (session: Session) => http.expectOne('/api/session').flush(session);

  async function goTo(address: string): Promise<string> {
    const harness = await RouterTestingHarness.create();
    await harness.navigateByUrl(address);
    return TestBed.inject(Router).url;
  }

  it('sends strangers to sign in, and remembers where they were going', async () => {
    answer(sessionOf());
    expect(await goTo('/boards?sort=name')).toBe('/sign-in?back=%2Fboards%3Fsort%3Dname');
  });

  it('lets in who is signed in', async () => {
    answer(sessionOf('librarian'));
    expect(await goTo('/boards')).toBe('/boards');
  });

  it('sends who is signed in from the sign-in page to the boards', async () => {
    answer(sessionOf('librarian'));
    expect(await goTo('/sign-in')).toBe('/boards');
  });

  it('shows the people page to administrators only', async () => {
    answer(sessionOf('librarian'));
    await goTo('/people');
    expect(TestBed.inject(Router).url).not.toBe('/people');
  });

  it('allows what the roles held allow', () => {
    answer(sessionOf('project-manager'));
    const session = TestBed.inject(SessionStore);
    expect(session.may('boards.create')).toBe(true);
    expect(session.may('channel.create')).toBe(false);
  });

  it('forgets unsaved drafts at sign-out, and nothing else', () => {
    answer(sessionOf('librarian'));
    localStorage.setItem(`${draftPrefix}1`, 'draft');
    localStorage.setItem('tollgate.theme', 'dark');
    TestBed.inject(SessionStore).signOut().subscribe();
    http.expectOne({ method: 'DELETE', url: '/api/session' }).flush(null);
    expect(localStorage.getItem(`${draftPrefix}1`)).toBeNull();
    expect(localStorage.getItem('tollgate.theme')).toBe('dark');
  });

  it('asks to sign in again when it has ended, and comes back to the same place', async () => {
    answer(sessionOf('librarian'));
    await goTo('/boards');
    TestBed.inject(ApiClient)
      .get('/boards')
      .subscribe({ error: () => undefined });
    const problem = { id: 'unauthenticated', title: 'Sign in', status: 401, detail: '' };
    http.expectOne('/api/boards').flush(problem, { status: 401, statusText: 'Who' });
    answer(sessionOf());
    await new Promise((resolve) => setTimeout(resolve));
    expect(TestBed.inject(Router).url).toBe('/sign-in?back=%2Fboards&ended=1');
  });
});
