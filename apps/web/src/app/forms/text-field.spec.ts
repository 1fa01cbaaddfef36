import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { TestBed } from '@angular/core/testing';
import type { FormControl } from '@angular/forms';
import { api } from '@tollgate/contracts';
import { formOf } from './schema-validators';
import { landOnFields } from './server-errors';
import { TextField } from './text-field';
import { TextFieldHarness } from './text-field.harness';

async function show(control: FormControl<string>): Promise<TextFieldHarness> {
  const fixture = TestBed.createComponent(TextField);
  fixture.componentRef.setInput('label', 'Name');
  fixture.componentRef.setInput('control', control);
  return TestbedHarnessEnvironment.harnessForFixture(fixture, TextFieldHarness);
}

describe('a text field', () => {
  const form = () => formOf(api.boardCreate, { name: '', description: '' });

  it('keeps quiet until it has been left', async () => {
    const field = await show(form().controls.name);
    expect(await field.errors()).toEqual([]);
    await field.leave();
    expect(await field.errors()).toEqual(['Name must not be empty.']);
  });

  it('ties its error to the input', async () => {
    const field = await show(form().controls.name);
    await field.leave();
    expect(await field.isDescribedByItsError()).toBe(true);
  });

  it('shows what the server says of it until it is typed in again', async () => {
    const group = form();
    const field = await show(group.controls.name);
    await field.type('Quay');
    landOnFields(group, [{ path: 'name', message: 'A board of this name is there already.' }]);
    expect(await field.errors()).toEqual(['A board of this name is there already.']);
    await field.type('Mole');
    expect(await field.errors()).toEqual([]);
  });
});
