import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { MATERIAL_ANIMATIONS } from '@angular/material/core';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatDialogHarness } from '@angular/material/dialog/testing';
import { provideRouter, Router } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { Subject } from 'rxjs';
import { ApiProblem } from '../api/api-problem';
import { Confirmation, type ConfirmationData } from './confirmation';
import { Dialogs } from './dialogs';
import { routedDialogs } from './routed-dialogs';

let reply: Subject<unknown>;

@Component({ selector: 'tg-host', template: '', changeDetection: ChangeDetectionStrategy.OnPush })
class Host {
  constructor() {
    const dialogs = inject(Dialogs);
    const router = inject(Router);
    const ask = (of: string) =>
      dialogs.open<Confirmation, ConfirmationData, boolean>(Confirmation, {
        heading: `Archive ${of}?`,
        text: 'Nothing is lost.',
        action: 'Archive',
        run: () => reply,
      });
    routedDialogs({
      archive: ask,
      lead: (of) => {
        const ref = ask(of);
        ref.afterClosed().subscribe(() => void router.navigateByUrl(`/${of}`));
        return ref;
      },
    });
  }
}

async function open(address: string) {
  TestBed.configureTestingModule({
    providers: [
      provideRouter([{ path: '**', component: Host }]),
      { provide: MATERIAL_ANIMATIONS, useValue: { animationsDisabled: true } },
    ],
  });
  const harness = await RouterTestingHarness.create();
  await harness.navigateByUrl(address);
  const loader = TestbedHarnessEnvironment.documentRootLoader(harness.fixture);
  const shown = async () => {
    await harness.fixture.whenStable();
    return loader.getAllHarnesses(MatDialogHarness);
  };
  const press = async (text: string) => (await loader.getHarness(MatButtonHarness.with({ text }))).click();
  return { shown, press, router: TestBed.inject(Router), harness };
}

describe('a dialog with an address', () => {
  beforeEach(() => (reply = new Subject()));

  it('opens from its address, with what it is about', async () => {
    const { shown } = await open('/?dialog=archive:Quay');
    const [dialog] = await shown();
    expect(await dialog!.getText()).toContain('Archive Quay?');
  });

  it('stays shut where the address names none that is known', async () => {
    const { shown } = await open('/?dialog=elsewhere');
    expect(await shown()).toHaveLength(0);
  });

  it('takes its address away when it is cancelled, and leaves the rest', async () => {
    const { shown, press, router } = await open('/?sort=name&dialog=archive:Quay');
    await press('Cancel');
    expect(await shown()).toHaveLength(0);
    expect(router.url).toBe('/?sort=name');
  });

  it('closes when the address goes', async () => {
    const { shown, harness } = await open('/?dialog=archive:Quay');
    await harness.navigateByUrl('/');
    expect(await shown()).toHaveLength(0);
  });

  it('waits for the answer, and closes on success only', async () => {
    const { shown, press } = await open('/?dialog=archive:Quay');
    await press('Archive');
    expect(await shown()).toHaveLength(1);
    reply.next({});
    expect(await shown()).toHaveLength(0);
  });

  it('does not cut short where its result leads', async () => {
    const { shown, press, router, harness } = await open('/?dialog=lead:elsewhere');
    await press('Archive');
    reply.next({});
    await shown();
    await harness.fixture.whenStable();
    expect(router.url).toBe('/elsewhere');
  });

  it('stays open and says why when the server refuses', async () => {
    const { shown, press } = await open('/?dialog=archive:Quay');
    await press('Archive');
    const problem = {
      type: 'x',
      id: 'conflict',
      title: 'Not now',
      status: 409,
      detail: 'It is in use.',
      instance: '',
    };
    reply.error(new ApiProblem({ ...problem, fields: [] }));
    const [dialog] = await shown();
    expect(await dialog!.getText()).toContain('It is in use.');
  });

  it('closes by Escape', async () => {
    const { shown, router } = await open('/?dialog=archive:Quay');
    const [dialog] = await shown();
    await dialog!.close();
    expect(await shown()).toHaveLength(0);
    expect(router.url).toBe('/');
  });
});
