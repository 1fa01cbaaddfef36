import { provideHttpClient, withInterceptors } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { TestBed } from '@angular/core/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MATERIAL_ANIMATIONS } from '@angular/material/core';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import type { Person } from '@tollgate/contracts';
import { problemInterceptor } from '../api/problem-interceptor';
import { TextFieldHarness } from '../forms/text-field.harness';
import { PersonDialog, type PersonDialogData } from './person-dialog';
import { RolesFieldHarness } from './roles-field.harness';

const noor: Person = {
  id: 'n',
  name: 'Noor',
  email: 'noor@example.com',
  roles: ['librarian'],
  active: true,
  invited: false,
  lastSignInAt: null,
  createdAt: '2026-05-31T12:00:00.000Z',
};

async function open(data: PersonDialogData) {
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
  const loader = TestbedHarnessEnvironment.loader(TestBed.createComponent(PersonDialog));
  return {
    fields: await loader.getAllHarnesses(TextFieldHarness),
    roles: await loader.getHarness(RolesFieldHarness),
    press: async (text: string) => (await loader.getHarness(MatButtonHarness.with({ text }))).click(),
    http: TestBed.inject(HttpTestingController),
    closedWith,
  };
}

describe('the dialog of a person', () => {
  it('asks for at least one role, at the roles', async () => {
    const { fields, roles, press, http } = await open({});
    await fields[0]!.type('Tamsin');
    await fields[1]!.type('tamsin@example.com');
    expect(await roles.error()).toBe('');
    await press('Send the invitation');
    expect(await roles.error()).toBe('Choose at least one role.');
    http.expectNone('/api/people');
  });

  it('invites with the roles chosen', async () => {
    const { fields, roles, press, http } = await open({});
    await fields[0]!.type('Tamsin');
    await fields[1]!.type('tamsin@example.com');
    await roles.toggle('SI reviewer');
    await press('Send the invitation');
    const request = http.expectOne({ method: 'POST', url: '/api/people' });
    expect(request.request.body).toEqual({
      name: 'Tamsin',
      email: 'tamsin@example.com',
      roles: ['si-reviewer'],
    });
  });

  it('changes name and roles of who is there, never the address', async () => {
    const { fields, roles, press, http, closedWith } = await open({ person: noor });
    expect(fields).toHaveLength(1);
    expect(await roles.held()).toEqual(['Librarian']);
    await roles.toggle('Librarian');
    await roles.toggle('Administrator');
    await press('Save');
    const request = http.expectOne({ method: 'PATCH', url: '/api/people/n' });
    expect(request.request.body).toEqual({ name: 'Noor', roles: ['administrator'] });
    request.flush({ ...noor, roles: ['administrator'] });
    expect(closedWith).toHaveLength(1);
  });

  it('shows at the roles why the server keeps the last administrator', async () => {
    const { roles, press, http, closedWith } = await open({ person: { ...noor, roles: ['administrator'] } });
    await roles.toggle('Librarian');
    await roles.toggle('Administrator');
    await press('Save');
    const fields = [{ path: 'roles', message: 'The last administrator stays.' }];
    const problem = {
      type: 'x',
      id: 'conflict',
      title: 'Conflict',
      status: 409,
      detail: '',
      instance: '',
      fields,
    };
    http.expectOne('/api/people/n').flush(problem, { status: 409, statusText: 'Conflict' });
    expect(await roles.error()).toBe('The last administrator stays.');
    expect(closedWith).toEqual([]);
  });
});
