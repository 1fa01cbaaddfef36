import { provideHttpClient, withInterceptors } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { TestBed } from '@angular/core/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MATERIAL_ANIMATIONS } from '@angular/material/core';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import { problemInterceptor } from '../api/problem-interceptor';
import { TextFieldHarness } from '../forms/text-field.harness';
import { BoardDialog, type BoardDialogData } from './board-dialog';

const quay = { id: 'b1', name: 'Quay', description: 'Line card' };

async function open(data: BoardDialogData) {
  const closedWith: unknown[] = [];
  TestBed.configureTestingModule({
    providers: [
      provideHttpClient(withInterceptors([problemInterceptor])),
      provideHttpClientTesting(),
      { provide: MATERIAL_ANIMATIONS, useValue: { animationsDisabled: true } },
      { provide: MAT_DIALOG_DATA, useValue: data },
      { provide: MatDialogRef, useValue: { close: (result: unknown) => closedWith.push(result) } },
    ],
  });
  const fixture = TestBed.createComponent(BoardDialog);
  const loader = TestbedHarnessEnvironment.loader(fixture);
  const [name, description] = await loader.getAllHarnesses(TextFieldHarness);
  const press = async (text: string) => (await loader.getHarness(MatButtonHarness.with({ text }))).click();
  const text = async () => {
    await fixture.whenStable();
    return (fixture.nativeElement as HTMLElement).textContent;
  };
  return {
    name: name!,
    description: description!,
    press,
    text,
    closedWith,
    http: TestBed.inject(HttpTestingController),
  };
}

describe('the dialog of a board', () => {
  it('sends nothing while a field is wrong, and says so at the field', async () => {
    const { name, press, http } = await open({});
    await press('Create the board');
    expect(await name.errors()).toEqual(['Name must not be empty.']);
    http.expectNone('/api/boards');
  });

  it('creates a board and closes with what was stored', async () => {
    const { name, press, http, closedWith } = await open({});
    await name.type(' Quay ');
    await press('Create the board');
    const request = http.expectOne({ method: 'POST', url: '/api/boards' });
    expect(request.request.body).toEqual({ name: 'Quay', description: '' });
    expect(closedWith).toEqual([]);
    request.flush(quay);
    expect(closedWith).toEqual([quay]);
  });

  it('opens with what is stored, and changes that', async () => {
    const { name, description, press, http } = await open({ board: quay });
    expect([await name.value(), await description.value()]).toEqual(['Quay', 'Line card']);
    await name.type('Mole');
    await press('Save');
    const request = http.expectOne({ method: 'PATCH', url: '/api/boards/b1' });
    expect(request.request.body).toEqual({ name: 'Mole', description: 'Line card' });
  });

  it('lands the server’s errors on their fields, and keeps the draft', async () => {
    const { name, press, http, closedWith } = await open({});
    await name.type('Quay');
    await press('Create the board');
    const fields = [{ path: 'name', message: 'A board of this name is there already.' }];
    const problem = {
      type: 'x',
      id: 'conflict',
      title: 'Conflict',
      status: 409,
      detail: '',
      instance: '',
      fields,
    };
    http.expectOne('/api/boards').flush(problem, { status: 409, statusText: 'Conflict' });
    expect(await name.errors()).toEqual(['A board of this name is there already.']);
    expect(await name.value()).toBe('Quay');
    expect(closedWith).toEqual([]);
  });

  it('says above its buttons that the server is away, and can be sent again', async () => {
    const { name, press, text, http } = await open({});
    await name.type('Quay');
    await press('Create the board');
    http.expectOne('/api/boards').error(new ProgressEvent('error'));
    expect(await text()).toContain('Nothing was saved');
    await press('Create the board');
    http.expectOne('/api/boards').flush(quay);
  });
});
