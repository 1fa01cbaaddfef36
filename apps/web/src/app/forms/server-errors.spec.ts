import { FormArray, FormControl, FormGroup } from '@angular/forms';
import { landOnFields, messageOf } from './server-errors';

function form() {
  return new FormGroup({
    name: new FormControl('Quay'),
    elements: new FormArray([new FormGroup({ lengthM: new FormControl('12 mm') })]),
  });
}

describe('problems a server names', () => {
  it('land on the control of their path, through lists too', () => {
    const group = form();
    const left = landOnFields(group, [{ path: 'elements[0].lengthM', message: 'Too long.' }]);
    expect(left).toEqual([]);
    expect(messageOf(group.get(['elements', 0, 'lengthM'])!)).toBe('Too long.');
    expect(group.get(['elements', 0, 'lengthM'])!.touched).toBe(true);
  });

  it('say how to mend what is wrong', () => {
    const group = form();
    landOnFields(group, [{ path: 'name', message: 'Taken.', mend: 'Choose another.' }]);
    expect(messageOf(group.controls.name)).toBe('Taken. Choose another.');
  });

  it('are given back where the form has no such control', () => {
    const problem = { path: 'grid.points', message: 'Too many.' };
    const whole = { path: '', message: 'Nothing was changed.' };
    expect(landOnFields(form(), [problem, whole])).toEqual([problem, whole]);
  });

  it('go when the value changes', () => {
    const group = form();
    landOnFields(group, [{ path: 'name', message: 'Taken.' }]);
    group.controls.name.setValue('Mole');
    expect(group.valid).toBe(true);
  });
});
