import { provideHttpClient, withInterceptors } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { parseChannelFile, type Channel, type CheckView } from '@tollgate/contracts';
import { problemInterceptor } from '../../api/problem-interceptor';
import { ChannelStore } from './channel-store';
import { CheckRunner } from './check-runner';
import { withElementValue } from './element-edits';

const view = { fingerprint: 'one' } as CheckView;
const settled = () => new Promise((done) => setTimeout(done, 60));

async function open() {
  const parsed = parseChannelFile({
    format: 'tollgate.channel/1',
    name: 'Lane 0',
    signaling: 'single-ended',
    elements: [{ kind: 'line', id: 'L1', z0Ohm: 50, lengthM: 0.02, effectivePermittivity: 3.6 }],
  });
  if (!parsed.ok) throw new Error(parsed.problems[0]?.message);
  TestBed.configureTestingModule({
    providers: [
      provideHttpClient(withInterceptors([problemInterceptor])),
      provideHttpClientTesting(),
      ChannelStore,
      CheckRunner,
    ],
  });
  const store = TestBed.inject(ChannelStore);
  const runner = TestBed.inject(CheckRunner);
  const can = { change: true, uploadFiles: true };
  const rest = { id: 'c1', version: 1, can, checkProblems: [], check: view };
  const channel = { ...rest, document: parsed.channel } as unknown as Channel;
  runner.show(channel);
  store.open(channel);
  TestBed.tick();
  await settled();
  const edit = async (lengthM: number) => {
    store.edit((document) => withElementValue(document, 'L1', ['lengthM'], lengthM));
    TestBed.tick();
    await settled();
  };
  return { store, runner, edit, http: TestBed.inject(HttpTestingController) };
}

const checks = { method: 'POST', url: '/api/channels/c1/check' };

describe('checking while a person edits', () => {
  it('shows the check that came with the channel and asks for none', async () => {
    const { runner, http } = await open();
    http.expectNone('/api/channels/c1/check');
    expect([runner.view(), runner.behind()]).toEqual([view, false]);
  });

  it('checks an edit, keeping the last view until the new one is there', async () => {
    const { runner, edit, http } = await open();
    await edit(0.03);
    expect([runner.view(), runner.behind()]).toEqual([view, true]);
    const next = { fingerprint: 'two' } as CheckView;
    http.expectOne(checks).flush(next);
    expect([runner.view(), runner.behind()]).toEqual([next, false]);
  });

  it('cancels a check that a newer edit has overtaken', async () => {
    const { edit, http } = await open();
    await edit(0.03);
    const first = http.expectOne(checks);
    await edit(0.04);
    expect(first.cancelled).toBe(true);
    expect(http.expectOne(checks).request.body).toMatchObject({
      document: { elements: [{ lengthM: 0.04 }] },
    });
  });

  it('puts what the engine refuses at its place, and takes it away once mended', async () => {
    const { runner, store, edit, http } = await open();
    await edit(0);
    const fields = [{ path: 'document.elements[0].lengthM', message: 'A line has a length.' }];
    http
      .expectOne(checks)
      .flush(
        { type: '', id: 'wrong', title: 'Wrong', status: 422, detail: '', instance: '', fields },
        { status: 422, statusText: 'Unprocessable Content' },
      );
    expect(store.problemAt('elements[0].lengthM')).toBe('A line has a length.');
    expect(runner.failure()).toBe('This document cannot be checked: A line has a length.');
    await edit(0.01);
    http.expectOne(checks).flush({ fingerprint: 'three' });
    expect([store.problems(), runner.failure()]).toEqual([[], '']);
  });
});
