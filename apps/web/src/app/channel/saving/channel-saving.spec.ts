import { provideHttpClient, withInterceptors } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { parseChannelFile, type Channel } from '@tollgate/contracts';
import { problemInterceptor } from '../../api/problem-interceptor';
import { ChannelStore } from '../document/channel-store';
import { withElementValue } from '../document/element-edits';
import { ChannelSaving } from './channel-saving';
import { Drafts } from './drafts';

function stored(version: number, lengthM = 0.02): Channel {
  const parsed = parseChannelFile({
    format: 'tollgate.channel/1',
    name: 'Lane 0',
    signaling: 'single-ended',
    elements: [{ kind: 'line', id: 'L1', z0Ohm: 50, lengthM, effectivePermittivity: 3.6 }],
  });
  if (!parsed.ok) throw new Error(parsed.problems[0]?.message);
  const can = { change: true, uploadFiles: true };
  const rest = { id: 'c1', version, can, checkProblems: [], check: null, changedBy: 'Rui', changedAt: '' };
  return { ...rest, document: parsed.channel } as unknown as Channel;
}

function open() {
  localStorage.clear();
  TestBed.configureTestingModule({
    providers: [
      provideRouter([]),
      provideHttpClient(withInterceptors([problemInterceptor])),
      provideHttpClientTesting(),
      ChannelStore,
      ChannelSaving,
    ],
  });
  const store = TestBed.inject(ChannelStore);
  const saving = TestBed.inject(ChannelSaving);
  const http = TestBed.inject(HttpTestingController);
  store.open(stored(3));
  TestBed.tick();
  const edit = (name: string, value: number) => {
    store.edit((document) => withElementValue(document, 'L1', [name], value));
    TestBed.tick();
  };
  const put = () => {
    saving.save();
    return http.expectOne({ method: 'PUT', url: '/api/channels/c1' });
  };
  const element = () => store.document()!.elements[0]!;
  return { store, saving, http, edit, put, element, draft: () => TestBed.inject(Drafts).find('c1') };
}

describe('saving a channel', () => {
  it('sends an edit over the version it was made from, and is saved once that is acknowledged', () => {
    const { saving, edit, put, draft } = open();
    edit('lengthM', 0.03);
    expect(saving.state()).toBe('changed');
    expect(draft()?.version).toBe(3);
    const request = put();
    expect(request.request.headers.get('If-Match')).toBe('"3"');
    expect(request.request.body).toMatchObject({ why: 'edit', document: { elements: [{ lengthM: 0.03 }] } });
    expect(saving.state()).toBe('saving');
    request.flush(stored(4, 0.03));
    expect([saving.state(), saving.dirty(), draft()]).toEqual(['saved', false, undefined]);
  });

  it('sends what was typed meanwhile as soon as the answer is there', () => {
    const { edit, put, http } = open();
    edit('lengthM', 0.03);
    const first = put();
    edit('lengthM', 0.04);
    first.flush(stored(4, 0.03));
    const second = http.expectOne({ method: 'PUT', url: '/api/channels/c1' });
    expect(second.request.headers.get('If-Match')).toBe('"4"');
  });

  it('joins its edit with that of another person, and saves what came of it', () => {
    const { edit, put, http, element } = open();
    edit('z0Ohm', 47);
    const current = stored(9, 0.05);
    put().flush(
      {
        type: '',
        id: 'changed',
        title: 'Changed',
        status: 412,
        detail: '',
        instance: '',
        fields: [],
        current,
      },
      { status: 412, statusText: 'Precondition Failed' },
    );
    expect(element()).toMatchObject({ z0Ohm: 47, lengthM: 0.05 });
    const again = http.expectOne({ method: 'PUT', url: '/api/channels/c1' });
    expect(again.request.headers.get('If-Match')).toBe('"9"');
    expect(again.request.body).toMatchObject({ why: 'merge' });
  });

  it('keeps a draft while the server is away', () => {
    const { saving, edit, put, draft } = open();
    edit('lengthM', 0.03);
    put().error(new ProgressEvent('error'));
    expect(saving.state()).toBe('away');
    expect(draft()?.document.elements[0]).toMatchObject({ lengthM: 0.03 });
  });

  it('says what the server refuses, and where', () => {
    const { saving, store, edit, put } = open();
    edit('lengthM', -1);
    const fields = [{ path: 'document.elements[0].lengthM', message: 'Length must be at least 0.' }];
    put().flush(
      { type: '', id: 'wrong', title: 'Wrong', status: 422, detail: '', instance: '', fields },
      { status: 422, statusText: 'Unprocessable Content' },
    );
    expect(saving.state()).toBe('refused');
    expect(store.problemAt('elements[0].lengthM')).toBe('Length must be at least 0.');
  });

  it('shows what another person saved where nothing is unsaved, and never an older version', () => {
    const { saving, element } = open();
    saving.takeIn(stored(4, 0.06));
    expect(element()).toMatchObject({ lengthM: 0.06 });
    saving.takeIn(stored(4, 0.07));
    expect(element()).toMatchObject({ lengthM: 0.06 });
  });

  it('brings a draft of an older version back by joining it', () => {
    const { saving, element } = open();
    const base = stored(1).document;
    const document = withElementValue(base, 'L1', ['z0Ohm'], 44);
    saving.recover({ version: 1, base, document, at: '' });
    expect(element()).toMatchObject({ z0Ohm: 44 });
  });

  it('saves an undo as such', () => {
    const { store, edit, put } = open();
    edit('lengthM', 0.03);
    put().flush(stored(4, 0.03));
    store.undo();
    expect(put().request.body).toMatchObject({ why: 'undo', document: { elements: [{ lengthM: 0.02 }] } });
  });
});
