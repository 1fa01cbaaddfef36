import { provideHttpClient, withInterceptors } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import type { Role, Session } from '@tollgate/contracts';
import { ApiClient } from '../api/api-client';
import { problemInterceptor } from '../api/problem-interceptor';
import { Shell } from './shell';
import { ShellHarness } from './shell.harness';

async function show(roles: Role[], demonstration = false) {
  TestBed.configureTestingModule({
    providers: [
      provideHttpClient(withInterceptors([problemInterceptor])),
      provideHttpClientTesting(),
      provideRouter([]),
    ],
  });
  const fixture = TestBed.createComponent(Shell);
  const person = roles.length ? { id: 'n', name: 'Noor', email: 'noor@example.com', roles } : null;
  const can = { createBoards: false, managePeople: false };
  const session: Session = { csrfToken: 't', person, demonstration, unclaimed: false, can };
  const http = TestBed.inject(HttpTestingController);
  http.expectOne('/api/session').flush(session);
  document.body.append(fixture.nativeElement as HTMLElement);
  return { shell: await TestbedHarnessEnvironment.harnessForFixture(fixture, ShellHarness), http };
}

describe('the frame', () => {
  it('shows strangers no place to go to', async () => {
    expect(await (await show([])).shell.places()).toEqual([]);
  });

  it('shows people to administrators only', async () => {
    expect(await (await show(['layout-engineer'])).shell.places()).toEqual(['Boards']);
    TestBed.resetTestingModule();
    expect(await (await show(['administrator'])).shell.places()).toEqual(['Boards', 'People']);
  });

  it('says demonstration where it is one, and shows its mail', async () => {
    const { shell } = await show(['librarian'], true);
    expect(await shell.isDemonstration()).toBe(true);
    expect(await shell.places()).toEqual(['Boards', 'Mail']);
  });

  it('says that the server is away', async () => {
    const { shell, http } = await show(['librarian']);
    expect(await shell.saysServerIsAway()).toBe(false);
    const reading = TestBed.inject(ApiClient).get('/boards').subscribe();
    http.expectOne('/api/boards').flush('', { status: 503, statusText: 'Away' });
    expect(await shell.saysServerIsAway()).toBe(true);
    reading.unsubscribe();
  });

  it('lets the keyboard skip to the content', async () => {
    expect(await (await show(['librarian'])).shell.skip()).toBe(true);
  });
});
